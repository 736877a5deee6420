import { randomUUID } from 'node:crypto';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { postSigned } from '../support/stand-in-server.ts';
import { runBot, signingSecret } from '../support/running-bot.ts';
import type { RunningBot } from '../support/running-bot.ts';

const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';
const helmets = 'cases: no helmet 44, helmet 31; coverage: no helmet 38%';

describe.each(['socket', 'http'] as const)('the bot over %s', (transport) => {
  let running: RunningBot;
  const messages = () => running.slack.store.messages;
  const posts = () => messages().filter(({ onlyFor }) => onlyFor === null);
  const slips = () => messages().filter(({ onlyFor }) => onlyFor !== null);

  beforeEach(async () => {
    running = await runBot(transport);
  });
  afterEach(() => running.close());

  it('answers a command with one root message that quotes the figure and one reply in its thread', async () => {
    await running.command(helmets);
    const [root, reply, ...more] = posts();
    expect(more).toEqual([]);
    expect(slips()).toEqual([]);
    expect(root?.threadTs).toBeNull();
    expect(root?.text).toContain(helmets);
    expect(root?.text).toContain('2.3 times as many cases');
    expect(reply?.threadTs).toBe(root?.ts);
    expect(reply?.text).toContain('95% interval 1.5 to 3.7');
    expect(reply?.text).toContain('59% is a share of the cases, not a risk');
  });

  it('answers the same command once when it is delivered twice', async () => {
    const fields = await running.command(shifts);
    await running.again(fields);
    await running.again(fields);
    expect(posts()).toHaveLength(2);
    expect(running.slack.callsOf('chat.postMessage')).toHaveLength(2);
  });

  it('numbers the checks of each channel in a series of its own', async () => {
    await running.command(shifts);
    await running.command(helmets);
    await running.command(shifts, { channel_id: 'C2' });
    const numbers = posts().flatMap(({ text, threadTs, channel }) =>
      threadTs === null ? [`${channel} ${/Check (\d+)/.exec(text)?.[1] ?? ''}`] : [],
    );
    expect(numbers).toEqual(['C1 1', 'C1 2', 'C2 1']);
  });

  it.each([
    ['18 of 12', 'more cases than people'],
    ['1.204 of 5,000', 'decimal'],
    ['cases: a 10, b 5', 'coverage'],
    ['', 'Three lines to try'],
    ['x'.repeat(4_001), 'longer than 2,400'],
    ['\u0000\u0001\ufffd%$#@&*', 'no figure'],
  ])('tells the author alone that %j cannot be read, and posts nothing', async (line, said) => {
    await running.command(line);
    expect(posts()).toEqual([]);
    expect(slips()).toHaveLength(1);
    expect(slips()[0]?.onlyFor).toBe('U1');
    expect(slips()[0]?.text).toContain(said);
  });

  it('shows help to the asker alone', async () => {
    await running.command('help shares');
    expect(posts()).toEqual([]);
    expect(slips()[0]?.text).toContain('share of everybody');
  });

  it('answers "only me" to the asker alone, without a number, and its buttons still work', async () => {
    await running.command(`${shifts}; only me`);
    expect(posts()).toEqual([]);
    const [slip] = slips();
    expect(slip?.text).toContain('3.9 times as often');
    expect(slip?.text).not.toMatch(/Check \d/);
    if (slip === undefined) throw new Error('no private answer');
    await running.press(slip, 'show_working', 'U1');
    expect(slips()).toHaveLength(2);
    expect(slips()[1]?.text).toContain('3.9485 (1.8145 to 8.5923)');
  });

  it('answers a mention in the thread where it was called, and an edit of it not again', async () => {
    await running.mention(shifts, { ts: '1700000001.000100', thread_ts: '1700000000.000900' });
    await running.mention(shifts, { ts: '1700000001.000100', thread_ts: '1700000000.000900' });
    expect(posts()).toHaveLength(1);
    expect(posts()[0]?.threadTs).toBe('1700000000.000900');
    expect(posts()[0]?.text).toContain('3.9 times as often');
  });

  it('answers a mention outside a thread in the thread of that message, and a bad one to its author alone', async () => {
    await running.mention('18 of', { ts: '1700000002.000100' });
    expect(posts()).toEqual([]);
    expect(slips()[0]).toMatchObject({ onlyFor: 'U1', threadTs: '1700000002.000100' });
    expect(slips()[0]?.text).toContain('total after');
  });

  it('does not answer another bot', async () => {
    await running.mention(shifts, { ts: '1700000003.000100', bot_id: 'B9' });
    expect(messages()).toEqual([]);
  });

  it('shows what is behind a button to the person who pressed, in the thread', async () => {
    await running.command(shifts);
    const [root, reply] = posts();
    if (root === undefined || reply === undefined) throw new Error('no answer');
    for (const part of ['readings', 'working', 'questions', 'avoid', 'other'])
      await running.press(reply, `show_${part}`);
    expect(posts()).toHaveLength(2);
    expect(slips()).toHaveLength(5);
    expect(slips().every(({ onlyFor, threadTs }) => onlyFor === 'U2' && threadTs === root.ts)).toBe(true);
    expect(slips()[0]?.text).toContain('Odds ratio');
    expect(slips()[1]?.text).toContain('0.0111639 (0.0048686 to 0.0199591)');
  });

  it('asks when a line has two readings, and answers the one that is picked, once', async () => {
    await running.command('71% of the injured vs 38% of riders');
    expect(posts()).toEqual([]);
    const [ask] = slips();
    if (ask === undefined) throw new Error('nothing was asked');
    expect(ask.text).not.toContain('1.87');
    expect(ask.text).not.toContain('1.9 times');
    await running.press(ask, 'ask_0', 'U1');
    expect(posts()).toHaveLength(2);
    expect(posts()[1]?.text).toContain('4 times as many');
    // The private question is replaced, so a second press can only come from an old screen.
    await running.press(ask, 'ask_0', 'U1');
    expect(posts()).toHaveLength(2);
  });

  it('posts once when the answer to a post is lost', async () => {
    running.slack.fault('chat.postMessage', { kind: 'lose-answer' });
    await running.command(shifts);
    expect(posts()).toHaveLength(2);
    expect(running.slack.callsOf('chat.postMessage')).toHaveLength(2);
    expect(running.slack.callsOf('conversations.history').length).toBeGreaterThan(0);
  });

  it('posts once when the answer is lost and 250 other messages follow before it looks', async () => {
    const stop = running.slack.store.onChange(() => {
      stop();
      for (let other = 0; other < 250; other += 1) {
        running.slack.store.add({
          channel: 'C1',
          threadTs: null,
          user: 'U3',
          text: 'chatter',
          blocks: [],
          metadata: null,
          onlyFor: null,
        });
      }
    });
    running.slack.fault('chat.postMessage', { kind: 'lose-answer' });
    await running.command(shifts);
    expect(posts().filter(({ user }) => user !== 'U3')).toHaveLength(2);
  });

  it('goes on, and posts once, when writing a sent message down fails', async () => {
    const markSent = running.ledger.markSent.bind(running.ledger);
    let failures = 0;
    running.ledger.markSent = (id, ts) => {
      failures += 1;
      return failures === 1 ? Promise.reject(new Error('disk full')) : markSent(id, ts);
    };
    await running.command(shifts);
    expect(failures).toBeGreaterThan(1);
    expect(posts()).toHaveLength(2);
  });

  it('posts once when Slack answers 500 without having taken the post', async () => {
    running.slack.fault('chat.postMessage', { kind: 'status', status: 500 });
    await running.command(shifts);
    expect(posts()).toHaveLength(2);
  });

  it('waits as long as it is asked to when it was too quick', async () => {
    const start = Date.now();
    running.slack.fault('chat.postMessage', { kind: 'rate-limit', seconds: 1 });
    await running.command(shifts);
    expect(Date.now() - start).toBeGreaterThanOrEqual(990);
    expect(posts()).toHaveLength(2);
  });

  it('does not post again where it may not look, and tells the asker', async () => {
    running.slack.fault('chat.postMessage', { kind: 'status', status: 503 });
    running.slack.fault('conversations.history', { kind: 'refuse', code: 'missing_scope' });
    await running.command(shifts);
    expect(posts()).toEqual([]);
    expect(slips()[0]?.text).toContain('could not be posted');
  });

  it('answers the asker alone where it is no member of the conversation', async () => {
    await running.command(shifts, { channel_id: 'C9' });
    expect(posts()).toEqual([]);
    const said = slips()
      .map(({ text }) => text)
      .join('\n');
    expect(said).toContain('not in this conversation');
    expect(said).toContain('3.9 times as often');
  });

  it('says everything with links folded, names unlinked, an operation id, and nothing active from what was typed', async () => {
    await running.command('"&lt;b&gt; &amp; co": 18 of 1,204 vs "day": 9 of 2,377');
    const calls = running.slack.callsOf('chat.postMessage');
    expect(calls).toHaveLength(2);
    for (const { fields } of calls) {
      expect(fields).toMatchObject({
        unfurl_links: 'false',
        unfurl_media: 'false',
        parse: 'none',
        link_names: 'false',
      });
      const metadata = JSON.parse(fields['metadata'] ?? '{}') as {
        event_type: string;
        event_payload: Record<string, unknown>;
      };
      expect(Object.keys(metadata.event_payload).sort()).toEqual(['op', 'v']);
      expect(fields['text']?.replaceAll('<@U1>', '')).not.toMatch(/[<>]/);
      expect(fields['text']).toContain('&lt;b&gt; &amp; co');
    }
  });

  it('closes its books after an answer: one request answered, two messages sent', async () => {
    await running.command(shifts);
    expect(await running.ledger.counts()).toEqual({ requests_answered: 1, messages_sent: 2 });
  });
});

describe('signed requests', () => {
  let running: RunningBot;
  beforeEach(async () => {
    running = await runBot('http');
  });
  afterEach(() => running.close());

  it('are refused with a wrong signature or an old time stamp, and nothing is stored', async () => {
    const fields = running.slack.commandFields(shifts);
    expect(await postSigned(running.address, fields, 'another secret')).toBe(401);
    expect(
      await postSigned(running.address, fields, signingSecret, Math.floor(Date.now() / 1000) - 360),
    ).toBe(401);
    expect(await running.ledger.counts()).toEqual({});
  });

  it('that are replayed within five minutes are answered once', async () => {
    const fields = running.slack.commandFields(shifts, { trigger_id: randomUUID() });
    const at = Math.floor(Date.now() / 1000);
    expect(await postSigned(running.address, fields, signingSecret, at)).toBe(200);
    expect(await postSigned(running.address, fields, signingSecret, at)).toBe(200);
    await running.bot.idle();
    expect(running.slack.store.messages).toHaveLength(2);
  });
});

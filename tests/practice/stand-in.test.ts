import { webApi } from '@slack/bolt';
import { beforeEach, describe, expect, it } from 'vitest';
import { MessageStore } from '../../src/practice/message-store.ts';
import { createStandIn } from '../../src/practice/stand-in.ts';
import type { StandIn } from '../../src/practice/stand-in.ts';

// The error codes and limits are those of Slack's published reference of its methods and blocks, as written down in our notes on
// the platform; the calls are made by Slack's own client.
const origin = 'https://harrowmere.example';
let now: number;
let store: MessageStore;
let standIn: StandIn;
let client: webApi.WebClient;

beforeEach(() => {
  now = Date.UTC(2026, 11, 1);
  store = new MessageStore(() => now);
  standIn = createStandIn({ store, isMember: (channel) => channel === 'CFERRY', origin });
  client = new webApi.WebClient('xoxb-practice', {
    slackApiUrl: `${origin}/api/`,
    fetch: standIn.fetch,
    retryConfig: { retries: 0 },
    logLevel: webApi.LogLevel.ERROR,
  });
});

const post = (more: object = {}) =>
  client.chat.postMessage({ channel: 'CFERRY', text: 'The 7:40 was late.', ...more });
const paragraph = (text: string) => ({ type: 'section', text: { type: 'mrkdwn', text } });
const button = (id: string, text = 'Working') => ({
  type: 'button',
  action_id: id,
  text: { type: 'plain_text', text },
});

describe('posting', () => {
  it('keeps text, blocks, thread and metadata as they were sent, in the order of rising time stamps', async () => {
    const blocks = [{ type: 'section', block_id: 'a', text: { type: 'mrkdwn', text: '18 &lt; 20' } }];
    const metadata = { event_type: 'divisor_message', event_payload: { op: 'one', v: 1 } };
    const root = await post({ text: '18 &lt; 20 & "ä"', blocks, metadata });
    const reply = await post({ thread_ts: root.ts });
    expect(Number(reply.ts)).toBeGreaterThan(Number(root.ts));
    expect(store.messages).toEqual([
      {
        ts: root.ts,
        channel: 'CFERRY',
        threadTs: null,
        user: 'UDIVISOR',
        text: '18 &lt; 20 & "ä"',
        blocks,
        metadata,
        onlyFor: null,
      },
      {
        ts: reply.ts,
        channel: 'CFERRY',
        threadTs: root.ts,
        user: 'UDIVISOR',
        text: 'The 7:40 was late.',
        blocks: [],
        metadata: null,
        onlyFor: null,
      },
    ]);
  });

  it('takes JSON as well as a form, and says so where it is neither a JSON object nor a known method', async () => {
    const call = async (method: string, body: string) => {
      const answer = await standIn.fetch(`${origin}/api/${method}`, {
        method: 'POST',
        headers: { 'content-type': 'application/json; charset=utf-8' },
        body,
      });
      return (await answer.json()) as object;
    };
    expect(await call('chat.postMessage', '{"channel":"CFERRY","text":"late"}')).toMatchObject({ ok: true });
    expect(await call('chat.postMessage', '{"channel":')).toEqual({ ok: false, error: 'invalid_json' });
    expect(await call('chat.postMessage', '[1]')).toEqual({ ok: false, error: 'invalid_json' });
    expect(await call('chat.scream', '{}')).toEqual({ ok: false, error: 'unknown_method' });
    expect(store.messages.map(({ text }) => text)).toEqual(['late']);
  });

  it('reads a text that looks like JSON and is none as the text that it is', async () => {
    await post({ text: '[18 of 1,204' });
    expect(store.messages[0]?.text).toBe('[18 of 1,204');
  });

  it.each([
    ['no text and no blocks', { text: '' }, 'no_text'],
    ['4,001 characters', { text: 'x'.repeat(4_001) }, 'msg_too_long'],
    ['51 blocks', { blocks: Array.from({ length: 51 }, () => ({ type: 'divider' })) }, 'invalid_blocks'],
    ['a section of 3,001 characters', { blocks: [paragraph('x'.repeat(3_001))] }, 'invalid_blocks'],
    [
      'five sections of 3,000 characters',
      { blocks: Array(5).fill(paragraph('x'.repeat(3_000))) },
      'msg_blocks_too_long',
    ],
    ['an empty text in a block', { blocks: [paragraph('')] }, 'invalid_blocks'],
    ['a block of a type that there is not', { blocks: [{ type: 'poster' }] }, 'invalid_blocks'],
    ['a block id twice', { blocks: Array(2).fill({ type: 'divider', block_id: 'a' }) }, 'invalid_blocks'],
    [
      'an action id twice',
      { blocks: [{ type: 'actions', elements: [button('show'), button('show')] }] },
      'invalid_blocks',
    ],
    [
      '26 buttons in a row',
      {
        blocks: [
          { type: 'actions', elements: Array.from({ length: 26 }, (_, index) => button(`a${index}`)) },
        ],
      },
      'invalid_blocks',
    ],
    [
      'a button of 76 characters',
      { blocks: [{ type: 'actions', elements: [button('show', 'x'.repeat(76))] }] },
      'invalid_blocks',
    ],
    [
      'an empty cell in a table',
      { blocks: [{ type: 'table', rows: [[{ type: 'raw_text', text: '' }]] }] },
      'invalid_blocks',
    ],
    [
      'two tables',
      { blocks: Array(2).fill({ type: 'table', rows: [[{ type: 'raw_text', text: '18' }]] }) },
      'invalid_blocks',
    ],
    [
      '101 rows in a table',
      { blocks: [{ type: 'table', rows: Array(101).fill([{ type: 'raw_text', text: '18' }]) }] },
      'invalid_blocks',
    ],
    [
      'a header of 151 characters',
      { blocks: [{ type: 'header', text: { type: 'plain_text', text: 'x'.repeat(151) } }] },
      'invalid_blocks',
    ],
    [
      'a picture without words',
      { blocks: [{ type: 'image', image_url: 'https://harrowmere.example/a' }] },
      'invalid_blocks',
    ],
    [
      'metadata without a payload',
      { metadata: { event_type: 'divisor_message' } },
      'invalid_metadata_format',
    ],
    ['a channel without the bot', { channel: 'CMARKET' }, 'not_in_channel'],
  ])('refuses %s', async (_, more, code) => {
    await expect(post(more)).rejects.toMatchObject({ data: { error: code } });
    expect(store.messages).toEqual([]);
  });

  it('takes 50 blocks, 3,000 characters in a section and 4,000 in the text', async () => {
    await post({
      text: 'x'.repeat(4_000),
      blocks: [paragraph('x'.repeat(3_000)), ...Array.from({ length: 49 }, () => ({ type: 'divider' }))],
    });
    expect(store.messages).toHaveLength(1);
  });

  it('shows an ephemeral message to its one person, and to no look-up', async () => {
    await client.chat.postEphemeral({ channel: 'CFERRY', user: 'UADA', text: 'Out of how many?' });
    expect(store.messages[0]).toMatchObject({ onlyFor: 'UADA', text: 'Out of how many?' });
    const { messages } = await client.conversations.history({ channel: 'CFERRY' });
    expect(messages).toEqual([]);
  });
});

describe('updating', () => {
  it('changes the bot’s own message, takes old blocks away where none are given, and keeps its metadata', async () => {
    const metadata = { event_type: 'divisor_message', event_payload: { op: 'one' } };
    const { ts = '' } = await post({ blocks: [paragraph('late')], metadata });
    await client.chat.update({ channel: 'CFERRY', ts, text: 'The 7:40 was on time.' });
    expect(store.messages).toHaveLength(1);
    expect(store.messages[0]).toMatchObject({ ts, text: 'The 7:40 was on time.', blocks: [], metadata });
  });

  it('refuses other people’s messages, unknown ones, and those that only one person sees', async () => {
    const said = { channel: 'CFERRY', threadTs: null, text: 'late', blocks: [], metadata: null };
    const { ts: bens } = store.add({ ...said, user: 'UBEN', onlyFor: null });
    const { ts: alone } = store.add({ ...said, user: 'UDIVISOR', onlyFor: 'UADA' });
    const codeOf = (ts: string) =>
      client.chat.update({ channel: 'CFERRY', ts, text: 'early' }).then(
        () => 'taken',
        (fault: unknown) => (fault as { data: { error: string } }).data.error,
      );
    expect(await codeOf(bens)).toBe('cant_update_message');
    expect(await codeOf(alone)).toBe('message_not_found');
    expect(await codeOf('1.000000')).toBe('message_not_found');
    expect(store.messages.map(({ text }) => text)).toEqual(['late', 'late']);
  });
});

describe('looking up', () => {
  const metadata = { event_type: 'divisor_message', event_payload: { op: 'one' } };

  it('gives metadata only where it is asked for', async () => {
    await post({ metadata });
    const plain = await client.conversations.history({ channel: 'CFERRY' });
    const full = await client.conversations.history({ channel: 'CFERRY', include_all_metadata: true });
    expect(plain.messages?.[0]?.metadata).toBeUndefined();
    expect(full.messages?.[0]?.metadata).toEqual(metadata);
  });

  it('gives a channel’s history newest first and without replies, a thread oldest first and with its root', async () => {
    const { ts: first = '' } = await post({ text: 'first' });
    await post({ text: 'reply', thread_ts: first });
    await post({ text: 'second' });
    const history = await client.conversations.history({ channel: 'CFERRY' });
    expect(history.messages?.map(({ text }) => text)).toEqual(['second', 'first']);
    const thread = await client.conversations.replies({ channel: 'CFERRY', ts: first });
    expect(thread.messages?.map(({ text }) => text)).toEqual(['first', 'reply']);
    await expect(client.conversations.replies({ channel: 'CFERRY', ts: '1.000000' })).rejects.toMatchObject({
      data: { error: 'thread_not_found' },
    });
  });

  it('keeps to the times asked for, their ends left out unless they are wanted, and to the limit', async () => {
    const stamps: string[] = [];
    for (const text of ['a', 'b', 'c']) {
      now += 1_000;
      const { ts = '' } = await post({ text });
      stamps.push(ts);
    }
    const [, oldest = ''] = stamps;
    const texts = async (more: object) =>
      (await client.conversations.history({ channel: 'CFERRY', ...more })).messages?.map(({ text }) => text);
    expect(await texts({ oldest })).toEqual(['c']);
    expect(await texts({ oldest, inclusive: true })).toEqual(['c', 'b']);
    expect(await texts({ latest: oldest })).toEqual(['a']);
    const limited = await client.conversations.history({ channel: 'CFERRY', limit: 2 });
    expect(limited).toMatchObject({ has_more: true });
    expect(limited.messages).toHaveLength(2);
  });
});

describe('a response address', () => {
  const respond = (address: string, body: object | string) =>
    standIn.fetch(address, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: typeof body === 'string' ? body : JSON.stringify(body),
    });
  const place = { channel: 'CMARKET', user: 'UADA', messageTs: null };

  it('answers its person alone, also where the bot is no member, and everybody where that is asked for', async () => {
    const address = standIn.responseUrl(place);
    await respond(address, { text: 'Out of how many?', thread_ts: '1.000000' });
    await respond(address, { text: 'late', response_type: 'in_channel' });
    expect(store.messages.map(({ text, onlyFor, threadTs }) => [text, onlyFor, threadTs])).toEqual([
      ['Out of how many?', 'UADA', '1.000000'],
      ['late', null, null],
    ]);
  });

  it('replaces or deletes the message whose button was pressed', async () => {
    const { ts = '' } = await post({ blocks: [paragraph('late')] });
    const address = standIn.responseUrl({ channel: 'CFERRY', user: 'UADA', messageTs: ts });
    await respond(address, { replace_original: true, text: 'Asked.' });
    expect(store.messages).toHaveLength(1);
    expect(store.messages[0]).toMatchObject({ ts, text: 'Asked.', blocks: [] });
    await respond(address, { delete_original: true });
    expect(store.messages).toEqual([]);
  });

  it('serves five answers, and none after half an hour', async () => {
    const [busy, old] = [standIn.responseUrl(place), standIn.responseUrl(place)];
    const statuses: number[] = [];
    for (let use = 1; use <= 6; use += 1) statuses.push((await respond(busy, { text: `${use}` })).status);
    expect(statuses).toEqual([200, 200, 200, 200, 200, 404]);
    now += 30 * 60 * 1_000;
    expect((await respond(old, { text: 'late' })).status).toBe(404);
    expect(store.messages).toHaveLength(5);
  });

  it('refuses what no message can be, and addresses that were never given out', async () => {
    const address = standIn.responseUrl(place);
    expect((await respond(address, { text: '' })).status).toBe(400);
    expect((await respond(address, '{"text":')).status).toBe(400);
    expect((await respond(`${origin}/response/0`, { text: 'late' })).status).toBe(404);
    expect(store.messages).toEqual([]);
  });
});

describe('the message store', () => {
  it('tells its listeners of every change until they leave', async () => {
    let heard = 0;
    const leave = store.onChange(() => (heard += 1));
    const { ts = '' } = await post();
    store.replace(ts, (message) => ({ ...message, text: 'early' }));
    store.replace(ts, null);
    expect(store.replace(ts, null)).toBe(false);
    expect(heard).toBe(3);
    leave();
    await post();
    expect(heard).toBe(3);
  });

  it('keeps the newest thousand messages', () => {
    const said = {
      channel: 'CFERRY',
      threadTs: null,
      user: 'UADA',
      blocks: [],
      metadata: null,
      onlyFor: null,
    };
    for (let count = 1; count <= 1_001; count += 1) store.add({ ...said, text: `${count}` });
    expect(store.messages).toHaveLength(1_000);
    expect(store.messages[0]?.text).toBe('2');
    expect(store.messages.at(-1)?.text).toBe('1001');
  });
});

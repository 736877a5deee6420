import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { runBot } from '../support/running-bot.ts';
import type { RunningBot } from '../support/running-bot.ts';

const sentence = 'Most of the injured, 44 of 75, wore no helmet, though only 38% of riders go without';
const paragraph =
  '44 of the 75 injured cyclists in Harrowmere wore no helmet, while 38% of riders go without. Injuries rose from 61 to 75 over the year.';

describe('a plain sentence in Slack', () => {
  let running: RunningBot;
  const posts = () => running.slack.store.messages.filter(({ onlyFor }) => onlyFor === null);
  const slips = () => running.slack.store.messages.filter(({ onlyFor }) => onlyFor !== null);
  const slip = () => {
    const [first] = slips();
    if (first === undefined) throw new Error('nothing was asked');
    return first;
  };

  beforeEach(async () => {
    running = await runBot('socket');
  });
  afterEach(() => running.close());

  it('is offered to its author alone, and answered with one tap', async () => {
    await running.command(sentence);
    expect(posts()).toEqual([]);
    expect(slip().text).toContain('I found: 44 of 75 (injured), 38% (of riders). Missing: nothing.');
    expect(JSON.stringify(slip().blocks)).toContain('"Yes"');
    await running.press(slip(), 'ask_0', 'U1');
    expect(posts()).toHaveLength(2);
    expect(posts()[0]?.text).toContain('no helmet: 44 of 75 injured, 38% of riders');
    expect(posts()[1]?.text).toContain('2.3 times as many');
  });

  it('with several figures has a button for each', async () => {
    await running.command(paragraph);
    expect(JSON.stringify(slip().blocks)).toMatch(/"1: 44 of 75.*"2: from 61 to 75/);
    await running.press(slip(), 'ask_1', 'U1');
    expect(posts()[0]?.text).toContain('Injuries from 61 to 75');
  });

  it('behind a mention is offered in its thread', async () => {
    await running.mention(sentence, { ts: '1700000005.000100' });
    expect(posts()).toEqual([]);
    await running.press(slip(), 'ask_0', 'U1');
    expect(posts().every(({ threadTs }) => threadTs === '1700000005.000100')).toBe(true);
    expect(posts()).toHaveLength(1);
  });

  it('that lacks something has no button, but the line to complete', async () => {
    await running.command('Most of the injured (44 of 75) wore no helmet');
    expect(slip().text).toContain('no helmet: 44 of 75 injured, ...% of ...');
    expect(JSON.stringify(slip().blocks)).not.toContain('ask_0');
  });
});

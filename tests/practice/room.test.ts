import { randomUUID } from 'node:crypto';
import { App } from '@slack/bolt';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Ledger } from '../../src/answer/ports.ts';
import { openSqliteLedger } from '../../src/ledger/sqlite-ledger.ts';
import { PracticeReceiver } from '../../src/practice/receiver.ts';
import { createRoom } from '../../src/practice/room.ts';
import type { Room } from '../../src/practice/room.ts';
import { channels, linesToTry, people } from '../../src/practice/workspace.ts';

const clock = { now: () => Date.now() };
const ids = { next: () => randomUUID() };
const log = { write: () => undefined };
const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';

let ledger: Ledger;
let room: Room;
beforeEach(async () => {
  ledger = await openSqliteLedger(':memory:', clock, ids);
  room = await createRoom({ ledger, clock, ids, log });
  await room.bot.start();
});
afterEach(async () => {
  await room.bot.stop();
  await ledger.close();
});

async function type(line: string, threadTs: string | null = null, person = 'UADA', channel = 'CFERRY') {
  const taken = await room.type({ person, channel, threadTs, line });
  await room.bot.idle();
  return taken;
}

const said = () => room.store.messages.map(({ user, threadTs, onlyFor }) => ({ user, threadTs, onlyFor }));

describe('a line that is typed', () => {
  it('as a command is answered by a root message and a reply', async () => {
    expect(await type(shifts)).toBe('taken');
    const [root] = room.store.messages;
    expect(said()).toEqual([
      { user: 'UDIVISOR', threadTs: null, onlyFor: null },
      { user: 'UDIVISOR', threadTs: root?.ts, onlyFor: null },
    ]);
  });

  it('may be typed with the call in front, as it would be in Slack', async () => {
    await type(`/divisor ${shifts}`);
    await type(`/Divisor  ${shifts} `);
    expect(said()).toHaveLength(4);
    expect(room.store.messages[0]?.text).toContain(`: ${shifts}`);
  });

  it('with the bot’s name in front is a message of its own, and answered in its thread', async () => {
    await type(`@Divisor ${shifts}`);
    const [asked] = room.store.messages;
    expect(asked?.text).toBe(`<@UDIVISOR> ${shifts}`);
    expect(said()).toEqual([
      { user: 'UADA', threadTs: null, onlyFor: null },
      { user: 'UDIVISOR', threadTs: asked?.ts, onlyFor: null },
    ]);
  });

  it('in a thread is said there, and answered there', async () => {
    await type(shifts);
    const root = room.store.messages[0]?.ts ?? '';
    await type('4.2% vs 2.6%', root, 'UBEN');
    expect(said().slice(2)).toEqual([
      { user: 'UBEN', threadTs: root, onlyFor: null },
      { user: 'UDIVISOR', threadTs: root, onlyFor: null },
    ]);
  });

  it('in a thread that there is not, in this channel or at all, is not taken', async () => {
    await type(shifts);
    const root = room.store.messages[0]?.ts ?? '';
    expect(await type(shifts, '1.000000')).toBe('not-there');
    expect(await type(shifts, root, 'UADA', 'CTOWN')).toBe('not-there');
    expect(said()).toHaveLength(2);
  });

  it('under a message that only one person sees is not taken', async () => {
    await type('18 of 12');
    expect(await type(shifts, room.store.messages[0]?.ts ?? '')).toBe('not-there');
  });

  it('reaches the bot with the three characters escaped that Slack escapes, and comes back as it was typed', async () => {
    await type('"R&lt;D <night>": 18 of 1,204 vs "R&D <day>": 9 of 2,377');
    expect(room.store.messages[0]?.text).toContain('"R&amp;lt;D &lt;night&gt;": 18 of 1,204');
  });
});

describe('what a person sees', () => {
  it('is everything that is public in the channel, and what was said to that person alone', async () => {
    await type('18 of 12');
    await type(shifts, null, 'UBEN');
    expect(room.seenBy('UADA', 'CFERRY')).toHaveLength(3);
    expect(room.seenBy('UBEN', 'CFERRY')).toHaveLength(2);
    expect(room.seenBy('UADA', 'CTOWN')).toHaveLength(0);
  });

  it('includes the buttons that can be pressed: nobody presses what only somebody else sees', async () => {
    await type('71% of the injured vs 38% of riders');
    const messageTs = room.store.messages[0]?.ts ?? '';
    const press = (person: string, action: string) => room.press({ person, messageTs, action });
    expect(await press('UBEN', 'ask_0')).toBe('not-there');
    expect(await press('UADA', 'ask_9')).toBe('not-there');
    expect(said()).toHaveLength(1);
    expect(await press('UADA', 'ask_0')).toBe('taken');
    await room.bot.idle();
    expect(said().filter(({ onlyFor }) => onlyFor === null)).toHaveLength(2);
  });
});

describe('the lines to try', () => {
  it.each(linesToTry)('%s is answered', async (line) => {
    await type(line);
    expect(said().length).toBeGreaterThan(0);
    expect(room.store.messages.every(({ text }) => !text.includes('on our side'))).toBe(true);
  });

  it('end in an answer that all see for at least two of them, and in a private one for at least two', async () => {
    for (const line of linesToTry) await type(line);
    const first = (alone: boolean) =>
      said().filter(({ threadTs, onlyFor }) => threadTs === null && (onlyFor !== null) === alone).length;
    expect(first(false)).toBeGreaterThanOrEqual(2);
    expect(first(true)).toBeGreaterThanOrEqual(2);
  });
});

describe('the town', () => {
  it('has three people and two channels, each with an id of its own', () => {
    expect(new Set(people.map(({ id }) => id)).size).toBe(3);
    expect(new Set(channels.map(({ id }) => id)).size).toBe(2);
  });
});

describe('the receiver', () => {
  const command = { command: '/divisor', team_id: 'T', user_id: 'U', channel_id: 'C', text: '' };
  const appOver = (receiver: PracticeReceiver) =>
    new App({
      receiver,
      authorize: () => Promise.resolve({ botToken: 'xoxb-1', botId: 'B', botUserId: 'U0' }),
    });

  it('hands over what the app said in acknowledging', async () => {
    const receiver = new PracticeReceiver();
    appOver(receiver).command('/divisor', ({ ack }) => ack('In a moment.'));
    expect(await receiver.deliver(command)).toEqual({ acknowledged: true, body: 'In a moment.' });
  });

  it('says so where nothing was acknowledged', async () => {
    const receiver = new PracticeReceiver();
    appOver(receiver).command('/divisor', () => Promise.resolve());
    expect(await receiver.deliver(command)).toEqual({ acknowledged: false, body: undefined });
  });

  it('delivers nothing before it has an app', async () => {
    await expect(new PracticeReceiver().deliver(command)).rejects.toThrow('no app');
  });
});

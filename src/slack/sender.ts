import type { webApi } from '@slack/bolt';
import { renderNotice } from '../render/slack/render-private.ts';
import type { Clock, Ledger, OutgoingMessage, PlannedMessage } from '../answer/ports.ts';
import type { Log } from './log.ts';
import { lookUp, send } from './post.ts';

export interface SenderParts {
  readonly ledger: Ledger;
  readonly client: webApi.WebClient;
  readonly fetch: typeof globalThis.fetch;
  readonly clock: Clock;
  readonly log: Log;
  /** Least time between two posts in one channel: Slack takes about one a second. */
  readonly pace: number;
  /** How long to wait for a message whose answer was lost to show up, before each look. */
  readonly lookUpWaits: readonly number[];
}

/** Reasons for which a conversation does not take the bot's posts; the asker is then answered alone. */
const notWelcome: ReadonlySet<string> = new Set([
  'not_in_channel',
  'channel_not_found',
  'is_archived',
  'cant_post_in_channel',
  'no_permission',
]);
/** With the growing waits about half an hour, after which the asker's address has run out too. */
const mostAttempts = 40;
const longestWait = 60_000;

/** Sends what is planned, once each, in the order of each channel. `step` does what is due and says when to come again. */
export class Sender {
  readonly #parts: SenderParts;
  readonly #lastPost = new Map<string, number>();
  readonly #looks = new Map<number, number>();

  constructor(parts: SenderParts) {
    this.#parts = parts;
  }

  /** One round. Returns the milliseconds until something is due again, or `null` where nothing is left. */
  async step(): Promise<number | null> {
    const { ledger, clock } = this.#parts;
    const open = await ledger.openMessages();
    if (open.length === 0) return null;
    const blocked = new Set<string>();
    let next = Infinity;
    for (const message of open) {
      const channel = `${message.teamId} ${message.channelId}`;
      // A channel's posts go out in their order: one that waits holds the later ones back.
      if (message.kind === 'post' && blocked.has(channel)) continue;
      if (message.under !== null && message.threadTs === null) {
        // Its root went out in this very round; the next one knows where.
        blocked.add(channel);
        next = 0;
        continue;
      }
      const due = Math.max(
        message.dueAt,
        message.kind === 'post' ? (this.#lastPost.get(channel) ?? -Infinity) + this.#parts.pace : 0,
      );
      const wait = due - clock.now();
      if (wait > 0) {
        next = Math.min(next, wait);
        if (message.kind === 'post') blocked.add(channel);
        continue;
      }
      // One worker sends: what is still marked as being sent was left so by a fault of the database, and is in doubt.
      const settled =
        message.state === 'pending' ? await this.#attempt(message, open) : await this.#settleDoubt(message);
      if (!settled && message.kind === 'post') blocked.add(channel);
      next = 0;
    }
    return Number.isFinite(next) ? next : null;
  }

  /** True where the message is out of the way. */
  async #attempt(message: OutgoingMessage, open: readonly OutgoingMessage[]): Promise<boolean> {
    const { ledger, client, fetch, clock, log } = this.#parts;
    if (!(await ledger.startSending(message.id))) return true;
    const outcome = await send(message, client, fetch);
    if (message.kind === 'post') this.#lastPost.set(`${message.teamId} ${message.channelId}`, clock.now());
    switch (outcome.kind) {
      case 'sent':
        await ledger.markSent(message.id, outcome.ts);
        return true;
      case 'wait': {
        const wait = Math.max(outcome.milliseconds, Math.min(longestWait, 1_000 * 2 ** message.attempts));
        log.write('info', 'message-postponed', { message: message.id, wait });
        if (message.attempts + 1 >= mostAttempts) await this.#giveUp(message, open, 'too_many_attempts');
        else await ledger.postpone(message.id, clock.now() + wait);
        return false;
      }
      case 'refused':
        await this.#giveUp(message, open, outcome.code);
        return true;
      case 'ambiguous':
        log.write('warn', 'message-in-doubt', { message: message.id, code: outcome.code });
        await ledger.markAmbiguous(
          message.id,
          clock.now() + (message.kind === 'post' ? (this.#parts.lookUpWaits[0] ?? 0) : 0),
        );
        return false;
    }
  }

  /** Looks for a message whose answer was lost, waits and looks again, and only then sends it again or gives it up. */
  async #settleDoubt(message: OutgoingMessage): Promise<boolean> {
    const { ledger, client, clock, log, lookUpWaits } = this.#parts;
    if (message.kind !== 'post') {
      // Seen by one person alone and not to be looked up: once more is better than not at all.
      if (message.attempts < 2) await ledger.postpone(message.id, clock.now());
      else await ledger.giveUp(message.id, 'in_doubt', []);
      return false;
    }
    const found = await lookUp(message, client);
    const looks = (this.#looks.get(message.id) ?? 0) + 1;
    this.#looks.set(message.id, looks);
    switch (found.kind) {
      case 'found':
        this.#looks.delete(message.id);
        log.write('info', 'message-found', { message: message.id });
        await ledger.markSent(message.id, found.ts);
        return true;
      case 'not-there':
        if (looks < lookUpWaits.length) {
          await ledger.markAmbiguous(message.id, clock.now() + (lookUpWaits[looks] ?? 0));
        } else {
          this.#looks.delete(message.id);
          await ledger.postpone(message.id, clock.now());
        }
        return false;
      case 'try-later':
        if (looks < mostAttempts) {
          await ledger.markAmbiguous(message.id, clock.now() + (lookUpWaits.at(-1) ?? 0));
          return false;
        }
        await this.#giveUp(message, [], 'in_doubt');
        return true;
      case 'cannot-look':
        // Silence rather than a second copy; the asker is told.
        await this.#giveUp(message, [], 'in_doubt');
        return true;
    }
  }

  async #giveUp(message: OutgoingMessage, open: readonly OutgoingMessage[], reason: string): Promise<void> {
    const { ledger, log } = this.#parts;
    log.write('warn', 'message-given-up', { message: message.id, reason });
    const replies = open.filter(({ under }) => under === message.id);
    await ledger.giveUp(
      message.id,
      reason,
      message.kind === 'post' && message.responseUrl !== null ? instead(message, replies, reason) : [],
    );
  }
}

/** What the asker alone is told when a post could not go out: why, and the answer itself. */
function instead(
  message: OutgoingMessage,
  replies: readonly OutgoingMessage[],
  reason: string,
): readonly PlannedMessage[] {
  const route = { kind: 'response', replaceOriginal: false, threadTs: null } as const;
  if (!notWelcome.has(reason)) {
    const notice = renderNotice('could-not-post');
    return [{ route, text: notice.text, blocks: JSON.stringify(notice.blocks) }];
  }
  const notice = renderNotice('not-in-channel');
  const answer = replies.length === 0 ? [message] : replies;
  return [
    { route, text: notice.text, blocks: JSON.stringify(notice.blocks) },
    ...answer.map(({ text, blocks }) => ({ route, text, blocks })),
  ];
}

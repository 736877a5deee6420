import { App, webApi } from '@slack/bolt';
import type { Receiver } from '@slack/bolt';
import type { Clock, Ledger } from '../answer/ports.ts';
import { durable } from './durable.ts';
import { registerListeners } from './listeners.ts';
import { faultOf } from './log.ts';
import type { Log } from './log.ts';
import { Sender } from './sender.ts';
import { Worker } from './worker.ts';

export interface BotParts {
  readonly ledger: Ledger;
  /** One or more: with Socket Mode two links, so that a command never falls into the gap while one is renewed. */
  readonly receivers: readonly [Receiver, ...Receiver[]];
  /** How to start and stop each receiver. */
  readonly start: (receiver: Receiver) => Promise<unknown>;
  readonly stop: (receiver: Receiver) => Promise<unknown>;
  readonly linked?: () => boolean;
  readonly token: string;
  readonly slackApiUrl?: string;
  /** Replaces the network, as in the practice room. */
  readonly fetch?: typeof globalThis.fetch;
  readonly clock: Clock;
  readonly log: Log;
  readonly pace: number;
  readonly lookUpWaits: readonly number[];
}

export interface Bot {
  start(): Promise<void>;
  /** Takes nothing more in, finishes the message it is at, and leaves the rest to the next start. */
  stop(): Promise<void>;
  /** Resolves once everything stored is answered and sent. */
  idle(): Promise<void>;
  /** Whether the receivers are up. */
  ready(): boolean;
}

const attemptTime = 8_000;

/** Puts the bot together. Every client makes a single attempt: what happens after a failure is the sender's to decide. */
export async function createBot(parts: BotParts): Promise<Bot> {
  const { ledger, log, clock, token, receivers } = parts;
  const clientOptions: webApi.WebClientOptions = {
    retryConfig: { retries: 0 },
    rejectRateLimitedCalls: true,
    timeout: attemptTime,
    ...(parts.slackApiUrl === undefined ? {} : { slackApiUrl: parts.slackApiUrl }),
    ...(parts.fetch === undefined ? {} : { fetch: parts.fetch }),
  };
  const client = new webApi.WebClient(token, clientOptions);
  const identity = await client.auth.test();
  const botUserId = identity.user_id ?? '';
  const [first, ...others] = receivers.map((receiver) => durable(receiver, ledger));
  if (first === undefined) throw new Error('a bot needs a receiver');
  const app = new App({
    receiver: first,
    authorize: () =>
      Promise.resolve({
        botToken: token,
        botUserId,
        ...(identity.bot_id === undefined ? {} : { botId: identity.bot_id }),
      }),
    clientOptions,
    convoStore: false,
    ignoreSelf: true,
  });
  for (const other of others) other.init(app);
  app.error((error) => {
    log.write('error', 'listener-fault', faultOf(error));
    return Promise.resolve();
  });
  const sender = new Sender({
    ledger,
    client,
    fetch: parts.fetch ?? globalThis.fetch,
    clock,
    log,
    pace: parts.pace,
    lookUpWaits: parts.lookUpWaits,
  });
  const worker = new Worker({ ledger, sender, log, botUserId: () => botUserId });
  registerListeners(app, worker);
  let up = false;
  return {
    async start() {
      await ledger.recover();
      worker.start();
      await Promise.all(receivers.map(parts.start));
      up = true;
      log.write('info', 'bot-started', { links: receivers.length });
    },
    async stop() {
      up = false;
      await Promise.all(receivers.map(parts.stop));
      await worker.stop();
      log.write('info', 'bot-stopped');
    },
    idle: () => worker.idle(),
    ready: () => up && (parts.linked?.() ?? true),
  };
}

import { randomUUID } from 'node:crypto';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import type { Ledger } from '../../src/answer/ports.ts';
import { openSqliteLedger } from '../../src/ledger/sqlite-ledger.ts';
import { createBot } from '../../src/slack/bot.ts';
import type { Bot } from '../../src/slack/bot.ts';
import { httpIntake, socketIntake } from '../../src/slack/receivers.ts';
import { StandInServer, postSigned, postSignedJson } from './stand-in-server.ts';

export const signingSecret = 'harrowmere-signing-secret';
export type Transport = 'socket' | 'http';

/** The real bot over the stand-in server, in this process, with a database of its own. */
export interface RunningBot {
  readonly slack: StandInServer;
  readonly ledger: Ledger;
  readonly bot: Bot;
  readonly address: string;
  /** Sends a command and resolves once it was acknowledged and everything it led to is done. */
  command(text: string, more?: Readonly<Record<string, string>>): Promise<Readonly<Record<string, string>>>;
  /** Delivers the same command again, under the same ids. */
  again(fields: Readonly<Record<string, string>>): Promise<void>;
  mention(text: string, more?: Readonly<Record<string, string>>): Promise<void>;
  press(
    message: {
      readonly ts: string;
      readonly channel: string;
      readonly threadTs: string | null;
      readonly blocks: readonly unknown[];
    },
    action: string,
    user?: string,
    triggerId?: string,
  ): Promise<void>;
  close(): Promise<void>;
}

const systemClock = { now: () => Date.now() };
const randomIds = { next: () => randomUUID() };
const silence = { write: () => undefined };

export async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  await new Promise((resolve) => server.close(resolve));
  return port;
}

export async function runBot(transport: Transport, databasePath = ':memory:'): Promise<RunningBot> {
  const slack = await StandInServer.start();
  const ledger = await openSqliteLedger(databasePath, systemClock, randomIds);
  const port = await freePort();
  const intake =
    transport === 'socket'
      ? socketIntake({ appToken: 'xapp-1', slackApiUrl: slack.apiUrl })
      : httpIntake({ signingSecret, host: '127.0.0.1', port, routes: [] });
  const bot = await createBot({
    ledger,
    ...intake,
    token: 'xoxb-1',
    slackApiUrl: slack.apiUrl,
    clock: systemClock,
    log: silence,
    pace: 0,
    lookUpWaits: [10, 10],
  });
  await bot.start();
  const address = `http://127.0.0.1:${port}/slack/events`;
  const envelopes = new Map<string, string>();
  const sendCommand = async (fields: Readonly<Record<string, string>>) => {
    const key = fields['trigger_id'] ?? '';
    if (transport === 'http') {
      await postSigned(address, fields, signingSecret);
    } else {
      const envelope = envelopes.get(key) ?? randomUUID();
      envelopes.set(key, envelope);
      await slack.deliver('slash_commands', fields, envelope);
    }
    await bot.idle();
  };
  const interactive = async (payload: object) => {
    if (transport === 'http') await postSigned(address, { payload: JSON.stringify(payload) }, signingSecret);
    else await slack.deliver('interactive', payload);
    await bot.idle();
  };
  return {
    slack,
    ledger,
    bot,
    address,
    async command(text, more) {
      const fields = slack.commandFields(text, more);
      await sendCommand(fields);
      return fields;
    },
    again: sendCommand,
    async mention(text, more = {}) {
      const ts = more['ts'] ?? '1700000000.000100';
      const event = {
        type: 'app_mention',
        user: 'U1',
        channel: 'C1',
        text: `<@UDIVISOR> ${text}`,
        ts,
        event_ts: ts,
        ...more,
      };
      const payload = {
        type: 'event_callback',
        team_id: 'THARROWMERE',
        api_app_id: 'A1',
        event_id: randomUUID(),
        event_time: 1,
        event,
      };
      if (transport === 'http') await postSignedJson(address, payload, signingSecret);
      else await slack.deliver('events_api', payload);
      await bot.idle();
    },
    async press(message, action, user = 'U2', triggerId = randomUUID()) {
      const buttons = (
        message.blocks as { type: string; elements?: { action_id: string; value: string }[] }[]
      ).flatMap((block) => (block.type === 'actions' ? (block.elements ?? []) : []));
      const button = buttons.find(({ action_id }) => action_id === action);
      if (button === undefined) throw new Error(`no button ${action}`);
      const thread = message.threadTs === null ? {} : { thread_ts: message.threadTs };
      await interactive({
        type: 'block_actions',
        team: { id: 'THARROWMERE' },
        user: { id: user, team_id: 'THARROWMERE' },
        channel: { id: message.channel },
        container: { type: 'message', message_ts: message.ts, channel_id: message.channel, ...thread },
        message: { ts: message.ts, ...thread },
        trigger_id: triggerId,
        response_url: slack.responseUrl(message.channel, user, message.ts),
        api_app_id: 'A1',
        actions: [
          { type: 'button', action_id: action, block_id: 'parts', value: button.value, action_ts: '1' },
        ],
      });
    },
    async close() {
      await bot.stop();
      await ledger.close();
      await slack.close();
    },
  };
}

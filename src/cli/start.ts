import { randomUUID } from 'node:crypto';
import { config } from 'dotenv';
import type { Clock, Ids } from '../answer/ports.ts';
import { openSqliteLedger } from '../ledger/sqlite-ledger.ts';
import { startPracticeRoom } from '../practice/start.ts';
import { linesToTry } from '../practice/workspace.ts';
import { createBot } from '../slack/bot.ts';
import { healthRoutes, startHealthServer } from '../slack/health.ts';
import { faultOf, lineLog } from '../slack/log.ts';
import { httpIntake, socketIntake } from '../slack/receivers.ts';
import { readConfiguration } from './configuration.ts';
import type { Configuration } from './configuration.ts';

/** What has to be closed at the end, in this order. */
type Stop = () => Promise<unknown>;

/** Longest time that a stop may take before the process ends all the same. */
const stopTime = 10_000;
const lookUpWaits = [10_000, 10_000];
const pace = 1_000;

config({ quiet: true });
const clock: Clock = { now: () => Date.now() };
const ids: Ids = { next: () => randomUUID() };
const result = readConfiguration(process.env);

if (!result.ok) {
  process.stderr.write(`Divisor cannot start:\n${result.faults.map((fault) => `- ${fault}`).join('\n')}\n`);
  process.exitCode = 2;
} else {
  const { port } = result.configuration;
  await run(result.configuration).catch((error: unknown) => {
    if (!(error instanceof Error && 'code' in error && error.code === 'EADDRINUSE')) throw error;
    process.stderr.write(
      `Divisor cannot start:\n- port ${port} is taken; end what listens there, or set PORT to another\n`,
    );
    process.exit(1);
  });
}

async function run(configuration: Configuration): Promise<void> {
  const { mode, host, port, databasePath, logLevel } = configuration;
  const log = lineLog(
    process.stderr,
    mode.kind === 'practice' && logLevel === 'info' ? 'warn' : logLevel,
    clock.now,
  );
  const end = (event: string) => (error: unknown) => {
    log.write('error', event, faultOf(error));
    process.exit(1);
  };
  // State is in the database alone; a supervisor starts the process again.
  process.on('unhandledRejection', end('unhandled-rejection'));
  process.on('uncaughtException', end('uncaught-exception'));
  const ledger = await openSqliteLedger(databasePath, clock, ids);
  const stops: Stop[] = [];
  if (mode.kind === 'practice') {
    const room = await startPracticeRoom({
      host,
      port,
      ledger,
      clock,
      ids,
      log,
      routes: (ready) => healthRoutes({ ledger, ready }),
    });
    process.stdout.write(
      `The practice room is open: ${room.address}\nA line to try there: ${linesToTry[0] ?? ''}\n`,
    );
    stops.push(() => room.stop());
  } else {
    let ready = () => false;
    const routes = healthRoutes({ ledger, ready: () => ready() });
    const slackApiUrl = configuration.slackApiUrl === null ? {} : { slackApiUrl: configuration.slackApiUrl };
    const intake =
      mode.kind === 'socket'
        ? socketIntake({ appToken: mode.appToken, ...slackApiUrl })
        : httpIntake({ signingSecret: mode.signingSecret, host, port, routes });
    const bot = await createBot({
      ledger,
      ...intake,
      token: mode.token,
      ...slackApiUrl,
      clock,
      log,
      pace,
      lookUpWaits,
    });
    ready = () => bot.ready();
    if (mode.kind === 'socket') {
      const server = await startHealthServer(routes, host, port);
      stops.push(() => new Promise((resolve) => server.close(resolve)));
    }
    await bot.start();
    stops.unshift(() => bot.stop());
    process.stdout.write(
      mode.kind === 'socket'
        ? 'Divisor is linked to Slack.\n'
        : `Divisor listens on http://${host}:${port}/slack/events\n`,
    );
  }
  stops.push(() => ledger.close());
  const stop = () => {
    setTimeout(() => process.exit(1), stopTime).unref();
    void stops
      .reduce<Promise<unknown>>((before, next) => before.then(next), Promise.resolve())
      .then(() => process.exit(0), end('stop-failed'));
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

import { randomUUID } from 'node:crypto';
import { setTimeout as wait } from 'node:timers/promises';
import type { Ledger } from '../../src/answer/ports.ts';
import { openSqliteLedger } from '../../src/ledger/sqlite-ledger.ts';
import { startPracticeRoom } from '../../src/practice/start.ts';
import { healthRoutes } from '../../src/slack/health.ts';

/** A practice room of its own on a free port, with a ledger in memory. */
export interface OpenRoom {
  readonly address: string;
  /** What was logged as a warning or an error. */
  readonly faults: readonly string[];
  close(): Promise<void>;
}

/** `slowness`: how many milliseconds the ledger takes before it hands out a request. */
export async function openRoom(port = 0, slowness = 0): Promise<OpenRoom> {
  const clock = { now: () => Date.now() };
  const ids = { next: () => randomUUID() };
  const ledger = await openSqliteLedger(':memory:', clock, ids);
  const faults: string[] = [];
  const room = await startPracticeRoom({
    host: '127.0.0.1',
    port,
    ledger: slowness === 0 ? ledger : slowed(ledger, slowness),
    clock,
    ids,
    log: {
      write: (level, event, facts) => {
        if (level === 'warn' || level === 'error') faults.push(`${event} ${JSON.stringify(facts ?? {})}`);
      },
    },
    routes: (ready) => healthRoutes({ ledger, ready }),
  });
  return {
    address: room.address,
    faults,
    async close() {
      await room.stop();
      await ledger.close();
    },
  };
}

const slowed = (ledger: Ledger, milliseconds: number): Ledger => ({
  ...ledger,
  nextRequest: () => wait(milliseconds).then(() => ledger.nextRequest()),
});

import type { Ledger, PlannedMessage, StoredRequest } from '../answer/ports.ts';
import { renderNotice } from '../render/slack/render-private.ts';
import { faultOf } from './log.ts';
import type { Log } from './log.ts';
import { planAnswer } from './plan-answer.ts';
import type { Sender } from './sender.ts';

export interface WorkerParts {
  readonly ledger: Ledger;
  readonly sender: Sender;
  readonly log: Log;
  readonly botUserId: () => string;
}

/** How often to look for work that nobody announced, and how long to wait after a fault of the database. */
const idleWait = 30_000;
const faultWait = 1_000;

/** Answers stored requests and sends what is planned, one round after the other, until it is stopped. */
export class Worker {
  readonly #parts: WorkerParts;
  #woken = false;
  #stopping = false;
  #idle = false;
  #rouse: (() => void) | null = null;
  #waiters: (() => void)[] = [];
  #running: Promise<void> | null = null;

  constructor(parts: WorkerParts) {
    this.#parts = parts;
  }

  start(): void {
    this.#running ??= this.#run();
  }

  /** There is something to do. */
  wake(): void {
    this.#woken = true;
    this.#idle = false;
    this.#rouse?.();
  }

  /** Resolves once every stored request is answered and every message sent or given up. */
  idle(): Promise<void> {
    if (this.#idle) return Promise.resolve();
    return new Promise((resolve) => this.#waiters.push(resolve));
  }

  /** Finishes what it is at and stops. */
  async stop(): Promise<void> {
    this.#stopping = true;
    this.#rouse?.();
    await this.#running;
  }

  async #run(): Promise<void> {
    const { ledger, log } = this.#parts;
    while (!this.#stopping) {
      this.#woken = false;
      let wait: number | null;
      try {
        await this.#answerAll();
        wait = await this.#parts.sender.step();
        if (wait === null) await ledger.forgetExpired();
      } catch (error) {
        log.write('error', 'worker-fault', faultOf(error));
        wait = faultWait;
      }
      if (wait === null && !this.#woken) this.#settle();
      await this.#sleep(wait ?? idleWait);
    }
  }

  #settle(): void {
    this.#idle = true;
    const waiting = this.#waiters;
    this.#waiters = [];
    for (const resolve of waiting) resolve();
  }

  async #answerAll(): Promise<void> {
    const { ledger } = this.#parts;
    for (
      let stored = await ledger.nextRequest();
      stored !== null && !this.#stopping;
      stored = await ledger.nextRequest()
    ) {
      await this.#answer(stored);
    }
  }

  async #answer(stored: StoredRequest): Promise<void> {
    const { ledger, log, botUserId } = this.#parts;
    let plan;
    try {
      plan = await planAnswer(stored, ledger, botUserId());
      await ledger.answerRequest(stored, plan.draft, plan.compose);
    } catch (error) {
      // Our own mistake: one bad request must not hold up the others, and the asker is told.
      log.write('error', 'request-failed', { request: stored.id, ...faultOf(error) });
      await ledger.failRequest(stored, 'answer-failed', stored.responseUrl === null ? [] : [failureNotice()]);
    }
  }

  #sleep(milliseconds: number): Promise<void> {
    if (this.#woken || this.#stopping || milliseconds <= 0) return Promise.resolve();
    return new Promise((resolve) => {
      const done = () => {
        clearTimeout(timer);
        this.#rouse = null;
        resolve();
      };
      const timer = setTimeout(done, milliseconds);
      this.#rouse = done;
    });
  }
}

function failureNotice(): PlannedMessage {
  const { text, blocks } = renderNotice('failed');
  return {
    route: { kind: 'response', replaceOriginal: false, threadTs: null },
    text,
    blocks: JSON.stringify(blocks),
  };
}

import type { App } from '@slack/bolt';
import { askPrefix } from '../render/slack/message.ts';

/** What a listener may do besides acknowledging: say that something was stored. */
export interface Waker {
  wake(): void;
}

interface Acknowledging {
  readonly ack?: () => Promise<void>;
}

/**
 * The one listener there is. The request was stored before Bolt saw it, so all that is left is to acknowledge and to wake
 * the worker. An acknowledgement on a dead link throws; the work does not depend on it.
 */
export async function acknowledge({ ack }: Acknowledging, worker: Waker): Promise<void> {
  worker.wake();
  await ack?.();
}

/** Registers the listeners for everything that this bot answers. */
export function registerListeners(app: App, worker: Waker): void {
  app.command('/divisor', ({ ack }) => acknowledge({ ack }, worker));
  app.event('app_mention', () => acknowledge({}, worker));
  app.action(new RegExp(`^(?:show_|${askPrefix})`), ({ ack }) => acknowledge({ ack }, worker));
}

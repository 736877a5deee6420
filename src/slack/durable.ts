import type { App, Receiver, ReceiverEvent } from '@slack/bolt';
import type { Ledger } from '../answer/ports.ts';
import { incomingOf } from './incoming.ts';

/**
 * Makes a receiver store every request before Bolt sees it, and so before it is acknowledged. A second delivery of the same
 * request is acknowledged and goes no further. Where the store fails, nothing is acknowledged and Slack says so to the asker.
 */
export function durable<R extends Receiver>(receiver: R, ledger: Ledger): R {
  const init = receiver.init.bind(receiver);
  receiver.init = (app: App) => {
    const storing = {
      processEvent: async (event: ReceiverEvent) => {
        const envelope: unknown = event.customProperties?.['envelopeId'];
        const incoming = incomingOf(event.body, typeof envelope === 'string' ? envelope : null);
        if (
          incoming !== null &&
          !(await ledger.storeRequest(incoming.keys, incoming.request, incoming.responseUrl))
        ) {
          return event.ack();
        }
        return app.processEvent(event);
      },
    };
    // Bolt's type asks for a whole App where a receiver only ever calls processEvent.
    init(storing as unknown as App);
  };
  return receiver;
}

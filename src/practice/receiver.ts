import type { App, Receiver, ReceiverEvent } from '@slack/bolt';

/** A Bolt receiver without a network: the practice room hands it what a person typed or pressed. */
export class PracticeReceiver implements Receiver {
  #app: Pick<App, 'processEvent'> | null = null;

  init(app: App): void {
    this.#app = app;
  }

  start(): Promise<void> {
    return Promise.resolve();
  }

  stop(): Promise<void> {
    return Promise.resolve();
  }

  /** Delivers one request and resolves once it was acknowledged. */
  async deliver(body: ReceiverEvent['body']): Promise<void> {
    if (this.#app === null) throw new Error('the receiver has no app yet');
    await this.#app.processEvent({ body, ack: () => Promise.resolve() });
  }
}

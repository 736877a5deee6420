import type { App, Receiver, ReceiverEvent } from '@slack/bolt';

/** What a delivery came to: whether the app acknowledged it, and what it said in doing so. */
export interface Acknowledgement {
  readonly acknowledged: boolean;
  readonly body: unknown;
}

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

  /** Delivers one request and resolves once the app is through with it. Throws where the app could not take it. */
  async deliver(body: ReceiverEvent['body']): Promise<Acknowledgement> {
    if (this.#app === null) throw new Error('the receiver has no app yet');
    let acknowledgement: Acknowledgement = { acknowledged: false, body: undefined };
    await this.#app.processEvent({
      body,
      ack: (answer?: unknown) => {
        acknowledgement = { acknowledged: true, body: answer };
        return Promise.resolve();
      },
    });
    return acknowledgement;
  }
}

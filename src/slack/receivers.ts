import { HTTPReceiver, LogLevel, SocketModeReceiver } from '@slack/bolt';
import type { Receiver } from '@slack/bolt';
import type { HealthRoute } from './health.ts';

/** How requests come in. */
export interface Intake {
  readonly receivers: readonly [Receiver, ...Receiver[]];
  readonly start: (receiver: Receiver) => Promise<unknown>;
  readonly stop: (receiver: Receiver) => Promise<unknown>;
  /** Whether requests can come in at this moment; with Socket Mode, whether a link is open. */
  readonly linked: () => boolean;
}

/** How long to wait for the first word on a new link. */
const helloTime = 20_000;

/**
 * Socket Mode: two links, since each renewal leaves some seconds without one. The receiver's own client opens links and may
 * retry; it shares no options with the clients that post.
 */
export function socketIntake(options: { readonly appToken: string; readonly slackApiUrl?: string }): Intake {
  const receiver = () =>
    new SocketModeReceiver({
      appToken: options.appToken,
      logLevel: LogLevel.WARN,
      customPropertiesExtractor: (envelope) => ({
        envelopeId: (envelope as { readonly envelope_id?: string }).envelope_id ?? '',
      }),
      installerOptions: {
        clientOptions: options.slackApiUrl === undefined ? {} : { slackApiUrl: options.slackApiUrl },
      },
    });
  const receivers = [receiver(), receiver()] as const;
  return {
    receivers,
    start: (each) => withinTime(each.start(), helloTime),
    // stop() would return before the link is closed.
    stop: (each) => (each instanceof SocketModeReceiver ? each.client.disconnect() : each.stop()),
    linked: () => receivers.some(({ client }) => client.websocket?.isActive() === true),
  };
}

/** HTTP: signed requests at /slack/events, the health routes beside it. */
export function httpIntake(options: {
  readonly signingSecret: string;
  readonly host: string;
  readonly port: number;
  readonly routes: readonly HealthRoute[];
}): Intake {
  const receiver = new HTTPReceiver({
    signingSecret: options.signingSecret,
    logLevel: LogLevel.WARN,
    endpoints: '/slack/events',
    customRoutes: options.routes.map(({ path, handler }) => ({ path, method: 'GET', handler })),
  });
  return {
    receivers: [receiver],
    start: () => receiver.start({ port: options.port, host: options.host }),
    stop: () => receiver.stop(),
    linked: () => true,
  };
}

async function withinTime<T>(work: Promise<T>, milliseconds: number): Promise<T> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(
      () => reject(new Error(`no link to Slack within ${milliseconds / 1000} seconds`)),
      milliseconds,
    );
  });
  try {
    return await Promise.race([work, late]);
  } finally {
    clearTimeout(timer);
  }
}

import type { MessageStore } from './message-store.ts';
import { ResponseAddresses } from './response-addresses.ts';
import type { ResponsePlace } from './response-addresses.ts';
import { webApi } from './web-api.ts';
import { fieldsOf } from './wire.ts';

/**
 * A stand-in for Slack's Web API, in this process: it takes what the real client sends and answers as Slack does, over a
 * message store. The practice room hands its `fetch` to the bot's client; the tests put a server in front of it.
 */
export interface StandIn {
  readonly fetch: typeof globalThis.fetch;
  /** The address at which one person may be answered alone, as it comes with a command or a button. */
  responseUrl(place: ResponsePlace): string;
}

export interface StandInOptions {
  readonly store: MessageStore;
  /** Whether the bot is a member of the channel. */
  readonly isMember: (channel: string) => boolean;
  /** Where response addresses begin. */
  readonly origin: string;
}

export function createStandIn({ store, isMember, origin }: StandInOptions): StandIn {
  const methods = webApi({ store, isMember });
  const addresses = new ResponseAddresses(store);
  return {
    async fetch(input, init) {
      const request = new Request(input, init);
      const { pathname } = new URL(request.url);
      const fields = fieldsOf(await request.text(), request.headers.get('content-type') ?? '');
      const response = /^\/response\/([\w-]+)$/.exec(pathname);
      if (response !== null) return addresses.answer(response[1] ?? '', fields);
      const method = methods[pathname.replace(/^.*\/api\//, '')];
      if (method === undefined) return Response.json({ ok: false, error: 'unknown_method' });
      return Response.json(fields === null ? { ok: false, error: 'invalid_json' } : method(fields));
    },
    responseUrl: (place) => `${origin}${addresses.open(place)}`,
  };
}

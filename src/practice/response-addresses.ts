import { randomUUID } from 'node:crypto';
import { faultInMessage } from './message-limits.ts';
import type { MessageStore } from './message-store.ts';
import { isTrue, listOf, textOf } from './wire.ts';
import type { Fields } from './wire.ts';
import { botPerson } from './workspace.ts';

/** Where an answer at a response address goes. */
export interface ResponsePlace {
  readonly channel: string;
  readonly user: string;
  /** The message whose button was pressed, if any. */
  readonly messageTs: string | null;
}

/** At most this many answers at one address, within half an hour. */
const mostUses = 5;
const lifetime = 30 * 60 * 1000;

interface Entry {
  readonly place: ResponsePlace;
  readonly until: number;
  uses: number;
}

/**
 * The addresses at which one person may be answered, as they come with a command or a button. Nobody can guess them, and they
 * do not come again after a restart.
 */
export class ResponseAddresses {
  readonly #store: MessageStore;
  readonly #entries = new Map<string, Entry>();

  constructor(store: MessageStore) {
    this.#store = store;
  }

  /** The path of a new address. */
  open(place: ResponsePlace): string {
    const now = this.#store.now();
    for (const [key, { until }] of this.#entries) if (until <= now) this.#entries.delete(key);
    const key = randomUUID();
    this.#entries.set(key, { place, until: now + lifetime, uses: 0 });
    return `/response/${key}`;
  }

  /** Takes an answer. `null` fields are a body that could not be read. */
  answer(key: string, fields: Fields | null): Response {
    const entry = this.#entries.get(key);
    if (entry === undefined || entry.until <= this.#store.now())
      return new Response('expired_url', { status: 404 });
    if (entry.uses >= mostUses) return new Response('used_url', { status: 404 });
    if (fields === null) return new Response('invalid_payload', { status: 400 });
    entry.uses += 1;
    const { channel, user, messageTs } = entry.place;
    if (isTrue(fields['delete_original'])) {
      if (messageTs !== null) this.#store.replace(messageTs, null);
      return new Response('ok');
    }
    const text = textOf(fields['text']);
    const blocks = listOf(fields['blocks']);
    const fault = faultInMessage(text, blocks);
    if (fault !== null) return new Response(fault, { status: 400 });
    const replaced =
      isTrue(fields['replace_original']) &&
      messageTs !== null &&
      this.#store.replace(messageTs, (message) => ({ ...message, text, blocks }));
    if (!replaced) {
      this.#store.add({
        channel,
        threadTs: textOf(fields['thread_ts']) || null,
        user: botPerson.id,
        text,
        blocks,
        metadata: null,
        onlyFor: fields['response_type'] === 'in_channel' ? null : user,
      });
    }
    return new Response('ok');
  }
}

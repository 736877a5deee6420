/** What was said, as the stand-in for Slack keeps it. */
export interface StoredMessage {
  /** Seconds since 1970 with six decimals: a message's name in its channel. */
  readonly ts: string;
  readonly channel: string;
  /** The first message of the thread; `null` for one that stands in the channel itself. */
  readonly threadTs: string | null;
  readonly user: string;
  readonly text: string;
  readonly blocks: readonly unknown[];
  readonly metadata: unknown;
  /** Only this person sees it. */
  readonly onlyFor: string | null;
}

/** How many messages are kept in all; the oldest go first. */
const mostMessages = 1_000;

/** Messages in the order in which they were said, with word to whoever looks on. */
export class MessageStore {
  #messages: StoredMessage[] = [];
  #last = 0;
  readonly #now: () => number;
  readonly #listeners = new Set<() => void>();

  constructor(now: () => number) {
    this.#now = now;
  }

  get messages(): readonly StoredMessage[] {
    return this.#messages;
  }

  /** Milliseconds since 1970. */
  now(): number {
    return this.#now();
  }

  add(message: Omit<StoredMessage, 'ts'>): StoredMessage {
    // Time stamps rise even within one microsecond.
    this.#last = Math.max(this.#last + 1, Math.floor(this.#now() * 1000));
    const ts = `${Math.floor(this.#last / 1e6)}.${String(this.#last % 1e6).padStart(6, '0')}`;
    const stored = { ...message, ts };
    this.#messages = [...this.#messages, stored].slice(-mostMessages);
    this.#tell();
    return stored;
  }

  find(channel: string, ts: string): StoredMessage | undefined {
    return this.#messages.find((message) => message.channel === channel && message.ts === ts);
  }

  /** Replaces a message by its time stamp; `null` takes it away. False: there is none. */
  replace(ts: string, change: ((message: StoredMessage) => StoredMessage) | null): boolean {
    const before = this.#messages;
    if (!before.some((message) => message.ts === ts)) return false;
    this.#messages = before.flatMap((message) =>
      message.ts !== ts ? [message] : change === null ? [] : [change(message)],
    );
    this.#tell();
    return true;
  }

  /** Calls the listener after every change, until the function that comes back is called. */
  onChange(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  #tell(): void {
    for (const listener of this.#listeners) listener();
  }
}

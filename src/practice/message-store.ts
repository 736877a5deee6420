/** What was said, as the stand-in for Slack keeps it. */
export interface StoredMessage {
  readonly ts: string;
  readonly channel: string;
  readonly threadTs: string | null;
  readonly user: string;
  readonly text: string;
  readonly blocks: readonly unknown[];
  readonly metadata: unknown;
  /** Only this person sees it. */
  readonly onlyFor: string | null;
}

/** How many messages are kept in all; the oldest go first. */
const mostMessages = 2_000;

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

  add(message: Omit<StoredMessage, 'ts'>): StoredMessage {
    // Time stamps rise even within one microsecond.
    this.#last = Math.max(this.#last + 1, this.#now() * 1000);
    const ts = `${Math.floor(this.#last / 1e6)}.${String(this.#last % 1e6).padStart(6, '0')}`;
    const stored = { ...message, ts };
    this.#messages = [...this.#messages, stored].slice(-mostMessages);
    this.#tell();
    return stored;
  }

  /** Replaces a message by its time stamp; `null` takes it away. */
  replace(ts: string, change: ((message: StoredMessage) => StoredMessage) | null): boolean {
    const before = this.#messages;
    this.#messages = before.flatMap((message) =>
      message.ts !== ts ? [message] : change === null ? [] : [change(message)],
    );
    this.#tell();
    return before.some((message) => message.ts === ts);
  }

  onChange(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  #tell(): void {
    for (const listener of this.#listeners) listener();
  }
}

/**
 * What the house needs from its edges. The edges fill these in: a database for the ledger, the system's clock, random ids.
 * Times are milliseconds since 1970.
 */

export interface Clock {
  readonly now: () => number;
}

export interface Ids {
  /** A new id that nobody can guess. */
  readonly next: () => string;
}

/** Somebody's request, as it is stored before it is acknowledged. Holds no token and no bearer address. */
export type AskedRequest =
  | {
      readonly kind: 'command';
      readonly teamId: string;
      readonly channelId: string;
      readonly userId: string;
      readonly text: string;
    }
  | {
      readonly kind: 'mention';
      readonly teamId: string;
      readonly channelId: string;
      readonly userId: string;
      readonly text: string;
      readonly threadTs: string;
    }
  | {
      readonly kind: 'button';
      readonly teamId: string;
      readonly channelId: string;
      readonly userId: string;
      readonly action: string;
      readonly value: string;
      readonly threadTs: string | null;
    };

export interface StoredRequest {
  readonly id: string;
  readonly request: AskedRequest;
  /** Where to answer the asker alone, for 30 minutes; `null` afterwards. Bearer-like: never logged. */
  readonly responseUrl: string | null;
  readonly receivedAt: number;
}

/** A check as the ledger keeps it. */
export interface StoredCheck {
  readonly id: string;
  readonly teamId: string;
  readonly channelId: string;
  /** In the channel's own series, from 1; `null` for an answer that only the asker saw. */
  readonly number: number | null;
  readonly line: string;
  readonly canonical: string;
  readonly kind: string;
  readonly askedBy: string;
  readonly createdAt: number;
}

/** A check before it has its number. */
export type CheckDraft = Omit<StoredCheck, 'id' | 'number' | 'createdAt'> & { readonly numbered: boolean };

/** How a message goes out. */
export type MessageRoute =
  | { readonly kind: 'post'; readonly thread: ThreadPlace }
  | { readonly kind: 'ephemeral'; readonly userId: string; readonly threadTs: string | null }
  | { readonly kind: 'response'; readonly replaceOriginal: boolean; readonly threadTs: string | null };

/** Where a post stands: in the channel, in a known thread, or in the thread of the message planned just before it. */
export type ThreadPlace =
  | { readonly kind: 'channel' }
  | { readonly kind: 'thread'; readonly ts: string }
  | { readonly kind: 'under-previous' };

export interface PlannedMessage {
  readonly route: MessageRoute;
  readonly text: string;
  /** Block Kit, as JSON. */
  readonly blocks: string;
}

export type MessageState = 'pending' | 'sending' | 'ambiguous' | 'sent' | 'failed';

/** A message on its way out, with everything that sending it needs. */
export interface OutgoingMessage {
  readonly id: number;
  /** Travels as message metadata, so that a message whose answer was lost can be found again. */
  readonly op: string;
  readonly requestId: string;
  readonly teamId: string;
  readonly channelId: string;
  readonly userId: string;
  readonly kind: MessageRoute['kind'];
  readonly threadTs: string | null;
  /** The message whose thread this one belongs to; its place is known once that one was sent. */
  readonly under: number | null;
  readonly replaceOriginal: boolean;
  readonly responseUrl: string | null;
  readonly text: string;
  readonly blocks: string;
  readonly state: MessageState;
  readonly attempts: number;
  readonly dueAt: number;
  readonly startedAt: number | null;
}

/** What is kept: requests before they are acknowledged, checks under their numbers, messages until they are sent. */
export interface Ledger {
  /** Stores a request once. False: one of its keys was seen before, and nothing was stored. */
  storeRequest(keys: readonly string[], request: AskedRequest, responseUrl: string | null): Promise<boolean>;
  /** The oldest request that nobody has answered. */
  nextRequest(): Promise<StoredRequest | null>;
  requestById(id: string): Promise<StoredRequest | null>;
  checkById(id: string): Promise<StoredCheck | null>;
  /**
   * Closes a request in one transaction: gives the check its number, plans the messages that `compose` makes of it, and
   * marks the request as answered. `compose` must be quick and must not wait.
   */
  answerRequest(
    request: StoredRequest,
    draft: CheckDraft | null,
    compose: (check: StoredCheck | null) => readonly PlannedMessage[],
  ): Promise<void>;
  /** Marks a request as one that could not be answered through our own fault, with the messages that say so. */
  failRequest(request: StoredRequest, code: string, messages: readonly PlannedMessage[]): Promise<void>;
  /**
   * Takes an offer under a refusal for the request `takenBy`. False: another request took it before. True again for the same
   * one, which comes twice where the process was stopped before it was answered.
   */
  takeOffer(requestId: string, takenBy: string): Promise<boolean>;
  /** Unsettled messages in the order in which they were planned. */
  openMessages(): Promise<readonly OutgoingMessage[]>;
  /** Marks a message as being sent. False: it was no longer waiting. */
  startSending(id: number): Promise<boolean>;
  markSent(id: number, ts: string | null): Promise<void>;
  markAmbiguous(id: number, dueAt: number): Promise<void>;
  postpone(id: number, dueAt: number): Promise<void>;
  /** Gives a message up, and with it those planned under it; plans others in their place. */
  giveUp(id: number, reason: string, instead: readonly PlannedMessage[]): Promise<void>;
  /** After a stop without warning: what was being sent may or may not have arrived. */
  recover(): Promise<void>;
  /** Deletes addresses that only their bearer may know, once they have run out. */
  forgetExpired(): Promise<void>;
  counts(): Promise<Readonly<Record<string, number>>>;
  close(): Promise<void>;
}

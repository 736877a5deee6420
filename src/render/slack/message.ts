import type { KnownBlock } from '@slack/types';

/**
 * A message as Slack takes it. `text` is complete (screen readers read only it), escaped, and under 4,000 characters;
 * `blocks` are at most 50. Both come from one report.
 */
export interface SlackMessage {
  readonly text: string;
  readonly blocks: readonly KnownBlock[];
}

/** What the ledger adds to a report when it is posted. */
export interface CheckContext {
  /** The check's number in its channel's own series, from 1; `null` for an answer that only the asker sees. */
  readonly number: number | null;
  /** Slack user id of the person who asked. */
  readonly askedBy: string;
  /** Opaque id that the buttons carry as their value; the ledger finds the typed line by it. */
  readonly checkId: string;
}

/** The parts of an answer that stand behind a button. The button's `action_id` is `show_` + the part. */
export const partsBehind = ['readings', 'working', 'questions', 'avoid', 'other'] as const;
export type PartBehind = (typeof partsBehind)[number];

/** `action_id` prefix of the buttons under a refusal that offers lines: `ask_0`, `ask_1`, ... in the diagnosis's order. */
export const askPrefix = 'ask_';

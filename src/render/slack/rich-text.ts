import type { KnownBlock, RichTextBlock, RichTextElement } from '@slack/types';

/** Builders for the blocks of a message. Typed text goes only into rich text and plain text, where nothing in it is active. */

export type Piece = RichTextElement;

export const plain = (text: string): Piece => ({ type: 'text', text });
export const bold = (text: string): Piece => ({ type: 'text', text, style: { bold: true } });
export const person = (userId: string): Piece => ({ type: 'user', user_id: userId });

/** One paragraph. */
export const paragraph = (...pieces: readonly Piece[]): RichTextBlock => ({
  type: 'rich_text',
  elements: [{ type: 'rich_text_section', elements: [...pieces] }],
});

/** A quotation on its own, so that it can be selected and copied alone. */
export const quotation = (text: string): RichTextBlock => ({
  type: 'rich_text',
  elements: [{ type: 'rich_text_quote', elements: [plain(text)] }],
});

/** Lines in a fixed-width box. */
export const box = (text: string): RichTextBlock => ({
  type: 'rich_text',
  elements: [{ type: 'rich_text_preformatted', elements: [{ type: 'text', text }], border: 0 }],
});

/** A bulleted list. */
export const list = (items: readonly (readonly Piece[])[]): RichTextBlock => ({
  type: 'rich_text',
  elements: [
    {
      type: 'rich_text_list',
      style: 'bullet',
      elements: items.map((pieces) => ({ type: 'rich_text_section' as const, elements: [...pieces] })),
    },
  ],
});

export interface ButtonParts {
  readonly action: string;
  readonly text: string;
  readonly value: string;
  /** What a screen reader says, at most 75 characters. */
  readonly spoken?: string;
}

/** A row of buttons. */
export const buttons = (blockId: string, parts: readonly ButtonParts[]): KnownBlock => ({
  type: 'actions',
  block_id: blockId,
  elements: parts.map(({ action, text, value, spoken }) => ({
    type: 'button',
    action_id: action,
    text: { type: 'plain_text', text, emoji: false },
    value,
    ...(spoken === undefined ? {} : { accessibility_label: spoken }),
  })),
});

/** A table with a header row; empty cells are not allowed there and are written as a dash. */
export const table = (rows: readonly (readonly string[])[]): KnownBlock => ({
  type: 'table',
  rows: rows.map((row) =>
    row.map((cell) => ({ type: 'raw_text' as const, text: cell === '' ? '\u2013' : cell })),
  ),
});

/** Escapes text for a message's top-level `text`, which Slack reads as mrkdwn: exactly these three characters, `&` first. */
export const escape = (text: string) =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');

/**
 * The limits of Slack's messages, answered with Slack's own error codes, so that the practice room is no more patient than
 * Slack. Lengths are in UTF-16 units, as Slack's documentation of its blocks gives them.
 */

type Block = Readonly<Record<string, unknown>>;

const most = {
  /** A longer top-level text is refused in an update, and cut into several messages in a post: refused here in both. */
  text: 4_000,
  blocks: 50,
  /** All texts of a message's blocks together; measured by others, not documented. */
  blockText: 13_200,
  id: 255,
} as const;

const record = (value: unknown): Block =>
  typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Block) : {};
const list = (value: unknown): readonly unknown[] =>
  Array.isArray(value) ? (value as readonly unknown[]) : [];

/** A text object: one that is there, not empty and not too long. */
const isText = (value: unknown, longest: number): boolean => {
  const { text } = record(value);
  return typeof text === 'string' && text.length > 0 && text.length <= longest;
};
const within = (value: unknown, longest: number): boolean =>
  value === undefined || (typeof value === 'string' && value.length <= longest);

/** Each type of block that a message may have, and what makes one right. */
const blockRules: Readonly<Record<string, (block: Block) => boolean>> = {
  section: ({ text, fields }) =>
    (text !== undefined || fields !== undefined) &&
    (text === undefined || isText(text, 3_000)) &&
    list(fields).length <= 10 &&
    list(fields).every((field) => isText(field, 2_000)),
  header: ({ text }) => record(text)['type'] === 'plain_text' && isText(text, 150),
  context: ({ elements }) =>
    list(elements).length >= 1 &&
    list(elements).length <= 10 &&
    list(elements).every((each) => (record(each)['type'] === 'image' ? isImage(each) : isText(each, 3_000))),
  divider: () => true,
  actions: ({ elements }) =>
    list(elements).length >= 1 && list(elements).length <= 25 && list(elements).every(isElement),
  image: (block) => isImage(block),
  rich_text: ({ elements }) => list(elements).length >= 1,
  table: ({ rows }) =>
    list(rows).length >= 1 &&
    list(rows).length <= 100 &&
    list(rows).every((row) => list(row).length >= 1 && list(row).length <= 20),
};

function isElement(value: unknown): boolean {
  const element = record(value);
  if (element['type'] !== 'button') return typeof element['type'] === 'string';
  return (
    isText(element['text'], 75) &&
    within(element['value'], 2_000) &&
    within(element['accessibility_label'], 75)
  );
}

function isImage(value: unknown): boolean {
  const { alt_text: alt } = record(value);
  return typeof alt === 'string' && alt.length > 0 && alt.length <= 2_000;
}

/** The error code for a message that Slack would refuse, or `null`. */
export function faultInMessage(text: string, blocks: readonly unknown[]): string | null {
  if (text === '' && blocks.length === 0) return 'no_text';
  if (text.length > most.text) return 'msg_too_long';
  if (blocks.length > most.blocks) return 'invalid_blocks';
  if (!blocks.every((block) => blockRules[String(record(block)['type'])]?.(record(block)) === true))
    return 'invalid_blocks';
  if (blocks.filter((block) => record(block)['type'] === 'table').length > 1) return 'invalid_blocks';
  const { characters, right } = readThrough(blocks);
  if (!right) return 'invalid_blocks';
  return characters > most.blockText ? 'msg_blocks_too_long' : null;
}

/** Counts all text and looks for ids that are too long or stand twice, and for empty texts, however deep. */
function readThrough(blocks: readonly unknown[]): { readonly characters: number; readonly right: boolean } {
  const ids = new Set<string>();
  let characters = 0;
  const walk = (node: unknown): boolean => {
    if (Array.isArray(node)) return node.every(walk);
    if (typeof node !== 'object' || node === null) return true;
    const fields = node as Block;
    for (const name of ['block_id', 'action_id']) {
      const id = fields[name];
      if (typeof id !== 'string') continue;
      if (ids.has(`${name} ${id}`) || id.length > most.id) return false;
      ids.add(`${name} ${id}`);
    }
    if (typeof fields['text'] === 'string') {
      characters += fields['text'].length;
      if (fields['text'] === '') return false;
    }
    return Object.values(fields).every(walk);
  };
  return { right: walk(blocks), characters };
}

/** Whether this is metadata as Slack takes it: a short word and an object. Absent is right too. */
export function isMetadata(value: unknown): boolean {
  if (value === undefined) return true;
  const { event_type: type, event_payload: payload } = record(value);
  return (
    typeof type === 'string' && /^\w{1,255}$/.test(type) && typeof payload === 'object' && payload !== null
  );
}

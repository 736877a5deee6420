/** The limits of Slack's messages, answered with Slack's own error codes, so that the practice room is no more patient than Slack. */

const mostText = 40_000;
const mostBlocks = 50;
const mostBlockText = 13_200;
const mostButtons = 25;

/** The error code for a message that Slack would refuse, or `null`. */
export function faultInMessage(text: string, blocks: readonly unknown[]): string | null {
  if (text === '' && blocks.length === 0) return 'no_text';
  if (text.length > mostText) return 'msg_too_long';
  if (blocks.length > mostBlocks) return 'invalid_blocks';
  const ids = new Set<string>();
  let characters = 0;
  const walk = (node: unknown): boolean => {
    if (Array.isArray(node)) return node.every(walk);
    if (typeof node !== 'object' || node === null) return true;
    const fields = node as Readonly<Record<string, unknown>>;
    for (const name of ['block_id', 'action_id']) {
      const id = fields[name];
      if (typeof id !== 'string') continue;
      if (ids.has(`${name} ${id}`) || id.length > 255) return false;
      ids.add(`${name} ${id}`);
    }
    if (typeof fields['text'] === 'string') {
      characters += fields['text'].length;
      if (fields['text'] === '') return false;
    }
    if (
      fields['type'] === 'actions' &&
      Array.isArray(fields['elements']) &&
      fields['elements'].length > mostButtons
    )
      return false;
    if (fields['type'] === 'button' && buttonTextTooLong(fields)) return false;
    return Object.values(fields).every(walk);
  };
  if (!blocks.every(walk)) return 'invalid_blocks';
  return characters > mostBlockText ? 'msg_blocks_too_long' : null;
}

function buttonTextTooLong(button: Readonly<Record<string, unknown>>): boolean {
  const label = button['text'] as { readonly text?: string } | undefined;
  const value = button['value'];
  return (label?.text?.length ?? 0) > 75 || (typeof value === 'string' && value.length > 2_000);
}

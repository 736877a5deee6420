/** The fields of a call to Slack. */
export type Fields = Readonly<Record<string, unknown>>;

/** Reads the fields of a call as Slack takes them: JSON, or a form in which nested values are JSON texts. `null`: neither. */
export function fieldsOf(body: string, contentType: string): Fields | null {
  if (!contentType.includes('application/json'))
    return Object.fromEntries([...new URLSearchParams(body)].map(([name, value]) => [name, nested(value)]));
  const fields = parsed(body);
  return typeof fields === 'object' && fields !== null && !Array.isArray(fields) ? (fields as Fields) : null;
}

/** A form's value: the text itself, or what it holds where it is a JSON list or object. */
function nested(value: string): unknown {
  return /^[[{]/.test(value) ? (parsed(value) ?? value) : value;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return null;
  }
}

export const textOf = (value: unknown): string => (typeof value === 'string' ? value : '');
export const listOf = (value: unknown): readonly unknown[] =>
  Array.isArray(value) ? (value as readonly unknown[]) : [];
export const isTrue = (value: unknown): boolean => value === true || value === 'true';

/** What the command line was asked to do. */
export type Request =
  | { readonly kind: 'line'; readonly line: string; readonly json: boolean; readonly yes: boolean }
  | { readonly kind: 'read'; readonly message: string; readonly json: boolean; readonly yes: boolean }
  | { readonly kind: 'stream'; readonly json: boolean; readonly yes: boolean }
  | { readonly kind: 'usage' }
  | { readonly kind: 'version' }
  | { readonly kind: 'unknown-option'; readonly option: string };

/** Reads the arguments. Words that are not options are one line, joined by spaces; after `--` nothing is an option. */
export function readArguments(words: readonly string[]): Request {
  const end = words.indexOf('--');
  const optional = end === -1 ? words : words.slice(0, end);
  const options = optional.filter((word) => word.startsWith('--'));
  const rest = [
    ...optional.filter((word) => !word.startsWith('--')),
    ...(end === -1 ? [] : words.slice(end + 1)),
  ];
  const unknown = options.find((option) => !['--json', '--yes', '--help', '--version'].includes(option));
  if (unknown !== undefined) return { kind: 'unknown-option', option: unknown };
  if (options.includes('--help')) return { kind: 'usage' };
  if (options.includes('--version')) return { kind: 'version' };
  const json = options.includes('--json');
  const yes = options.includes('--yes');
  if (end === -1 && rest.length === 1 && rest[0] === '-') return { kind: 'stream', json, yes };
  const [first, ...message] = rest;
  if (first?.toLowerCase() === 'read' && message.length > 0)
    return { kind: 'read', message: message.join(' '), json, yes };
  return { kind: 'line', line: rest.join(' '), json, yes };
}

export const usage = `divisor "LINE"     answers one line
divisor -          answers each line of standard input, one answer a line
divisor read "MESSAGE"
                   finds the figures in a message, and says what is missing
divisor help       what a line may hold

--json             the whole report as one line of JSON
--yes              takes what a plain sentence was found to ask
--help, --version
--                 what follows is the line, even if it starts with a dash

Status: 0 answered; 2 a line was not understood or is impossible; 1 the program failed.`;

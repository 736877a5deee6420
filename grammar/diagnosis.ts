import { messageText } from './messages.ts';
import type { MessageId } from './messages.ts';
import type { Diagnosis, Span, Suggestion } from './question.ts';

/** Three lines to try, for somebody who sees the bot for the first time. */
export const linesToTry: readonly string[] = [
  'night shift: 18 of 1,204 vs day shift: 9 of 2,377',
  'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
  '4.2% vs 2.6%',
];

/** A line to send as it stands. */
export const plainSuggestion = (line: string): Suggestion => ({ line, label: null });

/** A message with its place and the lines that would work, at most three. */
export function diagnosis(
  id: MessageId,
  span: Span,
  pieces: readonly string[] = [],
  suggestions: readonly (string | Suggestion)[] = [],
): Diagnosis {
  return {
    id: id === 'two-readings-shares' ? 'two-readings' : id,
    message: messageText(id, ...pieces),
    span,
    suggestions: suggestions
      .map((suggestion) => (typeof suggestion === 'string' ? plainSuggestion(suggestion) : suggestion))
      .slice(0, 3),
  };
}

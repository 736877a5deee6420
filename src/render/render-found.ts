import type { Diagnosis } from '../../grammar/question.ts';
import type { SentenceReading } from '../../grammar/sentence.ts';

/** The version of this JSON; it changes when a field changes its meaning or goes. */
const schema = 1;

/** What was found in a message, as one line of JSON: positions in the message as typed, UTF-16 units, `to` exclusive. */
export function renderFoundJson(message: string, { found, figures, missing }: SentenceReading): string {
  const [first] = figures;
  return JSON.stringify({
    schema,
    line: message,
    found: found.map(({ text, from, to, role }) => ({ text, from, to, role })),
    question: first?.question ?? null,
    draft: first?.draft ?? '',
    missing: missing.map(({ id, text }) => ({ id, text })),
  });
}

/** What was found in a message, as text: the pieces, the questions they make, and what is missing. */
export function renderFoundText({ found, figures, missing }: SentenceReading, told: Diagnosis): string {
  const widest = Math.max(0, ...found.map(({ role }) => role.length));
  const numbered = figures.length > 1;
  return [
    told.message,
    ...(found.length === 0 ? [] : ['', 'Found']),
    ...found.map(({ role, text }) => `  ${role.padEnd(widest)}  ${text.replace(/\s+/g, ' ')}`),
    ...(figures.length === 0 ? [] : ['', numbered ? 'Questions' : 'Question']),
    ...figures.map(({ draft }, index) => `  ${numbered ? `${index + 1}: ` : ''}${draft}`),
    ...(missing.length === 0 ? [] : ['', 'Missing', ...missing.map(({ text }) => `  ${text}`)]),
  ].join('\n');
}

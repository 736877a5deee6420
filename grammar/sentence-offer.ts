import { printCanonical } from './print-canonical.ts';
import { diagnosis, linesToTry, plainSuggestion } from './diagnosis.ts';
import type { Diagnosis, LineLimits, LineReading, Question, Span } from './question.ts';
import { readSentence } from './sentence.ts';
import type { SentenceReading, StrictReader } from './sentence.ts';
import { chooseText, confirmText, incompleteText, resultAloneText } from './sentence-messages.ts';
import { isChanging } from './sentence-words.ts';
import { hasOddNames, isOddNoun, nameBeforeVerb } from './sentence-names.ts';

/** Faults that may come of reading a sentence as if it were a line. Any other fault is of the figures, and stays. */
const ofWording: ReadonlySet<string> = new Set([
  'unread-part',
  'no-figure',
  'mixed-figures',
  'one-share',
  'one-count',
  'change-of-two',
  'two-readings',
  'group-missing',
  'second-total-missing',
  'total-missing',
  'total-first',
  'same-name-twice',
  'measurement',
  'two-numbers',
  'date-in-figure',
  'year-or-people',
  'years-or-counts',
  'different-times',
  'clauses-only',
  'reference-unknown',
  'coverage-unknown-group',
  'coverage-no-share',
  'coverage-missing',
  'cases-by-group',
  'units-differ',
  'mention-as-name',
  'not-whole',
  'too-many-groups',
  'no-count-fits',
  'unread-name',
  'clause-does-not-fit',
  'coverage-form-of-several',
]);

/** A full stop between two sentences. */
const severalSentences = /[A-Za-z0-9%)]{2}[.!?]\s+[A-Z]/;

/** `read "..."`: the message is read as a sentence, even where it could be read strictly. */
const readCommand = /^\s*read\s*["\u201c\u201e\u00ab]/i;
const closingQuotation = /["\u201c\u201d\u00bb]$/;

/**
 * Strict, then tolerant: a line that the strict reader refuses for its wording, or reads with a sentence for a name, is read as a
 * plain sentence, and what that finds is offered. A line that is read rightly is left as it is.
 */
export function withOffer(
  line: string,
  reading: LineReading,
  strict: StrictReader,
  limits: LineLimits,
): LineReading {
  // A sentence under test is held against the figures beside it, never read as figures itself.
  if (reading.kind === 'question' && reading.question.clauses.says !== undefined) return reading;
  const command = line.length > limits.characters ? null : readCommand.exec(line);
  if (command !== null) {
    const at = command[0].length;
    const message = line.slice(at).trimEnd().replace(closingQuotation, '');
    return refused(moved(offered(strict, message, readSentence(message, strict)), at));
  }
  if (reading.kind === 'help') return reading;
  if (reading.kind === 'question') {
    const odd = hasOddNames(reading.question, line);
    if (!odd && !severalSentences.test(line)) return reading;
    const found = readSentence(line, strict);
    // What a line asks is one figure; a second sentence with another must not be passed over.
    if (!odd && found.figures.length < 2) return reading;
    const [first] = found.figures;
    // `from 2019 to 2021 the ferry did not run`: two numbers in a sentence that are no figure.
    if (first === undefined)
      return reading.question.kind === 'bare-counts' ? refused(offered(strict, line, found)) : reading;
    const cut = first.question === null ? null : withCutNames(reading.question, first.question.canonical);
    return cut === null ? refused(offered(strict, line, found)) : { kind: 'question', question: cut };
  }
  const { id } = reading.diagnosis;
  if (!ofWording.has(id)) return reading;
  const found = readSentence(line, strict);
  return helps(id, found, line) ? refused(offered(strict, line, found)) : reading;
}

/** What a sentence gives as a diagnosis, each complete line in its canonical form. */
function offered(strict: StrictReader, line: string, found: SentenceReading): Diagnosis {
  const fault = diagnosisOf(line, found);
  const canonical = (each: string) => {
    // A draft with a gap stays as it is.
    if (each.includes('...')) return each;
    const reading = strict(each);
    return reading.kind === 'question' ? printCanonical(reading.question) : each;
  };
  return {
    ...fault,
    suggestions: fault.suggestions.map((each) => ({ ...each, line: canonical(each.line) })),
  };
}

const refused = (fault: Diagnosis): LineReading => ({ kind: 'diagnosis', diagnosis: fault });

const moved = (fault: Diagnosis, by: number): Diagnosis => ({
  ...fault,
  span: { from: fault.span.from + by, to: fault.span.to + by },
});

/** Whether what the sentence gives is more than what the refusal says. */
function helps(id: string, { figures, found }: SentenceReading, line: string): boolean {
  const [first] = figures;
  if (first === undefined) {
    if (found.some(({ role }) => role === 'claim')) return saysLittle.has(id) || id === 'not-whole';
    // `Ask Ada about ward 7`: a number in a sentence that counts nothing.
    return (id === 'one-count' || id === 'same-name-twice') && line.trim().split(/\s+/).length > 3;
  }
  if (first.question !== null) {
    // A total that stands first is best put right by itself, and two percentages are asked about as they stand.
    if (id === 'total-first')
      return first.question.kind === 'shares' || / vs /.test(first.question.canonical);
    // `compared to 9 from 2,377`: the total is there, behind a word that only a sentence has.
    if (id === 'second-total-missing' && !line.includes(':')) return true;
    return isProse(line);
  }
  return isProse(line) && saysLittle.has(id);
}

/** Refusals that say less than what a sentence lacks. */
const saysLittle: ReadonlySet<string> = new Set([
  'one-share',
  'one-count',
  'no-figure',
  'unread-part',
  'mixed-figures',
]);

/** Whether a line is a sentence rather than a figure with names: it has at least three words, one of them a verb. */
const isProse = (line: string) => {
  const words = line.split(/[\s,;:()"]+/).filter((word) => /^[^\d%]+$/.test(word));
  return words.length >= 3 && words.some((word) => isOddNoun(word) || isChanging(word));
};

/**
 * `... and 9 out of 2377 day staff had an incident`: where only the end of a sentence clings to a name and the sentence gives the
 * very same figures without it, the line was read rightly, and the name is cut.
 */
function withCutNames(question: Question, canonical: string): Question | null {
  if (question.kind !== 'counts') return null;
  const cut = {
    ...question,
    groups: question.groups.map((group) => ({
      ...group,
      label: group.label === null ? null : nameBeforeVerb(group.label),
    })),
  };
  return printCanonical(cut) === canonical ? cut : null;
}

/** What a message is answered with: an offer to confirm, figures to choose from, what is missing, or that there is no figure. */
export function diagnosisOf(
  message: string,
  { found, figures, missing, leftOut, count }: SentenceReading,
): Diagnosis {
  const [first] = figures;
  const texts = missing.map(({ text }) => text);
  if (first === undefined) {
    const claim = found.find(({ role }) => role === 'claim');
    if (claim === undefined) return diagnosis('no-figure', { from: 0, to: message.length }, [], linesToTry);
    return made('result-alone', resultAloneText(cut(claim.text, 60)), claim, []);
  }
  if (figures.length > 1) {
    const offered = figures.slice(0, 3);
    return made(
      'confirm',
      chooseText(
        offered.map(({ shown }) => cut(shown, 44)),
        count,
      ),
      { from: first.span.from, to: Math.max(...figures.map(({ span }) => span.to)) },
      offered.map(({ draft, shown }, index) => ({ line: draft, label: cut(`${index + 1}: ${shown}`, 75) })),
    );
  }
  if (first.question === null)
    return made(
      'incomplete',
      incompleteText(cut(first.shown, 80), texts),
      first.span,
      first.draft === '' ? [] : [plainSuggestion(first.draft)],
    );
  return made('confirm', confirmText(cut(first.shown, 90), texts, cut(leftOut.join(', '), 40)), first.span, [
    { line: first.question.canonical, label: 'Yes' },
    ...(first.instead === null ? [] : [first.instead]),
  ]);
}

const made = (
  id: string,
  message: string,
  { from, to }: Span,
  suggestions: Diagnosis['suggestions'],
): Diagnosis => ({
  id,
  message,
  span: { from, to },
  suggestions,
});

const cut = (text: string, most: number) =>
  text.length <= most ? text : `${text.slice(0, most - 1).trimEnd()}\u2026`;

import { grouped } from './numbers.ts';
import type { IRecognitionException, IToken } from 'chevrotain';
import { joinCoverages } from './coverage-by-period.ts';
import { diagnosis, linesToTry } from './diagnosis.ts';
import { fold, typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { withoutAbout } from './about.ts';
import { joinSpacedNumbers } from './odd-figures.ts';
import { parseTags } from './parser.ts';
import { printCanonical } from './print-canonical.ts';
import type { SaysClause } from './claim.ts';
import type { Diagnosis, HelpTopic, LineLimits, LineReading, Question } from './question.ts';
import { cutSays } from './says-cut.ts';
import { withOffer } from './sentence-offer.ts';
import { settleLine } from './settle.ts';
import { tableOf } from './table.ts';
import { tagAlarm } from './tag-alarm.ts';
import { tagLine } from './tag.ts';
import * as tags from './tags.ts';
import { fineTokensOf } from './tokens.ts';
import { layersBy, partsOfTree } from './tree.ts';

const topics: readonly HelpTopic[] = [
  'overview',
  'counts',
  'shares',
  'rates',
  'change',
  'strata',
  'stated',
  'bare-counts',
  'alarm',
];

/** Reads one typed line: strictly, else as a plain sentence whose figures are offered. Pure, linear in its length, never throws. */
export function readLine(line: string, limits: LineLimits): LineReading {
  return withOffer(line, readStrictly(line, limits), (each) => readStrictly(each, limits), limits);
}

/** Reads one line as it stands. */
export function readStrictly(line: string, limits: LineLimits): LineReading {
  // Before anything else, so that no step ever sees more.
  if (line.length > limits.characters) {
    return refusal(
      diagnosis('too-long', { from: limits.characters, to: line.length }, [grouped(limits.characters)]),
    );
  }
  const topic = helpTopicOf(line);
  if (topic !== null) return { kind: 'help', topic };
  const { folded: typed, says, fault: saysFault } = cutSays(fold(line));
  if (saysFault !== null) return refusal(saysFault);
  if (says !== null && /^[\s;|]*$/.test(typed.text))
    return refusal(diagnosis('clauses-only', { from: 0, to: line.length }));
  const table = typed.text.includes('\n') ? tableOf(typed) : ({ kind: 'none' } as const);
  if (table.kind === 'fault') return refusal(table.fault);
  const folded = table.kind === 'line' ? table.folded : typed;
  const { tokens: single, remarks } = withoutAbout(joinSpacedNumbers(fineTokensOf(folded.text)), folded);
  const { tokens: fine, fault: coverageFault } = joinCoverages(single, folded);
  if (/^[\s?]*$/.test(folded.text))
    return refusal(diagnosis('empty-line', { from: 0, to: line.length }, [], linesToTry));
  if (coverageFault !== null) return refusal(coverageFault);
  const alarm = tagAlarm(fine, folded);
  const { tags: tagged, fault, hasFigure } = alarm ?? tagLine(fine, folded);
  if (fault !== null) return refusal(fault);
  if (
    !hasFigure &&
    !tagged.some(({ tokenType }) => tokenType === tags.CasesTag || tokenType === tags.ShareTag)
  ) {
    return refusal(diagnosis('no-figure', { from: 0, to: line.length }, [], linesToTry));
  }
  const { tree, errors } = parseTags(tagged);
  const [error] = errors;
  if (error !== undefined) return refusal(faultOf(error, folded));
  const question = settleLine(partsOfTree(tree, folded), {
    typed: line,
    by: layersBy(tree, folded),
    remarks: [...folded.remarks, ...remarks, ...(alarm?.remarks ?? [])],
    mostGroups: limits.groups,
    mostLayers: limits.layers,
  });
  if (!question.ok) return refusal(question.fault);
  if (says === null) return { kind: 'question', question: question.value };
  // A sentence is held against ratios and differences between groups, and an alarm has none.
  if (question.value.kind === 'alarm')
    return refusal(
      diagnosis('alarm-clause', { from: 0, to: line.length }, ['says'], [printCanonical(question.value)]),
    );
  return { kind: 'question', question: withSays(question.value, says) };
}

const withSays = (question: Question, says: SaysClause): Question => ({
  ...question,
  clauses: { ...question.clauses, says },
});

const refusal = (fault: Diagnosis): LineReading => ({ kind: 'diagnosis', diagnosis: fault });

/** `help`, `help counts`: the whole line, and no figure in it. */
function helpTopicOf(line: string): HelpTopic | null {
  const words = /^\s*help(?:\s+([a-z -]+?))?\s*[.?!]?\s*$/i.exec(line);
  if (words === null) return null;
  const asked = words[1]?.toLowerCase().replace(/\s+/g, '-') ?? 'overview';
  return topics.find((topic) => topic === asked) ?? 'overview';
}

/** What a parse error says to a person: where it is, and what would have been understood there. */
function faultOf(error: IRecognitionException, folded: Folded): Diagnosis {
  const { token } = error;
  const previousToken = 'previousToken' in error ? (error.previousToken as IToken | undefined) : undefined;
  // At the end of the input the parser gives no place; the end of the token before is it.
  const atEnd = Number.isNaN(token.startOffset);
  const from = atEnd ? (previousToken?.startOffset ?? 0) : token.startOffset;
  const to = atEnd ? (previousToken?.endOffset ?? 0) + 1 : (token.endOffset ?? token.startOffset) + 1;
  const span = typedSpan(folded, from, to);
  if (previousToken?.tokenType === tags.OfTag) {
    const count = folded.typed.slice(0, span.from).trim().split(/\s+/).at(-1) ?? '';
    return diagnosis('total-missing', span, [count], [`${folded.typed.slice(0, span.to).trim()} ...`]);
  }
  return diagnosis(
    'unread-part',
    span,
    [folded.typed.slice(span.from, span.to).trim().slice(0, 40)],
    linesToTry.slice(0, 2),
  );
}

/** The words that say what a figure of an alarm is, and what each of them means. */

/** What a word in front of or behind a figure says that it is. */
export type AlarmWord =
  | 'sensitivity'
  | 'miss rate'
  | 'specificity'
  | 'false alarm rate'
  | 'prevalence'
  | 'caught'
  | 'missed'
  | 'false alarms'
  | 'quiet'
  | 'accuracy'
  | 'result';

interface Spelling {
  readonly word: AlarmWord;
  /** A term of the trade; the others are words that may as well be the name of a group. */
  readonly technical: boolean;
}

const spellings: readonly (readonly [AlarmWord, boolean, readonly string[]])[] = [
  [
    'sensitivity',
    true,
    ['sensitivity', 'sensitive', 'sens', 'tpr', 'true positive rate', 'detection rate', 'hit rate', 'recall'],
  ],
  ['sensitivity', false, ['catches', 'detects', 'finds']],
  ['miss rate', true, ['miss rate', 'false negative rate', 'fnr']],
  ['specificity', true, ['specificity', 'specific', 'spec', 'tnr', 'true negative rate']],
  ['false alarm rate', true, ['false alarm rate', 'false positive rate', 'fpr']],
  [
    'prevalence',
    true,
    ['prevalence', 'prev', 'base rate', 'baserate', 'pretest probability', 'pre test probability'],
  ],
  ['caught', true, ['tp', 'true positive', 'true positives']],
  ['caught', false, ['caught', 'true alarm', 'true alarms', 'real alarm', 'real alarms', 'hits']],
  ['missed', true, ['fn', 'false negative', 'false negatives']],
  ['missed', false, ['missed', 'misses']],
  ['false alarms', true, ['fp', 'false positive', 'false positives']],
  ['false alarms', false, ['false alarm', 'false alarms']],
  ['quiet', true, ['tn', 'true negative', 'true negatives']],
  ['quiet', false, ['quiet', 'rightly quiet', 'silent']],
  ['accuracy', true, ['accurate', 'accuracy']],
  ['result', true, ['ppv', 'npv', 'positive predictive value', 'negative predictive value']],
];

const bySpelling = new Map<string, Spelling>(
  spellings.flatMap(([word, technical, phrases]) =>
    phrases.map((phrase): [string, Spelling] => [phrase, { word, technical }]),
  ),
);
const longestPhrase = 3;

const words = new Map<string, AlarmWord>(spellings.map(([word]) => [word, word]));

/** The alarm word of this name, or `null`. */
export const alarmWordNamed = (name: string | null): AlarmWord | null =>
  name === null ? null : (words.get(name) ?? null);

/** A word of the alarm with its place: `from` up to, but without, `to` among the given words. */
export interface FoundWord extends Spelling {
  readonly from: number;
  readonly to: number;
}

/** The alarm words in a row of words, the longest spelling first: "false alarm rate" is not "false alarms". */
export function alarmWordsIn(row: readonly string[]): readonly FoundWord[] {
  const found: FoundWord[] = [];
  for (let at = 0; at < row.length;) {
    const here = phraseAt(row, at);
    if (here !== null) found.push(here);
    at = here?.to ?? at + 1;
  }
  return found;
}

function phraseAt(row: readonly string[], from: number): FoundWord | null {
  for (let to = Math.min(row.length, from + longestPhrase); to > from; to -= 1) {
    const phrase = row.slice(from, to).map(plain).join(' ');
    const spelling = bySpelling.get(phrase);
    if (spelling !== undefined) return { ...spelling, from, to };
  }
  return null;
}

const plain = (word: string) => word.toLowerCase().replace(/-/g, ' ').replace(/\.$/, '');

/** What an alarm is called: these need no name of their own, and a name that ends in one of them is an alarm's. */
const kinds = /(?:^|\s)(?:alarms?|alerts?|tests?|filters?|detectors?|sensors?|screens?|screening|checks?)$/i;
export const isAlarmName = (text: string) => kinds.test(text);
export const isPlainAlarm = (text: string) => {
  const bare = text.trim().replace(/^(?:the|our|an?|this)\s+/i, '');
  return kinds.test(bare) && !/\s/.test(bare);
};

const fillers =
  /^(?:a|an|the|this|that|our|its?|is|are|was|were|be|of|at|with|has|had|have|having|and|or|from|between|in|on|for|=|:|\(|\)|\[|\]|\?|-+|rates?|alarms?|alerts?|tests?|filters?|detectors?|cases|n)$/i;
/** Words around the figures that change nothing. */
export const isFiller = (text: string) => fillers.test(text);

const pluralUnit = /(?:[^s]s|people|children|men|women|staff)$/i;
/** Whether words behind a prevalence can be what is counted: "wells", "water samples", "people". */
export const isUnit = (text: string) => pluralUnit.test(text);

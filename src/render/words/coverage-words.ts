import type { CoverageKnown, Question, SharesGroup, SharesQuestion } from '../../../grammar/question.ts';
import { casesAsTyped, population } from './labels.ts';
import { count, percent } from './numbers.ts';

/** Coverage in words, however it is known. */

/** Beyond this many periods a sentence names the first and the last only. */
const mostPeriods = 3;

type Known<Kind extends CoverageKnown['kind']> = Extract<CoverageKnown, { kind: Kind }>;

/** The group's coverage in the line that says how the input was read; `full`: with what it is a share of. */
export function coverageRead(question: SharesQuestion, index: number): string {
  const group = question.groups[index];
  if (group === undefined) return '';
  const { coverage, known } = group;
  const full = index === 0;
  const of = full ? ` of ${population(question)}` : '';
  switch (known.kind) {
    case 'given':
      return `${coverage.text}${of}`;
    case 'interval':
      return full ? `${shareText(group)}${of} (${ends(known)})` : shareText(group);
    case 'range':
      return `${ends(known)}${of}`;
    case 'growth':
      return `from ${known.start.text} to ${known.end.text}${of}`;
    case 'sample':
      return full
        ? `${count(known.inGroup)} of a sample of ${count(known.sampled)}${question.unit === null ? '' : ` ${question.unit}`}`
        : `${count(known.inGroup)} of ${count(known.sampled)}`;
    case 'periods':
      return full ? `${periodsText(question, known)}` : '';
  }
}

function periodsText(question: Question, { by, periods }: Known<'periods'>): string {
  const [first, last] = [periods[0], periods.at(-1)];
  const name = (label: string | null) => (label === null ? '' : `${label} `);
  if (periods.length <= mostPeriods || first === undefined || last === undefined) {
    const rows = periods.map(
      ({ label, coverage, allCases }, index) =>
        `${name(label)}${coverage.text} (${count(allCases)}${index === 0 ? ' cases' : ''})`,
    );
    return `${rows.join(', ')} of ${population(question)} by ${by}`;
  }
  const when =
    first.label === null || last.label === null
      ? ` in ${periods.length} ${by}s`
      : `, ${first.label} to ${last.label}`;
  return `${first.coverage.text} to ${last.coverage.text} of ${population(question)}${when}`;
}

const ends = ({ low, high }: Known<'range'> | Known<'interval'>) => `${low.text} to ${high.text}`;

/** One number for a coverage, where a sentence needs one: `38%`, and the middle of a range. */
export function shareText({ coverage, known }: SharesGroup): string {
  if (known.kind === 'given') return coverage.text;
  return known.kind === 'sample' || known.kind === 'periods'
    ? percent(coverage.value, 'short')
    : `${Number((coverage.value * 100).toFixed(10))}%`;
}

/** What the share of the cases would be if both groups had them equally often. */
export function expectedShare(group: SharesGroup): string {
  switch (group.known.kind) {
    case 'given':
      return group.coverage.text;
    case 'range':
      return ends(group.known);
    case 'growth':
      return shareText(group);
    case 'interval':
    case 'sample':
    case 'periods':
      return `about ${shareText(group)}`;
  }
}

/** How a sentence to post goes on behind "made up 44 of 75 cases": with the group's share of everybody. */
export function coveragePhrase(question: SharesQuestion, index: number): string {
  const group = question.groups[index];
  if (group === undefined) return '';
  const { known } = group;
  const people = population(question);
  switch (known.kind) {
    case 'given':
      return ` and ${group.coverage.text} of ${people}`;
    case 'range':
      return ` and ${ends(known)} of ${people}`;
    case 'interval':
      return ` and ${shareText(group)} of ${people} (interval ${ends(known)})`;
    case 'sample':
      return ` and ${count(known.inGroup)} of ${count(known.sampled)}${question.unit === null ? '' : ` ${question.unit}`} sampled (${shareText(group)})`;
    case 'growth':
      return `, while its share of ${people} went from ${known.start.text} to ${known.end.text}`;
    case 'periods':
      return `, while its share of ${people} ${courseText(known)}`;
  }
}

function courseText({ by, periods }: Known<'periods'>): string {
  const texts = periods.map(({ coverage }) => coverage.text);
  return texts.length <= mostPeriods
    ? `was ${texts.join(', then ')}, by ${by}`
    : `went from ${texts[0] ?? ''} to ${texts.at(-1) ?? ''}`;
}

/** "of known group", behind the cases, where some are of unknown group. */
export const ofKnownGroup = (question: Question) =>
  question.kind === 'shares' && question.unknownCases !== null ? ' of known group' : '';

/** "Of 12 more the group is not known.", in front of a sentence about the others. */
export const unknownSentence = ({ unknownCases }: SharesQuestion) =>
  unknownCases === null ? '' : ` Of ${count(unknownCases.value)} more the group is not known.`;

/** What the ratio takes for granted: "If those split like the others, that is"; `null` where nothing. */
export function assumption(question: Question): string | null {
  if (question.kind !== 'shares') return null;
  const parts = [
    ...(question.unknownCases === null ? [] : ['those split like the others']),
    ...(question.groups.some(({ known }) => known.kind === 'growth')
      ? ['the risk stayed the same meanwhile']
      : []),
  ];
  return parts.length === 0 ? null : `If ${parts.join(' and ')}, that is`;
}

/** The caution about the coverage itself, by how it is known. */
export function coverageCaution(question: SharesQuestion): string {
  const group = question.groups.find(({ coverageImplied }) => !coverageImplied);
  const same = 'for the same people, place and time';
  if (group === undefined) return `Coverage is taken as exact, ${same}.`;
  const { known, coverage } = group;
  const hasInterval = question.groups.every(({ cases }) => cases !== null);
  switch (known.kind) {
    case 'given': {
      const about = question.remarks.find(
        ({ id, readAs }) => id === 'about-taken-as-given' && readAs === coverage.text,
      );
      return about === undefined
        ? `${coverage.text} is taken as exact, ${same}.`
        : `${capitalised(about.text)} is taken as ${coverage.text}, ${same}.`;
    }
    case 'range':
      return hasInterval
        ? `The interval covers every coverage from ${ends(known)}, ${same}.`
        : `Every coverage from ${ends(known)} is possible, ${same}.`;
    case 'interval':
      return `${ends(known)} is taken as chance alone (${known.level?.text ?? '95%'}), ${same}.`;
    case 'sample':
      return hasInterval
        ? `Chance in the sample of ${count(known.sampled)} is allowed for; other people, place or time are not.`
        : `The sample of ${count(known.sampled)} is taken as exact for want of an interval, ${same}.`;
    case 'growth':
    case 'periods':
      return coverageChanged(question);
  }
}

const capitalised = (text: string) => text.slice(0, 1).toUpperCase() + text.slice(1);

/** Coverage that changed while the cases were counted. */
export const coverageChanged = ({ groups }: SharesQuestion) =>
  groups.some(({ known }) => known.kind === 'growth')
    ? 'Coverage changed while the cases were counted, so the ratio depends on when they came.'
    : 'The coverage when cases arose counts, not when reported.';

/** "Of all 87 cases, 12 have no known group." */
export function unknownCaution(question: SharesQuestion): string {
  const unknown = question.unknownCases?.value ?? 0;
  const all = unknown + (question.totalCases?.value ?? 0);
  return `Of all ${count(all)} ${casesAsTyped(question)}, ${count(unknown)} have no known group.`;
}

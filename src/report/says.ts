import type { FigureClaim, SaysClause } from '../../grammar/claim.ts';
import type { Reading } from './reading.ts';
import { readingsOf, shownDirection } from './report.ts';
import type { GroupedReport as Report } from './report.ts';
import { faultOf } from './says-faults.ts';
import { intervalFinding } from './says-interval.ts';
import type { AtLevel } from './says-interval.ts';
import { pairsFor } from './says-subject.ts';
import type { Says, SaysPair, SaysRemark } from './said.ts';
import { agrees, ofGroups, ofPair, wordedAs } from './says-values.ts';
import type { Comparable } from './says-values.ts';

/** Holds the sentence under test, if there is one, against the report. Pure; never throws whatever the sentence says. */
export function saysFor(report: Report, at: AtLevel): Says | null {
  const clause = report.question.clauses.says;
  if (clause === undefined) return null;
  const pairs = pairsFor(report, clause.text);
  const [first] = pairs;
  if (first === undefined) return null;
  const { claim } = clause;
  if (claim.kind !== 'figure') {
    const words = pairs.map((pair) => inWords(report, clause, pair));
    return words.find(({ agreesWith }) => agreesWith.length > 0) ?? words[0] ?? null;
  }
  const given = asGiven(report, clause, claim, first);
  if (given !== null) return given;
  const each = pairs.map((pair) => againstPair(report, clause, claim, pair, at));
  return each.find(({ agreesWith }) => agreesWith.length > 0) ?? each[0] ?? null;
}

function againstPair(
  report: Report,
  clause: SaysClause,
  claim: FigureClaim,
  pair: SaysPair,
  at: AtLevel,
): Says {
  const worded = wordedAs(report, pair, claim, clause.text);
  const fitting = distinct(worded.filter(({ value }) => agrees(claim, value)));
  const intervals = fitting.map((reading) => ({
    reading,
    ...intervalFinding(report, pair, claim, reading, at),
  }));
  const withInterval = claim.interval !== null;
  const agreesWith = withInterval
    ? intervals.filter(({ matched }) => matched).map(({ reading }) => reading)
    : fitting;
  const fault = fitting.length > 0 ? null : faultOf(report, pair, claim, clause.text);
  const [shown] = [...intervals].sort((a, b) => Number(b.matched) - Number(a.matched));
  const remarks: SaysRemark[] = [
    ...(fault === null ? [] : [fault]),
    ...(claim.measure === 'times-more'
      ? [{ id: 'ambiguous-more', reading: agreesWith[0] ?? null } as const]
      : []),
    ...(withInterval && shown !== undefined
      ? [
          {
            id: 'interval-variant',
            reading: shown.reading,
            matched: shown.matched,
            nearest: shown.nearest,
          } as const,
        ]
      : []),
    ...differenceRemark(report, pair, claim),
  ];
  const settled = agreesWith.length > 0 && remarks.every(({ id }) => id === 'interval-variant');
  return {
    clause,
    pair,
    agreesWith,
    remarks,
    instead: settled ? null : insteadOf(report, pair, claim, remarks, worded),
    held: worded.length === 0 && fault === null ? 'no-reading' : 'held',
  };
}

/** A number without a unit that is one of the counts of the line, or the difference of two. */
function asGiven(report: Report, clause: SaysClause, claim: FigureClaim, pair: SaysPair): Says | null {
  if (claim.measure !== 'figure' || claim.interval !== null) return null;
  const { question } = report;
  if (question.kind === 'strata' || question.kind === 'stated') return null;
  const counts = question.groups.map(({ cases }) => cases?.value ?? NaN);
  const [own = NaN, other = NaN] = [
    counts[pair.subject],
    counts[pair.subject === pair.of ? (pair.against ?? pair.of) : pair.of],
  ];
  const difference = claim.direction === 'down' ? other - own : own - other;
  const base = { clause, pair, agreesWith: [], remarks: [], instead: null };
  if (claim.direction === null) return counts.includes(claim.value) ? { ...base, held: 'given' } : null;
  return difference > 0 && difference === claim.value ? { ...base, held: 'count-difference' } : null;
}

const distinct = (found: readonly Comparable[]): Reading[] => [
  ...new Map(found.map(({ reading }) => [`${reading.id} ${reading.of}`, reading])).values(),
];

/** A comparison is claimed, and the interval includes no difference. */
function differenceRemark(report: Report, pair: SaysPair, claim: FigureClaim): SaysRemark[] {
  if (claim.measure === 'share' || claim.measure === 'percentage' || pair.against === null) return [];
  // An interval that goes with the figure says so itself.
  if (claim.interval !== null) return [];
  const headline = ofPair(report, pair, [report.headline])[0];
  if (headline === undefined || shownDirection(report, headline) !== 'none-shown') return [];
  return [{ id: 'no-difference-shown', reading: headline, claims: 'difference', shown: false }];
}

/** The reading to write instead: one in the measure of the sentence, unless no difference is shown. */
function insteadOf(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  remarks: readonly SaysRemark[],
  worded: readonly Comparable[],
): Reading | null {
  const headline =
    ofPair(report, pair, [report.headline])[0] ?? readingsOf(report, report.headline)[0] ?? null;
  if (remarks.some(({ id }) => id === 'no-difference-shown')) return headline;
  const fault = remarks[0];
  if (fault?.id === 'points-called-per-cent' || fault?.id === 'hedge-too-strong') return fault.reading;
  if (fault?.id === 'share-as-risk' || fault?.id === 'odds-ratio-as-risk') return headline;
  if (claim.measure === 'share') {
    const [share] = ofGroups(report, { ...pair, named: true }, ['risk', 'case-share', 'rate']);
    return share?.reading ?? headline;
  }
  return worded[0]?.reading ?? headline;
}

/** "No difference", "significant", "not significant", and sentences without a figure. */
function inWords(report: Report, clause: SaysClause, pair: SaysPair): Says {
  const headline = ofPair(report, pair, [report.headline])[0] ?? null;
  const base: Says = {
    clause,
    pair,
    agreesWith: [],
    remarks: [],
    instead: headline ?? readingsOf(report, report.headline)[0] ?? null,
    held: 'held',
  };
  if (clause.claim.kind === 'none') return { ...base, held: 'no-figure' };
  if (headline === null || (headline.interval === null && headline.whyNoInterval !== 'no-exact-form'))
    return { ...base, held: 'no-reading' };
  const shown = shownDirection(report, headline) !== 'none-shown';
  const remark = (claims: 'difference' | 'none'): SaysRemark => ({
    id: 'no-difference-shown',
    reading: headline,
    claims,
    shown,
  });
  switch (clause.claim.kind) {
    case 'shown':
      return shown
        ? { ...base, agreesWith: [headline], instead: null }
        : { ...base, remarks: [remark('difference')] };
    case 'not-shown':
      return shown
        ? { ...base, remarks: [remark('none')] }
        : {
            ...base,
            agreesWith: [headline],
            // It says so itself.
            remarks: /nor that/i.test(clause.text) ? [] : [remark('none')],
            instead: null,
          };
    default:
      return { ...base, remarks: [remark('none')] };
  }
}

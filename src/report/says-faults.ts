import type { FigureClaim } from '../../grammar/claim.ts';
import type { GroupedQuestion as Question } from '../../grammar/question.ts';
import type { GroupedReport as Report } from './report.ts';
import type { SaysFault, SaysPair } from './said.ts';
import {
  agrees,
  changes,
  ofGroups,
  ofPair,
  plainRatios,
  pointDifferences,
  ratios,
  shareOf,
  wordedAs,
} from './says-values.ts';

/** The first explanation that gives the claim's number; `null` where none does. */
export function faultOf(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): SaysFault | null {
  const tests: readonly (() => SaysFault | null)[] = [
    () => pointsAndPerCent(report, pair, claim),
    () => hedgeTooStrong(report, pair, claim, sentence),
    () => shareAsRisk(report, pair, claim, sentence),
    () => oddsAsRisk(report, pair, claim),
    () => otherWayRound(report, pair, claim, sentence),
    () => wrongBase(report, pair, claim),
    () => roundedFirst(report, pair, claim, sentence),
    () => decimalSlip(report, pair, claim, sentence),
  ];
  for (const test of tests) {
    const found = test();
    if (found !== null) return found;
  }
  return null;
}

function pointsAndPerCent(report: Report, pair: SaysPair, claim: FigureClaim): SaysFault | null {
  if (claim.measure === 'change' || claim.measure === 'percentage') {
    const found = pointDifferences(report, pair, claim).find(({ value }) => agrees(claim, value));
    return found === undefined
      ? null
      : { id: 'points-called-per-cent', reading: found.reading, called: 'per-cent' };
  }
  if (claim.measure !== 'points') return null;
  const found = changes(report, pair, claim).find(({ value }) =>
    agrees(claim, claim.direction === null ? Math.abs(value) : value),
  );
  return found === undefined
    ? null
    : { id: 'points-called-per-cent', reading: found.reading, called: 'points' };
}

function oddsAsRisk(report: Report, pair: SaysPair, claim: FigureClaim): SaysFault | null {
  if (claim.about === 'odds') return null;
  const found = ratios(report, pair, 'odds').find(({ value }) => {
    if (claim.measure === 'ratio' || claim.measure === 'times-more') return agrees(claim, value);
    if (claim.measure !== 'change') return false;
    return agrees(claim, claim.direction === 'down' ? 1 - value : value - 1);
  });
  return found === undefined ? null : { id: 'odds-ratio-as-risk', reading: found.reading };
}

function shareAsRisk(report: Report, pair: SaysPair, claim: FigureClaim, sentence: string): SaysFault | null {
  if (report.question.kind !== 'shares') return null;
  const shareOfCases = (subject: number) =>
    ofGroups(report, { ...pair, subject, named: true }, ['case-share'])[0];
  const own = shareOfCases(pair.subject);
  if (own === undefined) return null;
  const found = (is: Extract<SaysFault, { id: 'share-as-risk' }>['is']): SaysFault => ({
    id: 'share-as-risk',
    reading: own.reading,
    is,
  });
  const { measure, direction } = claim;
  const asShare = measure === 'share' && shareOf(report, claim, sentence) !== 'cases';
  if ((asShare || (measure === 'change' && direction === 'up')) && agrees(claim, own.value))
    return found('share');
  if (measure !== 'ratio' && measure !== 'times-more' && measure !== 'change') return null;
  const inUnit = (ratio: number) =>
    measure !== 'change' ? ratio : direction === 'down' ? 1 - ratio : ratio - 1;
  const other = shareOfCases(otherOf(pair));
  const coverage = ofGroups(report, { ...pair, named: true }, ['population-share'])[0];
  if (other !== undefined && agrees(claim, inUnit(own.value / other.value)))
    return found('cases-against-cases');
  if (coverage !== undefined && agrees(claim, inUnit(own.value / coverage.value)))
    return found('share-against-coverage');
  return null;
}

const otherOf = ({ of, against, subject }: SaysPair) => (subject === of ? (against ?? of) : of);

function hedgeTooStrong(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): SaysFault | null {
  if (claim.hedge === null) return null;
  // Near enough that the number is this reading's: what does not fit is the word in front of it.
  const near = wordedAs(report, pair, claim, sentence).find(
    ({ value }) => value >= claim.value * 0.7 && value <= claim.value * 1.5,
  );
  return near === undefined ? null : { id: 'hedge-too-strong', reading: near.reading };
}

function otherWayRound(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): SaysFault | null {
  if (pair.against === null || claim.measure === 'share' || claim.measure === 'percentage') return null;
  const turned = { ...pair, turned: !pair.turned };
  const opposite: FigureClaim = {
    ...claim,
    direction: claim.direction === 'up' ? 'down' : claim.direction === 'down' ? 'up' : null,
  };
  const found =
    wordedAs(report, turned, claim, sentence).find(({ value }) => agrees(claim, value)) ??
    // The size is right and the direction is the other one.
    (claim.direction === null
      ? undefined
      : wordedAs(report, pair, opposite, sentence).find(({ value }) => agrees(claim, value)));
  return found === undefined ? null : { id: 'other-way-round', reading: found.reading };
}

function wrongBase(report: Report, pair: SaysPair, claim: FigureClaim): SaysFault | null {
  if (claim.measure === 'share') return otherTotal(report, pair, claim);
  const [first] = ratios(report, pair, 'plain');
  if (first === undefined) return null;
  const { value: ratio } = first;
  // A change is said as what it would be as a change.
  const [change] = claim.measure === 'change' ? changes(report, pair, claim) : [];
  const { reading } = change ?? first;
  const counts = countRatio(report, pair);
  const ofCounts = counts !== null && claim.measure === 'change' ? signedChange(claim, counts) : counts;
  if (
    (claim.measure === 'change' || claim.measure === 'ratio') &&
    ofCounts !== null &&
    agrees(claim, ofCounts)
  )
    return { id: 'from-wrong-base', reading, base: 'counts' };
  if (claim.measure === 'change') {
    const own = claim.direction === 'down' ? 1 / ratio - 1 : 1 - 1 / ratio;
    if (agrees(claim, own)) return { id: 'from-wrong-base', reading, base: 'own' };
    const goesThatWay = claim.direction === 'down' ? ratio < 1 : ratio > 1;
    return goesThatWay && agrees(claim, ratio) ? { id: 'from-wrong-base', reading, base: 'whole' } : null;
  }
  if (claim.measure === 'ratio' && ratio > 2 && agrees(claim, ratio - 1))
    return { id: 'from-wrong-base', reading, base: 'change' };
  return null;
}

const signedChange = ({ direction }: FigureClaim, ratio: number) =>
  direction === 'down' ? 1 - ratio : ratio - 1;

/** The cases of the one group over those of the other, whatever their totals or times. */
function countRatio({ question }: Report, pair: SaysPair): number | null {
  if (question.kind !== 'counts' && question.kind !== 'rates') return null;
  const [own, other] = [question.groups[pair.subject], question.groups[otherOf(pair)]];
  if (own === undefined || other === undefined || other.cases.value === 0) return null;
  return own.cases.value / other.cases.value;
}

/** A group's cases over another total: that of the other group, or of both. */
function otherTotal(report: Report, pair: SaysPair, claim: FigureClaim): SaysFault | null {
  const { question } = report;
  if (question.kind !== 'counts') return null;
  const group = question.groups[pair.subject];
  const [reading] = ofGroups(report, { ...pair, named: true }, ['risk']);
  if (group === undefined || reading === undefined) return null;
  const all = question.groups.reduce((sum, { total }) => sum + total.value, 0);
  const others = question.groups.filter((each) => each !== group).map(({ total }) => total.value);
  return [...others, all].some((total) => agrees(claim, group.cases.value / total))
    ? { id: 'from-wrong-base', reading: reading.reading, base: 'other-total' }
    : null;
}

/** The figures of the two groups that the ratio is the quotient of, as they are usually printed. */
function figuresOf(question: Question, pair: SaysPair): readonly [number, number] | null {
  const figure = (index: number): number | null => {
    switch (question.kind) {
      case 'counts': {
        const group = question.groups[index];
        return group === undefined ? null : (group.cases.value / group.total.value) * 100;
      }
      case 'stated':
        return (question.groups[index]?.share.value ?? NaN) * 100;
      case 'rates': {
        const group = question.groups[index];
        return group === undefined ? null : group.cases.value / group.exposure.value;
      }
      case 'bare-counts':
        return question.groups[index]?.cases.value ?? null;
      case 'shares':
      case 'strata':
        return null;
    }
  };
  const [own, other] = [figure(pair.subject), figure(otherOf(pair))];
  return own === null || other === null ? null : [own, other];
}

const roundedTo = (value: number, decimals: number) => {
  const unit = 10 ** -decimals;
  return Number((Math.round(value / unit) * unit).toPrecision(12));
};

/** Every way of rounding first that is common: both figures to the same decimals, or the ratio itself. */
function roundings(
  report: Report,
  pair: SaysPair,
): readonly {
  readonly from: readonly number[];
  readonly unit: 'percent' | 'ratio' | 'count';
  readonly decimals: number;
}[] {
  const { question } = report;
  const [ratio] = ratios(report, pair, 'plain');
  const figures = figuresOf(question, pair);
  const unit = question.kind === 'counts' || question.kind === 'stated' ? 'percent' : 'count';
  const scale = question.kind === 'rates' ? Math.floor(Math.log10(Math.max(...(figures ?? [1])))) : 0;
  const steps =
    question.kind === 'bare-counts' ? [-1, -2, -3] : [3, 2, 1, 0].map((decimals) => decimals - scale);
  const both = steps.flatMap((decimals) => {
    if (figures === null) return [];
    const from = figures.map((value) => roundedTo(value, decimals));
    return from.some((value) => value === 0) ? [] : [{ from, unit, decimals } as const];
  });
  const shares = question.kind === 'shares' ? sharesRounded(report, pair) : [];
  const alone =
    ratio === undefined || !Number.isFinite(ratio.value)
      ? []
      : [1, 0].flatMap((decimals) => {
          const rounded = roundedTo(ratio.value, decimals);
          return rounded === 0 ? [] : [{ from: [rounded], unit: 'ratio', decimals } as const];
        });
  return [...both, ...shares, ...alone];
}

/** The share of cases and the coverage, each to whole per cents or tenths; the quotient is that of their odds. */
function sharesRounded(report: Report, pair: SaysPair) {
  const named = { ...pair, named: true };
  const share = ofGroups(report, named, ['case-share'])[0]?.value ?? NaN;
  const coverage = ofGroups(report, named, ['population-share'])[0]?.value ?? NaN;
  if (report.question.groups.length !== 2) return [];
  return [1, 0, -1].flatMap((decimals) => {
    const from = [roundedTo(share * 100, decimals), roundedTo(coverage * 100, decimals)];
    return from.some((value) => !(value > 0 && value < 100))
      ? []
      : [{ from, unit: 'percent', decimals } as const];
  });
}

function roundedFirst(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): SaysFault | null {
  const [worded] = wordedAs(report, pair, claim, sentence);
  const reading = worded?.reading ?? ofPair(report, pair, plainRatios)[0];
  if (reading === undefined || pair.against === null) return null;
  const found = roundings(report, pair).find(({ from: [own = NaN, other], unit }) => {
    const ratio =
      other === undefined
        ? own
        : report.question.kind === 'shares'
          ? (own / (100 - own)) * ((100 - other) / other)
          : own / other;
    switch (claim.measure) {
      case 'ratio':
        return other !== undefined && agrees(claim, ratio);
      case 'change':
        return agrees(claim, claim.direction === 'down' ? 1 - ratio : ratio - 1);
      case 'points':
        if (other === undefined || unit !== 'percent' || report.question.kind === 'shares') return false;
        return agrees(claim, ((claim.direction === 'down' ? -1 : 1) * (own - other)) / 100);
      case 'figure':
        return other !== undefined && agrees(claim, ratio);
      default:
        return false;
    }
  });
  return found === undefined ? null : { id: 'rounded-first', reading, ...found };
}

/** How many digits a number needs before a moved point is more than chance. */
const digitsOf = (text: string) => (/[1-9][\d.,]*/.exec(text)?.[0].replace(/\D/g, '') ?? '').length;

function decimalSlip(report: Report, pair: SaysPair, claim: FigureClaim, sentence: string): SaysFault | null {
  if (digitsOf(claim.text) < (claim.measure === 'share' || claim.measure === 'percentage' ? 1 : 2))
    return null;
  for (const places of [1, -1, 2, -2, 3, -3]) {
    const moved = { ...claim, hedge: null };
    const found = wordedAs(report, pair, claim, sentence).find(
      ({ value }) => value > 0 && agrees(moved, value * 10 ** places),
    );
    if (found !== undefined) return { id: 'decimal-slip', reading: found.reading, places };
  }
  return null;
}

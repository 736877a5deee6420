import type { ClaimedInterval, FigureClaim } from '../../grammar/claim.ts';
import { exactCaseOddsInterval, scaled } from '../stats/case-odds-interval.ts';
import { clopperPearsonInterval } from '../stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../stats/conditional-odds-ratio-interval.ts';
import type { Interval, TwoGroups } from '../stats/interval.ts';
import {
  agrestiCaffoRiskDifference,
  agrestiCoullRisk,
  cornfieldOddsRatio,
  koopmanRiskRatio,
  logCaseRatio,
  logCaseRatioWithHalves,
  logRiskRatio,
  logRiskRatioWithHalves,
  meeRiskDifference,
  newcombeRiskDifference,
  waldRisk,
  waldRiskDifference,
  waldRiskDifferenceCorrected,
  wilsonCorrectedRisk,
  woolfOddsRatio,
  woolfOddsRatioWithHalves,
} from '../stats/textbook-intervals.ts';
import type { Reading } from './reading.ts';
import type { GroupedReport as Report } from './report.ts';
import type { IntervalVariant, SaysPair, VariantLimits } from './said.ts';
import { agrees } from './says-values.ts';

/** What a published interval was found to be: the variant that gives both limits, or the nearest one. */
export interface IntervalFinding {
  readonly matched: boolean;
  readonly nearest: VariantLimits | null;
}

/** The same report at another level, for an interval that names its own. */
export type AtLevel = (level: number) => Report;

/** Holds a claim's interval against every variant of a reading's interval that is in common use. */
export function intervalFinding(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  reading: Reading,
  at: AtLevel,
): IntervalFinding {
  const { interval } = claim;
  if (interval === null) return { matched: false, nearest: null };
  const level = interval.level ?? report.level;
  const all = variantsOf(report, reading, level, at).map((each) => ({
    ...each,
    limits: inUnitOf(claim, pair, reading, each.limits),
  }));
  const found = all.find(({ limits }) => matches(interval, limits));
  if (found !== undefined) return { matched: true, nearest: found };
  const off = ({ limits }: VariantLimits) => distance(interval, limits);
  const nearest = [...all].sort((a, b) => off(a) - off(b))[0];
  return { matched: false, nearest: nearest ?? null };
}

function matches({ low, high }: ClaimedInterval, limits: Interval): boolean {
  if (limits.low === null || limits.high === null) return false;
  const [from, to] = low.value <= high.value ? [low, high] : [high, low];
  return agrees({ ...from, hedge: null }, limits.low) && agrees({ ...to, hedge: null }, limits.high);
}

const distance = ({ low, high }: ClaimedInterval, limits: Interval) =>
  limits.low === null || limits.high === null
    ? Infinity
    : Math.abs(limits.low - Math.min(low.value, high.value)) +
      Math.abs(limits.high - Math.max(low.value, high.value));

/** Limits of a reading as the claim counts: turned round, as a change, and positive where the claim goes. */
function inUnitOf(claim: FigureClaim, { turned }: SaysPair, reading: Reading, limits: Interval): Interval {
  const isRatio = /ratio$/.test(reading.id);
  const down = claim.direction === 'down';
  const through = (value: number | null): number => {
    if (value === null) return Infinity;
    if (reading.id === 'relative-change' || (isRatio && claim.measure === 'change')) {
      const ratio = reading.id === 'relative-change' ? value + 1 : value;
      const change = (turned ? 1 / ratio : ratio) - 1;
      return down ? -change : change;
    }
    if (isRatio) return turned ? 1 / value : value;
    if (reading.against === null) return value;
    const plain = reading.id === 'extra-cases' ? value / (reading.per ?? 1) : value;
    return turned !== down ? -plain : plain;
  };
  const ends = [through(limits.low), through(limits.high)].sort((a, b) => a - b);
  const end = (value: number | undefined) => (value === undefined || !Number.isFinite(value) ? null : value);
  return { low: end(ends[0]), high: end(ends[1]) };
}

const change = ({ low, high }: Interval): Interval => ({
  low: low === null ? null : low - 1,
  high: high === null ? null : high - 1,
});

function variantsOf(report: Report, reading: Reading, level: number, at: AtLevel): readonly VariantLimits[] {
  const same = (each: Reading) =>
    each.id === reading.id &&
    each.of === reading.of &&
    each.layer === reading.layer &&
    each.rest === reading.rest;
  const here = level === report.level ? reading : at(level).readings.find(same);
  const own = here?.interval ?? null;
  const beside = here?.exactBeside ?? null;
  return [
    ...(own === null ? [] : [{ variant: 'own', limits: own } as const]),
    ...(beside === null ? [] : [{ variant: 'exact-beside', limits: beside } as const]),
    ...textbook(report, reading, level),
  ];
}

type Named = readonly [IntervalVariant, Interval | null];
const named = (pairs: readonly Named[]): VariantLimits[] =>
  pairs.flatMap(([variant, limits]) => (limits === null ? [] : [{ variant, limits }]));

function textbook({ question }: Report, reading: Reading, level: number): readonly VariantLimits[] {
  if (reading.layer !== null || reading.rest) return [];
  const { id, of, against } = reading;
  const [own, other] = [question.groups[of], question.groups[against ?? 0]];
  if (own === undefined || other === undefined) return [];
  if ('total' in own && 'total' in other) {
    const groups: TwoGroups = {
      cases: own.cases.value,
      total: own.total.value,
      referenceCases: other.cases.value,
      referenceTotal: other.total.value,
    };
    const certain = [own.cases, own.total, other.cases, other.total].every(({ low, high }) => low === high);
    return certain ? ofCounts(id, groups, level) : [];
  }
  const ratio = id === 'risk-ratio' || id === 'rate-ratio' || id === 'count-ratio';
  if (!ratio && id !== 'relative-change') return [];
  const asked = (pairs: readonly Named[]) =>
    named(pairs).map(({ variant, limits }) => ({ variant, limits: ratio ? limits : change(limits) }));
  if ('exposure' in own && 'exposure' in other) {
    if (own.asStated || other.asStated) return [];
    return asked(
      ofCases('rates', own.cases.value, other.cases.value, other.exposure.value / own.exposure.value, level),
    );
  }
  if ('coverage' in own && 'coverage' in other) {
    if (own.cases === null || other.cases === null || own.known.kind !== 'given') return [];
    return asked(
      ofCases('odds', own.cases.value, other.cases.value, other.coverage.value / own.coverage.value, level),
    );
  }
  if (question.kind === 'bare-counts' && question.overTime && 'cases' in own && 'cases' in other)
    return asked(ofCases('rates', own.cases?.value ?? NaN, other.cases?.value ?? NaN, 1, level));
  return [];
}

/** Two counts of cases with a factor between them: rates, or shares beside coverage. */
function ofCases(
  kind: 'rates' | 'odds',
  cases: number,
  referenceCases: number,
  factor: number,
  level: number,
): readonly Named[] {
  const whole = Number.isSafeInteger(cases) && Number.isSafeInteger(referenceCases);
  return [
    [`log-${kind}`, logCaseRatio(cases, referenceCases, factor, level)],
    [`log-${kind}-with-halves`, logCaseRatioWithHalves(cases, referenceCases, factor, level)],
    [`exact-${kind}`, whole ? scaled(exactCaseOddsInterval(cases, referenceCases, level), factor) : null],
  ];
}

function ofCounts(id: Reading['id'], groups: TwoGroups, level: number): readonly VariantLimits[] {
  const { cases, total } = groups;
  const whole = Object.values(groups).every((value) => Number.isSafeInteger(value));
  const riskRatios: readonly Named[] = [
    ['log', logRiskRatio(groups, level)],
    ['log-with-halves', logRiskRatioWithHalves(groups, level)],
    ['koopman', koopmanRiskRatio(groups, level)],
  ];
  switch (id) {
    case 'risk':
      return named([
        ['clopper-pearson', whole ? clopperPearsonInterval(cases, total, level) : null],
        ['wald', waldRisk(cases, total, level)],
        ['agresti-coull', agrestiCoullRisk(cases, total, level)],
        ['wilson-corrected', wilsonCorrectedRisk(cases, total, level)],
      ]);
    case 'risk-ratio':
      return named(riskRatios);
    case 'relative-change':
      return named(riskRatios).map(({ variant, limits }) => ({ variant, limits: change(limits) }));
    case 'risk-difference':
      return named([
        ['mee', meeRiskDifference(groups, level)],
        ['newcombe', newcombeRiskDifference(groups, level)],
        ['wald-difference', waldRiskDifference(groups, level)],
        ['agresti-caffo', agrestiCaffoRiskDifference(groups, level)],
        ['wald-difference-corrected', waldRiskDifferenceCorrected(groups, level)],
      ]);
    case 'odds-ratio':
      return named([
        ['woolf', woolfOddsRatio(groups, level)],
        ['cornfield', cornfieldOddsRatio(groups, level)],
        ['woolf-with-halves', woolfOddsRatioWithHalves(groups, level)],
        ['conditional-exact', whole ? conditionalOddsRatioInterval(groups, level) : null],
      ]);
    default:
      return [];
  }
}

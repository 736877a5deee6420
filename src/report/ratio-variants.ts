import type { SharesGroup, SharesQuestion } from '../../grammar/question.ts';
import { coverageSensitivity } from '../stats/coverage-sensitivity.ts';
import { ratioUnderConstantRisk, ratioUnderEvenCases } from '../stats/growing-coverage.ts';
import type { Interval } from '../stats/interval.ts';
import { unknownGroupBounds } from '../stats/unknown-group-bounds.ts';
import { coverageMethod } from './coverage-method.ts';
import type { CountsOptions } from './counts-readings.ts';
import { estimateOf } from './estimates.ts';
import type { Limits, Reading } from './reading.ts';

/** What a ratio that stands beside the headline's takes for granted. */
export type VariantId =
  | 'constant-risk' // coverage grew, and the risk outside the group stayed the same
  | 'even-cases' // coverage grew, and the cases came evenly
  | 'closing-coverage' // coverage had been what it was at the end all the time
  | 'like-the-known' // the cases of unknown group split like the known
  | 'all-in-reference' // all of them belong to the reference group
  | 'all-in-group' // all of them belong to the other
  | 'at-coverage'; // coverage had been this

/** The same ratio under one of several assumptions. */
export interface RatioVariant {
  readonly id: VariantId;
  readonly of: number;
  readonly against: number;
  /** The coverage that it takes, of the group that `RatioVariants` names; `null` where it takes none of its own. */
  readonly coverage: number | null;
  readonly estimate: number | null;
  readonly unbounded: boolean;
  /** `null`: without cases, or the estimate alone is meant. */
  readonly interval: Limits | null;
}

/**
 * Ratios that stand side by side: two assumptions about growth, the ends of what unknown cases allow, coverages to try, and what
 * one point more of coverage does.
 */
export interface RatioVariants {
  readonly topic: 'growth' | 'unknown' | 'tried' | 'sensitivity';
  /** The group whose coverage the variants take. */
  readonly coverageOf: number;
  readonly rows: readonly RatioVariant[];
  /** `sensitivity`: d ln R/dc, per unit of that coverage; else `null`. */
  readonly slope: number | null;
}

/** Everything that stands beside the ratio of two groups; nothing for three or more. */
export function ratioVariants(
  question: SharesQuestion,
  ratio: Reading | undefined,
  options: CountsOptions,
): RatioVariants[] {
  if (question.groups.length !== 2 || ratio === undefined) return [];
  return [
    ...growthVariants(question, ratio, options),
    ...unknownVariants(question, ratio, options),
    ...triedVariants(question, ratio, options),
    ...sensitivityVariants(question, ratio, options),
  ];
}

type Pair = Pick<RatioVariant, 'of' | 'against'>;

const variant = (
  id: VariantId,
  { of, against }: Pair,
  coverage: number | null,
  estimate: number,
  interval: Interval | null,
): RatioVariant => ({ id, of, against, coverage, ...estimateOf(estimate), interval });

const pairOf = ({ of, against }: Reading): Pair => ({ of, against: against ?? 0 });

interface Figures {
  readonly cases: number;
  readonly referenceCases: number;
  /** False for shares of cases, and where a count is hidden: then there are estimates and no intervals. */
  readonly counted: boolean;
}

function figuresOf({ groups }: SharesQuestion, { of, against }: Pair): Figures | null {
  const [own, other] = [groups[of], groups[against]];
  if (own === undefined || other === undefined) return null;
  const whole = own.cases !== null && other.cases !== null;
  const [x, y] = [own, other].map((group) => (whole ? group.cases : group.caseShare));
  return {
    cases: x?.value ?? NaN,
    referenceCases: y?.value ?? NaN,
    counted: whole && x?.precision !== 'range' && y?.precision !== 'range',
  };
}

function growthVariants(
  question: SharesQuestion,
  reading: Reading,
  { level, exact }: CountsOptions,
): RatioVariants[] {
  const pair = pairOf(reading);
  const known = question.groups[pair.of]?.known;
  const figures = figuresOf(question, pair);
  if (known?.kind !== 'growth' || figures === null) return [];
  const { cases, referenceCases, counted } = figures;
  const from = { cases, referenceCases, start: known.start.value, end: known.end.value };
  const constant = ratioUnderConstantRisk(from, level);
  const even = ratioUnderEvenCases(from, level);
  const closing = known.end.value;
  const shown = (interval: Interval) => (exact || !counted ? null : interval);
  const rows = [
    variant(
      'constant-risk',
      pair,
      (known.start.value + known.end.value) / 2,
      constant.estimate ?? Infinity,
      shown(constant.interval),
    ),
    variant('even-cases', pair, null, even.estimate ?? Infinity, shown(even.interval)),
    // At 0% or 100% there is nobody to compare with at the end.
    ...(closing > 0 && closing < 1
      ? [atCoverage('closing-coverage', pair, figures, closing, closing, { level, exact })]
      : []),
  ];
  return [{ topic: 'growth', coverageOf: pair.of, rows, slope: null }];
}

/** The ratio if coverage of `of` had been `coverage` all the time; `shown` is the coverage as it is spoken of. */
function atCoverage(
  id: VariantId,
  pair: Pair,
  { cases, referenceCases, counted }: Figures,
  coverage: number,
  shown: number,
  { level, exact }: Pick<CountsOptions, 'level' | 'exact'>,
): RatioVariant {
  const method = coverageMethod(fixedAt(coverage), level, exact);
  return variant(
    id,
    pair,
    shown,
    method.ratio(cases, referenceCases),
    counted ? (method.interval?.(cases, referenceCases) ?? null) : null,
  );
}

const fixedAt = (value: number): Pick<SharesGroup, 'coverage' | 'known'> => ({
  coverage: { text: '', value, low: value, high: value, precision: 'exact', span: { from: 0, to: 0 } },
  known: { kind: 'given' },
});

function unknownVariants(
  question: SharesQuestion,
  reading: Reading,
  { level, exact }: CountsOptions,
): RatioVariants[] {
  const pair = pairOf(reading);
  const group = question.groups[pair.of];
  const figures = figuresOf(question, pair);
  const unknown = question.unknownCases?.value ?? 0;
  if (group === undefined || figures === null || unknown === 0) return [];
  const { cases, referenceCases, counted } = figures;
  const { ratio, interval } = coverageMethod(group, level, exact);
  const limits = interval ?? (() => ({ low: null, high: null }));
  const finite = (x: number, y: number) => {
    const value = ratio(x, y);
    return Number.isFinite(value) ? value : null;
  };
  const bounds = unknownGroupBounds({ cases, referenceCases, unknown }, finite, limits);
  const shown = (x: number, y: number) => (interval === null || !counted ? null : interval(x, y));
  const rows = [
    variant('like-the-known', pair, null, bounds.likeTheKnown ?? ratio(cases, referenceCases), null),
    variant(
      'all-in-reference',
      pair,
      null,
      bounds.estimates.low ?? ratio(cases, referenceCases + unknown),
      shown(cases, referenceCases + unknown),
    ),
    variant(
      'all-in-group',
      pair,
      null,
      bounds.estimates.high ?? ratio(cases + unknown, referenceCases),
      shown(cases + unknown, referenceCases),
    ),
  ];
  return [{ topic: 'unknown', coverageOf: pair.of, rows, slope: null }];
}

/** The group whose coverage was typed: the one that somebody may doubt. */
const typedGroup = ({ groups }: SharesQuestion) =>
  Math.max(
    0,
    groups.findIndex(({ coverageImplied }) => !coverageImplied),
  );

function triedVariants(
  question: SharesQuestion,
  reading: Reading,
  { level, exact }: CountsOptions,
): RatioVariants[] {
  const pair = pairOf(reading);
  const figures = figuresOf(question, pair);
  const tried = question.clauses.tryCoverages ?? [];
  if (tried.length === 0 || figures === null) return [];
  const coverageOf = typedGroup(question);
  const unknown = question.unknownCases?.value ?? 0;
  const rows = tried.map(({ value }) => {
    const own = coverageOf === pair.of ? value : 1 - value;
    const at = atCoverage('at-coverage', pair, figures, own, value, { level, exact });
    return unknown === 0 ? at : { ...at, interval: null };
  });
  return [{ topic: 'tried', coverageOf, rows, slope: null }];
}

const point = 0.01;

/** What one point less and one point more of coverage does to the ratio, where it is one number. */
function sensitivityVariants(
  question: SharesQuestion,
  reading: Reading,
  options: CountsOptions,
): RatioVariants[] {
  const pair = pairOf(reading);
  const coverageOf = typedGroup(question);
  const group = question.groups[coverageOf];
  const figures = figuresOf(question, pair);
  if (figures === null) return [];
  if (group?.known.kind !== 'given' || reading.estimate === null || reading.estimate === 0) return [];
  const rows = [-point, 0, point]
    .map((step) => Number((group.coverage.value + step).toPrecision(15)))
    .filter((coverage) => coverage > 0 && coverage < 1)
    .map((coverage) =>
      atCoverage(
        'at-coverage',
        pair,
        { ...figures, counted: false },
        coverageOf === pair.of ? coverage : 1 - coverage,
        coverage,
        options,
      ),
    );
  const slope = coverageSensitivity(group.coverage.value) * (coverageOf === pair.of ? 1 : -1);
  return [{ topic: 'sensitivity', coverageOf, rows, slope }];
}

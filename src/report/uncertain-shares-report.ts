import type { Quantity, SharesGroup, SharesQuestion } from '../../grammar/question.ts';
import type { Interval } from '../stats/interval.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import { clopperPearsonInterval } from '../stats/clopper-pearson-interval.ts';
import { cautionsFor } from './cautions.ts';
import { coverageMethod, usualOwnLevel } from './coverage-method.ts';
import type { CoverageMethod } from './coverage-method.ts';
import type { CountsOptions } from './counts-readings.ts';
import { estimateOf, intervalOver } from './estimates.ts';
import { missingFor } from './missing.ts';
import { ratioFollowers, relativeChange } from './ratio-followers.ts';
import { ratioVariants } from './ratio-variants.ts';
import { reading } from './reading.ts';
import type { IntervalMethod, Reading, ReadingInterval } from './reading.ts';
import type { Report } from './report.ts';
import { coverageCorners, fewCases, ratioRoundingRange } from './shares-readings.ts';

/** Whether the coverage is not one number, or some cases are of unknown group: the answer then carries that uncertainty too. */
export const isUncertain = ({ groups, unknownCases }: SharesQuestion) =>
  unknownCases !== null || groups.some(({ known }) => known.kind !== 'given');

/**
 * Two groups whose coverage is not one number, or whose cases are not all of known group. Every interval comes from one test at
 * "no difference", as everywhere: with unknown cases it is the outermost over all to one side and all to the other (Horowitz &
 * Manski 2000).
 */
export function uncertainSharesReport(question: SharesQuestion, options: CountsOptions): Report {
  const { groups, reference } = question;
  const of = groups.findIndex((_, index) => index !== reference);
  const [group, other] = [groups[of], groups[reference]];
  if (group === undefined || other === undefined) throw new RangeError('two groups are needed');
  const pair: Pair = {
    question,
    of,
    group,
    other,
    options,
    method: coverageMethod(group, options.level, options.exact),
    unknown: question.unknownCases?.value ?? 0,
    counted: group.cases !== null && other.cases !== null ? [group.cases, other.cases] : null,
  };
  const ratio = ratioReading(pair);
  const shares = groups.map((_, index) => caseShare(pair, index));
  const breakEven = shares[of];
  const readings: Reading[] = [
    ...shares,
    ...groups.map((each, index) => populationShare(each, index, options)),
    ratio,
    relativeChange(ratio),
    ...ratioFollowers(ratio),
    ...fractionReading(pair, ratio),
    // By period there is not one coverage at which the difference would vanish.
    ...(breakEven === undefined || group.known.kind === 'periods'
      ? []
      : [{ ...breakEven, id: 'break-even-coverage' as const, against: reference }]),
  ];
  return {
    question,
    level: options.level,
    readings,
    headline: 'risk-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
    variants: ratioVariants(question, ratio, options),
  };
}

interface Pair {
  readonly question: SharesQuestion;
  readonly of: number;
  readonly group: SharesGroup;
  readonly other: SharesGroup;
  readonly options: CountsOptions;
  readonly method: CoverageMethod;
  readonly unknown: number;
  /** `null` where only shares of cases are known. */
  readonly counted: readonly [Quantity, Quantity] | null;
}

type OfCases<Value> = (cases: number, referenceCases: number) => Value;

/** All unknown cases to the reference group for the lower limit, to the group for the upper one. */
const eitherSide =
  (interval: OfCases<Interval>, unknown: number): OfCases<Interval> =>
  (cases, referenceCases) =>
    unknown === 0
      ? interval(cases, referenceCases)
      : {
          low: interval(cases, referenceCases + unknown).low,
          high: interval(cases + unknown, referenceCases).high,
        };

/** The interval over what the counts may be, and over where the unknown cases may belong. */
function limitsOf(
  { counted, unknown, options, method }: Pair,
  interval: OfCases<Interval> | null,
  name: IntervalMethod,
): ReadingInterval | null {
  if (counted === null || interval === null) return null;
  const hull = eitherSide(interval, unknown);
  const found = intervalOver(counted, options.level, name, ([x = NaN, y = NaN]) => hull(x, y));
  return {
    ...found,
    envelope: found.envelope || method.envelope,
    ...(unknown > 0 ? { unknownToEitherSide: true } : {}),
  };
}

const whyNone = ({ counted }: Pair, interval: ReadingInterval | null) =>
  interval !== null ? null : counted === null ? 'no-case-number' : 'no-exact-form';

function ratioReading(pair: Pair): Reading {
  const { group, other, counted, method, options, of, question } = pair;
  const numerators = counted ?? ([group.caseShare, other.caseShare] as const);
  const interval = limitsOf(pair, method.interval, method.method);
  const few = counted !== null && counted.some(({ value }) => value < fewCases);
  const exact = coverageMethod(group, options.level, true);
  const oneNumber = group.known.kind === 'given' || group.known.kind === 'range';
  const fixed = { coverage: group.coverage.value, referenceCoverage: 1 - group.coverage.value };
  return reading({
    id: 'risk-ratio',
    of,
    against: question.reference,
    ...estimateOf(method.ratio(numerators[0].value, numerators[1].value)),
    interval,
    whyNoInterval: whyNone(pair, interval),
    roundingRange:
      group.known.kind === 'periods'
        ? null
        : ratioRoundingRange(numerators, oneNumber ? coverageCorners(group, other) : [fixed]),
    exactBeside:
      few && !options.exact ? limitsOf({ ...pair, method: exact }, exact.interval, exact.method) : null,
  });
}

function fractionReading(pair: Pair, ratio: Reading): Reading[] {
  const { counted, group, other, method, of, question } = pair;
  if (ratio.estimate === null || ratio.estimate <= 1) return [];
  const [own, rest] = counted ?? [group.caseShare, other.caseShare];
  const interval = limitsOf(pair, method.fractionInterval, method.fractionMethod);
  return [
    reading({
      id: 'population-attributable-fraction',
      of,
      against: question.reference,
      ...estimateOf(method.fraction(own.value, rest.value)),
      interval,
      whyNoInterval: whyNone(pair, interval),
    }),
  ];
}

/** The group's share of the cases whose group is known; the limits hold wherever the others belong. */
function caseShare(pair: Pair, index: number): Reading {
  const { question, of, options } = pair;
  const { caseShare: share } = question.groups[index] ?? pair.group;
  const proportion: OfCases<Interval> = (cases, referenceCases) =>
    options.exact
      ? clopperPearsonInterval(cases, cases + referenceCases, options.level)
      : wilsonInterval(cases, cases + referenceCases, options.level);
  // Seen from the other group the unknown cases lie on the other side.
  const turned =
    pair.counted === null || index === of ? pair.counted : ([pair.counted[1], pair.counted[0]] as const);
  const interval = limitsOf(
    { ...pair, counted: turned, method: { ...pair.method, envelope: false } },
    someCases(proportion),
    options.exact ? 'clopper-pearson' : 'wilson',
  );
  return reading({
    id: 'case-share',
    of: index,
    estimate: share.value,
    interval,
    whyNoInterval: interval === null ? 'no-case-number' : null,
    roundingRange: share.low === share.high ? null : { low: share.low, high: share.high },
  });
}

const someCases =
  (limits: OfCases<Interval>): OfCases<Interval> =>
  (cases, referenceCases) =>
    cases + referenceCases === 0 ? { low: 0, high: 1 } : limits(cases, referenceCases);

/** The coverage itself: what was given, or what its sample or its own interval says. */
function populationShare(
  { coverage, known, coverageImplied }: SharesGroup,
  of: number,
  { level, exact }: CountsOptions,
): Reading {
  const common = { id: 'population-share', of, estimate: coverage.value } as const;
  const ends = { low: coverage.low, high: coverage.high };
  switch (known.kind) {
    case 'given':
      return reading({
        ...common,
        whyNoInterval: 'given',
        roundingRange: coverage.low === coverage.high || coverageImplied ? null : ends,
      });
    case 'range':
      return reading({ ...common, whyNoInterval: 'range-given', roundingRange: ends });
    case 'growth':
      return reading({ ...common, whyNoInterval: 'mean-of-growth', roundingRange: ends });
    case 'periods':
      return reading({ ...common, whyNoInterval: 'mean-over-cases', roundingRange: ends });
    case 'interval':
      return reading({
        ...common,
        interval: {
          low: known.low.value,
          high: known.high.value,
          level: known.level?.value ?? usualOwnLevel,
          method: 'as-given',
          envelope: false,
          designEffect: 1,
        },
      });
    case 'sample': {
      const limits = exact
        ? clopperPearsonInterval(known.inGroup, known.sampled, level)
        : wilsonInterval(known.inGroup, known.sampled, level);
      return reading({
        ...common,
        interval: {
          ...limits,
          level,
          method: exact ? 'clopper-pearson' : 'wilson',
          envelope: false,
          designEffect: 1,
        },
      });
    }
  }
}

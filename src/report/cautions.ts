import type {
  CountsQuestion,
  Quantity,
  Question,
  RatesQuestion,
  SharesQuestion,
  StrataQuestion,
} from '../../grammar/question.ts';
import { alarmCautions } from './alarm-cautions.ts';
import type { Reading } from './reading.ts';
import { isReversed, pooledAndCrude } from './reversal.ts';

/**
 * The cautions, most important first: an answer carries the first two that apply. Sources stand with the words in
 * the renderer's catalogue.
 */
export const cautionIds = [
  'whole-register',
  'reversal',
  'layers-too-small',
  'layers-not-alike',
  'layers-differ-in-mix',
  'rows-chosen-by-outcome',
  'totals-missing',
  'base-rate',
  'unknown-group',
  'coverage-changed',
  'prevalence-decides',
  'all-cases-in-one-group',
  'no-cases',
  'suppressed-cell',
  'shares-do-not-add-up',
  'picked-comparison',
  'few-cases',
  'could-have-shown',
  'small-risk',
  'odds-ratio-far',
  'coverage-as-given',
  'divisor-may-have-changed',
  'events-singly',
  'prevalence-as-given',
  'as-stated',
  'picked-starting-point',
  'one-group',
  'groups-may-differ',
] as const;
export type CautionId = (typeof cautionIds)[number];

/** How many cautions an answer carries. */
const mostCautions = 2;

/** The cautions that these inputs call for. */
export function cautionsFor(question: Question, readings: readonly Reading[]): readonly CautionId[] {
  const found = new Set([...applying(question, readings), ...always(question)]);
  return cautionIds.filter((id) => found.has(id)).slice(0, mostCautions);
}

/** What the clauses of any question call for. */
function always({ clauses }: Question): readonly CautionId[] {
  return clauses.everyone ? ['whole-register'] : [];
}

/** A list of cautions with one more, which takes its place by importance. */
export function withCaution(found: readonly CautionId[], id: CautionId): readonly CautionId[] {
  return cautionIds.filter((each) => each === id || found.includes(each)).slice(0, mostCautions);
}

function applying(question: Question, readings: readonly Reading[]): readonly CautionId[] {
  switch (question.kind) {
    case 'counts':
      return countsCautions(question, readings);
    case 'shares':
      return sharesCautions(question);
    case 'stated':
      return [
        'as-stated',
        ...(question.overTime ? (['picked-starting-point'] as const) : []),
        'groups-may-differ',
        ...smallRisk(readings),
      ];
    case 'rates':
      return ratesCautions(question);
    case 'strata':
      return strataCautions(question, readings);
    case 'alarm':
      return alarmCautions(question);
    case 'bare-counts':
      if (question.overTime)
        return ['divisor-may-have-changed', ...fewOf(question.groups), 'picked-starting-point'];
      return ['totals-missing', ...(question.groups.length > 2 ? (['picked-comparison'] as const) : [])];
  }
}

/** Fewer than five in a group. */
const fewOf = (groups: readonly { readonly cases: Quantity }[]): readonly CautionId[] =>
  groups.some(({ cases }) => cases.high < 5) ? ['few-cases'] : [];

function ratesCautions({ groups, overTime, clauses }: RatesQuestion): readonly CautionId[] {
  const stated = groups.some(({ asStated }) => asStated);
  return [
    ...(stated ? (['as-stated'] as const) : []),
    ...(groups.every(({ cases }) => cases.value === 0) ? (['no-cases'] as const) : []),
    ...(groups.length > 2 ? (['picked-comparison'] as const) : []),
    ...(stated ? [] : fewOf(groups)),
    ...(stated || clauses.designEffect !== null ? [] : (['events-singly'] as const)),
    ...(overTime ? (['picked-starting-point'] as const) : []),
    groups.length === 1 ? 'one-group' : 'groups-may-differ',
  ];
}

function countsCautions(question: CountsQuestion, readings: readonly Reading[]): readonly CautionId[] {
  const { groups, chosenByOutcome } = question;
  if (chosenByOutcome) return ['rows-chosen-by-outcome', 'groups-may-differ'];
  return [
    ...(groups.some(({ cases }) => cases.precision === 'range') ? (['suppressed-cell'] as const) : []),
    ...(groups.every(({ cases }) => cases.value === 0) ? (['no-cases'] as const) : []),
    ...(groups.length > 1 && groups.filter(({ cases }) => cases.value > 0).length === 1
      ? (['all-cases-in-one-group'] as const)
      : []),
    ...(groups.length > 2 ? (['picked-comparison'] as const) : []),
    ...(groups.some(({ cases }) => cases.high < 5) || smallestExpected(question) < 3
      ? (['few-cases'] as const)
      : []),
    ...smallRisk(readings),
    ...(oddsRatioFar(readings) ? (['odds-ratio-far'] as const) : []),
    ...(question.overTime ? (['picked-starting-point'] as const) : []),
    groups.length === 1 ? 'one-group' : 'groups-may-differ',
  ];
}

/** Below this p value the layers are said not to look alike: the test misses most real differences (common practice). */
const notAlike = 0.1;
/** Crude and pooled further apart than this: the groups differ in what the layers are of (Maldonado & Greenland 1993). */
const changeInEstimate = Math.log(1.1);

function strataCautions(question: StrataQuestion, readings: readonly Reading[]): readonly CautionId[] {
  const others = question.groups.map((_, of) => of).filter((of) => of !== question.reference);
  const small = question.layers.some(({ question: { groups } }) =>
    groups.some((group) => 'total' in group && group.total.value < 5),
  );
  const apart = others.some((of) => {
    const { pooled, crude } = pooledAndCrude(readings, of);
    return pooled !== null && crude !== null && Math.abs(Math.log(crude / pooled)) > changeInEstimate;
  });
  const reversed = others.some((of) => isReversed(readings, of));
  const unlike = readings.some(
    ({ id, estimate }) => id === 'homogeneity' && estimate !== null && estimate < notAlike,
  );
  return [
    ...(reversed ? (['reversal'] as const) : []),
    ...(small ? (['layers-too-small'] as const) : []),
    ...(unlike ? (['layers-not-alike'] as const) : []),
    ...(apart && !reversed ? (['layers-differ-in-mix'] as const) : []),
    ...(question.layers[0]?.question.kind === 'shares' ? (['coverage-as-given'] as const) : []),
    ...(reversed ? [] : (['groups-may-differ'] as const)),
  ];
}

/** The smallest expected cell if all groups shared one risk: below 3 the limits are rough (measured, see the calibration). */
function smallestExpected({ groups }: CountsQuestion): number {
  const cases = groups.reduce((sum, group) => sum + group.cases.value, 0);
  const total = groups.reduce((sum, group) => sum + group.total.value, 0);
  const risk = cases / total;
  return Math.min(...groups.map((group) => group.total.value * Math.min(risk, 1 - risk)));
}

function sharesCautions(question: SharesQuestion): readonly CautionId[] {
  const { groups } = question;
  const cases = groups.map((group) => group.cases);
  const counted = cases.filter((quantity) => quantity !== null);
  const caseShares = groups.reduce((sum, { caseShare }) => sum + caseShare.value, 0);
  const coverages = groups.reduce((sum, { coverage }) => sum + coverage.value, 0);
  const changed = groups.some(({ known }) => known.kind === 'growth' || known.kind === 'periods');
  return [
    'base-rate',
    ...(question.unknownCases === null ? [] : (['unknown-group'] as const)),
    ...(changed ? (['coverage-changed'] as const) : []),
    ...(Math.abs(caseShares - 1) > 1e-9 || Math.abs(coverages - 1) > 1e-9
      ? (['shares-do-not-add-up'] as const)
      : []),
    ...(counted.length > 1 && counted.filter(({ value }) => value > 0).length === 1
      ? (['all-cases-in-one-group'] as const)
      : []),
    ...(groups.length > 2 ? (['picked-comparison'] as const) : []),
    ...(counted.some(({ value }) => value < 5) ? (['few-cases'] as const) : []),
    'coverage-as-given',
  ];
}

/** A ratio of 2 or more between risks that are both below 1 in 1,000 sounds larger than it is. */
function smallRisk(readings: readonly Reading[]): readonly CautionId[] {
  const risks = readings.filter(({ id }) => id === 'risk').map(({ estimate }) => estimate ?? 0);
  const ratio = readings.find(({ id }) => id === 'risk-ratio' || id === 'percentage-ratio')?.estimate ?? 1;
  return Math.max(...risks) < 0.001 && (ratio >= 2 || ratio <= 0.5) ? ['small-risk'] : [];
}

function oddsRatioFar(readings: readonly Reading[]): boolean {
  const odds = readings.find(({ id }) => id === 'odds-ratio')?.estimate ?? null;
  const ratio = readings.find(({ id }) => id === 'risk-ratio')?.estimate ?? null;
  if (odds === null || ratio === null || odds <= 0 || ratio <= 0) return false;
  return Math.abs(Math.log(odds / ratio)) > Math.log(1.5);
}

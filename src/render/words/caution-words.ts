import type { CautionId } from '../../report/cautions.ts';
import { readingsOf } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import { prevalenceAsGiven, prevalenceDecides } from './alarm-cautions.ts';
import { cases } from './labels.ts';
import { fixed, percent } from './numbers.ts';

interface CautionEntry {
  /** Where the advice comes from; `common practice` for a fact of the trade. */
  readonly source: string;
  readonly text: (report: Report) => string;
}

/** The catalogue of cautions: one or two stand in an answer, chosen by its inputs. */
export const cautionCatalogue = {
  'rows-chosen-by-outcome': {
    source: 'Breslow & Day 1980, Statistical Methods in Cancer Research, vol. 1',
    text: () =>
      'The rows were chosen by outcome, so the shares within them are no risks; only the odds ratio can be read.',
  },
  'totals-missing': {
    source: 'common practice',
    text: () =>
      'Counts without totals say nothing about how often: the larger group may simply have more of everything.',
  },
  'base-rate': { source: 'Orenstein et al. 1985, Bull. World Health Organ. 63:1055', text: baseRate },
  'prevalence-decides': {
    source: 'Altman & Bland 1994, BMJ 309:102',
    text: ({ question }) => prevalenceDecides(question),
  },
  'all-cases-in-one-group': {
    source: 'Hanley & Lippman-Hand 1983, JAMA 249:1743',
    text: () => 'All cases are in one group. None in the other does not mean that none can happen there.',
  },
  'no-cases': {
    source: 'Hanley & Lippman-Hand 1983, JAMA 249:1743',
    text: () => 'No case at all does not mean no risk; the interval says how high it may still be.',
  },
  'suppressed-cell': {
    source: 'common practice',
    text: () => 'A hidden small count was read as 0 to 4: the interval covers all of them.',
  },
  'shares-do-not-add-up': {
    source: 'common practice',
    text: () => 'The shares do not add up to 100%: ask whether a group is missing or rounding did it.',
  },
  'picked-comparison': {
    source: 'Agresti et al. 2008, Statistics in Medicine 27:2870',
    text: () =>
      'With several groups one pair often looks different by chance: do not pick one after looking.',
  },
  'few-cases': {
    source: 'calibration of the intervals, see tests; common practice for small counts of people',
    text: fewCases,
  },
  'small-risk': { source: 'Cochrane Handbook, chapter 15', text: smallRisk },
  'odds-ratio-far': {
    source: 'Davies, Crombie & Tavakoli 1998, BMJ 316:989',
    text: () => 'The odds ratio is far from the risk ratio here: it must not be read as "times as likely".',
  },
  'coverage-as-given': {
    source: 'Deeks et al. 2011 (coverage error in the screening method); common practice',
    text: coverageAsGiven,
  },
  'prevalence-as-given': {
    source: 'Altman & Bland 1994, BMJ 309:102',
    text: ({ question }) => prevalenceAsGiven(question),
  },
  'as-stated': {
    source: 'common practice',
    text: () =>
      'Percentages alone do not show how many stand behind them: a small number may have moved them by chance.',
  },
  'one-group': {
    source: 'common practice',
    text: () => 'One group by itself: whether that is much needs a second group.',
  },
  'groups-may-differ': {
    source: 'common practice',
    text: () => 'The groups may differ in more than their name, such as age, place or time watched.',
  },
} satisfies Record<CautionId, CautionEntry>;

/** The words of a caution. */
export const cautionText = (report: Report, id: CautionId): string => cautionCatalogue[id].text(report);

function baseRate(report: Report): string {
  const { question } = report;
  const of = readingsOf(report, 'risk-ratio')[0]?.of ?? 0;
  const share = readingsOf(report, 'case-share').find((reading) => reading.of === of)?.estimate ?? NaN;
  const held = question.kind === 'shares' ? (question.groups[of]?.coverage.text ?? '') : '';
  return `${percent(share, 'short')} is a share of the ${cases(question)}, not a risk; it would be ${held} if both groups had ${cases(question)} equally often.`;
}

function fewCases({ question }: Report): string {
  if (question.kind === 'alarm') return 'Few cases or few false alarms: treat the limits as rough.';
  const few = question.groups.some(
    (group) => 'cases' in group && group.cases !== null && group.cases.value > 0 && group.cases.value < 5,
  );
  return few
    ? 'Few cases: treat the limits as rough. If these are people in a small place, write "fewer than 5".'
    : 'Few cases: treat the limits as rough.';
}

function smallRisk({ question, readings }: Report): string {
  const risks = readings.filter(({ id }) => id === 'risk').map(({ estimate }) => estimate ?? 0);
  const most = Math.max(...risks);
  const per = 10 ** Math.max(3, Math.ceil(-Math.log10(most)));
  return `The ratio is large, the risk small: at most ${Math.ceil(most * per)} in ${fixed(per, 0)}${question.unit === null ? '' : ` ${question.unit}`}.`;
}

function coverageAsGiven({ question }: Report): string {
  if (question.kind !== 'shares') return '';
  const held = question.groups.find(({ coverageImplied }) => !coverageImplied)?.coverage.text ?? 'Coverage';
  return `${held} is taken as exact, for the same people, place and time.`;
}

import type { Question } from '../../../grammar/question.ts';
import type { CautionId } from '../../report/cautions.ts';
import { readingsOf } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import {
  coverageCaution,
  coverageChanged,
  expectedShare,
  unknownCaution,
  ofKnownGroup,
} from './coverage-words.ts';
import { prevalenceAsGiven, prevalenceDecides } from './alarm-cautions.ts';
import { cases } from './labels.ts';
import { amount, fixed, percent, probability, ratio } from './numbers.ts';

interface CautionEntry {
  /** Where the advice comes from; `common practice` for a fact of the trade. */
  readonly source: string;
  readonly text: (report: Report) => string;
}

/** The catalogue of cautions: one or two stand in an answer, chosen by its inputs. */
export const cautionCatalogue = {
  'whole-register': {
    source: 'Brillinger 1986, Biometrics 42:693; APHO technical briefing 3, 2008',
    text: () =>
      'These are all the cases, so the figure is exact for that time; the interval says how far apart chance alone puts two groups of this size.',
  },
  reversal: {
    source: 'Bickel, Hammel & O\u2019Connell 1975, Science 187:398; Julious & Mullee 1994, BMJ 309:1480',
    text: () =>
      'All together the figures point the other way, because the groups are mixed differently: the layers compare like with like.',
  },
  'layers-too-small': {
    source: 'design review of the pooled intervals, section 2.2',
    text: () => 'A layer has fewer than five in a group: such layers are too small to be put together.',
  },
  'layers-not-alike': {
    source: 'Gart & Nam 1988, Biometrics 44:323; Greenland 1987',
    text: () => 'The layers do not look alike: one ratio for all hides how much they differ.',
  },
  'layers-differ-in-mix': {
    source: 'Maldonado & Greenland 1993, Am. J. Epidemiol. 138:923',
    text: ({ question }) =>
      question.kind === 'strata' && question.by !== null
        ? `The groups differ in ${question.by}: all together the ratio is another one than within the layers.`
        : 'The groups are mixed differently: all together the ratio is another one than within the layers.',
  },
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
  'unknown-group': {
    source: 'Horowitz & Manski 2000, JASA 95:77',
    text: ({ question }) => (question.kind === 'shares' ? unknownCaution(question) : ''),
  },
  'coverage-changed': {
    source: 'Farrington 1993, International Journal of Epidemiology 22:742',
    text: ({ question }) => (question.kind === 'shares' ? coverageChanged(question) : ''),
  },
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
    text: pickedComparison,
  },
  'few-cases': {
    source: 'calibration of the intervals, see tests; common practice for small counts of people',
    text: fewCases,
  },
  'could-have-shown': {
    source: 'Fleiss, Levin & Paik 2003, Statistical Methods for Rates and Proportions, ch. 4',
    text: couldHaveShown,
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
  'divisor-may-have-changed': {
    source: 'common practice',
    text: () =>
      'A count also grows when more are counted: without the totals nothing follows about the risk. Both times are taken as equally long.',
  },
  'events-singly': {
    source: 'Glynn & Buring 1996, BMJ 312:364',
    text: () =>
      'The limits take cases as coming one by one; several at once, or the same people again, make them too narrow (give a design effect).',
  },
  'picked-starting-point': {
    source: 'Barnett et al. 2005, Int. J. Epidemiol. 34:215',
    text: () => 'A first figure that was picked because it stood out falls back by itself.',
  },
  'prevalence-as-given': {
    source: 'Altman & Bland 1994, BMJ 309:102',
    text: ({ question }) => prevalenceAsGiven(question),
  },
  'as-stated': {
    source: 'common practice',
    text: () =>
      'Without counts nobody sees how many stand behind a figure: a few may have moved it by chance.',
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
  const group = question.kind === 'shares' ? question.groups[of] : undefined;
  const held = group === undefined ? '' : expectedShare(group);
  return `${percent(share, 'short')} is a share of the ${cases(question)}${ofKnownGroup(question)}, not a risk; it would be ${held} if both groups had ${cases(question)} equally often.`;
}

function fewCases({ question }: Report): string {
  if (question.kind === 'alarm') return 'Few cases or few false alarms: treat the limits as rough.';
  const few = casesOf(question).some((count) => count > 0 && count < 5);
  return few
    ? 'Few cases: treat the limits as rough. If these are people in a small place, write "fewer than 5".'
    : 'Few cases: treat the limits as rough.';
}

/** Every count of cases that the question names. */
function casesOf(question: Question): readonly number[] {
  switch (question.kind) {
    case 'strata':
      return question.layers.flatMap((layer) => casesOf(layer.question));
    case 'stated':
    case 'alarm':
      return [];
    case 'shares':
      return question.groups.flatMap(({ cases: count }) => (count === null ? [] : [count.value]));
    case 'counts':
    case 'rates':
    case 'bare-counts':
      return question.groups.map(({ cases: count }) => count.value);
  }
}

function couldHaveShown({ couldShow }: Report): string {
  if (couldShow == null) return '';
  const { above, below, growthForDoubling } = couldShow;
  const least =
    above !== null ? ratio(above, 'short') : below !== null && below > 0 ? ratio(below, 'short') : null;
  const shown =
    least === null
      ? 'At this size no ratio would show four times in five'
      : `At this size a ratio of ${least} would show four times in five`;
  if (growthForDoubling === null || growthForDoubling <= 1) return `${shown}.`;
  return `${shown}; a doubling takes ${amount(growthForDoubling, 'short')} times as many.`;
}

function pickedComparison({ readings }: Report): string {
  const p = readings.find(({ id }) => id === 'overall-difference')?.estimate ?? null;
  const all = p === null ? '' : ` (overall p ${probability(p)})`;
  return `Of several pairs one often differs by chance${all}: do not pick one after looking.`;
}

function smallRisk({ question, readings }: Report): string {
  const risks = readings.filter(({ id }) => id === 'risk').map(({ estimate }) => estimate ?? 0);
  const most = Math.max(...risks);
  const per = 10 ** Math.max(3, Math.ceil(-Math.log10(most)));
  return `The ratio is large, the risk small: at most ${Math.ceil(most * per)} in ${fixed(per, 0)}${question.unit === null ? '' : ` ${question.unit}`}.`;
}

function coverageAsGiven({ question }: Report): string {
  return question.kind === 'shares'
    ? coverageCaution(question)
    : 'Coverage is taken as exact, for the same people, place and time.';
}

import { readingsOf, shownDirection } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { pooledAndCrude } from '../../report/reversal.ts';
import { capital, cases, Label, label, one } from './labels.ts';
import { percent, ratio } from './numbers.ts';
import { quantityText } from './read-as.ts';
import type { Avoid } from './telling.ts';

/** What is better not posted, and why. The reason is said first. */
export function avoidFor(report: Report): readonly Avoid[] {
  const { question } = report;
  if (question.groups.length === 1) return [oneGroup(report)];
  switch (question.kind) {
    case 'counts':
      return question.chosenByOutcome
        ? [oddsAsRisk(report), causal(report)]
        : [...countsAlone(report), ...difference(report), causal(report)];
    case 'shares':
      return [shareAsRisk(report), ...difference(report), causal(report)];
    case 'strata':
      return [...crudeAlone(report), ...difference(report), causal(report)];
    case 'stated':
    case 'rates':
      return [...difference(report), causal(report)];
    case 'bare-counts':
      if (question.overTime) return [countsAsRisk(report), ...difference(report), causal(report)];
      return [
        {
          because: 'Without the totals nobody can tell how often it happened.',
          text: `${Label(question, 0)} is the more dangerous one.`,
        },
      ];
  }
}

function oneGroup(report: Report): Avoid {
  return {
    because: 'One group by itself cannot be high or low: it takes a second one to compare with.',
    text: `A high figure for ${label(report.question, 0)}.`,
  };
}

function countsAlone(report: Report): Avoid[] {
  const { question } = report;
  if (question.kind !== 'counts' || question.groups.length !== 2) return [];
  const [one_, other] = question.groups;
  if (one_ === undefined || other === undefined || one_.total.value === other.total.value) return [];
  return [
    {
      because: `It leaves out the totals, ${quantityText(one_.total)} and ${quantityText(other.total)}.`,
      text: `${quantityText(one_.cases)} ${cases(question)} against ${quantityText(other.cases)}.`,
    },
  ];
}

/** The figure that leaves the layers out, where it points elsewhere. */
function crudeAlone({ question, readings }: Report): Avoid[] {
  const of = question.groups.findIndex((_, at) => at !== question.reference);
  const { pooled, crude } = pooledAndCrude(readings, of);
  if (pooled === null || crude === null || ratio(pooled, 'short') === ratio(crude, 'short')) return [];
  return [
    {
      because: 'All together, the mix of the layers is compared too, not only the groups.',
      text: `${Label(question, of)}: ${ratio(crude, 'short')} times as often.`,
    },
  ];
}

function countsAsRisk({ question }: Report): Avoid {
  return {
    because: 'A count can change because more are counted; the risk need not have changed.',
    text: `The risk of ${cases(question)} has changed.`,
  };
}

function shareAsRisk(report: Report): Avoid {
  const { question } = report;
  const of = readingsOf(report, 'risk-ratio')[0]?.of ?? 0;
  const share = readingsOf(report, 'case-share').find((reading) => reading.of === of)?.estimate ?? NaN;
  const text = percent(share, 'short');
  const single = one(question);
  return {
    because: `${text} is a share of the ${cases(question)}, not a risk.`,
    text: `${single === null ? `Those in ${label(question, of)} have` : `A ${single} in ${label(question, of)} has`} a risk of ${text}.`,
  };
}

function difference(report: Report): Avoid[] {
  const { question } = report;
  const [reading] = readingsOf(report, report.headline);
  if (reading?.estimate == null || question.groups.length !== 2) return [];
  if (shownDirection(report, reading) === 'none-shown') {
    return [
      { because: 'These figures are too few to tell.', text: 'There is no difference.' },
      {
        because: 'The interval includes no difference.',
        text: question.overTime
          ? `It has ${reading.estimate > 1 ? 'risen' : 'fallen'}.`
          : `${Label(question, reading.of)} is ${reading.estimate > 1 ? 'higher' : 'lower'}.`,
      },
    ];
  }
  if (reading.estimate <= 1) return [];
  const times = ratio(reading.estimate, 'short');
  return [
    {
      because: `Some read "times more" as ${times} times, others as ${ratio(reading.estimate + 1, 'short')} times; write "times as".`,
      text: `${capital(times)} times more.`,
    },
  ];
}

function oddsAsRisk(report: Report): Avoid {
  const odds = readingsOf(report, 'odds-ratio')[0]?.estimate ?? null;
  return {
    because: 'An odds ratio is not a risk ratio, and these rows were chosen by outcome.',
    text: odds === null ? 'Times as likely.' : `${ratio(odds, 'short')} times as likely.`,
  };
}

function causal(report: Report): Avoid {
  const of = readingsOf(report, report.headline)[0]?.of ?? 0;
  if (report.question.overTime)
    return {
      because: 'The figures compare two times; they do not say why they differ.',
      text: 'What came in between is the cause.',
    };
  return {
    because: 'The figures compare groups; they do not say why the groups differ.',
    text: `${Label(report.question, of)} is the cause.`,
  };
}

/** "The reason. So not: ‘the sentence’", in one line; names keep quotation marks of their own. */
export const avoidLine = ({ because, text }: Avoid): string =>
  `${because} So not: \u201c${text.replaceAll('\u201c', '\u2018').replaceAll('\u201d', '\u2019')}\u201d`;

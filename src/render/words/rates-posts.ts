import type { RatesQuestion } from '../../../grammar/question.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import { changeText, countedMore, limitsText } from './interval-text.ts';
import { cases, Label, label, one } from './labels.ts';
import { amount } from './numbers.ts';
import { compared, intervalNote } from './ratio-words.ts';
import { rateText } from './read-as.ts';
import { noneShown } from './none-shown.ts';
import { manyPer, perExposure } from './rate-words.ts';
import type { Post } from './telling.ts';

/** Sentences to post about rates: each with what was counted and what it was counted over. */
export function ratesPosts(report: Report, question: RatesQuestion): Post[] {
  const order = [...question.groups.keys()].sort(
    (a, b) => Number(a === question.reference) - Number(b === question.reference),
  );
  const rows = (question.overTime ? order.toReversed() : order)
    .map((index) => `${Label(question, index)}: ${rateText(question, index)}.`)
    .join(' ');
  const [ratio] = readingsOf(report, 'rate-ratio');
  if (ratio === undefined) return oneRate(report, rows);
  if (shownDirection(report, ratio) === 'none-shown')
    return [{ reading: 'rate-ratio', text: noneShown(ratio, rows) }];
  const reference = label(question, question.reference);
  if (ratio.estimate === null)
    return [
      {
        reading: 'rate-ratio',
        text: `${rows} No ratio can be given without ${cases(question)} in ${reference} (${intervalNote(ratio)}).`,
      },
    ];
  return [
    {
      reading: 'rate-ratio',
      text: `${rows} That is ${compared(ratio, manyPer(question), reference)}.`,
    },
    ...changePost(report, question, rows),
    ...differencePost(report, question),
  ];
}

function oneRate(report: Report, rows: string): Post[] {
  const [rate] = readingsOf(report, 'rate');
  if (rate?.estimate == null) return [];
  return [
    {
      reading: 'rate',
      text: `${rows} That is ${amount(rate.estimate * (rate.per ?? 1), 'short')} ${perExposure(report.question, rate.per ?? 1)} (${intervalNote(rate)}).`,
    },
  ];
}

function changePost(report: Report, question: RatesQuestion, rows: string): Post[] {
  const [change] = readingsOf(report, 'relative-change');
  if (change?.estimate == null || change.interval === null) return [];
  const single = one(question);
  return [
    {
      reading: 'relative-change',
      text: `${rows} That is ${countedMore(changeText(change.estimate, 'short'))}${single === null ? '' : ` per ${single}`} (${countedMore(intervalNote(change))}).`,
    },
  ];
}

function differencePost(report: Report, question: RatesQuestion): Post[] {
  const [difference] = readingsOf(report, 'rate-difference');
  if (difference?.estimate == null || difference.against === null || difference.interval === null) return [];
  const per = difference.per ?? 1;
  const rates = [difference.of, difference.against].map((index) => {
    const rate = readingsOf(report, 'rate').find(({ of }) => of === index)?.estimate ?? 0;
    return `${Label(question, index)}: ${amount(rate * per, 'short')} (${rateText(question, index)}).`;
  });
  const down = difference.estimate < 0;
  const turned = down
    ? {
        ...difference,
        interval: {
          ...difference.interval,
          low: negated(difference.interval.high),
          high: negated(difference.interval.low),
        },
      }
    : difference;
  const limits = limitsText(turned, turned.interval ?? difference.interval, 'short');
  const level = intervalNote(turned).split(' interval ')[0] ?? '';
  return [
    {
      reading: 'rate-difference',
      text: `In ${perExposure(question, per).replace(/^per /, '')}: ${rates.join(' ')} That is ${amount(Math.abs(difference.estimate) * per, 'short')} ${down ? 'fewer' : 'more'} (${level} interval ${limits}).`,
    },
  ];
}

const negated = (value: number | null) => (value === null ? null : -value);

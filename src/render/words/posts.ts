import type { CountsQuestion } from '../../../grammar/question.ts';
import type { Reading, ReadingId } from '../../report/reading.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { changePosts } from './change-posts.ts';
import { assumption } from './coverage-words.ts';
import { changeText, limitsText } from './interval-text.ts';
import { cases, Label, label, perOne } from './labels.ts';
import { amount, beside, fixed, percent, points, ratio } from './numbers.ts';
import { compared, comparison, intervalNote } from './ratio-words.ts';
import { noneShown } from './none-shown.ts';
import { manyPer } from './rate-words.ts';
import { ratesPosts } from './rates-posts.ts';
import { quantityText, rateText } from './read-as.ts';
import { madeUp, sharesPosts } from './shares-posts.ts';
import { strataPosts } from './strata-words.ts';
import type { Post } from './telling.ts';

const postLength = 280;
const shortLength = 70;

/** The sentences that may be posted, one for each fair reading, the headline's first. None claims a difference that the interval does not show. */
export function postsFor(report: Report): readonly Post[] {
  const { question } = report;
  if (question.kind === 'strata') return strataPosts(report, question);
  if (question.groups.length > 2) return report.headline === 'odds-ratio' ? [] : manyGroups(report);
  switch (question.kind) {
    case 'counts':
      return countsPosts(report, question);
    case 'shares':
      return sharesPosts(report, question);
    case 'stated':
      return statedPosts(report);
    case 'rates':
      return ratesPosts(report, question);
    case 'bare-counts':
      return question.overTime ? changePosts(report, question) : bareCountsPosts(report);
  }
}

/** Whether a sentence fits where 280 characters are the limit. */
export const fitsPost = (text: string) => text.length <= postLength;

/** The main comparison in at most 70 characters, or `null` where none fits. */
export function shortPost(report: Report): string | null {
  const { question } = report;
  const [reading] = readingsOf(report, report.headline);
  if (reading?.estimate == null || reading.against === null || question.groups.length !== 2) return null;
  if (question.kind === 'bare-counts' || question.kind === 'strata' || report.headline === 'odds-ratio')
    return null;
  if (shownDirection(report, reading) === 'none-shown' || assumption(question) !== null) return null;
  const { words, joiner, figure } = comparison(
    reading.estimate,
    question.kind === 'shares'
      ? `many ${cases(question)}`
      : question.kind === 'rates'
        ? manyPer(question)
        : 'often',
  );
  const per = question.kind === 'shares' ? ` ${perOne(question)}` : '';
  const core = `${Label(question, reading.of)}: ${words}${per} ${joiner} ${label(question, reading.against)}`;
  const limits = reading.interval === null ? '' : limitsText(reading, reading.interval, 'short');
  const bracket = [figure, limits].filter((part) => part !== null && part !== '').join(', ');
  const text = bracket === '' ? core : `${core} (${bracket})`;
  return text.length <= shortLength ? text : null;
}

/** "Night shift: 18 of 1,204 shifts. Day shift: 9 of 2,377." */
function denominators(report: Report, question: CountsQuestion): string {
  const last = [...question.groups.keys()].sort(
    (a, b) => Number(a === question.reference) - Number(b === question.reference),
  );
  return (question.overTime ? last.toReversed() : last)
    .map((index, place) => {
      const group = question.groups[index];
      if (group === undefined) return '';
      const noun = place === 0 && question.caseNoun !== null ? ` ${question.caseNoun}` : '';
      const unit = place === 0 && question.unit !== null ? ` ${question.unit}` : '';
      return `${Label(report.question, index)}: ${quantityText(group.cases)}${noun} of ${quantityText(group.total)}${unit}.`;
    })
    .join(' ');
}

function countsPosts(report: Report, question: CountsQuestion): Post[] {
  const rows = denominators(report, question);
  const [risk] = readingsOf(report, 'risk');
  if (question.groups.length === 1) {
    return risk?.estimate == null
      ? []
      : [
          {
            reading: 'risk',
            text: `${rows} That is ${percent(risk.estimate, 'short')} (${intervalNote(risk)}).`,
          },
        ];
  }
  if (question.chosenByOutcome) return oddsPost(report, rows);
  const [ratioReading] = readingsOf(report, 'risk-ratio');
  if (ratioReading === undefined) return [];
  if (shownDirection(report, ratioReading) === 'none-shown')
    return [{ reading: 'risk-ratio', text: noneShown(ratioReading, rows) }];
  const reference = label(report.question, question.reference);
  const ratioPost: Post[] =
    ratioReading.estimate === null
      ? [
          {
            reading: 'risk-ratio',
            text: `${rows} No ratio can be given without ${cases(report.question)} in ${reference} (${intervalNote(ratioReading)}).`,
          },
        ]
      : [{ reading: 'risk-ratio', text: `${rows} That is ${compared(ratioReading, 'often', reference)}.` }];
  // A hidden count has no percentage of its own that could be posted.
  if (question.groups.some(({ cases: x, total }) => x.precision === 'range' || total.precision === 'range'))
    return ratioPost;
  return [
    ...ratioPost,
    ...changePost(report, rows),
    ...differencePost(report, question),
    ...extraPost(report),
  ];
}

function oddsPost(report: Report, rows: string): Post[] {
  const [odds] = readingsOf(report, 'odds-ratio');
  if (odds?.estimate == null) return [];
  const text =
    shownDirection(report, odds) === 'none-shown'
      ? `${rows} These figures do not show a difference in the odds, nor that there is none (${intervalNote(odds)}).`
      : `${rows} The odds ratio is ${ratio(odds.estimate, 'short')} (${intervalNote(odds)}).`;
  return [{ reading: 'odds-ratio', text }];
}

function changePost(report: Report, rows: string): Post[] {
  const [change] = readingsOf(report, 'relative-change');
  if (change?.estimate == null || change.interval === null) return [];
  return [
    {
      reading: 'relative-change',
      text: `${rows} That is ${changeText(change.estimate, 'short')} (${intervalNote(change)}).`,
    },
  ];
}

function differencePost(report: Report, question: CountsQuestion): Post[] {
  const [difference] = readingsOf(report, 'risk-difference');
  if (difference?.estimate == null || difference.against === null) return [];
  const parts = [difference.of, difference.against].map((index) => {
    const group = question.groups[index];
    const risk = readingsOf(report, 'risk').find(({ of }) => of === index);
    return group === undefined || risk?.estimate == null
      ? ''
      : `${Label(report.question, index)}: ${percent(risk.estimate, 'short')} (${quantityText(group.cases)} of ${quantityText(group.total)}).`;
  });
  return [{ reading: 'risk-difference', text: `${parts.join(' ')} ${pointsSentence(difference)}` }];
}

/** "The difference is 1.1 percentage points (95% interval 0.5 to 2.0)." */
function pointsSentence(difference: Reading): string {
  const { estimate } = difference;
  if (estimate === null) return '';
  const size = points(Math.abs(estimate), 'short');
  const limits =
    difference.interval === null || estimate > 0
      ? intervalNote(difference)
      : intervalNote({
          ...difference,
          interval: {
            ...difference.interval,
            low: negated(difference.interval.high),
            high: negated(difference.interval.low),
          },
        });
  return `That is ${size} percentage ${size === '1' ? 'point' : 'points'} ${estimate < 0 ? 'less' : 'more'} (${limits}).`;
}

const negated = (value: number | null) => (value === null ? null : -value);

function extraPost(report: Report): Post[] {
  const [extra] = readingsOf(report, 'extra-cases');
  if (extra?.estimate == null || extra.per === null || extra.against === null) return [];
  const per = extra.per;
  const frequency = (index: number) => {
    const risk = readingsOf(report, 'risk').find(({ of }) => of === index)?.estimate ?? 0;
    return `${amount(risk * per, 'short')} in ${label(report.question, index)}`;
  };
  const { question } = report;
  const counted = question.unit === null ? '' : ` ${question.unit}`;
  const sign = extra.estimate < 0 ? -1 : 1;
  const flipped: Reading = {
    ...extra,
    interval:
      extra.interval === null || sign > 0
        ? extra.interval
        : { ...extra.interval, low: negated(extra.interval.high), high: negated(extra.interval.low) },
  };
  const word = sign > 0 ? 'more' : 'fewer';
  return [
    {
      reading: 'extra-cases',
      text: `Per ${fixed(per, 0)}${counted}: about ${frequency(extra.of)} against about ${frequency(extra.against)}, ${beside(Math.abs(extra.estimate), 0, 'short')} ${word} (${intervalNote(flipped)}).`,
    },
  ];
}

function statedPosts(report: Report): Post[] {
  const [reading] = readingsOf(report, 'percentage-ratio');
  const [difference] = readingsOf(report, 'percentage-difference');
  const { question } = report;
  if (question.kind !== 'stated' || reading?.against == null) return [];
  const order = question.overTime ? [reading.against, reading.of] : [reading.of, reading.against];
  const rows = order
    .map((index) => `${Label(question, index)}: ${question.groups[index]?.share.text ?? ''}.`)
    .join(' ');
  const frequency = question.groups.every(({ form }) => form === 'frequency');
  const posts: Post[] = frequency
    ? extraPost(report).map((post) => ({ ...post, reading: 'extra-cases' }))
    : [];
  if (!frequency && difference !== undefined)
    posts.push({ reading: 'percentage-difference', text: `${rows} ${pointsSentence(difference)}` });
  if (reading.estimate !== null) {
    posts.push({
      reading: 'percentage-ratio',
      text: `${rows} That is ${compared(reading, 'often', label(question, reading.against))}.`,
    });
  }
  return posts;
}

function bareCountsPosts(report: Report): Post[] {
  const { question } = report;
  if (question.kind !== 'bare-counts') return [];
  const rows = question.groups
    .map((group, index) => `${Label(question, index)}: ${quantityText(group.cases)}.`)
    .join(' ');
  return [
    {
      reading: 'count-ratio' satisfies ReadingId,
      text: `${rows} Out of how many is not known, so nothing follows about how often.`,
    },
  ];
}

function manyGroups(report: Report): Post[] {
  const { question } = report;
  const ratios = readingsOf(report, report.headline);
  const lines = ratios.flatMap((reading): Post[] => {
    if (reading.estimate === null || reading.against === null || reading.interval === null) return [];
    const rows =
      question.kind === 'counts'
        ? pairDenominators(question, report, reading)
        : question.kind === 'shares'
          ? madeUp(report, question, reading.of)
          : question.kind === 'rates'
            ? [reading.of, reading.against]
                .map((index) => `${Label(question, index)}: ${rateText(question, index)}.`)
                .join(' ')
            : '';
    if (rows === '') return [];
    if (shownDirection(report, reading) === 'none-shown')
      return [{ reading: reading.id, text: noneShown(reading, rows) }];
    return [
      {
        reading: reading.id,
        text: `${rows} That is ${compared(reading, 'often', label(question, reading.against))}.`,
      },
    ];
  });
  return lines;
}

function pairDenominators(question: CountsQuestion, report: Report, reading: Reading): string {
  const pair = [reading.of, reading.against ?? 0].flatMap((index) => question.groups[index] ?? []);
  const labels = [reading.of, reading.against ?? 0].map((index) => Label(report.question, index));
  return pair
    .map(
      ({ cases: x, total }, place) => `${labels[place] ?? ''}: ${quantityText(x)} of ${quantityText(total)}.`,
    )
    .join(' ');
}

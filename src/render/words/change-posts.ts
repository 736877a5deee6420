import type { BareCountsQuestion } from '../../../grammar/question.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import { changeText, countedMore, limitsText } from './interval-text.ts';
import { Label } from './labels.ts';
import { noneShown } from './none-shown.ts';
import { ratio } from './numbers.ts';
import { quantityText } from './read-as.ts';
import type { Post } from './telling.ts';

/** Sentences to post about two counts of one thing at two times, with what they take for granted. */
export function changePosts(report: Report, question: BareCountsQuestion): Post[] {
  const [reading] = readingsOf(report, 'count-ratio');
  const [change] = readingsOf(report, 'relative-change');
  if (reading === undefined || reading.against === null) return [];
  const rows = [reading.against, reading.of]
    .map((index, place) => {
      const noun = place === 0 ? question.caseNoun : null;
      const count = question.groups[index]?.cases;
      return `${Label(question, index)}: ${count === undefined ? '' : quantityText(count)}${noun === null ? '' : ` ${noun}`}.`;
    })
    .join(' ');
  if (shownDirection(report, reading) === 'none-shown')
    return [{ reading: 'count-ratio', text: noneShown(reading, rows) }];
  if (reading.estimate === null || change?.estimate == null || change.interval === null) return [];
  const level = `${Number((report.level * 100).toFixed(4))}%`;
  const given = 'if both times are equally long';
  return [
    {
      reading: 'relative-change',
      text: `${rows} That is ${countedMore(changeText(change.estimate, 'full'))} (${level} interval ${countedMore(limitsText(change, change.interval, 'full'))}, ${given}).`,
    },
    {
      reading: 'count-ratio',
      text: `${rows} That is ${ratio(reading.estimate, 'full')} times as many (${level} interval ${limitsText(reading, reading.interval ?? change.interval, 'full')}, ${given}).`,
    },
  ];
}

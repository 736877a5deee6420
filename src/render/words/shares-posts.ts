import type { SharesQuestion } from '../../../grammar/question.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { grantedNote, wanting } from './coverage-posts.ts';
import { assumption, coveragePhrase, ofKnownGroup, unknownSentence } from './coverage-words.ts';
import { changeText, countedMore } from './interval-text.ts';
import { capital, cases, casesAsTyped, Label, label, perOne } from './labels.ts';
import { noneShown } from './none-shown.ts';
import { percent } from './numbers.ts';
import { compared, intervalNote } from './ratio-words.ts';
import { quantityText } from './read-as.ts';
import type { Post } from './telling.ts';
/** Sentences to post about shares of cases beside coverage. */

export function sharesPosts(report: Report, question: SharesQuestion): Post[] {
  const [ratioReading] = readingsOf(report, 'risk-ratio');
  if (ratioReading === undefined) return [];
  const group = question.groups[ratioReading.of];
  if (group === undefined) return [];
  const made = madeUp(report, question, ratioReading.of);
  const reference = label(report.question, question.reference);
  if (shownDirection(report, ratioReading) === 'none-shown')
    return [{ reading: 'risk-ratio', text: noneShown(ratioReading, made) }];
  const per = capital(perOne(report.question));
  const granted = assumption(report.question);
  const ratioPost: Post =
    ratioReading.estimate === null
      ? {
          reading: 'risk-ratio',
          text: `${made} No ratio can be given ${wanting(question, ratioReading.of)} (${intervalNote(ratioReading)}).`,
        }
      : {
          reading: 'risk-ratio',
          text:
            granted === null
              ? `${made} ${per}, that is ${compared(ratioReading, `many ${cases(report.question)}`, reference)}.`
              : `${made} ${granted} ${compared(ratioReading, `many ${cases(report.question)} ${perOne(question)}`, reference, grantedNote(ratioReading))}.`,
        };
  const share = readingsOf(report, 'case-share').find(({ of }) => of === ratioReading.of);
  const sharePost: Post[] =
    share?.interval == null || question.unknownCases !== null
      ? []
      : [
          {
            reading: 'case-share',
            text: `${made.slice(0, -1)}. As a share of all ${cases(report.question)} that is ${percent(share.estimate ?? NaN, 'short')} (${intervalNote(share)}); it is no risk.`,
          },
        ];
  return [ratioPost, ...shareChangePost(report, made, reference), ...sharePost];
}

/** "“No helmet” made up 44 of 75 admitted (59%) and 38% of riders." */
export function madeUp(report: Report, question: SharesQuestion, index: number): string {
  const group = question.groups[index];
  if (group === undefined) return '';
  const share = percent(group.caseShare.value, 'short');
  const all = question.totalCases;
  const counted =
    group.cases !== null && all !== null
      ? `${quantityText(group.cases)} of ${quantityText(all)} ${casesAsTyped(report.question)}${ofKnownGroup(question)} (${share})`
      : `${quantityText(group.caseShare)} of the ${casesAsTyped(report.question)}`;
  return `${Label(report.question, index)} made up ${counted}${coveragePhrase(question, index)}.${unknownSentence(question)}`;
}

/** For shares: "Per rider, that is 130% more cases than ...", since the two shares in front are not what is compared. */
function shareChangePost(report: Report, rows: string, reference: string): Post[] {
  const [change] = readingsOf(report, 'relative-change');
  if (change?.estimate == null || change.interval === null) return [];
  const more = countedMore(changeText(change.estimate, 'short'));
  const granted = assumption(report.question);
  if (granted !== null) {
    return [
      {
        reading: 'relative-change',
        text: `${rows} ${granted} ${more} ${cases(report.question)} ${perOne(report.question)} than ${reference} (${countedMore(grantedNote(change))}).`,
      },
    ];
  }
  return [
    {
      reading: 'relative-change',
      text: `${rows} ${capital(perOne(report.question))}, that is ${more} ${cases(report.question)} than ${reference} (${countedMore(intervalNote(change))}).`,
    },
  ];
}

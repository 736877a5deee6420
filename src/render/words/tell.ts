import type { AlarmReport, GroupedReport, Report } from '../../report/report.ts';
import { alarmAvoid, alarmHeadline, alarmPosts, alarmShortPost } from './alarm-words.ts';
import { avoidFor } from './avoid.ts';
import { cautionText } from './caution-words.ts';
import { tableFor } from './group-table.ts';
import { headlineFor } from './headline.ts';
import { missingText } from './missing-words.ts';
import { postsFor, shortPost } from './posts.ts';
import { readAs, remarksText, statedText } from './read-as.ts';
import { readingRow } from './reading-row.ts';
import { saysTold } from './says-words.ts';
import { sidesFor } from './side-by-side.ts';
import type { Telling } from './telling.ts';

/** What the answer is not. It stands last under every answer, since a figure about health, safety or law may come unannounced. */
export const whatItIsNot =
  'Figures as given; no medical, safety or legal advice. Local rules and the licensed professional decide.';

/** Puts a report into words. */
export function tell(report: Report): Telling {
  const { question } = report;
  const words =
    question.kind === 'alarm' ? ofAlarm({ ...report, question }) : ofGroups({ ...report, question });
  return {
    ...words,
    readAs: readAs(report.question),
    remarks: [...statedText(report), ...remarksText(report.question)],
    cautions: report.cautions.map((id) => ({ id, text: cautionText(report, id) })),
    missing: report.missing.map((id) => ({ id, text: missingText(report.question, id) })),
    rows: [...report.readings, ...(report.againstRest ?? [])].map((reading) => readingRow(report, reading)),
    sides: sidesFor(report),
    limits: whatItIsNot,
  };
}

type OwnWords = Pick<Telling, 'headline' | 'says' | 'posts' | 'shortPost' | 'table' | 'avoid'>;

const ofGroups = (report: GroupedReport): OwnWords => ({
  headline: headlineFor(report),
  says: saysTold(report),
  posts: postsFor(report),
  shortPost: shortPost(report),
  table: tableFor(report),
  avoid: avoidFor(report),
});

const ofAlarm = (report: AlarmReport): OwnWords => ({
  headline: alarmHeadline(report),
  says: null,
  posts: alarmPosts(report),
  shortPost: alarmShortPost(report),
  table: null,
  avoid: alarmAvoid(report),
});

import type { Report } from '../../report/report.ts';
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
  return {
    headline: headlineFor(report),
    readAs: readAs(report.question),
    remarks: [...statedText(report), ...remarksText(report.question)],
    says: saysTold(report),
    posts: postsFor(report),
    shortPost: shortPost(report),
    cautions: report.cautions.map((id) => ({ id, text: cautionText(report, id) })),
    missing: report.missing.map((id) => ({ id, text: missingText(report.question, id) })),
    rows: [...report.readings, ...(report.againstRest ?? [])].map((reading) => readingRow(report, reading)),
    table: tableFor(report),
    sides: sidesFor(report),
    avoid: avoidFor(report),
    limits: whatItIsNot,
  };
}

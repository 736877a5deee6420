import type { Report } from '../../report/report.ts';
import type { CautionId } from '../../report/cautions.ts';
import type { MissingId } from '../../report/missing.ts';
import type { Reading, ReadingId } from '../../report/reading.ts';
import { avoidFor } from './avoid.ts';
import { cautionText } from './caution-words.ts';
import { headlineFor } from './headline.ts';
import { missingText } from './missing-words.ts';
import { postsFor, shortPost } from './posts.ts';
import { readAs, remarksText, statedText } from './read-as.ts';
import { readingRow } from './reading-row.ts';
import { tableFor } from './group-table.ts';

/** One sentence that may be posted, with its denominators and interval inside it, so that it can be copied alone. */
export interface Post {
  readonly reading: ReadingId;
  readonly text: string;
}

/** What is better not posted; the reason comes first. */
export interface Avoid {
  readonly text: string;
  readonly because: string;
}

/** A reading in words. */
export interface ReadingRow {
  readonly reading: Reading;
  /** "Risk ratio, night shift against day shift". */
  readonly name: string;
  /** "3.95 (95% interval 1.81 to 8.6)". */
  readonly value: string;
  /** "18/1,204 / (9/2,377)". */
  readonly formula: string;
  /** "3.9485 (1.8145 to 8.5923)", at the long precision. */
  readonly long: string;
  /** The method and its source. */
  readonly method: string;
}

/** The answer in words. Every renderer draws from this one value, so that all of them say the same. */
export interface Telling {
  /** Complete in itself; within 110 characters for labels of usual length. */
  readonly headline: string;
  readonly readAs: string;
  /** How the line was read where that may surprise, and stated percentages held against the counts. */
  readonly remarks: readonly string[];
  readonly posts: readonly Post[];
  /** The main sentence's short form of at most 70 characters, or `null` where none fits. */
  readonly shortPost: string | null;
  readonly cautions: readonly { readonly id: CautionId; readonly text: string }[];
  readonly missing: readonly { readonly id: MissingId; readonly text: string }[];
  readonly rows: readonly ReadingRow[];
  /** With three or more groups: one row a group, the header first. */
  readonly table: readonly (readonly string[])[] | null;
  readonly avoid: readonly Avoid[];
  readonly limits: string;
}

/** What the answer is not. It stands last under every answer, since a figure about health, safety or law may come unannounced. */
export const whatItIsNot =
  'Figures as given; no medical, safety or legal advice. Local rules and the licensed professional decide.';

/** Puts a report into words. */
export function telling(report: Report): Telling {
  return {
    headline: headlineFor(report),
    readAs: readAs(report.question),
    remarks: [...statedText(report), ...remarksText(report.question)],
    posts: postsFor(report),
    shortPost: shortPost(report),
    cautions: report.cautions.map((id) => ({ id, text: cautionText(report, id) })),
    missing: report.missing.map((id) => ({ id, text: missingText(report.question, id) })),
    rows: report.readings.map((reading) => readingRow(report, reading)),
    table: tableFor(report),
    avoid: avoidFor(report),
    limits: whatItIsNot,
  };
}

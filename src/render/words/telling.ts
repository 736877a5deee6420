import type { CautionId } from '../../report/cautions.ts';
import type { MissingId } from '../../report/missing.ts';
import type { Reading, ReadingId } from '../../report/reading.ts';
import type { SaysRemark } from '../../report/said.ts';

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

/** Ratios that stand beside the headline's, each under an assumption of its own. */
export interface Side {
  readonly topic: 'growth' | 'unknown' | 'tried' | 'sensitivity';
  readonly title: string;
  /** All of them in one sentence. */
  readonly line: string;
  /** One row each, the header first; `null` where the line says everything. */
  readonly table: readonly (readonly string[])[] | null;
  readonly working: string;
}

/** The sentence under test, held against the readings. */
export interface SaysTold {
  readonly text: string;
  /** Which readings it agrees with as worded. */
  readonly line: string;
  readonly agreesWith: readonly ReadingId[];
  readonly remarks: readonly { readonly id: SaysRemark['id']; readonly text: string }[];
  /** A sentence that would be right; `null` where nothing needs to be written instead. */
  readonly instead: string | null;
  /** The line and the first remark, for where there is little room. */
  readonly short: string;
}

/** The answer in words. Every renderer draws from this one value, so that all of them say the same. */
export interface Telling {
  /** Complete in itself; within 110 characters for labels of usual length. */
  readonly headline: string;
  readonly readAs: string;
  /** How the line was read where that may surprise, and stated percentages held against the counts. */
  readonly remarks: readonly string[];
  /** `null` where no sentence was given to be tested. */
  readonly says: SaysTold | null;
  readonly posts: readonly Post[];
  /** The main sentence's short form of at most 70 characters, or `null` where none fits. */
  readonly shortPost: string | null;
  readonly cautions: readonly { readonly id: CautionId; readonly text: string }[];
  readonly missing: readonly { readonly id: MissingId; readonly text: string }[];
  readonly rows: readonly ReadingRow[];
  /** With three or more groups: one row a group, the header first. */
  readonly table: readonly (readonly string[])[] | null;
  readonly sides: readonly Side[];
  readonly avoid: readonly Avoid[];
  readonly limits: string;
}

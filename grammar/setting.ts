import type { ReadingRemark } from './question.ts';
import type { SettledClauses } from './settle-clauses.ts';

/** What every kind needs to settle: the typed line, its clauses, and what was already remarked. */
export interface Setting {
  readonly typed: string;
  readonly given: SettledClauses;
  readonly remarks: readonly ReadingRemark[];
  readonly mostGroups: number;
  readonly mostLayers: number;
}

import type { WrittenNumber } from './numbers.ts';
import type { Span } from './question.ts';

/** Coverage that is not one number, as written; what is impossible is refused when it is settled. */
export type WrittenCoverage =
  | { readonly kind: 'range'; readonly low: WrittenNumber; readonly high: WrittenNumber }
  | {
      readonly kind: 'interval';
      readonly low: WrittenNumber;
      readonly high: WrittenNumber;
      readonly level: WrittenNumber | null;
    }
  | { readonly kind: 'growth'; readonly start: WrittenNumber; readonly end: WrittenNumber }
  | {
      readonly kind: 'periods';
      readonly by: string;
      readonly periods: readonly WrittenPeriod[];
      /** Where the cases by period stand. */
      readonly casesAt: Span;
    };

export interface WrittenPeriod {
  readonly label: string | null;
  readonly coverage: WrittenNumber;
  readonly coverageAt: Span;
  readonly allCases: WrittenNumber;
  readonly casesAt: Span;
}

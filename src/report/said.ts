import type { SaysClause } from '../../grammar/claim.ts';
import type { Interval } from '../stats/interval.ts';
import type { Reading } from './reading.ts';

/** What comes of holding a sentence under test against a report: values only. */

/** Which two groups a sentence compares, as the readings have them. */
export interface SaysPair {
  /** The group that the readings are of, and the one they compare it with; `null` where there is one group alone. */
  readonly of: number;
  readonly against: number | null;
  /** The sentence goes from the reference to the other group, and so every comparison is turned round. */
  readonly turned: boolean;
  /** The group that the sentence is about. */
  readonly subject: number;
  /** Whether the sentence names its subject. */
  readonly named: boolean;
}

/** What a sentence that agrees with no reading as worded may have come from. Each names the reading it was found by. */
export type SaysFault =
  | {
      readonly id: 'points-called-per-cent';
      readonly reading: Reading;
      readonly called: 'per-cent' | 'points';
    }
  | { readonly id: 'odds-ratio-as-risk'; readonly reading: Reading }
  | {
      readonly id: 'share-as-risk';
      readonly reading: Reading;
      /** What the figure is: the share itself, the cases of one group over the other's, or the share over its coverage. */
      readonly is: 'share' | 'cases-against-cases' | 'share-against-coverage';
    }
  | { readonly id: 'other-way-round'; readonly reading: Reading }
  | {
      readonly id: 'from-wrong-base';
      readonly reading: Reading;
      /** Divided by the group's own figure; the whole of the ratio taken for the change; the change for the ratio; or the counts without what they are out of. */
      readonly base: 'own' | 'whole' | 'change' | 'counts' | 'other-total';
    }
  | {
      readonly id: 'rounded-first';
      readonly reading: Reading;
      /** The figures as they were before, rounded to what the claim follows from. */
      readonly from: readonly number[];
      readonly unit: 'percent' | 'ratio' | 'count';
      readonly decimals: number;
    }
  /** `places` to the left (the claim is too large) or, negative, to the right. */
  | { readonly id: 'decimal-slip'; readonly reading: Reading; readonly places: number }
  | { readonly id: 'hedge-too-strong'; readonly reading: Reading };

/** The common ways of working out an interval, beside the one in use here (`own`). */
export type IntervalVariant =
  | 'own'
  | 'exact-beside'
  | 'log'
  | 'log-with-halves'
  | 'koopman'
  | 'wald-difference'
  | 'wald-difference-corrected'
  | 'agresti-caffo'
  | 'newcombe'
  | 'mee'
  | 'woolf'
  | 'woolf-with-halves'
  | 'cornfield'
  | 'conditional-exact'
  | 'log-odds'
  | 'log-odds-with-halves'
  | 'exact-odds'
  | 'log-rates'
  | 'log-rates-with-halves'
  | 'exact-rates'
  | 'wald'
  | 'agresti-coull'
  | 'wilson-corrected'
  | 'clopper-pearson';

/** A variant with its limits in the reading's own unit. */
export interface VariantLimits {
  readonly variant: IntervalVariant;
  readonly limits: Interval;
}

/** What there is to say about a sentence beside what it agrees with. The ids are fixed: other programs lean on them. */
export type SaysRemark =
  | SaysFault
  | { readonly id: 'ambiguous-more'; readonly reading: Reading | null }
  | {
      readonly id: 'no-difference-shown';
      readonly reading: Reading;
      /** What the sentence claims: a difference where none is shown, or none where that is not shown either. */
      readonly claims: 'difference' | 'none';
      /** Whether the figures show a difference. */
      readonly shown: boolean;
    }
  | {
      readonly id: 'interval-variant';
      readonly reading: Reading;
      readonly matched: boolean;
      readonly nearest: VariantLimits | null;
    };

/** A sentence held against every reading of the report. */
export interface Says {
  readonly clause: SaysClause;
  readonly pair: SaysPair;
  /** The readings with which it agrees as worded, at its own precision. */
  readonly agreesWith: readonly Reading[];
  readonly remarks: readonly SaysRemark[];
  /** The reading whose sentence would be right; `null` where nothing needs to be written instead. */
  readonly instead: Reading | null;
  /**
   * `no-figure`: nothing in it could be held; `no-reading`: nothing here measures what it says; `given`: it repeats a count as
   * it was given, or, with `count-difference`, the difference of the two.
   */
  readonly held: 'held' | 'no-figure' | 'no-reading' | 'given' | 'count-difference';
}

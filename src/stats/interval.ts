/** Two limits of an interval. `null` means that there is no limit on that side; never an infinity, never NaN. */
export interface Interval {
  readonly low: number | null;
  readonly high: number | null;
}

/** Cases among a total in a group and in its reference group. Cases in [0, total]; totals in (0, 1e15], need not be whole. */
export interface TwoGroups {
  readonly cases: number;
  readonly total: number;
  readonly referenceCases: number;
  readonly referenceTotal: number;
}

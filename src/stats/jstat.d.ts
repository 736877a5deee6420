declare module 'jstat' {
  /** The parts of the library that are used here; each is compared with 30-digit values in the tests. */
  export const jStat: {
    readonly normal: { inv(probability: number, mean: number, standardDeviation: number): number };
  };
}

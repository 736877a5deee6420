declare module 'jstat' {
  /** The parts of the library that are used here; each is compared with 40-digit values in the tests. */
  const jstat: {
    readonly normal: { inv(probability: number, mean: number, standardDeviation: number): number };
  };
  export default jstat;
}

import { measured, report } from './calibration-readings.ts';

/**
 * Calibration: how often each 95% interval holds the truth, by enumeration of all outcomes over a stated grid, beside the common
 * textbook intervals. Run by `npm run calibration`; what it printed last stands in tests/bench/calibration.txt.
 */

const head = `How often 95% intervals hold the truth: all outcomes enumerated, weighted by their probabilities.
${new Date().toISOString().slice(0, 10)}, Node ${process.version}

Two groups: 10, 15, 30, 60 and 200 people in either, 37 risks in either: 0.1, 0.16, 0.25, 0.4, 0.63, 1, 1.6, 2.5, 4 and 6.3%, 10 to
97.5% in steps of 3.5 points, and 99%. One group: the same sizes and risks. Shares of cases: as many cases as people above, coverages
as risks above (known exactly), true ratios 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10 and 20. Rates: equal exposures, the risks times 200 as
expected events in either group. "Lowest" is the lowest of the grid; between its points there are lower ones. A formula that gives
no interval (a textbook one at a count of 0) does not hold the truth.
`;
process.stdout.write(`${head}\n${report(measured())}`);

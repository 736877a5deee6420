import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { measured, report } from '../bench/calibration-readings.ts';

/** Some seconds of enumeration, once for all that follows. */
const found = measured();

function of(name: string) {
  const each = found.get(name);
  if (each === undefined) throw new Error(`nothing was measured under ${name}`);
  return each;
}
/** Per cent to two places, as the program prints them. */
const percent = (share: number) => (100 * share).toFixed(2);

/** Mean and lowest over all cells; the same where at least three are expected of all that is counted. */
const figures = [
  ['risk ratio, Miettinen-Nurminen', 34_225, '95.29', '85.10', 11_881, '95.15', '93.15'],
  ['risk difference, Miettinen-Nurminen', 34_225, '95.79', '84.72', 11_881, '95.11', '92.94'],
  ['odds ratio, Miettinen-Nurminen', 34_225, '95.56', '87.72', 11_881, '95.14', '93.22'],
  ['risk, Wilson', 185, '95.01', '85.10', 109, '95.02', '92.04'],
  ['ratio from shares, score', 1_665, '95.32', '84.69', 771, '95.15', '92.03'],
  ['rate ratio, score', 1_369, '95.19', '90.65', 961, '95.13', '94.57'],
] as const;

describe('with all outcomes enumerated over sizes 10, 15, 30, 60 and 200 and 37 risks from 0.1% to 99%', () => {
  for (const [name, cells, mean, lowest, filledCells, filledMean, filledLowest] of figures)
    it(`the 95% interval "${name}" holds the truth ${mean}% of the time on average and ${lowest}% at the lowest of ${cells} cells; ${filledMean}% and ${filledLowest}% in the ${filledCells} where at least 3 are expected of all that is counted`, () => {
      const { all, filled } = of(name);
      expect([all.cells, percent(all.mean), percent(all.lowest)]).toEqual([cells, mean, lowest]);
      expect([filled.cells, percent(filled.mean), percent(filled.lowest)]).toEqual([
        filledCells,
        filledMean,
        filledLowest,
      ]);
    });

  it('the three readings of counts hold the truth 95.1 to 95.2% of the time on average where at least 3 cases and 3 others are expected in both groups, and nowhere there less than 92.9%', () => {
    for (const [name] of figures.slice(0, 3)) {
      const { mean, lowest } = of(name).filled;
      expect(mean).toBeGreaterThanOrEqual(0.951);
      expect(mean).toBeLessThanOrEqual(0.952);
      expect(lowest).toBeGreaterThanOrEqual(0.929);
    }
  });

  it('the exact intervals of a risk, an odds ratio, a ratio from shares and a rate ratio hold the truth at least 95% of the time in every cell', () => {
    const exact = [...found].filter(([name]) => name.includes('exact'));
    expect(exact.map(([name]) => name)).toEqual([
      'odds ratio, exact (conditional)',
      'risk, exact (Clopper-Pearson)',
      'ratio from shares, exact',
      'rate ratio, exact',
    ]);
    for (const [, { all }] of exact) expect(all.lowest).toBeGreaterThanOrEqual(0.95);
  });

  for (const [own, ...others] of [
    ['risk ratio, Miettinen-Nurminen', 'risk ratio, log (Katz)', 'risk ratio, log with halves added'],
    ['risk difference, Miettinen-Nurminen', 'risk difference, Wald'],
    ['odds ratio, Miettinen-Nurminen', 'odds ratio, Woolf', 'odds ratio, Woolf with halves added'],
    ['risk, Wilson', 'risk, Wald'],
    [
      'ratio from shares, score',
      'ratio from shares, log odds',
      'ratio from shares, log odds with halves added',
    ],
    ['rate ratio, score', 'rate ratio, log', 'rate ratio, log with halves added'],
  ] as const)
    for (const other of others)
      it(`"${own}" is nearer to 95% on average over all cells, and higher at its lowest, than "${other}"`, () => {
        const [ours, theirs] = [of(own).all, of(other).all];
        expect(Math.abs(ours.mean - 0.95)).toBeLessThan(Math.abs(theirs.mean - 0.95));
        expect(ours.lowest).toBeGreaterThan(theirs.lowest);
      });

  it('the committed tests/bench/calibration.txt says what the program would print today', () => {
    const committed = readFileSync(new URL('../bench/calibration.txt', import.meta.url), 'utf8');
    expect(committed).toContain(`\n\n${report(found)}`);
    expect(committed).toMatch(/\n\d{4}-\d\d-\d\d, Node v\d+\.\d+\.\d+\n/);
  });
});

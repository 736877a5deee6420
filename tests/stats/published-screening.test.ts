import { describe, expect, it } from 'vitest';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { exactShareRatioInterval, shareRatio } from '../../src/stats/share-ratio.ts';
import { fixture } from './error-of.ts';
import { halfUnit, named, printedOf } from './published-sources.ts';
import type { Checked } from './published-sources.ts';

/** Printed examples in which an input was itself rounded in print: right within what its two ends give. */
const published = fixture<{
  readonly screening: readonly (Checked & {
    readonly vaccinated: number;
    readonly cases: number;
    readonly effectiveness: string;
  })[];
  readonly curves: readonly (Checked & { readonly coverage: number; readonly effectiveness: number })[];
  readonly mortalityRatios: readonly (Checked & { readonly deaths: number; readonly smr: string })[];
}>('published.json');

const ends = (printed: string) => [Number(printed) - halfUnit(printed), Number(printed) + halfUnit(printed)];
/** Within the values at the two ends, and half a unit of the figure's own. */
function betweenEnds(printed: string | null | undefined, values: readonly number[]): void {
  const figure = printed ?? '';
  expect(Number(figure)).toBeGreaterThanOrEqual(Math.min(...values) - halfUnit(figure));
  expect(Number(figure)).toBeLessThanOrEqual(Math.max(...values) + halfUnit(figure));
}

describe('the screening method against print', () => {
  for (const row of published.screening) {
    const { id, figures, vaccinated, cases, effectiveness } = row;
    const [low, high] = printedOf(id, figures);
    it(`${vaccinated} of ${cases} cases vaccinated, effectiveness ${effectiveness}%, from which the coverage is recovered: exact limits ${low} to ${high}% (${named(row)})`, () => {
      const intervals = ends(effectiveness).map((percent) => {
        const odds = vaccinated / (cases - vaccinated) / (1 - percent / 100);
        const coverage = odds / (1 + odds);
        const counts = { cases: vaccinated, referenceCases: cases - vaccinated };
        return exactShareRatioInterval({ ...counts, coverage, referenceCoverage: 1 - coverage }, 0.95);
      });
      const percentOf = (limit: number | null) => 100 * (1 - (limit ?? NaN));
      betweenEnds(
        low,
        intervals.map((interval) => percentOf(interval.high)),
      );
      betweenEnds(
        high,
        intervals.map((interval) => percentOf(interval.low)),
      );
    });
  }

  for (const row of published.curves) {
    const { id, figures, coverage, effectiveness } = row;
    const [share = null] = printedOf(id, figures);
    it(`at coverage ${coverage} and effectiveness ${effectiveness} the vaccinated are ${share} of the cases (${named(row)})`, () => {
      const [least, most] = ends(share ?? '').map((cases) =>
        shareRatio({ cases, referenceCases: 1 - cases, coverage, referenceCoverage: 1 - coverage }),
      );
      expect(1 - effectiveness).toBeGreaterThanOrEqual(least ?? NaN);
      expect(1 - effectiveness).toBeLessThanOrEqual(most ?? NaN);
    });
  }
});

describe('standardised mortality ratios against print', () => {
  for (const row of published.mortalityRatios) {
    const { id, figures, deaths, smr } = row;
    const [low, high] = printedOf(id, figures);
    it(`${deaths} deaths and a ratio of ${smr}, from which the expected deaths are recovered: exact limits ${low} to ${high} (${named(row)})`, () => {
      const intervals = ends(smr).map((ratio) => garwoodInterval(deaths, deaths / ratio, 0.95));
      betweenEnds(
        low,
        intervals.map((interval) => interval.low ?? NaN),
      );
      betweenEnds(
        high,
        intervals.map((interval) => interval.high ?? NaN),
      );
    });
  }
});

import { describe, expect, it } from 'vitest';
import { readingFor, reportFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

describe('a part against the whole', () => {
  it('is compared with the rest: 18 of 1,204 and all 27 of 3,581 give 3.948, not 1.98 (design review, section 4)', () => {
    const ratio = readingFor('night: 18 of 1,204 vs all: 27 of 3,581', 'risk-ratio');
    close(ratio.estimate, 3.94850498339);
    close(ratio.interval?.low, 1.81452906747);
    close(ratio.interval?.high, 8.59232546177);
  });
});

describe('a design effect', () => {
  it('widens the interval and leaves the estimate: 44 v 31, coverage 38%, D 1.8 gives 1.26177206848 to 4.250277067 (design review, section 4)', () => {
    const ratio = readingFor(
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%; design effect 1.8',
      'risk-ratio',
    );
    close(ratio.estimate, 2.31578947368);
    close(ratio.interval?.low, 1.26177206848);
    close(ratio.interval?.high, 4.250277067);
    expect(ratio.interval?.designEffect).toBe(1.8);
  });

  it('of 2 is half of everything: the limits of 18 of 1,204 and 10 of 2,376 are those of 9 of 602 and 5 of 1,188', () => {
    for (const id of ['risk-ratio', 'risk-difference', 'odds-ratio', 'risk'] as const) {
      const divided = readingFor('18 of 1,204 vs 10 of 2,376; design effect 2', id).interval;
      const half = readingFor('9 of 602 vs 5 of 1,188', id).interval;
      close(divided?.low, half?.low ?? NaN);
      close(divided?.high, half?.high ?? NaN);
    }
    const layered = (line: string) =>
      reportFor(line).readings.find(({ id }) => id === 'pooled-risk-ratio')?.interval;
    const layers = layered(
      'a: x 18 of 1,204 vs y 10 of 2,376 | b: x 8 of 204 vs y 4 of 376; design effect 2',
    );
    const halves = layered('a: x 9 of 602 vs y 5 of 1,188 | b: x 4 of 102 vs y 2 of 188');
    close(layers?.low, halves?.low ?? NaN);
    close(layers?.high, halves?.high ?? NaN);
    const rates = readingFor(
      '18 in 1,204 hours vs 10 in 2,376 hours; design effect 2',
      'rate-ratio',
    ).interval;
    close(rates?.low, readingFor('9 in 602 hours vs 5 in 1,188 hours', 'rate-ratio').interval?.low ?? NaN);
  });
});

describe('a whole register', () => {
  it('is said to be one before anything else', () => {
    expect(reportFor('18 of 1,204 vs 9 of 2,377; counted: everyone').cautions[0]).toBe('whole-register');
  });
});

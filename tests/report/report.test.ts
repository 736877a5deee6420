import { describe, expect, it } from 'vitest';
import { cautionIds } from '../../src/report/cautions.ts';
import { directionOf } from '../../src/report/report.ts';
import { cautionCatalogue, cautionText } from '../../src/render/words/caution-words.ts';
import { scenarios } from '../scenarios/scenarios.ts';
import { readingFor, reportFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

describe('shares of cases and coverage', () => {
  const line = 'cases: no helmet 44, helmet 31; coverage: no helmet 38%';

  it('give the values of the design review (40-digit arithmetic)', () => {
    const ratio = readingFor(line, 'risk-ratio');
    close(ratio.estimate, 2.31578947368);
    close(ratio.interval?.low, 1.46830884089);
    close(ratio.interval?.high, 3.65242021098);
    const fraction = readingFor(line, 'population-attributable-fraction');
    close(fraction.estimate, 1 / 3);
    close(fraction.interval?.low, 0.151072836463);
    close(fraction.interval?.high, 0.5019721108);
    const strength = readingFor(line, 'hidden-cause-strength');
    close(strength.estimate, 4.06138146861);
    close(strength.atLimit, 2.29753861082);
  });

  it('carry what rounding alone allows: 58.7% and 38% give 2.2657233939 to 2.37373737374 (design review)', () => {
    const { roundingRange } = readingFor('no helmet: 58.7% of cases, 38% of riders', 'risk-ratio');
    close(roundingRange?.low, 2.2657233939);
    close(roundingRange?.high, 2.37373737374);
  });

  it('have no interval without the number of cases, and one with it: 58.7% of 75 is 44', () => {
    expect(readingFor('no helmet: 58.7% of cases, 38% of riders', 'risk-ratio').whyNoInterval).toBe(
      'no-case-number',
    );
    close(
      readingFor('no helmet: 58.7% of cases, 38% of riders; of 75 cases', 'risk-ratio').interval?.low,
      1.46830884089,
    );
  });

  it('show the exact limits beside the score limits where a group has fewer than five cases', () => {
    expect(
      readingFor('cases: no helmet 9, helmet 2; coverage: no helmet 38%', 'risk-ratio').exactBeside,
    ).not.toBeNull();
    expect(readingFor(line, 'risk-ratio').exactBeside).toBeNull();
  });

  it('with a population come from the counts rows alone: 17 and 14 of 1,000 give 0.0000136499339701 to 0.0496308164458 (design review)', () => {
    const report = reportFor('cases: no helmet 17, helmet 14; coverage: no helmet 38%; population 1,000');
    const difference = report.readings.find(({ id }) => id === 'risk-difference');
    close(difference?.interval?.low, 0.0000136499339701, 7);
    close(difference?.interval?.high, 0.0496308164458);
    // Both say the same about no difference; the interval from the shares alone would hold it.
    const ratio = report.readings.find(({ id }) => id === 'risk-ratio');
    expect(ratio === undefined ? null : directionOf(ratio)).toBe('higher');
    expect(report.readings.filter(({ interval }) => interval?.method === 'wilson-share-odds')).toEqual([]);
  });

  it('of three groups are compared in pairs: two courses against none 0.313636363636, one against none 0.6 (design review)', () => {
    const three =
      'cases: none 40, one course 12, two courses 23; coverage: none 30%, one course 15%, two courses 55%; reference none';
    close(readingFor(three, 'risk-ratio', 2).estimate, 0.313636363636);
    close(readingFor(three, 'risk-ratio', 1).interval?.low, 0.318148788355);
    close(readingFor(three, 'risk-ratio', 1).interval?.high, 1.13154603499);
  });
});

describe('counts at their edges', () => {
  it('5 of 56 against 0 of 29 is unbounded with the lower limit 0.717495078277 (design review)', () => {
    const ratio = readingFor('a: 5 of 56 vs b: 0 of 29', 'risk-ratio');
    expect(ratio).toMatchObject({ estimate: null, unbounded: true });
    close(ratio.interval?.low, 0.717495078277);
    expect(ratio.interval?.high).toBeNull();
  });

  it('no case in either group has no ratio, limits 0 and none, and a difference with its interval', () => {
    const line = 'a: 0 of 10 vs b: 0 of 20';
    expect(readingFor(line, 'risk-ratio')).toMatchObject({
      estimate: null,
      unbounded: false,
      interval: { low: 0, high: null },
    });
    // Newcombe 1998, Table II (from memory).
    const difference = readingFor(line, 'risk-difference');
    expect(difference.estimate).toBe(0);
    expect(difference.interval?.low).toBeCloseTo(-0.1658, 4);
    expect(difference.interval?.high).toBeCloseTo(0.2844, 4);
  });

  it('everybody in both groups is a ratio of 1 (0.715618660466 to 1.1986961459, design review)', () => {
    const ratio = readingFor('a: 10 of 10 vs b: 20 of 20', 'risk-ratio');
    expect(ratio.estimate).toBe(1);
    close(ratio.interval?.low, 0.715618660466);
    close(ratio.interval?.high, 1.1986961459);
  });

  it('a hidden count has its middle as estimate and the outermost limits as interval', () => {
    const ratio = readingFor('a: <5 of 900 vs b: 31 of 1,100', 'risk-ratio');
    const [none, four] = [
      readingFor('a: 0 of 900 vs b: 31 of 1,100', 'risk-ratio'),
      readingFor('a: 4 of 900 vs b: 31 of 1,100', 'risk-ratio'),
    ];
    expect(ratio.interval).toMatchObject({
      low: none.interval?.low,
      high: four.interval?.high,
      envelope: true,
    });
    expect(ratio.roundingRange).toEqual({ low: 0, high: four.estimate });
  });

  it('with exact have no risk-ratio interval, and say why', () => {
    const line = 'a: 18 of 1,204 vs b: 9 of 2,377; exact';
    expect(readingFor(line, 'risk-ratio')).toMatchObject({ interval: null, whyNoInterval: 'no-exact-form' });
    expect(readingFor(line, 'odds-ratio').interval?.method).toBe('conditional-exact');
    expect(readingFor(line, 'risk').interval?.method).toBe('clopper-pearson');
  });

  it('scale extra cases by the clause, else by the smallest power of ten from 100 at which the smaller risk gives 1', () => {
    expect(readingFor('a: 18 of 1,204 vs b: 9 of 2,377', 'extra-cases').per).toBe(1_000);
    expect(readingFor('a: 18 of 1,204 vs b: 9 of 2,377; per 100,000', 'extra-cases').per).toBe(100_000);
    expect(readingFor('a: 50 of 100 vs b: 20 of 100', 'extra-cases').per).toBe(100);
  });

  it('turn the difference that may be none into two ranges for one extra case', () => {
    const reading = readingFor('a: 3 of 900 vs b: 4 of 800', 'one-extra-per');
    expect(reading.interval).toBeNull();
    expect(reading.ranges?.more?.high).toBeNull();
    expect(reading.ranges?.fewer?.high).toBeNull();
  });

  it('hold a percentage that stands beside them: 31 of 9,240 is 0.34%, the line has 3.4%', () => {
    const { stated } = reportFor('harbour ferry: 31 of 9,240 (3.4%)');
    expect(stated).toHaveLength(1);
    expect(stated[0]).toMatchObject({ group: 0, agrees: false });
    expect(reportFor('harbour ferry: 31 of 9,240 (0.34%)').stated[0]?.agrees).toBe(true);
  });
});

describe('figures without counts', () => {
  it('1 in 250 against 1 in 400 has no interval', () => {
    const report = reportFor('1 in 250 vs 1 in 400');
    expect(report.readings.every(({ interval }) => interval === null)).toBe(true);
    close(report.readings.find(({ id }) => id === 'percentage-ratio')?.estimate, 1.6);
  });

  it('rows chosen by outcome have the odds ratio alone: (12/3)/(40/60) = 6', () => {
    const report = reportFor('12 of 15 ill ate there, 40 of 100 well ate there');
    expect(report.headline).toBe('odds-ratio');
    close(report.readings.find(({ id }) => id === 'odds-ratio')?.estimate, 6);
    expect(report.readings.some(({ id }) => id === 'risk-ratio')).toBe(false);
  });
});

describe('the readings of one figure', () => {
  it('agree about no difference in every scenario', () => {
    for (const line of Object.values(scenarios)) {
      const { readings } = reportFor(line);
      const layered = readings.some(({ layer }) => layer !== null);
      const ratios = layered
        ? ['pooled-risk-ratio', 'pooled-rate-ratio']
        : ['risk-ratio', 'rate-ratio', 'count-ratio'];
      for (const ratio of readings.filter(({ id, interval }) => ratios.includes(id) && interval !== null)) {
        const shown = directionOf(ratio) !== 'none-shown';
        for (const other of readings.filter(
          ({ of, against }) => of === ratio.of && against === ratio.against,
        )) {
          const none =
            other.id === 'odds-ratio' || other.id === 'pooled-odds-ratio'
              ? 1
              : /^(?:pooled-)?(?:risk|rate)-difference$/.test(other.id) ||
                  other.id === 'relative-change' ||
                  other.id.endsWith('fraction')
                ? 0
                : null;
          if (none === null || other.interval === null) continue;
          const { low, high } = other.interval;
          expect((low ?? -Infinity) > none || (high ?? Infinity) < none, `${line}: ${other.id}`).toBe(shown);
        }
      }
    }
  });
});

describe('the catalogue of cautions', () => {
  it('has words and a source for every id, and a scenario that shows each', () => {
    const shown = new Set(
      [
        ...Object.values(scenarios),
        'no helmet: 58.7% of cases, 38% of riders\nhelmet: 40.0% of cases, 62% of riders',
        'a: 3 of 84,000 vs b: 21 of 91,000',
        'a: 70 of 100 vs b: 30 of 100',
        'a: 30 of 84,000 vs b: 90 of 91,000',
      ].flatMap((line) => {
        const report = reportFor(line);
        for (const id of report.cautions) expect(cautionText(report, id)).not.toMatch(/undefined|NaN/);
        return report.cautions;
      }),
    );
    for (const id of cautionIds) {
      expect(cautionCatalogue[id].source.length).toBeGreaterThan(5);
      expect(shown.has(id), id).toBe(true);
    }
  });
});

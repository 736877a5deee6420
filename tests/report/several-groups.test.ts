import { describe, expect, it } from 'vitest';
import type { ReadingId } from '../../src/report/reading.ts';
import { levelForAll } from '../../src/report/several-groups.ts';
import { reportFor, readingFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

const againstRest = (line: string, of: number) =>
  (reportFor(line).againstRest ?? []).find((reading) => reading.of === of);

describe('three or more groups', () => {
  const shifts = 'early: 12 of 900, late: 30 of 1,100, night: 18 of 640';
  const doses =
    'cases: none 40, one course 12, two courses 23; coverage: none 30%, one course 15%, two courses 55%';

  it('are each held against all the others together: night 18 of 640 against 42 of 2,000', () => {
    const rest = againstRest(shifts, 2);
    const pair = readingFor('night: 18 of 640 vs others: 42 of 2,000', 'risk-ratio');
    close(rest?.estimate, pair.estimate ?? NaN);
    close(rest?.interval?.low, pair.interval?.low ?? NaN);
    close(rest?.interval?.high, pair.interval?.high ?? NaN);
    expect(rest).toMatchObject({ rest: true, against: null });
  });

  it('from shares give the pairs of the design review: two courses against none 0.313636363636 (0.188822132436 to 0.5209546536), and 0.362 against everybody else', () => {
    const line = `${doses}; reference none`;
    const two = readingFor(line, 'risk-ratio', 2);
    close(two.estimate, 0.313636363636);
    close(two.interval?.low, 0.188822132436);
    close(two.interval?.high, 0.5209546536);
    const one = readingFor(line, 'risk-ratio', 1);
    close(one.estimate, 0.6);
    close(one.interval?.low, 0.318148788355);
    close(one.interval?.high, 1.13154603499);
    expect(againstRest(line, 2)?.estimate?.toFixed(3)).toBe('0.362');
  });

  it('from shares that leave somebody out have no reading against the rest', () => {
    const line =
      'cases: none 40, one course 12, two courses 23; coverage: none 30%, one course 15%, two courses 45%';
    expect(reportFor(line).againstRest).toEqual([]);
  });

  it('are first asked whether they differ at all: chi-squared 8.02 on 2 df for three depots', () => {
    const line = 'a: 14 in 5,200 hours, b: 9 in 8,800 hours, c: 3 in 4,000 hours';
    const all = reportFor(line).readings[0];
    expect(all?.id).toBe('overall-difference');
    // By hand: 26 events over 18,000 hours expect 7.5111, 12.7111 and 5.7778.
    const expected = [5_200, 8_800, 4_000].map((hours) => (26 * hours) / 18_000);
    const statistic = [14, 9, 3].reduce(
      (sum, x, at) => sum + (x - (expected[at] ?? 0)) ** 2 / (expected[at] ?? 1),
      0,
    );
    close(all?.test?.statistic, statistic);
    // With 2 degrees of freedom the tail of chi-squared is exp(-x/2).
    close(all?.estimate, Math.exp(-statistic / 2));
  });

  it('have a second interval that holds for all pairs at once, at the level 1 - (1 - level)/k', () => {
    const ratio = readingFor(shifts, 'risk-ratio', 0);
    const wider = readingFor('early: 12 of 900 vs night: 18 of 640; level 97.5%', 'risk-ratio', 0);
    close(ratio.atOnce?.low, wider.interval?.low ?? NaN);
    close(ratio.atOnce?.high, wider.interval?.high ?? NaN);
    expect(levelForAll(0.95, 1)).toBeNull();
    expect(levelForAll(0.9999, 2)).toBeNull();
  });
});

describe('figures that show no difference', () => {
  it('say what would have shown: by enumeration for 3 of 900 and 4 of 800, and how many a doubling takes', () => {
    const { couldShow, cautions } = reportFor('3 of 900 vs 4 of 800');
    expect(couldShow?.method).toBe('enumeration');
    expect(couldShow?.above).toBeGreaterThan(3);
    expect(couldShow?.growthForDoubling).toBeGreaterThan(1);
    expect(cautions).toContain('could-have-shown');
  });

  it.each([
    ['18 of 1,204 vs 9 of 2,377', 'shows one'],
    ['4.2% vs 2.6%', 'has no interval'],
    ['12 of 15 ill ate there, 40 of 100 well ate there', 'was chosen by outcome'],
  ])('%j says nothing of the kind: it %s', (line) => {
    expect(reportFor(line).couldShow).toBeNull();
  });

  it('agree with the enumeration of a smaller case by hand: 10 cases in all, coverage 50%, show 9 or 10 only', () => {
    // Of 10 cases the score test at 95% rejects at 9 and 10 (|x - 5| > 1.96 root(2.5) = 3.1). P(X >= 9) = 0.8 at the share s with
    // 10 s^9 (1 - s) + s^10 = 0.8: s = 0.9168... (bisection), so the ratio is s/(1 - s).
    let [low, high] = [0.5, 1];
    for (let step = 0; step < 60; step += 1) {
      const s = (low + high) / 2;
      if (10 * s ** 9 * (1 - s) + s ** 10 < 0.8) low = s;
      else high = s;
    }
    const { couldShow } = reportFor('cases: a 6, b 4; coverage: a 50%');
    close(couldShow?.above, low / (1 - low), 9);
    close(couldShow?.below, (1 - low) / low, 9);
  });

  it('carry it for rates and for changes of counts too', () => {
    const ids: readonly ReadingId[] = ['rate-ratio', 'count-ratio'];
    for (const line of ['4 in 5,200 hours vs 3 in 8,800 hours', 'from 61 to 75']) {
      const report = reportFor(line);
      expect(ids).toContain(report.headline);
      expect(report.couldShow, line).not.toBeNull();
    }
  });
});

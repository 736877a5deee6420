import { describe, expect, it } from 'vitest';
import type { Reading, ReadingId } from '../../src/report/reading.ts';
import { reportFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

function pooled(line: string, id: ReadingId): Reading {
  const found = reportFor(line).readings.find((reading) => reading.id === id && reading.layer === null);
  if (found === undefined) throw new Error(`${line} has no ${id}`);
  return found;
}

function limits(line: string, id: ReadingId, estimate: number, low: number, high: number): void {
  const reading = pooled(line, id);
  close(reading.estimate, estimate);
  close(reading.interval?.low, low);
  close(reading.interval?.high, high);
}

const trial =
  'by age: under 55: treated 8 of 106 vs placebo 5 of 120 | 55 and over: treated 22 of 98 vs placebo 16 of 85';
const centres = [
  [11, 36, 10, 37],
  [16, 20, 22, 32],
  [14, 19, 7, 19],
  [2, 16, 1, 17],
  [6, 17, 0, 12],
  [1, 11, 0, 10],
  [1, 5, 1, 9],
  [4, 6, 6, 7],
]
  .map(
    ([x1 = 0, n1 = 0, x2 = 0, n2 = 0], at) =>
      `centre ${'abcdefgh'[at] ?? ''}: drug ${x1} of ${n1} vs control ${x2} of ${n2}`,
  )
  .join(' | ');
const doctors = [
  [32, 52_407, 2, 18_790],
  [104, 43_248, 12, 10_673],
  [206, 28_612, 28, 5_710],
  [186, 12_663, 28, 2_585],
  [102, 5_317, 31, 1_462],
]
  .map(
    ([x1 = 0, t1 = 0, x2 = 0, t2 = 0], at) =>
      `"${35 + 10 * at} and over": smoking ${x1} in ${t1} person-years vs not smoking ${x2} in ${t2} person-years`,
  )
  .join(' | ');

describe('layers of counts', () => {
  it('give the pooled values of the design review for the two layers of the UGDP trial (40-digit arithmetic)', () => {
    limits(trial, 'pooled-risk-ratio', 1.32555532416, 0.802799220588, 2.20208486753);
    limits(trial, 'pooled-risk-difference', 0.0349002693369, -0.0287092597947, 0.100269600544);
    limits(trial, 'pooled-odds-ratio', 1.40222571783, 0.767069935987, 2.56212216598);
  });

  it('give the pooled values of the design review for the eight centres of Agresti', () => {
    limits(centres, 'pooled-risk-ratio', 1.42445721832, 1.08326636256, 1.89580172497);
    limits(centres, 'pooled-risk-difference', 0.129870506571, 0.0299578678816, 0.228255473376);
    limits(centres, 'pooled-odds-ratio', 2.1302908906, 1.18192427461, 3.83835368779);
    const { test, estimate } = pooled(centres, 'homogeneity');
    close(test?.statistic, 10.1778880951);
    expect(test?.degrees).toBe(7);
    expect(estimate).toBeGreaterThan(0.1);
  });

  it('name a reversal first: Berkeley’s kind, with every layer on one side and all together on the other', () => {
    const line =
      'by age: under 40: night 3 of 900 vs day 40 of 9,000 | 40 and over: night 80 of 2,000 vs day 6 of 100';
    expect(reportFor(line).cautions[0]).toBe('reversal');
    expect(reportFor(trial).cautions).not.toContain('reversal');
  });

  it('with hidden counts have the outermost limits over all they may be', () => {
    const hidden = 'a: night <5 of 900 vs day 40 of 9,000 | b: night 80 of 2,000 vs day 6 of 100';
    const at = (count: number) => pooled(hidden.replace('<5', String(count)), 'pooled-risk-ratio').interval;
    const { interval } = pooled(hidden, 'pooled-risk-ratio');
    expect(interval?.envelope).toBe(true);
    close(interval?.low, at(0)?.low ?? NaN);
    close(interval?.high, at(4)?.high ?? NaN);
  });

  it('that are crude-only would say something else: the crude ratio comes from the sums', () => {
    close(pooled(trial, 'crude-risk-ratio').estimate, 30 / 204 / (21 / 205));
  });
});

describe('layers of rates', () => {
  it('give the maximum likelihood ratio of the British doctors, not the Mantel-Haenszel 1.4247 (design review)', () => {
    limits(doctors, 'pooled-rate-ratio', 1.42551854286, 1.15542714253, 1.75874511712);
    limits(`${doctors}; level 90%`, 'pooled-rate-ratio', 1.42551854286, 1.19500238554, 1.70050077551);
  });

  it('give the Mantel-Haenszel rate difference of the British doctors, 11.4392 per 10,000 (Breslow & Day data, design review)', () => {
    const difference = pooled(doctors, 'pooled-rate-difference');
    expect(((difference.estimate ?? NaN) * 10_000).toFixed(4)).toBe('11.4392');
  });

  it('that are not alike are said not to be: the ratio falls from 5.7 to 0.9 with age', () => {
    expect(reportFor(doctors).cautions).toContain('layers-not-alike');
  });
});

describe('layers of shares', () => {
  const line =
    'a: no helmet 2 of 9 cases, 30% of riders | b: no helmet 5 of 12 cases, 50% of riders | c: no helmet 9 of 10 cases, 80% of riders';

  it('give the pooled score and exact limits of the design review for 2/9 (30%), 5/12 (50%), 9/10 (80%)', () => {
    limits(line, 'pooled-risk-ratio', 0.897863298214, 0.42048182496, 1.91410640159);
    const { interval } = pooled(`${line}; exact`, 'pooled-risk-ratio');
    close(interval?.low, 0.385163254455);
    close(interval?.high, 2.09399751365);
  });
});

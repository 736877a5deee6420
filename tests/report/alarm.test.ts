import { describe, expect, it } from 'vitest';
import { directionOf } from '../../src/report/report.ts';
import { countedNumbers, naturalFrequencies, outOf } from '../../src/report/natural-frequencies.ts';
import type { AlarmQuestion } from '../../grammar/question.ts';
import { readingFor, reportFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

function alarm(line: string): AlarmQuestion {
  const { question } = reportFor(line);
  if (question.kind !== 'alarm') throw new Error(`${line} is no alarm`);
  return question;
}

describe('an alarm from counts, with a prevalence from elsewhere', () => {
  it('has the values of the design review (40-digit arithmetic): 240 of 418, 87 of 375, 3%', () => {
    const line = 'alarm: sensitivity 240 of 418, false alarms 87 of 375, prevalence 3%';
    const ratio = readingFor(line, 'likelihood-ratio-positive');
    close(ratio.estimate, 2.47483913546);
    close(ratio.interval?.low, 2.0301163702);
    close(ratio.interval?.high, 3.03782413332);
    const value = readingFor(line, 'positive-predictive-value');
    close(value.estimate, 0.0710993700596);
    close(value.interval?.low, 0.0590777814135);
    close(value.interval?.high, 0.0858842161493);
    const silent = readingFor(line, 'negative-predictive-value');
    close(silent.estimate, 0.983140388658);
    close(silent.interval?.low, 0.980994265656);
    close(silent.interval?.high, 0.985124478922);
    expect(ratio.interval?.method).toBe('miettinen-nurminen');
    expect(value.interval?.method).toBe('miettinen-nurminen-prevalence-odds');
  });

  it.each([
    'sensitivity 46 of 50, specificity 194 of 200, prevalence 0.4%',
    'caught 46, missed 4, false alarms 6, quiet 194, prevalence 0.4%',
    'missed 4 of 50, false alarms 6 of 200, prevalence 0.4%',
  ])('%j has 0.109654350417 (0.0543390122141 to 0.211805519117) (design review)', (line) => {
    const value = readingFor(line, 'positive-predictive-value');
    close(value.estimate, 0.109654350417);
    close(value.interval?.low, 0.0543390122141);
    close(value.interval?.high, 0.211805519117);
    expect(reportFor(line).headline).toBe('positive-predictive-value');
  });

  it('over a range of prevalence has its middle and the outer envelope', () => {
    const value = readingFor(
      'sensitivity 46 of 50, specificity 194 of 200, prevalence 0.2-1%',
      'positive-predictive-value',
    );
    // Bayes by hand at 0.6%; the ends from the limits of LR+ above, carried to 0.2% and to 1%.
    close(value.estimate, (0.92 * 0.006) / (0.92 * 0.006 + 0.03 * 0.994));
    close(value.interval?.low, 0.0278738958581);
    close(value.interval?.high, 0.403297701178);
    expect(value.interval?.envelope).toBe(true);
    close(value.roundingRange?.low, (0.92 * 0.002) / (0.92 * 0.002 + 0.03 * 0.998));
    close(value.roundingRange?.high, (0.92 * 0.01) / (0.92 * 0.01 + 0.03 * 0.99));
  });

  it('with a prevalence from a sample takes its own limits in (variance recovery on logs, by hand)', () => {
    const value = readingFor(
      'sensitivity 46 of 50, specificity 194 of 200, prevalence 40 of 10,000',
      'positive-predictive-value',
    );
    close(value.interval?.low, 0.0513200362137);
    close(value.interval?.high, 0.221834208979);
    expect(value.interval?.method).toBe('mover-prevalence-odds');
  });

  it('with a sampled prevalence and an empty cell still has limits, the outermost ones', () => {
    const line = 'sensitivity 50 of 50, specificity 200 of 200, prevalence 40 of 10,000';
    const value = readingFor(line, 'positive-predictive-value');
    const given = readingFor(line.replace('40 of 10,000', '0.4%'), 'positive-predictive-value');
    expect(value).toMatchObject({ estimate: 1, interval: { high: 1 } });
    expect(value.interval?.low ?? NaN).toBeLessThan(given.interval?.low ?? NaN);
    expect(value.interval?.low ?? NaN).toBeGreaterThan(0);
  });

  it('excludes the prevalence exactly where the likelihood ratio excludes 1', () => {
    let decided = 0;
    for (let caught = 0; caught <= 20; caught += 1) {
      for (let falsely = 0; falsely <= 30; falsely += 3) {
        const line = `sensitivity ${caught} of 20, false alarms ${falsely} of 30, prevalence 1 in 8`;
        const { readings } = reportFor(line);
        for (const [ratioId, valueId, prevalence] of [
          ['likelihood-ratio-positive', 'positive-predictive-value', 1 / 8],
          ['likelihood-ratio-negative', 'negative-predictive-value', 7 / 8],
        ] as const) {
          const ratio = readings.find(({ id }) => id === ratioId);
          const value = readings.find(({ id }) => id === valueId);
          if (ratio?.interval == null || value?.interval == null) throw new Error(`${line}: no interval`);
          const { low, high } = value.interval;
          const outside = (low ?? 0) > prevalence || (high ?? 1) < prevalence;
          expect(outside, `${line}: ${valueId}`).toBe(directionOf(ratio) !== 'none-shown');
          if (outside) decided += 1;
        }
      }
    }
    expect(decided).toBeGreaterThan(50);
  });

  it('has no exact interval of the predictive values, and says so', () => {
    const line = 'sensitivity 46 of 50, specificity 194 of 200, prevalence 0.4%; exact';
    expect(readingFor(line, 'positive-predictive-value').whyNoInterval).toBe('no-exact-form');
    expect(readingFor(line, 'sensitivity').interval?.method).toBe('clopper-pearson');
  });
});

describe('an alarm from four counts of one sample', () => {
  const line = 'caught 46, missed 4, false alarms 30, quiet 920';

  it('has the Wilson limits of real alarms among alarms, 46 of 76, and of silences (40-digit arithmetic)', () => {
    const value = readingFor(line, 'positive-predictive-value');
    close(value.estimate, 46 / 76);
    close(value.interval?.low, 0.49286296638959);
    close(value.interval?.high, 0.7075341735967);
    const silent = readingFor(line, 'negative-predictive-value');
    close(silent.estimate, 920 / 924);
    close(silent.interval?.low, 0.98892234122601);
    close(silent.interval?.high, 0.99831528573265);
    const prevalence = readingFor(line, 'prevalence');
    close(prevalence.estimate, 0.05);
    close(prevalence.interval?.low, 0.038130262392749);
    expect(reportFor(line).missing).toContain('taken-as-they-come');
  });

  it('has limits at its edges and no value where there never was an alarm', () => {
    expect(
      readingFor('caught 10, missed 0, false alarms 0, quiet 90', 'positive-predictive-value'),
    ).toMatchObject({ estimate: 1, interval: { high: 1 } });
    const none = reportFor('caught 0, missed 10, false alarms 0, quiet 90');
    expect(none.readings[0]).toMatchObject({ id: 'positive-predictive-value', estimate: null });
    expect(
      readingFor('caught 10, missed 0, false alarms 0, quiet 90', 'likelihood-ratio-positive'),
    ).toMatchObject({ estimate: null, unbounded: true, interval: { high: null } });
  });

  it('covers every value of a hidden count', () => {
    const silent = readingFor(
      'caught 46, missed <5, false alarms 30, quiet 920',
      'negative-predictive-value',
    );
    expect(silent.interval).toMatchObject({ high: 1, envelope: true });
    close(silent.interval?.low, 0.98892234122601);
  });

  it('is warned of few cases', () => {
    expect(reportFor('caught 3, missed 4, false alarms 30, quiet 920').cautions).toContain('few-cases');
    expect(reportFor(line).cautions).toEqual(['prevalence-decides']);
  });
});

describe('an alarm from percentages', () => {
  const line = 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%';

  it('is Bayes by hand, without an interval', () => {
    const value = readingFor(line, 'positive-predictive-value');
    close(value.estimate, 0.00368 / 0.03356);
    expect(value).toMatchObject({ interval: null, whyNoInterval: 'no-counts' });
    close(readingFor(line, 'negative-predictive-value').estimate, 0.96612 / 0.96644);
    close(readingFor(line, 'likelihood-ratio-positive').estimate, 92 / 3);
    close(readingFor(line, 'likelihood-ratio-negative').estimate, 8 / 97);
  });

  it('carries what rounding alone allows (by hand at 91.5%, 96.5%, 0.35% and 92.5%, 97.5%, 0.45%)', () => {
    const { roundingRange } = readingFor(line, 'positive-predictive-value');
    close(roundingRange?.low, 0.0032025 / 0.03808);
    close(roundingRange?.high, 0.0041625 / 0.02905);
    const silent = readingFor(line, 'negative-predictive-value').roundingRange;
    close(silent?.low, (0.965 * 0.9955) / (0.965 * 0.9955 + 0.085 * 0.0045));
    close(silent?.high, (0.975 * 0.9965) / (0.975 * 0.9965 + 0.075 * 0.0035));
    // The prevalence has no part in the likelihood ratio.
    close(readingFor(line, 'likelihood-ratio-positive').roundingRange?.low, 0.915 / 0.035);
  });

  it('asks for the counts and for where the prevalence comes from', () => {
    expect(reportFor(line).missing).toEqual(['counts-behind', 'prevalence-source', 'who-is-counted']);
    expect(reportFor(line).cautions).toEqual(['prevalence-decides', 'prevalence-as-given']);
  });

  it('gives the same answer however the other side was typed', () => {
    const turned = 'alarm: miss rate 8%, false alarm rate 3%, prevalence 0.4%';
    for (const id of ['positive-predictive-value', 'negative-predictive-value'] as const)
      close(readingFor(turned, id).estimate, readingFor(line, id).estimate ?? NaN, 12);
  });
});

describe('natural frequencies', () => {
  it('of 10,000 wells 40 are bad, 37 of them and 299 others raise an alarm', () => {
    const question = alarm('alarm: sensitivity 92%, specificity 97%, prevalence 0.4%');
    expect(naturalFrequencies(question, 100)).toEqual({
      base: 10_000,
      cases: 40,
      caught: 37,
      others: 9_960,
      falseAlarms: 299,
      alarms: 336,
    });
  });

  it('add up, are a few at least, and show the share that the headline shows', () => {
    for (const sensitivity of ['0%', '3%', '50%', '92%', '99.9%', '100%']) {
      for (const specificity of ['0%', '40%', '97%', '99.99%', '100%']) {
        for (const prevalence of ['1 in 1,000,000', '0.4%', '7%', '50%', '99%']) {
          const line = `sensitivity ${sensitivity}, specificity ${specificity}, prevalence ${prevalence}`;
          const value = readingFor(line, 'positive-predictive-value').estimate;
          const base = outOf([value ?? 0]);
          const numbers = naturalFrequencies(alarm(line), base);
          if (numbers === null) {
            expect(value, line).toBeNull();
            continue;
          }
          const { cases, caught, others, falseAlarms, alarms } = numbers;
          expect(cases + others, line).toBe(numbers.base);
          expect(caught + falseAlarms, line).toBe(alarms);
          for (const number of [cases, caught, falseAlarms])
            expect(number === 0 || number >= 3, line).toBe(true);
          expect(caught === cases, line).toBe(sensitivity === '100%');
          expect(Math.round((caught / alarms) * base), line).toBe(Math.round((value ?? NaN) * base));
        }
      }
    }
  });

  it('start from the number after `per`', () => {
    const line = 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%; per 1,000,000';
    expect(naturalFrequencies(alarm(line), 100)?.base).toBe(1_000_000);
  });

  it('are the counts themselves where all four are there', () => {
    expect(countedNumbers(alarm('tp 46 fp 30 fn 4 tn 920'))).toMatchObject({
      base: 1_000,
      cases: 50,
      alarms: 76,
    });
    expect(countedNumbers(alarm('tp 46 fp 30 fn 4 tn 920; prevalence 1%'))).toBeNull();
  });
});

import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import {
  negativeLikelihoodRatio,
  negativeLikelihoodRatioInterval,
  positiveLikelihoodRatio,
  positiveLikelihoodRatioInterval,
} from '../../src/stats/likelihood-ratio.ts';
import {
  negativePredictiveValue,
  negativePredictiveValueInterval,
  positivePredictiveValue,
  positivePredictiveValueInterval,
} from '../../src/stats/predictive-values.ts';
import { both, errorOf, fixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';

/** Values from 120-digit arithmetic; see tests/fixtures/reference/make-alarm-limits.py, which records its versions. */
const reference = fixture<{
  readonly limits: readonly {
    readonly counts: readonly [number, number, number, number];
    readonly prevalence: number;
    readonly level: string;
    readonly positiveRatio: string | null;
    readonly negativeRatio: string | null;
    readonly positiveRatioLimits: Pair;
    readonly negativeRatioLimits: Pair;
    readonly positiveValueLimits: Pair;
    readonly negativeValueLimits: Pair;
  }[];
  readonly values: readonly {
    readonly shares: readonly [number, number, number];
    readonly positive: string | null;
    readonly negative: string | null;
  }[];
}>('alarm-limits.json');

const alarmsOf = ([truePositives, affected, falsePositives, unaffected]: readonly [
  number,
  number,
  number,
  number,
]) => ({ truePositives, affected, falsePositives, unaffected });

describe('alarms against 120-digit arithmetic (mpmath)', () => {
  it('have likelihood ratios and score limits to 1e-12, with sensitivities of 0 of n and n of n, without false alarms and with nothing but false alarms, at 50% to 99.99%', () => {
    const found = worst(reference.limits, (row) => {
      const alarms = alarmsOf(row.counts);
      return Math.max(
        errorOf(positiveLikelihoodRatio(alarms), row.positiveRatio),
        errorOf(negativeLikelihoodRatio(alarms), row.negativeRatio),
        both(positiveLikelihoodRatioInterval(alarms, Number(row.level)), row.positiveRatioLimits),
        both(negativeLikelihoodRatioInterval(alarms, Number(row.level)), row.negativeRatioLimits),
      );
    });
    expect(reference.limits.length).toBeGreaterThan(60);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('have limits of both predictive values to 1e-12 at prevalences from 0.000001 to 0.999999', () => {
    const found = worst(reference.limits, (row) => {
      const alarms = alarmsOf(row.counts);
      const level = Number(row.level);
      return Math.max(
        both(positivePredictiveValueInterval(alarms, row.prevalence, level), row.positiveValueLimits),
        both(negativePredictiveValueInterval(alarms, row.prevalence, level), row.negativeValueLimits),
      );
    });
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('have predictive values by Bayes to 1e-14, and none where no alarm or no silence can be', () => {
    const found = worst(
      reference.values,
      ({ shares: [sensitivity, falseAlarmRate, prevalence], positive, negative }) => {
        const rates = { sensitivity, falseAlarmRate, prevalence };
        return Math.max(
          errorOf(positivePredictiveValue(rates), positive),
          errorOf(negativePredictiveValue(rates), negative),
        );
      },
    );
    expect(
      reference.values.filter(({ positive, negative }) => positive === null || negative === null),
    ).toHaveLength(2);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-14);
  });
});

describe('alarms against the values of the design review (40-digit arithmetic, section 6)', () => {
  const alarms = alarmsOf([240, 418, 87, 375]);
  const rates = { sensitivity: 240 / 418, falseAlarmRate: 87 / 375, prevalence: 0.03 };

  it('240 of 418 and 87 of 375 have a positive likelihood ratio of 2.47483913546 (2.0301163702 to 3.03782413332)', () => {
    expect(positiveLikelihoodRatio(alarms)).toBeCloseTo(2.47483913546, 11);
    expect(
      both(positiveLikelihoodRatioInterval(alarms, 0.95), ['2.0301163702', '3.03782413332']),
    ).toBeLessThan(5e-12);
  });

  it('at a prevalence of 3% the same alarm has predictive values of 0.0710993700596 (0.0590777814135 to 0.0858842161493) and 0.983140388658 (0.980994265656 to 0.985124478922)', () => {
    expect(positivePredictiveValue(rates)).toBeCloseTo(0.0710993700596, 13);
    expect(negativePredictiveValue(rates)).toBeCloseTo(0.983140388658, 12);
    expect(
      both(positivePredictiveValueInterval(alarms, 0.03, 0.95), ['0.0590777814135', '0.0858842161493']),
    ).toBeLessThan(5e-12);
    expect(
      both(negativePredictiveValueInterval(alarms, 0.03, 0.95), ['0.980994265656', '0.985124478922']),
    ).toBeLessThan(5e-12);
  });

  it('46 of 50 and 6 of 200 have a positive predictive value of 0.109654350417 (0.0543390122141 to 0.211805519117) at a prevalence of 0.4%', () => {
    const rare = alarmsOf([46, 50, 6, 200]);
    expect(
      positivePredictiveValue({ sensitivity: 46 / 50, falseAlarmRate: 6 / 200, prevalence: 0.004 }),
    ).toBeCloseTo(0.109654350417, 12);
    expect(
      both(positivePredictiveValueInterval(rare, 0.004, 0.95), ['0.0543390122141', '0.211805519117']),
    ).toBeLessThan(5e-12);
  });
});

describe('alarms that cannot be', () => {
  it.each([
    ['nobody affected', 'total-out-of-range', () => positiveLikelihoodRatio(alarmsOf([0, 0, 1, 4]))],
    [
      'more alarms than affected',
      'cases-out-of-range',
      () => negativeLikelihoodRatio(alarmsOf([5, 4, 1, 4])),
    ],
    [
      'a prevalence of 0',
      'share-out-of-range',
      () => positivePredictiveValueInterval(alarmsOf([3, 4, 1, 4]), 0, 0.95),
    ],
    [
      'a prevalence of 1',
      'share-out-of-range',
      () => negativePredictiveValueInterval(alarmsOf([3, 4, 1, 4]), 1, 0.95),
    ],
    [
      'a sensitivity in percent',
      'share-out-of-range',
      () => positivePredictiveValue({ sensitivity: 90, falseAlarmRate: 0.09, prevalence: 0.01 }),
    ],
  ])('%s: refused with the code %s', (_, code, call) => {
    expect(call).toThrow(ArgumentError);
    expect(call).toThrow(expect.objectContaining({ code }));
  });
});

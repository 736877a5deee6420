import { describe, expect, it } from 'vitest';
import { tell } from '../../src/render/words/tell.ts';
import type { SaysTold } from '../../src/render/words/telling.ts';
import { scenarios } from '../scenarios/scenarios.ts';
import { reportFor } from '../support/report-for.ts';

/** Figures of Harrowmere, with what they give: all worked out by hand beside them. */
const figures = {
  // 1.495% and 0.379%: 3.949 times, 295% higher, 1.116 points, 11.2 per 1,000, one in 90; odds ratio 3.993
  shifts: 'night: 18 of 1,204 vs day: 9 of 2,377',
  // 44/75 = 58.7% against 38%: 44/31 x 62/38 = 2.316 times; the other way 0.432, 57% lower
  helmets: 'no helmet: 44 of 75 injured, 38% of riders',
  // 530/412 = 1.286; 118/530 = 22.3%
  delays: 'delays from 412 to 530',
  // 5.2/4.4 = 1.182; 0.8 points
  late: 'from 4.4% to 5.2%',
  // 1.5 times, 50% higher, 1 point
  plain: '3% vs 2%',
  // 14/5,200 / (9/8,800) = 2.632; 2.69 per 1,000
  buses: 'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days',
  // 31/9,240 = 0.3355%
  ferry: 'harbour ferry: 31 of 9,240',
  // 0.3333% against 0.5%: 0.667 times; the interval goes from 0.17 to 2.7
  few: 'night shift: 3 of 900 vs day shift: 4 of 800',
  // (12/3) / (40/60) = 6.0
  rows: '12 of 15 ill ate at the market, 40 of 100 well ate there',
  // pooled 1.46, standardised 1.44, all together 2.89
  layers:
    'by age: under 40: night 30 of 900 vs day 200 of 9,000 | 40 and over: night 160 of 2,000 vs day 6 of 100',
  // 2.05 and 2.11 times the early shift
  three: 'early: 12 of 900, late: 30 of 1,100, night: 18 of 640; reference early',
} as const;
type Figure = keyof typeof figures;

function saidOf(figure: string, sentence: string): SaysTold {
  const { says } = tell(reportFor(`${figure}; says "${sentence}"`));
  if (says === null) throw new Error(`nothing said about ${sentence}`);
  return says;
}
const idsOf = ({ remarks }: SaysTold) => remarks.map(({ id }) => id);

const right: readonly (readonly [Figure, string, readonly string[]])[] = [
  ['shifts', '295% higher', ['relative-change']],
  ['shifts', '290% more', ['relative-change']],
  ['shifts', 'Night shifts had 295 per cent more incidents than day shifts', ['relative-change']],
  ['shifts', '3.9 times as often', ['risk-ratio']],
  ['shifts', '3.95x', ['risk-ratio']],
  ['shifts', 'four times as likely', ['risk-ratio']],
  ['shifts', '4-fold', ['risk-ratio']],
  ['shifts', 'nearly 4 times', ['risk-ratio']],
  ['shifts', 'about four times the risk', ['risk-ratio']],
  ['shifts', 'over 3.7 times as often', ['risk-ratio']],
  ['shifts', 'at least 3 times', ['risk-ratio']],
  ['shifts', 'day shifts had 75% fewer than night shifts', ['relative-change']],
  ['shifts', 'on day shifts a quarter as often as on night shifts', ['risk-ratio']],
  ['shifts', '1.1 percentage points higher', ['risk-difference']],
  ['shifts', 'up 1.12 pp', ['risk-difference']],
  ['shifts', 'a difference of 1.1 points', ['risk-difference']],
  ['shifts', 'a 1.5% risk', ['risk']],
  ['shifts', '1 in 67 night shifts', ['risk']],
  ['shifts', '0.38% of day shifts', ['risk']],
  ['shifts', '18 of 1,204', ['risk']],
  ['shifts', '11 more per 1,000', ['extra-cases', 'one-extra-per']],
  ['shifts', 'one extra case for every 90 shifts', ['one-extra-per', 'extra-cases']],
  ['shifts', 'odds ratio 3.99', ['odds-ratio']],
  ['shifts', 'significant', ['risk-ratio']],
  ['shifts', '3 to 4 times as often', ['risk-ratio']],
  ['helmets', '2.3 times as likely', ['risk-ratio']],
  ['helmets', 'riders without a helmet were injured 2.3 times as often', ['risk-ratio']],
  ['helmets', '130% higher', ['relative-change']],
  ['helmets', 'helmet wearers had a 57% lower risk', ['relative-change']],
  ['helmets', 'helmets more than halve the risk', ['risk-ratio']],
  ['helmets', '59% of the injured', ['case-share']],
  ['helmets', 'Most of the injured wore no helmet', ['case-share']],
  ['helmets', '38% of riders', ['population-share']],
  ['helmets', '44 of 75 injured', ['case-share']],
  ['delays', '29% more', ['relative-change']],
  ['delays', 'Ferry delays are up 29%', ['relative-change']],
  ['delays', 'rose by 28.6%', ['relative-change']],
  ['delays', 'an increase of about 30%', ['relative-change']],
  ['delays', '1.3 times as many', ['count-ratio']],
  ['late', '0.8 points', ['percentage-difference']],
  ['late', '18% higher', ['relative-change']],
  ['late', 'rose by almost a fifth', ['relative-change']],
  ['plain', '50% higher', ['relative-change']],
  ['plain', '1 point higher', ['percentage-difference']],
  ['plain', 'half as many again', ['relative-change']],
  ['plain', '1.5 times', ['percentage-ratio']],
  ['buses', '2.6 times as often', ['rate-ratio']],
  ['buses', '2.7 per 1,000 bus-days', ['rate']],
  ['buses', 'depot B had 62% fewer', ['relative-change']],
  ['ferry', '0.34%', ['risk']],
  ['ferry', '3.4 per 1,000', ['risk']],
  ['rows', 'the odds were 6 times as high', ['odds-ratio']],
  ['layers', '1.5 times as often', ['pooled-risk-ratio']],
  ['layers', 'all together 2.9 times as often', ['crude-risk-ratio']],
  ['three', 'late shifts had twice as many', ['risk-ratio']],
  ['three', 'night had 110% more than early', ['relative-change']],
  ['three', 'early shifts had half as many as late ones', ['risk-ratio']],
];

const faulty: readonly (readonly [Figure, string, string])[] = [
  ['shifts', '1.1% higher', 'points-called-per-cent'],
  ['shifts', '295 points higher', 'points-called-per-cent'],
  ['plain', '1% higher', 'points-called-per-cent'],
  ['late', '0.8% more', 'points-called-per-cent'],
  ['late', 'up 0.8 per cent', 'points-called-per-cent'],
  ['shifts', '3.99 times as likely', 'odds-ratio-as-risk'],
  ['shifts', '299% higher', 'odds-ratio-as-risk'],
  ['rows', '6 times as likely', 'odds-ratio-as-risk'],
  ['helmets', 'a 59% risk', 'share-as-risk'],
  ['helmets', '59% of riders', 'share-as-risk'],
  ['helmets', '59% more likely', 'share-as-risk'],
  ['helmets', '1.42 times as likely', 'share-as-risk'],
  ['helmets', '1.54 times the risk', 'share-as-risk'],
  ['shifts', '75% lower', 'other-way-round'],
  ['shifts', '0.25 times', 'other-way-round'],
  ['shifts', '295% lower', 'other-way-round'],
  ['shifts', 'day shifts had 3.95 times as many as night shifts', 'other-way-round'],
  ['delays', '29% fewer', 'other-way-round'],
  ['helmets', '57% lower', 'other-way-round'],
  ['shifts', '39.5 times as often', 'decimal-slip'],
  ['shifts', '29.5% higher', 'decimal-slip'],
  ['ferry', '3.4%', 'decimal-slip'],
  ['ferry', '0.034%', 'decimal-slip'],
  ['delays', '2.9% more', 'decimal-slip'],
  ['delays', '22% more', 'from-wrong-base'],
  ['shifts', '74.7% higher', 'from-wrong-base'],
  ['shifts', '395% higher', 'from-wrong-base'],
  ['shifts', '2.95 times as often', 'from-wrong-base'],
  ['shifts', 'twice as often', 'from-wrong-base'],
  ['shifts', '3.75 times as often', 'rounded-first'],
  ['shifts', '275% higher', 'rounded-first'],
  ['late', '25% higher', 'rounded-first'],
  ['shifts', 'over 4 times as often', 'hedge-too-strong'],
  ['shifts', 'at least 4 times', 'hedge-too-strong'],
  ['delays', 'more than a third more', 'hedge-too-strong'],
  ['helmets', 'up to twice as likely', 'hedge-too-strong'],
  ['few', 'significant', 'no-difference-shown'],
  ['few', 'no difference', 'no-difference-shown'],
  ['few', 'twice as often', 'no-difference-shown'],
  ['shifts', 'no difference', 'no-difference-shown'],
  ['shifts', 'not significant', 'no-difference-shown'],
];

describe('a right sentence under test', () => {
  it.each(right)('%s: %s agrees with %j, and nothing is held against it', (figure, sentence, ids) => {
    const says = saidOf(figures[figure], sentence);
    expect(says.agreesWith, says.short).toEqual(ids);
    expect(idsOf(says)).toEqual([]);
    expect(says.instead).toBeNull();
  });
});

describe('a sentence that agrees with no reading as worded', () => {
  it.each(faulty)('%s: %s has the remark %s and a sentence to write instead', (figure, sentence, id) => {
    const says = saidOf(figures[figure], sentence);
    expect(says.agreesWith, says.short).toEqual([]);
    expect(idsOf(says)[0], says.short).toBe(id);
    expect(says.instead).not.toBeNull();
  });

  it.each([
    ['shifts', 'night shifts are dangerous', /no figure in it/],
    ['rows', 'twice as often', /none of the readings/],
    ['few', 'the lines cost 3 pounds', /repeats a figure as given/],
    ['delays', '118 more', /difference of the two counts/],
    ['helmets', 'twice as likely', /none of the readings; the risk ratio is 2.32 times/],
  ] as const)('%s: %s is told as what it is', (figure, sentence, words) => {
    expect(saidOf(figures[figure], sentence).line).toMatch(words);
  });
});

describe('times more', () => {
  it.each([
    ['4 times more', ['risk-ratio']],
    ['3 times more', ['relative-change']],
    ['7 times more', []],
  ] as const)('%s is said to have two readings', (sentence, ids) => {
    const says = saidOf(figures.shifts, sentence);
    expect(says.agreesWith).toEqual(ids);
    expect(idsOf(says)).toContain('ambiguous-more');
  });
});

describe('a sentence that agrees while no difference is shown', () => {
  it.each(['33% lower', '0.67 times as often', 'a third fewer', '0.17 points lower'])('%s', (sentence) => {
    const says = saidOf(figures.few, sentence);
    expect(says.agreesWith).toHaveLength(1);
    expect(idsOf(says)).toEqual(['no-difference-shown']);
  });
});

describe('a figure with its interval', () => {
  it.each([
    ['shifts', '3.95 (95% CI 1.81 to 8.59)', 'Miettinen-Nurminen'],
    // exp(ln 3.9485 -+ 1.96 root(1/18 - 1/1204 + 1/9 - 1/2377)) = 1.779, 8.763
    ['shifts', '3.95 (95% CI 1.78 to 8.76)', 'Katz'],
    ['shifts', '295% higher (95% CI 78% to 776%)', 'Katz'],
    ['shifts', 'odds ratio 3.99 (95% CI 1.79 to 8.92)', 'Woolf'],
    ['shifts', '1.5% (95% CI 0.95% to 2.35%)', 'Wilson'],
    ['shifts', '1.5% (95% CI 0.89% to 2.35%)', 'Clopper'],
    ['helmets', '2.3 (95% CI 1.5 to 3.7)', 'Wilson'],
    // 2.3158 exp(-+ 1.96 root(1/44 + 1/31)) = 1.4625, 3.6669
    ['helmets', '2.316 (95% CI 1.463 to 3.667)', 'Farrington'],
    ['buses', '2.63 (95% CI 1.14 to 6.08)', 'log limits'],
  ] as const)('%s: %s agrees, and the variant is named: %s', (figure, sentence, name) => {
    const says = saidOf(figures[figure], sentence);
    expect(says.agreesWith, says.short).toHaveLength(1);
    expect(idsOf(says)).toEqual(['interval-variant']);
    expect(says.remarks[0]?.text).toContain(name);
  });

  it.each([
    ['shifts', '3.95 (95% CI 2.5 to 6.0)'],
    ['helmets', '2.3 (95% CI 1.2 to 4.4)'],
    ['plain', '1.5 (95% CI 1.1 to 2.0)'],
  ] as const)('%s: %s agrees with none, since no variant gives both limits', (figure, sentence) => {
    const says = saidOf(figures[figure], sentence);
    expect(says.agreesWith).toEqual([]);
    expect(idsOf(says)).toEqual(['interval-variant']);
  });
});

describe('what the house itself posts', () => {
  // Sentences without a comparison of two groups in figures; an alarm takes no sentence at all.
  const without = /^(?:All together|New bus had|Night: 18\. Day: 9\. Out)/;
  it.each(Object.entries(scenarios).filter(([, line]) => !/ says |alarm/.test(line)))(
    '%s: is held against nothing when tested in turn',
    (_, line) => {
      const words = tell(reportFor(line));
      const separator = line.includes('\t') ? '\n' : '; ';
      const own = [words.headline, ...words.posts.map(({ text }) => text), words.shortPost ?? words.headline];
      for (const sentence of own.filter((each) => !without.test(each))) {
        const { says } = tell(reportFor(`${line}${separator}says "${sentence}"`));
        if (says === null) continue;
        expect(says.agreesWith.length, `${sentence} ${says.short}`).toBeGreaterThan(0);
        expect(
          idsOf(says).filter((id) => id !== 'interval-variant'),
          sentence,
        ).toEqual([]);
      }
    },
  );
});

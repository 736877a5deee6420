import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import type { Question } from '../../grammar/question.ts';
import { readLine } from '../../grammar/read-line.ts';
import { commandLineLimits } from '../../src/answer/answer-line.ts';
import { renderJson } from '../../src/render/render-json.ts';
import { renderText } from '../../src/render/render-text.ts';
import { directionOf } from '../../src/report/report.ts';
import { reportOf } from '../../src/report/report-of.ts';

const bare = (value: Question): unknown =>
  JSON.parse(
    JSON.stringify(value, (key, each: unknown) => (key === 'span' || key === 'remarks' ? undefined : each)),
  );

function question(line: string): Question {
  const reading = readLine(line, commandLineLimits);
  if (reading.kind === 'question') return reading.question;
  throw new Error(`${line}: ${JSON.stringify(reading)}`);
}

const percent = fc.integer({ min: 1, max: 999 }).map((tenths) => `${tenths / 10}%`);
const rising = fc
  .uniqueArray(fc.integer({ min: 1, max: 999 }), { minLength: 3, maxLength: 3 })
  .map((tenths) => tenths.sort((a, b) => a - b).map((each) => `${each / 10}%`));
const ends = fc
  .uniqueArray(fc.integer({ min: 0, max: 100 }), { minLength: 2, maxLength: 2 })
  .map(([start = 0, end = 1]) => `from ${start}% to ${end}%`);

/** A coverage of one group in one of its spellings. */
const coverage = fc.oneof(
  percent,
  rising.map(([low = '', , high = '']) => `${low} to ${high}`),
  rising.map(([low = '', , high = '']) => `between ${low} and ${high}`),
  rising.map(([low = '', middle = '', high = '']) => `${middle} (${low} to ${high})`),
  rising.map(([low = '', middle = '', high = '']) => `${middle} (90% CI ${low} to ${high})`),
  ends,
  fc
    .tuple(fc.integer({ min: 1, max: 2_000 }), fc.double({ min: 0, max: 1, noNaN: true }))
    .map(([sampled, part]) => `${Math.round(sampled * part)} of ${sampled}`),
);
const names = fc.constantFrom(
  ['no helmet', 'helmet'] as const,
  ['under 40', '40 and over'] as const,
  ['cases', 'vs'] as const,
  ['M\u00fcller', 'x; y'] as const,
  ['from abroad', 'up to date'] as const,
);
const tail = fc.subarray(['level 90%', 'exact', 'note "it; was | so"', 'try 20%, 38.5%'], { maxLength: 3 });

const line = fc
  .tuple(
    names,
    fc.array(fc.integer({ min: 0, max: 400 }), { minLength: 2, maxLength: 2 }),
    fc.integer({ min: 0, max: 60 }),
    coverage,
    fc.boolean(),
    fc.boolean(),
    tail,
  )
  .filter(([, [one = 0, other = 0]]) => one + other > 0)
  // There are no exact limits for these.
  .filter(([, , , held, , , clauses]) => !(clauses.includes('exact') && /\(|from/.test(held)))
  .map(([[first, second], [one = 0, other = 0], unknown, held, ofSecond, unit, clauses]) =>
    [
      `cases: "${first}" ${one}, "${second}" ${other}${unknown > 20 ? `, unknown ${unknown}` : ''}`,
      `coverage: "${ofSecond ? second : first}" ${held}${unit ? ` ${/ of /.test(held) ? '' : 'of '}riders` : ''}`,
      ...clauses,
    ].join('; '),
  );

const byPeriod = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 99 }), fc.integer({ min: 0, max: 60 })), {
    minLength: 2,
    maxLength: 12,
  })
  .chain((rows) => {
    const all = rows.reduce((sum, [, cases]) => sum + cases, 0);
    return fc.tuple(
      fc.constant(rows),
      fc.integer({ min: 0, max: all }),
      fc.constant(all),
      names,
      fc.boolean(),
    );
  })
  .filter(([, , all]) => all > 0)
  .map(([rows, own, all, [first, second], named]) => {
    const shares = rows.map(([share], at) => `${named ? `"week ${at + 1}" ` : ''}${share}%`);
    return `cases: "${first}" ${own}, "${second}" ${all - own}; coverage of "${first}" by week: ${shares.join(', ')}; cases by week: ${rows.map(([, cases]) => cases).join(', ')}`;
  });

describe('generated coverages', () => {
  it.each([
    ['of every form', line],
    ['by period', byPeriod],
  ] as const)('%s survive printing and reading, and have an answer that agrees with itself', (_, lines) => {
    fc.assert(
      fc.property(lines, (typed) => {
        const first = question(typed);
        expect(bare(question(printCanonical(first)))).toEqual(bare(first));
        const report = reportOf(first);
        const ratio = report.readings.find(({ id }) => id === 'risk-ratio');
        if (ratio === undefined) throw new Error('no ratio');
        for (const { estimate, interval } of report.readings) {
          if (estimate === null || interval === null) continue;
          expect(interval.low ?? -Infinity).toBeLessThanOrEqual(estimate + 1e-9 * Math.abs(estimate));
          expect(interval.high ?? Infinity).toBeGreaterThanOrEqual(estimate - 1e-9 * Math.abs(estimate));
        }
        const fraction = report.readings.find(({ id }) => id === 'population-attributable-fraction');
        if (fraction?.interval != null && Math.abs((fraction.interval.low ?? -1) / 1e-9) > 1)
          expect((fraction.interval.low ?? -1) > 0).toBe(directionOf(ratio) === 'higher');
        const texts = `${renderText(report, (text) => text)}${renderJson(typed, report)}`;
        expect(texts).not.toMatch(/NaN|Infinity|undefined /);
      }),
      { numRuns: 800 },
    );
  });
});

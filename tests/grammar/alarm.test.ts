import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import type { AlarmQuestion, Question } from '../../grammar/question.ts';
import { readLine } from '../../grammar/read-line.ts';
import { commandLineLimits } from '../../src/answer/answer-line.ts';
import { reportOf } from '../../src/report/report-of.ts';

const read = (line: string) => readLine(line, commandLineLimits);
function question(line: string): Question {
  const reading = read(line);
  if (reading.kind === 'question') return reading.question;
  throw new Error(`${line}: ${JSON.stringify(reading)}`);
}
function alarm(line: string): AlarmQuestion {
  const found = question(line);
  if (found.kind !== 'alarm') throw new Error(`${line} was read as ${found.kind}`);
  return found;
}
const bare = (value: Question): unknown =>
  JSON.parse(
    JSON.stringify(value, (key, each: unknown) => (key === 'span' || key === 'remarks' ? undefined : each)),
  );

const stated = 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%';
const cells = 'alarm: caught 46, missed 4, false alarms 30, quiet 920';
const range = 'alarm: sensitivity 92%, specificity 97%, prevalence 0.2-1%';

/** Typed line, canonical form. */
const corpus: readonly (readonly [string, string])[] = [
  [stated, stated],
  ['sensitivity 92%, specificity 97%, prevalence 0.4%', stated],
  ['sensitivity 92% specificity 97% prevalence 0.4%', stated],
  ['92% sensitivity, 97% specificity, 0.4% prevalence', stated],
  ['92% sensitivity 97% specificity 0.4% prevalence', stated],
  ['92% sensitivity, specificity 97%, prevalence 0.4%', stated],
  ['SENS 92%, Spec 97%, prev 0.4%', stated],
  ['sens. 92% spec. 97% prev. 0.4%', stated],
  ['prevalence 0.4%; specificity 97%; sensitivity 92%', stated],
  ['sensitivity 92%\nspecificity 97%\nprevalence 0.4%', stated],
  ['alarm:\n- sensitivity: 92%\n- specificity: 97%\n- prevalence: 0.4%', stated],
  ['alarm: sensitivity 92% | specificity 97% | prevalence 0.4%', stated],
  ['alarm: sensitivity of 92%, a specificity of 97% and a prevalence of 0.4%', stated],
  ['the test has sensitivity 92 per cent, specificity 97 pc and base rate 0.4%', stated],
  ['test: 92% sensitive, 97% specific, prevalence 0.4%', stated],
  ['alarm: sensitivity = 92%, specificity = 97%, prevalence = 0.4%?', stated],
  ['alarm: sensitivity 92%, specificity 97%, false alarm rate 3%, prevalence 0.4%', stated],
  ['alarm: sensitivity about 92%, specificity 97%, prevalence 0.4%', stated],
  ['alarm: tpr 92%, fpr 3%, base rate 0.4%', 'alarm: sensitivity 92%, false alarm rate 3%, prevalence 0.4%'],
  [
    'alarm: catches 92%, false alarm rate 3%, 1 in 250 base rate',
    'alarm: sensitivity 92%, false alarm rate 3%, prevalence 1 in 250',
  ],
  [
    'alarm: miss rate 8%, false positive rate 3%, prevalence one in 250',
    'alarm: miss rate 8%, false alarm rate 3%, prevalence 1 in 250',
  ],
  [
    'water alarm: sensitivity 92%, specificity 97%, prevalence 0.4% of wells',
    'water alarm: sensitivity 92%, specificity 97%, prevalence 0.4% of wells',
  ],
  [
    'water alarm sensitivity 92%, specificity 97%, prevalence 1 in 250 wells',
    'water alarm: sensitivity 92%, specificity 97%, prevalence 1 in 250 wells',
  ],
  [
    'unit 7 alarm: sensitivity 92%, specificity 97%, prevalence 1 in 250 days',
    '"unit 7 alarm": sensitivity 92%, specificity 97%, prevalence 1 in 250 days',
  ],
  [
    'alarm: sensitivity 46/50, specificity 194 of 200, prevalence 0.4%',
    'alarm: sensitivity 46 of 50, specificity 194 of 200, prevalence 0.4%',
  ],
  [
    'caught 46 of 50, false alarms 6/200, prevalence 0.4%',
    'alarm: sensitivity 46 of 50, false alarm rate 6 of 200, prevalence 0.4%',
  ],
  [
    'missed 4 out of 50; quiet 194 of 200; prevalence 3 in 2000',
    'alarm: miss rate 4 of 50, specificity 194 of 200, prevalence 3 of 2,000',
  ],
  [
    'alarm: sensitivity 92% (46 of 50), specificity 97% of 200, prevalence 40 of 10,000 wells',
    'alarm: sensitivity 46 of 50 (92%), specificity 97% of 200, prevalence 40 of 10,000 wells',
  ],
  [range, range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence 0.2% to 1%', range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence 0.2 to 1%', range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence from 0.2% to 1%', range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence between 0.2% and 1%', range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence 0.2%-1%', range],
  ['alarm: sensitivity 92%, specificity 97%, prevalence 0.2% \u2013 1%', range],
  [
    'alarm: sensitivity 92%, specificity 97%, prevalence 1 in 400 to 1 in 100',
    'alarm: sensitivity 92%, specificity 97%, prevalence 1 in 400 to 1 in 100',
  ],
  [cells, cells],
  ['caught 46, missed 4, false alarms 30, quiet 920', cells],
  ['caught 46 missed 4 false alarms 30 quiet 920', cells],
  ['46 caught, 4 missed, 30 false alarms, 920 quiet', cells],
  ['tp 46 fp 30 fn 4 tn 920', cells],
  ['TN=920, FN=4, FP=30, TP=46', cells],
  ['TP: 46\nFP: 30\nFN: 4\nTN: 920', cells],
  ['true positives 46, false positives 30, false negatives 4, true negatives 920', cells],
  ['tp 46 fp 30 fn 4 tn 920; prevalence 0.4%', `${cells}, prevalence 0.4%`],
  [
    'caught 46, missed 4, specificity 97%, prevalence 0.4%',
    'alarm: caught 46, missed 4, specificity 97%, prevalence 0.4%',
  ],
  [
    'alarm: caught 46, missed <5, false alarms 30, quiet 12k',
    'alarm: caught 46, missed <5, false alarms 30, quiet 12k',
  ],
  [
    `${stated} level 90% only me`,
    'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%; level 90%; only me',
  ],
  [
    `${stated}; among "wells, May"; source https://harrowmere.example/a; note x; exact; per 10,000`,
    `${stated}; per 10,000; among "wells, May"; source https://harrowmere.example/a; note x; exact`,
  ],
];

describe('an alarm is read as a person means it', () => {
  it.each(corpus)('%j', (line, canonical) => {
    const first = alarm(line);
    expect(printCanonical(first)).toBe(canonical);
    expect(bare(alarm(canonical))).toEqual(bare(first));
  });

  it('with the shares the right way round', () => {
    const turned = alarm('alarm: miss rate 8%, false alarm rate 3%, prevalence 1 in 250 wells');
    expect(turned.sensitivity.share).toMatchObject({ value: 0.92, low: 0.915, high: 0.925 });
    expect(turned.specificity.share).toMatchObject({ value: 0.97, low: 0.965, high: 0.975 });
    expect(turned.unit).toBe('wells');
    expect(alarm(range).prevalence?.share).toMatchObject({ value: 0.006, low: 0.002, high: 0.01 });
    expect(alarm(cells).prevalence).toBeNull();
    expect(alarm(cells).sensitivity.share.value).toBe(0.92);
  });

  it('says which words it left out', () => {
    const { remarks } = alarm(`${stated} in summer`);
    expect(remarks).toMatchObject([{ id: 'words-left-out', text: 'summer' }]);
  });
});

describe('a line that only sounds like an alarm', () => {
  it.each([
    ['false alarms 30 vs quiet 20', 'bare-counts'],
    ['false alarms 3 of 900 vs 4 of 800', 'counts'],
    ['false alarms 3 of 900, 4 of 800', 'counts'],
    ['alarm: 3 of 900 vs siren: 4 of 800', 'counts'],
    ['alarm: 3 of 900, siren: 4 of 800', 'counts'],
    ['smoke test: missed 3 of 900, other 4 of 800', 'counts'],
    ['missed: 3 of 900, caught: 4 of 800', 'counts'],
    ['missed appointments 30, silent calls 20', 'bare-counts'],
    ['quiet ward 3 of 900, busy ward 4 of 800', 'counts'],
    ['sensitivity: 46 of 50', 'counts'],
    ['sensitivity 46 of 50 vs 40 of 50', 'counts'],
    ['tp 46 vs fp 30', 'bare-counts'],
  ])('%j is of the kind %s', (line, kind) => expect(question(line).kind).toBe(kind));
});

describe('an alarm that lacks something', () => {
  const told = (line: string) => {
    const reading = read(line);
    if (reading.kind !== 'diagnosis') throw new Error(`${line} was read as ${reading.kind}`);
    const { message, suggestions } = reading.diagnosis;
    return { message, lines: suggestions.map((suggestion) => suggestion.line) };
  };

  it('is told which figure, with the line to complete', () => {
    const { message, lines } = told('alarm: sensitivity 92%, specificity 97%');
    expect(message).toMatch(/^Missing: prevalence\./);
    expect(lines).toEqual(['alarm: sensitivity 92%, specificity 97%, prevalence 1 in ...']);
    expect(told('tp 46 fp 30 fn 4').lines).toEqual([
      'alarm: caught 46, false alarms 30, missed 4, quiet ...',
    ]);
  });

  it('is offered the whole line where a figure has no word', () => {
    const { lines } = told('The alarm catches 92% of bad wells, false alarm rate 3%, 1 in 250 wells is bad');
    expect(lines).toEqual(['alarm: sensitivity 92%, false alarm rate 3%, prevalence 1 in 250']);
    expect(told('alarm: 92%, 97%, 0.4%').lines).toEqual([stated]);
  });

  it('is offered the other reading where two counts could be two groups', () => {
    expect(told('false alarms 30, quiet 20').lines[1]).toBe('false alarms: 30 vs quiet: 20');
  });

  it('is asked what "accurate" means, in the words of the design', () => {
    expect(told('water alarm 92% accurate, 1 in 250 wells bad')).toEqual({
      message: '"92% accurate" can mean how many real cases are caught, or how many of all calls are right.',
      lines: ['alarm: sensitivity ...%, false alarm rate ...%, prevalence 1 in 250'],
    });
  });

  it('is given back with the signs that bare numbers lack', () => {
    expect(told('alarm: sensitivity 0.92, specificity 0.97, prevalence 0.004').lines).toEqual([stated]);
  });
});

const tenths = fc.integer({ min: 0, max: 1_000 }).map((value) => `${(value / 10).toFixed(1)}%`);
const inside = fc.integer({ min: 1, max: 998 }).map((value) => `${(value / 10).toFixed(1)}%`);
const pair = fc
  .tuple(fc.nat({ max: 900 }), fc.integer({ min: 900, max: 90_000 }))
  .map(([x, n]) => `${x} of ${n}`);
const side = (own: string, turned: string) =>
  fc.tuple(fc.constantFrom(own, turned), fc.oneof(tenths, pair)).map((words) => words.join(' '));
const prevalences = fc
  .oneof(
    inside,
    fc.integer({ min: 2, max: 9_000 }).map((n) => `1 in ${n}`),
    fc.constantFrom('0.2-1%', '1 in 400 to 1 in 100', '40 of 10,000', '4\u2030'),
  )
  .chain((figure) => fc.constantFrom('', ' wells').map((unit) => `prevalence ${figure}${unit}`));
const shared = fc
  .tuple(side('sensitivity', 'miss rate'), side('specificity', 'false alarm rate'), prevalences)
  .chain((parts) => fc.shuffledSubarray(parts, { minLength: 3, maxLength: 3 }));
const positive = fc.integer({ min: 1, max: 90_000 });
const counted = fc.tuple(positive, positive, positive, positive).chain(([tp, fp, fn, tn]) =>
  fc.shuffledSubarray([`tp ${tp}`, `false alarms ${fp}`, `fn ${fn}`, `quiet ${tn}`], {
    minLength: 4,
    maxLength: 4,
  }),
);

describe('generated alarms', () => {
  it('survive printing and reading in any order and with any separator, and can be answered', () => {
    fc.assert(
      fc.property(
        fc.oneof(shared, counted),
        fc.constantFrom(', ', ' ', '; ', '\n', ' and '),
        fc.constantFrom('', 'alarm: ', 'water alarm: '),
        (parts, between, head) => {
          const first = alarm(`${head}${parts.join(between)}`);
          expect(bare(alarm(printCanonical(first)))).toEqual(bare(first));
          reportOf(first);
        },
      ),
      { numRuns: 1_500 },
    );
  });
});

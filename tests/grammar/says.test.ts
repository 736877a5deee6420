import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { readClaim } from '../../grammar/says-claim.ts';
import { tell } from '../../src/render/words/tell.ts';
import { bare, questionFor, read } from '../support/question-for.ts';
import { reportFor } from '../support/report-for.ts';

const figure = 'night: 18 of 1,204 vs day: 9 of 2,377';
const saysOf = (line: string) => questionFor(line).clauses.says?.text ?? null;

describe('the clause says', () => {
  it.each([
    [`${figure}; says twice as often`, 'twice as often'],
    [`${figure}\nsays twice as often`, 'twice as often'],
    [`${figure} | says: twice`, 'twice'],
    [`says 67% higher; ${figure}`, '67% higher'],
    [`${figure} says twice`, 'twice'],
    ['18/1204 v 9/2377 says "up 29%" level 90%', 'up 29%'],
    ['18/1204 v 9/2377 says twice only me', 'twice'],
    ['from 412 to 530 says up 29%', 'up 29%'],
    ['no helmet: 44 of 75 injured, 38% of riders says 2.3 times', '2.3 times'],
    [`${figure}; says "up; and | up"`, 'up; and | up'],
    [`${figure}; says "she said "double" to me"; level 90%`, "she said 'double' to me"],
    [
      `says \u201cshe said \u201cdouble\u201d; then half\u201d; ${figure}`,
      'she said \u201cdouble\u201d; then half',
    ],
    [`says \u201etwice\u201c; ${figure}`, 'twice'],
    [`says \u00abtwice\u00bb ${figure}`, 'twice'],
    [`${figure}; says "up 29%`, 'up 29%'],
    [`${figure}; says "up 29%; among "riders"`, 'up 29%'],
    [`${figure}; says \u201cup 29%; level 90%`, 'up 29%'],
  ])('%j has the sentence %j', (line, sentence) => {
    expect(saysOf(line)).toBe(sentence);
    expect(questionFor(line)).toMatchObject({ groups: [{}, {}] });
  });

  it.each([
    'Survey says yes: 44 of 75 vs Survey says no: 3 of 80',
    'says yes: 3 of 900 vs says no: 4 of 800',
    '"x says": 3 of 900 vs y: 4 of 800',
    `${figure}; note "x; says twice"`,
  ])('is not in %j', (line) => {
    expect(saysOf(line)).toBeNull();
  });

  it('is read the same after printing, with every other clause beside it', () => {
    for (const line of [
      `${figure}; says "twice; or "thrice""; level 90%; note "he says so"; only me`,
      'says \u201ca \u201cb\u201d\u201d; from 4.4% to 5.2%; source https://harrowmere.example/x',
      'cases: no helmet 44, helmet 31; coverage: no helmet 38%; try 30%, 40%; says 2.3 times',
      'by age: under 40: night 3 of 900 vs day 40 of 9,000 | over: night 80 of 2,000 vs day 6 of 100; says twice',
    ]) {
      const question = questionFor(line);
      expect(bare(questionFor(printCanonical(question)))).toEqual(bare(question));
    }
  });

  it('is held whatever the sentence, and printing it gives it again', () => {
    const pieces = fc.constantFrom(
      ...['67%', '1.8 times', 'twice', 'half', 'a third', 'fewer', 'higher', 'up by', '1 in 50', 'points'],
      ...[
        '(95% CI 1 to 2)',
        'night',
        'than day',
        'about',
        'at least',
        '"',
        '\u201c',
        '\u201d',
        ';',
        '|',
        '0',
        ',',
      ],
      ...['-5', '0%', '1e9', '999,999,999', 'x', '%', 'odds ratio', 'risk', 'says', '\u00fc', '\u0130', '.'],
    );
    fc.assert(
      fc.property(fc.array(pieces, { minLength: 1, maxLength: 9 }), (words) => {
        const line = `${figure}; says "${words.join(' ')}"`;
        const reading = read(line);
        if (reading.kind !== 'question') return;
        expect(bare(questionFor(printCanonical(reading.question)))).toEqual(bare(reading.question));
        const { says } = tell(reportFor(line));
        expect(JSON.stringify(says)).not.toMatch(/NaN|Infinity|undefined|!/);
      }),
      { numRuns: 1_000 },
    );
  });

  it('takes no longer than the line is long', () => {
    const long = (piece: string) => piece.repeat(Math.floor(3_900 / piece.length));
    for (const piece of [
      'says ',
      '1 1 ',
      '3 to ',
      'more than ',
      '(95% ',
      '"says"',
      'a third of ',
      '18 of ',
    ]) {
      const start = performance.now();
      readClaim(long(piece));
      read(`${figure}; says ${long(piece).slice(0, 3_900)}`);
      expect(performance.now() - start, piece).toBeLessThan(500);
    }
  });
});

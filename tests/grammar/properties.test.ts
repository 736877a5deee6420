import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fineTokens, fineTokensOf } from '../../grammar/tokens.ts';
import { LineParser } from '../../grammar/parser.ts';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { readLine } from '../../grammar/read-line.ts';
import { commandLineLimits } from '../../src/answer/answer-line.ts';
import { reportOf } from '../../src/report/report-of.ts';
import { scenarios } from '../scenarios/scenarios.ts';
import { bare, questionFor as question } from '../support/question-for.ts';

const words = [
  'night',
  'day',
  'no helmet',
  'helmet',
  'out of hours',
  'under 40',
  '18-29',
  '2023/24',
  'M\u00fcller',
  'depot A',
  'per diem',
  'bed and breakfast',
  'level 1',
  'note',
  'cases',
  'one dose',
  'vs',
  'route 14',
  '\u0395\u03bb\u03ad\u03bd\u03b7',
  'a/b',
  'x; y',
  '50%',
];
const names = fc.uniqueArray(fc.constantFrom(...words), {
  minLength: 2,
  maxLength: 5,
  selector: (word) => word,
});
const counts = fc.integer({ min: 0, max: 900 });
const totals = fc.integer({ min: 900, max: 2_000_000 });
const grouped = (value: number) => value.toLocaleString('en-US');
const clauses = fc.subarray(
  [
    'level 90%',
    'per 1,000',
    'among "riders, May"',
    'note "it; was | so"',
    'source https://harrowmere.example/a?b=1',
    'exact',
    'only me',
    'period "Jan to Jun"',
    'says "67% higher; or “two thirds”, he says"',
  ],
  { minLength: 0, maxLength: 4 },
);

const countsLine = fc
  .tuple(names, fc.array(fc.tuple(counts, totals), { minLength: 5, maxLength: 5 }), clauses)
  .map(([labels, figures, tail]) =>
    [
      labels
        .map((label, at) => `"${label}": ${figures[at]?.[0] ?? 0} of ${grouped(figures[at]?.[1] ?? 900)}`)
        .join(' vs '),
      ...tail,
    ].join('; '),
  );
const sharesLine = fc
  .tuple(
    names,
    fc.array(fc.integer({ min: 1, max: 900 }), { minLength: 5, maxLength: 5 }),
    fc.integer({ min: 1, max: 18 }),
    clauses,
  )
  .map(([labels, cases, coverage, tail]) => {
    const held = labels.slice(0, -1).map((label) => `"${label}" ${coverage}%`);
    return [
      `cases: ${labels.map((label, at) => `"${label}" ${cases[at] ?? 1}`).join(', ')}`,
      `coverage: ${held.join(', ')}`,
      ...tail,
    ].join('; ');
  });
const statedLine = fc
  .tuple(names, fc.array(fc.integer({ min: 0, max: 1_000 }), { minLength: 5, maxLength: 5 }), clauses)
  .map(([labels, shares, tail]) =>
    [
      labels.map((label, at) => `"${label}": ${((shares[at] ?? 0) / 10).toFixed(1)}%`).join(' vs '),
      ...tail,
    ].join('; '),
  );
const bareLine = fc
  .tuple(names, fc.array(fc.integer({ min: 0, max: 9_000 }), { minLength: 5, maxLength: 5 }), clauses)
  .map(([labels, cases, tail]) =>
    [labels.map((label, at) => `"${label}": ${grouped(cases[at] ?? 0)}`).join(' vs '), ...tail].join('; '),
  );

const ratesLine = fc
  .tuple(
    names,
    fc.array(fc.tuple(counts, totals, fc.constantFrom('in', 'per')), { minLength: 5, maxLength: 5 }),
    fc.constantFrom('bus-days', 'hours', 'km', 'person-years'),
    clauses,
  )
  .map(([labels, figures, unit, tail]) =>
    [
      labels
        .map((label, at) => {
          const [cases, exposure, sign] = figures[at] ?? [0, 900, 'in'];
          return `"${label}": ${grouped(cases)} ${sign} ${grouped(exposure)} ${unit}`;
        })
        .join(' vs '),
      ...tail,
    ].join('; '),
  );
const changeLine = fc
  .tuple(counts, counts, totals, totals, fc.constantFrom('bare', 'counts', 'percentages', 'lengths'), clauses)
  .map(([one, other, first, second, form, tail]) => {
    const figure = (count: number, total: number) =>
      ({
        bare: grouped(count + 3_000),
        counts: `${count} of ${grouped(total)}`,
        percentages: `${(count / 10).toFixed(1)}%`,
        lengths: `${count} in ${grouped(total)} days`,
      })[form];
    return [`from ${figure(one, first)} to ${figure(other, second)}`, ...tail].join('; ');
  });

describe('generated questions', () => {
  it('of a change survive printing and reading', () => {
    fc.assert(
      fc.property(changeLine, (line) => {
        const first = question(line);
        expect(first.overTime).toBe(true);
        expect(bare(question(printCanonical(first)))).toEqual(bare(first));
      }),
      { numRuns: 1_500 },
    );
  });

  it.each([
    ['counts', countsLine],
    ['shares', sharesLine],
    ['stated', statedLine],
    ['bare-counts', bareLine],
    ['rates', ratesLine],
  ] as const)('of the kind %s survive printing and reading', (kind, lines) => {
    fc.assert(
      fc.property(lines, (line) => {
        const first = question(line);
        expect(first.kind).toBe(kind);
        expect(bare(question(printCanonical(first)))).toEqual(bare(first));
      }),
      { numRuns: 1_500 },
    );
  });
});

const mutations = fc.tuple(
  fc.constantFrom(...Object.values(scenarios)),
  fc.array(
    fc.tuple(
      fc.nat({ max: 80 }),
      fc.constantFrom(
        '',
        ' ',
        ',',
        ';',
        '|',
        ':',
        '%',
        'of',
        ' vs ',
        '"',
        '(',
        ')',
        '/',
        '-',
        '\n',
        '\u201c',
        '<',
        '&lt;',
        '1',
        '0',
        '.',
        'per',
        ' in ',
        '\u0000',
        '\ud83d\udeb2',
        '~',
        '*',
        '\u00a0',
      ),
    ),
    { minLength: 1, maxLength: 6 },
  ),
);
const hostile = fc.oneof(
  mutations.map(([line, edits]) =>
    edits.reduce<string>(
      (text, [at, piece]) => `${text.slice(0, at)}${piece}${text.slice(at + (piece === '' ? 1 : 0))}`,
      line,
    ),
  ),
  fc.string({ unit: 'binary', maxLength: 200 }),
  fc.string({
    unit: fc.constantFrom('1', ' ', 'of', ':', ',', '%', 'a', '\n', '(', 'vs ', '/', '"'),
    maxLength: 300,
  }),
);

describe('any string', () => {
  it('gives a question that can be answered, help, or a diagnosis with a place inside the line, and never throws', () => {
    fc.assert(
      fc.property(hostile, (line) => {
        const reading = readLine(line, commandLineLimits);
        if (reading.kind === 'question') {
          reportOf(reading.question);
          return;
        }
        if (reading.kind === 'help') return;
        const { from, to } = reading.diagnosis.span;
        expect(from).toBeGreaterThanOrEqual(0);
        expect(to).toBeGreaterThanOrEqual(from);
        expect(to).toBeLessThanOrEqual(line.length);
      }),
      { numRuns: 12_000 },
    );
  });
});

describe('the tokens', () => {
  it.each([
    'M\u00fcller',
    '\u0395\u03bb\u03ad\u03bd\u03b7',
    '\ud83d\udeb2',
    'injured',
    'version',
    'office',
    'perhaps',
    'vsomething',
    'and/or'.slice(0, 3) + 'y',
  ])('%s is one word', (word) => {
    expect(fineTokensOf(word).map(({ tokenType }) => tokenType.name)).toEqual(['Word']);
  });

  it.each([
    ['versus', 'Versus'],
    ['vs', 'Versus'],
    ['vs.', 'Versus'],
    ['v', 'Versus'],
    ['v.', 'Versus'],
    ['against', 'Against'],
    ['compared with', 'Against'],
    ['compared to', 'Against'],
    ['than', 'Against'],
    ['of', 'Of'],
    ['out of', 'Of'],
    ['of the', 'Of'],
    ['of all', 'Of'],
    ['in', 'In'],
    ['per', 'Per'],
    ['per cent', 'Percent'],
    ['percent', 'Percent'],
    ['pc', 'Percent'],
    ['pct', 'Percent'],
    ['p.c.', 'Percent'],
    ['million', 'Magnitude'],
    ['billion', 'Magnitude'],
    ['thousand', 'Magnitude'],
    ['cases', 'Cases'],
    ['coverage', 'Coverage'],
    ['level', 'Level'],
    ['reference', 'Reference'],
    ['population', 'Population'],
    ['among', 'Among'],
    ['period', 'Period'],
    ['source', 'Source'],
    ['note', 'Note'],
    ['exact', 'Exact'],
    ['only me', 'OnlyMe'],
    ['says', 'Says'],
    ['fewer than', 'FewerThan'],
    ['from', 'From'],
    ['to', 'To'],
    ['and', 'And'],
    ['or', 'And'],
  ])('%s is lexed as itself', (spelling, name) => {
    expect(fineTokensOf(spelling).map(({ tokenType }) => tokenType.name)).toEqual([name]);
  });

  it('end with one that takes any character, so that nothing is ever an error', () => {
    expect(fineTokens.at(-1)?.name).toBe('Other');
  });
});

describe('the parser', () => {
  it('is LL(1): built with its own checks it reports no ambiguity and no fault', () => {
    const parser = new LineParser(false);
    expect(parser.getGAstProductions()).toBeDefined();
  });

  it('gives a place at the end of the line, where it has none of its own', () => {
    const reading = readLine('night 18 of', commandLineLimits);
    expect(reading).toMatchObject({
      kind: 'diagnosis',
      diagnosis: { id: 'total-missing', span: { from: 9, to: 11 } },
    });
  });
});

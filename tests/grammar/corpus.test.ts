import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { bare, questionFor as question, read } from '../support/question-for.ts';

const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';
const plain = '18 of 1,204 vs 9 of 2,377';
const helmets = 'cases: no helmet 44, helmet 31; coverage: no helmet 38%';

/** Typed line, canonical form: what a person means by it. */
const corpus: readonly (readonly [string, string])[] = [
  [shifts, shifts],
  ['night shift 18 of 1204 vs day shift 9 of 2377', shifts],
  ['night shift 18/1204 day shift 9/2377', shifts],
  ['night shift: 18/1,204, day shift: 9/2,377', shifts],
  [
    'NIGHT SHIFT: 18 of 1,204 VS day shift: 9 OUT OF 2,377',
    'NIGHT SHIFT: 18 of 1,204 vs day shift: 9 of 2,377',
  ],
  ['night shift: 18 of 1,204 against day shift: 9 of 2,377', shifts],
  ['night shift: 18 of 1,204 compared with day shift: 9 of 2,377', shifts],
  ['night shift 18 of 1,204 and day shift 9 of 2,377', shifts],
  ['night shift: 18 of 1,204; day shift: 9 of 2,377', shifts],
  ['night shift: 18 of 1,204 | day shift: 9 of 2,377', shifts],
  ['night shift: 18 of 1,204\nday shift: 9 of 2,377', shifts],
  ['- night shift: 18 of 1,204\n- day shift: 9 of 2,377', shifts],
  ['1. night shift: 18 of 1,204\n2. day shift: 9 of 2,377', shifts],
  ['"night shift": 18 of 1,204 vs \u201cday shift\u201d: 9 of 2,377', shifts],
  ['night shift - 18 of 1,204 vs day shift - 9 of 2,377', shifts],
  ['night shift \u2013 18 of 1,204 vs day shift \u2014 9 of 2,377', shifts],
  ['night shift: 18 of 1\u00a0204 vs day shift: 9 of 2\u2009377', shifts],
  ["night shift: 18 of 1'204 vs day shift: 9 of 2\u2019377", shifts],
  ['night shift: 18 of 1 204 vs day shift: 9 of 2 377', shifts],
  ['night shift: 18 of the 1,204 vs day shift: 9 of all 2,377', shifts],
  ['`night shift: 18 of 1,204 vs day shift: 9 of 2,377`', shifts],
  ['*night shift*: 18 of 1,204 vs _day shift_: 9 of 2,377', shifts],
  ['\uff4eight shift: \uff11\uff18 of 1,204 vs day shift: 9 of 2,377', shifts],
  ['night\u200b shift: 18 of 1,204 vs day shift: 9 of 2,377', shifts],
  ['night shift: 18 of 1,204\u00b9 vs day shift: 9 of 2,377\u2020', shifts],
  ['night shift: 18 of 1,204 / day shift: 9 of 2,377', shifts],
  ['18 of 1,204 vs 9 of 2,377', plain],
  ['18/1204 v 9/2377', plain],
  ['18/1204 v. 9/2377', plain],
  ['18 of 1204 versus 9 of 2377', plain],
  ['is 18/1204 vs 9/2377 significant?', plain],
  [
    '18 out of 1204 night staff and 9 out of 2377 day staff',
    'night staff: 18 of 1,204 vs day staff: 9 of 2,377',
  ],
  ['18 of 1204 staff vs 9 of 2377 staff', '18 of 1,204 staff vs 9 of 2,377 staff'],
  [
    '18 incidents out of 1,204 shifts vs 9 incidents out of 2,377 shifts',
    '18 incidents of 1,204 shifts vs 9 of 2,377 shifts',
  ],
  [
    'night: 18 incidents of 1,204 shifts vs day: 9 incidents of 2,377 shifts',
    'night: 18 incidents of 1,204 shifts vs day: 9 of 2,377 shifts',
  ],
  ['old release 12/84000 new release 31/91000', 'old release: 12 of 84,000 vs new release: 31 of 91,000'],
  ['out of hours 3 of 900 vs in hours 4 of 800', '"out of hours": 3 of 900 vs "in hours": 4 of 800'],
  [
    'per diem staff 3 of 900 vs regular staff 4 of 800',
    '"per diem staff": 3 of 900 vs regular staff: 4 of 800',
  ],
  ['from abroad 3 of 900 vs local 4 of 800', '"from abroad": 3 of 900 vs local: 4 of 800'],
  ['people in care 3 of 900 vs others 4 of 800', '"people in care": 3 of 900 vs others: 4 of 800'],
  ['route 14 200 of 5,200 vs route 15 100 of 5,000', '"route 14": 200 of 5,200 vs "route 15": 100 of 5,000'],
  ['18-29: 3 of 900 vs 30-39: 4 of 800', '"18-29": 3 of 900 vs "30-39": 4 of 800'],
  ['depot 4-7: 3 of 900 vs depot 8-9: 4 of 800', '"depot 4-7": 3 of 900 vs "depot 8-9": 4 of 800'],
  ['2023/24: 3 of 900 vs 2022/23: 4 of 800', '"2023/24": 3 of 900 vs "2022/23": 4 of 800'],
  ['under 40: 3 of 900 vs 40 and over: 4 of 800', '"under 40": 3 of 900 vs "40 and over": 4 of 800'],
  ['level 1: 3 of 900 vs level 2: 4 of 800', '"level 1": 3 of 900 vs "level 2": 4 of 800'],
  [
    'M\u00fcller: 3 of 900 vs \u0395\u03bb\u03ad\u03bd\u03b7: 4 of 800',
    'M\u00fcller: 3 of 900 vs \u0395\u03bb\u03ad\u03bd\u03b7: 4 of 800',
  ],
  ['recent 18 of 900 vs earlier 9 of 900', 'recent: 18 of 900 vs earlier: 9 of 900'],
  ['help: 3 of 900 vs no help: 4 of 800', '"help": 3 of 900 vs "no help": 4 of 800'],
  ['12k of 2.01m vs 9k of 1m', '12k of 2.01m vs 9k of 1m'],
  [
    '1.2 million of 3 million vs 2 thousand of 10 thousand',
    '1.2 million of 3 million vs 2 thousand of 10 thousand',
  ],
  ['1,20,400 of 2,40,000 vs 5 of 10', '120,400 of 240,000 vs 5 of 10'],
  ['1.5% of 1,204 vs 9 of 2,377', plain],
  ['harbour ferry: 31 of 9,240 (3.4%)', 'harbour ferry: 31 of 9,240 (3.4%)'],
  ['3.4% (31 of 9,240) vs 2.60% (20 of 8,000)', '31 of 9,240 (3.4%) vs 20 of 8,000 (2.60%)'],
  [
    'night: 18 of 1,204 shifts (1.5%) vs day: 9 of 2,377 shifts (0.4%)',
    'night: 18 of 1,204 (1.5%) shifts vs day: 9 of 2,377 (0.4%) shifts',
  ],
  ['north ward: <5 of 900 vs south ward: 31 of 1,100', 'north ward: <5 of 900 vs south ward: 31 of 1,100'],
  [
    'north ward: fewer than 5 of 900 vs south ward: 31 of 1,100',
    'north ward: <5 of 900 vs south ward: 31 of 1,100',
  ],
  ['north ward: &lt;5 of 900 vs south ward: 31 of 1,100', 'north ward: <5 of 900 vs south ward: 31 of 1,100'],
  ['18 in 900 people vs 9 in 800 people', '18 of 900 people vs 9 of 800 people'],
  [
    'early: 12 of 900, late: 30 of 1,100, night: 18 of 640; reference early',
    'early: 12 of 900 vs late: 30 of 1,100 vs night: 18 of 640; reference early',
  ],
  [
    `${shifts}; level 90%; per 1,000; among "registered riders, May"; source https://harrowmere.example/x; note "a b"; exact; only me`,
    `${shifts}; level 90%; per 1,000; among "registered riders, May"; source https://harrowmere.example/x; note a b; exact; only me`,
  ],
  [`${shifts} level 90% only me`, `${shifts}; level 90%; only me`],
  [`${shifts} per 1,000`, `${shifts}; per 1,000`],
  [`${shifts}\nperiod Jan to Jun`, `${shifts}; period Jan to Jun`],
  [helmets, helmets],
  [
    'cases: no helmet 44, helmet 31; coverage: helmet 62%',
    'cases: no helmet 44, helmet 31; coverage: helmet 62%',
  ],
  [
    'cases: no-helmet 44, Helmets 31; coverage: No Helmet 38%',
    'cases: no-helmet 44, Helmets 31; coverage: no-helmet 38%',
  ],
  ['no helmet 44, helmet 31; coverage no helmet 38%', helmets],
  ['Cases: 44 no helmet, 31 helmet\nCoverage: 38% no helmet', helmets],
  [
    'cases: no helmet 44, helmet 31; coverage: no helmet 38% of riders',
    'cases: no helmet 44, helmet 31; coverage: no helmet 38% of riders',
  ],
  ['no helmet: 44 of 75 injured, 38% of riders', 'no helmet: 44 of 75 injured, 38% of riders'],
  ['44 of 75 no helmet, coverage 38%', 'no helmet: 44 of 75 cases; coverage 38%'],
  ['no helmet: 58.7% of cases, 38% of riders', 'no helmet: 58.7% of cases, 38% of riders'],
  ['no helmet: 58.7% of cases, 38% of riders; of 75 cases', 'no helmet: 44 of 75 cases, 38% of riders'],
  [
    'cases: none 40, one course 12, two courses 23; coverage: none 30%, one course 15%, two courses 55%',
    'cases: none 40, "one course" 12, "two courses" 23; coverage: none 30%, "one course" 15%, "two courses" 55%',
  ],
  [`${helmets}; population 84,000`, `${helmets}; population 84,000`],
  ['cases: no helmet 44, helmet 31 coverage: no helmet 38%', helmets],
  ['cases: no helmet 44, helmet 31; coverage: no helmet about 38%', helmets],
  [`${shifts} reference night shift`, `${shifts}; reference night shift`],
  ['4.2% vs 2.6%', '4.2% vs 2.6%'],
  ['4.20% vs 2.6%', '4.20% vs 2.6%'],
  ['4.2 percent vs 2.6 per cent', '4.2% vs 2.6%'],
  ['4.2 pc v 2.6 pct', '4.2% vs 2.6%'],
  ['4.2 p.c. vs 2\u00b76%', '4.2% vs 2.6%'],
  ['night: 4.2% vs day: 2.6%', 'night: 4.2% vs day: 2.6%'],
  ['4.2% of night staff, 2.6% of day staff', 'night staff: 4.2% vs day staff: 2.6%'],
  ['5\u2030 vs 4\u2030', '5\u2030 vs 4\u2030'],
  ['10-12% vs 4%', '10-12% vs 4%'],
  ['1 in 250 vs 1 in 400', '1 in 250 vs 1 in 400'],
  ['1 in 4 vs 1 in 6', '1 in 4 vs 1 in 6'],
  ['one in four vs one in five', '1 in 4 vs 1 in 5'],
  ['3 per 1,000 vs 2 per 1,000', '3 per 1,000 vs 2 per 1,000'],
  ['3 in 1,000 vs 2 in 1,000', '3 in 1,000 vs 2 in 1,000'],
  ['night 18 vs day 9', 'night: 18 vs day: 9'],
  ['18 vs 9', '18 vs 9'],
  ['two doses 44, one dose 31', '"two doses": 44 vs "one dose": 31'],
];

describe('typed lines are read as a person means them', () => {
  it.each(corpus)('%j', (line, canonical) => {
    expect(printCanonical(question(line))).toBe(canonical);
  });

  it('and reading the canonical form again gives the same question', () => {
    for (const [line] of corpus) {
      const first = question(line);
      const again = question(printCanonical(first));
      expect(bare(again), line).toEqual(
        bare({ ...first, ...(first.kind === 'counts' || first.kind === 'shares' ? {} : {}) }),
      );
    }
  });
});

describe('one figure', () => {
  const spellings = [
    shifts,
    'night shift 18 of 1204 vs day shift 9 of 2377',
    '18 of 1,204 night shift vs 9 of 2,377 day shift',
    'night shift: 18/1204 vs day shift: 9/2377',
    'night shift: 18 out of 1,204 vs day shift: 9 out of 2,377',
    'night shift: 18 of 1,204, day shift: 9 of 2,377',
    'night shift: 18 of 1\u2009204 vs day shift: 9 of 2\u2009377',
    "night shift: 18 of 1'204 vs day shift: 9 of 2'377",
    'night shift \u2013 18 of 1,204 vs day shift \u2013 9 of 2,377',
    '\u2022 night shift: 18 of 1,204\n\u2022 day shift: 9 of 2,377',
    'night shift: 18 of 1,204\nday shift: 9 of 2,377',
    'night shift: 18 of 1,204 / day shift: 9 of 2,377',
    '\u201cnight shift\u201d 18 of 1,204 vs "day shift" 9 of 2,377',
  ];

  it(`in ${spellings.length} spellings gives one question`, () => {
    const first = bare(question(shifts));
    for (const line of spellings) expect(bare(question(line)), line).toEqual(first);
  });
});

describe('the rules that settle the language', () => {
  it('P1: two percentages of different nouns are asked about, never compared unasked', () => {
    const reading = read('71% of the injured vs 38% of riders');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe('two-readings');
    expect(reading.diagnosis.suggestions.map(({ label }) => label)).toEqual([
      'That is what I mean',
      'No, two separate groups',
    ]);
    const kinds = reading.diagnosis.suggestions.map(({ line }) => question(line).kind);
    expect(kinds).toEqual(['shares', 'stated']);
  });

  it('I2: a stated frequency has no counts', () => {
    expect(question('1 in 250 vs 1 in 400').kind).toBe('stated');
    expect(question('3 per 1,000 vs 2 per 1,000').kind).toBe('stated');
  });

  it('I9: a percentage of a total is the counts that round to it', () => {
    const read18 = question('1.5% of 1,204 vs 9 of 2,377');
    const read9 = question('18 of 1,204 vs 0.4% of 2,377');
    if (read18.kind !== 'counts' || read9.kind !== 'counts') throw new Error('these are counts');
    expect(read18.groups[0]?.cases).toMatchObject({ value: 18, low: 18, high: 18 });
    expect(read9.groups[1]?.cases).toMatchObject({ low: 9, high: 10 });
  });

  it('D1: the earlier of two groups ordered in time is the reference', () => {
    expect(question('before: 41 of 1,000 vs after: 52 of 1,100')).toMatchObject({ reference: 0 });
    expect(question('after: 52 of 1,100 vs before: 41 of 1,000')).toMatchObject({ reference: 1 });
    expect(question('2023: 3 of 900 vs 2022: 4 of 800')).toMatchObject({ reference: 1 });
  });

  it('Q3: rows chosen by outcome are known by their names', () => {
    for (const line of [
      '12 of 15 ill ate at the market, 40 of 100 well ate there',
      'cases: 44 of 75 vs controls: 100 of 400',
    ]) {
      expect(question(line)).toMatchObject({ kind: 'counts', chosenByOutcome: true });
    }
  });

  it('C8: a footnote mark is dropped with a remark, and 1,204 with one stays 1,204', () => {
    const marked = question('18 of 1,204\u00b9 vs 9 of 2,377');
    if (marked.kind !== 'counts') throw new Error('these are counts');
    expect(marked.groups[0]?.total.value).toBe(1204);
    expect(marked.remarks.map(({ id }) => id)).toContain('footnote-dropped');
  });

  it('E3: struck-out text is not read, and that is said', () => {
    const struck = question('~18~ 19 of 1,204 vs 9 of 2,377');
    if (struck.kind !== 'counts') throw new Error('these are counts');
    expect(struck.groups[0]?.cases.value).toBe(19);
    expect(struck.remarks.map(({ id }) => id)).toContain('struck-out-dropped');
  });

  it('roundings: 58.7% is 0.5865 to 0.5875, 1 in 250 is 1/250.5 to 1/249.5, 12k is 11,500 to 12,500, <5 is 0 to 4', () => {
    const stated = question('58.7% vs 1 in 250');
    if (stated.kind !== 'stated') throw new Error('stated');
    expect(stated.groups[0]?.share.low).toBeCloseTo(0.5865, 12);
    expect(stated.groups[0]?.share.high).toBeCloseTo(0.5875, 12);
    expect(stated.groups[1]?.share).toMatchObject({ low: 1 / 250.5, high: 1 / 249.5 });
    const counts = question('12k of 84k vs <5 of 900');
    if (counts.kind !== 'counts') throw new Error('counts');
    expect(counts.groups[0]?.cases).toMatchObject({ value: 12_000, low: 11_500, high: 12_500 });
    expect(counts.groups[1]?.cases).toMatchObject({ low: 0, high: 4, precision: 'range' });
  });

  it('suffixes move the decimal point: 2.01k is 2010 and no fraction of a person', () => {
    const read2010 = question('2.01k of 9k vs 1 of 9');
    if (read2010.kind !== 'counts') throw new Error('counts');
    expect(read2010.groups[0]?.cases.value).toBe(2010);
  });
});

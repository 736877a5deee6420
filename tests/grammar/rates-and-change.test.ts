import { describe, expect, it } from 'vitest';
import { conversion, unitKey } from '../../grammar/exposures.ts';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { bare, questionFor, read } from '../support/question-for.ts';

const depots = 'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days';
const quoted = '"depot A": 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days';

const rates: readonly (readonly [string, string])[] = [
  [depots, quoted],
  ['depot A 14 in 5200 bus-days depot B 9 in 8800 bus-days', quoted],
  ['depot A: 14 in 5,200 bus-days, depot B: 9 in 8,800', quoted],
  ['14 incidents in 5200 bus days vs 9 in 8800', '14 incidents in 5,200 bus days vs 9 in 8,800 bus days'],
  ['depot A 14/5200h depot B 9/8800h', '"depot A": 14 in 5,200 hours vs depot B: 9 in 8,800 hours'],
  ['night 14/5200 hours vs day 9/8800 hours', 'night: 14 in 5,200 hours vs day: 9 in 8,800 hours'],
  ['14 per 5,200 hours vs 9 per 8,800 hours', '14 per 5,200 hours vs 9 per 8,800 hours'],
  ['14 per 5,200 vs 9 per 8,800', '14 per 5,200 vs 9 per 8,800'],
  ['3 per 1,000 bus-days vs 2 per 1,000 bus-days', '3 per 1,000 bus-days vs 2 per 1,000 bus-days'],
  ['3 per 1,000 per year vs 2 per 1,000 per year', '3 per 1,000 per year vs 2 per 1,000 per year'],
  ['5 a week vs 3 a week', '5 per week vs 3 per week'],
  ['12 incidents per day vs 9 incidents per day', '12 incidents per day vs 9 per day'],
  [
    '3.4 per 100,000 person-years vs 2.1 per 100,000 person-years',
    '3.4 per 100,000 person-years vs 2.1 per 100,000 person-years',
  ],
  ['harbour: 14 in 5,200.5 km', 'harbour: 14 in 5,200.5 km'],
  ['<5 in 5,200 hours vs 9 in 8,800 hours', '<5 in 5,200 hours vs 9 in 8,800 hours'],
  ['18 in 1 day vs 9 in 1 day', '18 in 1 day vs 9 in 1 day'],
];

const changes: readonly (readonly [string, string])[] = [
  ['from 412 to 530', 'from 412 to 530'],
  ['delays from 412 to 530', 'delays from 412 to 530'],
  ['ferry delays went from 412 to 530', 'ferry delays from 412 to 530'],
  ['530, up from 412', 'from 412 to 530'],
  ['delays fell to 412, down from 530', 'delays from 530 to 412'],
  ['before 412 after 530', 'from 412 to 530'],
  ['before: 412 vs after: 530', 'from 412 to 530'],
  ['412 in 2023, 530 in 2024', '"2023": 412 vs "2024": 530'],
  ['412 delays in 2023 vs 530 delays in 2024', '"2023": 412 delays vs "2024": 530'],
  ['2023: 412 vs 2024: 530', '"2023": 412 vs "2024": 530'],
  ['412 last year 530 this year', 'last year: 412 vs this year: 530'],
  ['ferry delays 412 last year 530 this year', 'last year: 412 ferry delays vs this year: 530'],
  ['from 412 in 31 days to 530 in 28 days', 'from 412 in 31 days to 530 in 28 days'],
  ['412 in 31 days \u2192 530 in 28 days', 'from 412 in 31 days to 530 in 28 days'],
  ['from 4.4% to 5.2%', 'from 4.4% to 5.2%'],
  ['4.2% \u2192 8.1%', 'from 4.2% to 8.1%'],
  ['4.2% -> 8.1%', 'from 4.2% to 8.1%'],
  ['18 of 1,204\u21929 of 2,377', 'from 18 of 1,204 to 9 of 2,377'],
  ['from 41 of 1,000 to 52 of 1,100', 'from 41 of 1,000 to 52 of 1,100'],
  ['before: 41 of 1,000 vs after: 52 of 1,100', 'from 41 of 1,000 to 52 of 1,100'],
  ['3 in 1000 to 4 in 1000', 'from 3 in 1,000 to 4 in 1,000'],
  ['errors 31 of 91k, before 12 of 84k', 'errors: 31 of 91k vs before: 12 of 84k'],
];

describe('rates and changes are read as a person means them', () => {
  it.each([...rates, ...changes])('%j', (line, canonical) => {
    expect(printCanonical(questionFor(line))).toBe(canonical);
  });

  it('and reading the canonical form again gives the same question', () => {
    for (const [line] of [...rates, ...changes]) {
      const first = questionFor(line);
      expect(bare(questionFor(printCanonical(first))), line).toEqual(bare(first));
    }
  });

  it('every rate is of the kind rates, and every change is over time with the earlier as reference', () => {
    for (const [line] of rates) expect(questionFor(line).kind, line).toBe('rates');
    for (const [line] of changes) expect(questionFor(line).overTime, line).toBe(true);
    for (const line of ['530, up from 412', 'from 412 to 530', '2024: 530 vs 2023: 412']) {
      const question = questionFor(line);
      if (question.kind !== 'bare-counts') throw new Error(`${line} is ${question.kind}`);
      expect(question.groups[question.reference]?.cases.value, line).toBe(412);
    }
  });
});

describe('the rules of rates and changes', () => {
  it('I5 and I6: over a time after "in", and over a base that is not round, the two numbers are counts; over a round one they are as stated', () => {
    const stated = (line: string) => {
      const question = questionFor(line);
      return question.kind === 'rates' ? question.groups.map(({ asStated }) => asStated) : question.kind;
    };
    expect(stated('14 in 5,000 hours vs 9 in 8,800 hours')).toEqual([false, false]);
    expect(stated('14 per 5,200 hours vs 9 per 1,000 hours')).toEqual([false, true]);
    expect(stated('5 a week vs 3 a week')).toEqual([true, true]);
    expect(stated('3 per 1,000 vs 2 per 1,000')).toBe('stated');
  });

  it('a singular behind a total is part of the next name, not a unit', () => {
    expect(questionFor('night shift 18/1204 day shift 9/2377').kind).toBe('counts');
    expect(questionFor('night 14 in 5,200 crossings vs day 9 in 8,800 crossings').kind).toBe('counts');
  });

  it('units are one in any spelling, and different ones are refused with the conversion where there is one', () => {
    expect(unitKey('bus days')).toBe(unitKey('Bus-Days'));
    expect(unitKey('hrs')).toBe(unitKey('h'));
    expect(conversion('days', 'hours')).toBe(24);
    expect(conversion('bus-weeks', 'bus-days')).toBe(7);
    expect(conversion('months', 'days')).toBeNull();
    expect(conversion('bus-days', 'days')).toBeNull();
    const reading = read('14 in 5,200 hours vs 9 in 300 days');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.suggestions.map(({ line }) => line)).toEqual([
      '14 in 5,200 hours vs 9 in 7,200 hours',
    ]);
  });

  it('W6: one time behind every figure is kept as the period, two are refused with the rates that follow', () => {
    const same = questionFor('night: 18 of 1,204 shifts in 30 days vs day: 9 of 2,377 shifts in 30 days');
    expect(same).toMatchObject({ kind: 'counts', unit: 'shifts', clauses: { period: '30 days' } });
    const reading = read('18 of 1,204 in 30 days vs 9 of 2,377 in 90 days');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.suggestions.map(({ line }) => line)).toEqual([
      '18 in 36,120 person-days vs 9 in 213,930 person-days',
    ]);
  });

  it('W4: an arrow between named groups separates them and is no change', () => {
    expect(questionFor('night: 3 of 900 \u2192 day: 4 of 800')).toMatchObject({
      kind: 'counts',
      overTime: false,
    });
  });
});

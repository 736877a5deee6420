import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { bare, questionFor, read } from '../support/question-for.ts';

describe('a part and the whole that contains it', () => {
  it.each([
    [
      'harbour ward: 31 of 9,240 vs all: 210 of 88,000',
      'harbour ward: 31 of 9,240 vs the rest: 179 of 78,760',
    ],
    [
      'harbour ward 31/9240 v the whole town 210/88000',
      'harbour ward: 31 of 9,240 vs the rest: 179 of 78,760',
    ],
    ['night: 18 of 1,204; day: 9 of 2,377; total: 27 of 3,581', 'night: 18 of 1,204 vs day: 9 of 2,377'],
    [
      'night: 18 of 1,204; day: 9 of 2,377; all shifts: 30 of 4,000',
      'night: 18 of 1,204 vs day: 9 of 2,377 vs the rest: 3 of 419',
    ],
  ])('%j is read as %j', (line, canonical) => {
    const question = questionFor(line);
    expect(printCanonical(question)).toBe(canonical);
    expect(bare(questionFor(canonical))).toEqual(bare(question));
  });

  it('is said to have been taken apart, or left out where it is the sum', () => {
    const ids = (line: string) => questionFor(line).remarks.map(({ id }) => id);
    expect(ids('harbour ward: 31 of 9,240 vs all: 210 of 88,000')).toEqual(['whole-taken-apart']);
    expect(ids('night: 18 of 1,204; day: 9 of 2,377; total: 27 of 3,581')).toEqual(['total-left-out']);
  });

  it.each([
    ['harbour ward: 31 of 9,240 vs all: 21 of 88,000', 'whole-too-small'],
    ['harbour ward: 31 of 9,240 vs all: 210 of 9,000', 'whole-too-small'],
    ['harbour ward: <5 of 9,240 vs all: 210 of 88,000', 'whole-not-exact'],
  ])('%j is refused as %s', (line, id) => {
    expect(read(line)).toMatchObject({ kind: 'diagnosis', diagnosis: { id } });
  });
});

describe('design effect and whole registers', () => {
  it('are clauses that print and read back', () => {
    const line = 'night: 18 of 1,204 vs day: 9 of 2,377; design effect 1.8; counted: everyone';
    const question = questionFor(line);
    expect(question.clauses).toMatchObject({ designEffect: { value: 1.8, text: '1.8' }, everyone: true });
    expect(printCanonical(question)).toBe(line);
    expect(
      bare(questionFor('night: 18 of 1,204 vs day: 9 of 2,377; counted everyone; design effect: 1.8')),
    ).toEqual(bare(question));
  });

  it.each([
    ['18 of 1,204 vs 9 of 2,377; design effect 0.5', 'design-effect-range'],
    ['18 of 1,204 vs 9 of 2,377; design effect', 'clause-without-value'],
    ['1 of 5 vs 0 of 900; design effect 50', 'design-effect-too-large'],
    ['a: x 1 of 5 vs y 0 of 900 | b: x 1 of 50 vs y 0 of 900; design effect 50', 'design-effect-too-large'],
    ['cases: a 1, b 2; coverage: a 38%; population 60; design effect 50', 'design-effect-too-large'],
    ['18 of 1,204 vs 9 of 2,377; design effect 2; exact', 'exact-with-design-effect'],
    ['cases: no helmet 44, helmet 31; coverage: helmet 55-65%; design effect 2', 'design-effect-and-form'],
  ])('%j is refused as %s', (line, id) => {
    expect(read(line)).toMatchObject({ kind: 'diagnosis', diagnosis: { id } });
  });

  it('leave the words free for names', () => {
    expect(printCanonical(questionFor('design 3 of 900 vs counted 4 of 800'))).toBe(
      '"design": 3 of 900 vs "counted": 4 of 800',
    );
  });
});

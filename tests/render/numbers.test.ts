import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  amount,
  changePercent,
  count,
  fixed,
  percent,
  points,
  ratio,
  working,
} from '../../src/render/words/numbers.ts';

describe('numbers in full digits', () => {
  it('follow the rule of four as printed by Cole 2015 (BMJ 350:h1845): 22.68 (7.51 to 73.67) is 22.7 (7.5 to 74)', () => {
    expect([22.68, 7.51, 73.67].map((value) => ratio(value, 'full'))).toEqual(['22.7', '7.5', '74']);
  });

  it('have 3 decimals from 0.040 to 0.399, 2 from 0.40 to 3.99, 1 from 4.0 to 39.9 (Cole 2015)', () => {
    expect([0.0404, 0.3987, 0.404, 3.987, 4.04, 39.87].map((value) => amount(value, 'full'))).toEqual([
      '0.040',
      '0.399',
      '0.40',
      '3.99',
      '4.0',
      '39.9',
    ]);
  });

  it('are rounded before the step is chosen: 3.996 is 4.0, not 4.00', () => {
    expect(amount(3.996, 'full')).toBe('4.0');
  });
});

describe('numbers in sentences', () => {
  it('take one digit less than the rule of four', () => {
    expect([2.3158, 1.4683, 3.6524, 22.68].map((value) => ratio(value, 'short'))).toEqual([
      '2.3',
      '1.5',
      '3.7',
      '23',
    ]);
  });
});

describe('a limit beside "no difference"', () => {
  it('gets the digits that show its side', () => {
    expect(ratio(0.98, 'short')).toBe('0.98');
    expect(ratio(1.0042, 'full')).toBe('1.004');
    expect(points(0.0004, 'short')).toBe('0.04');
  });

  it('is said in words where three more digits do not show it', () => {
    expect(ratio(1.0000041, 'full')).toBe('just above 1');
    expect(ratio(0.9999999, 'short')).toBe('just below 1');
  });

  it('never reads as 1, nor on the other side of it, at any size', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-9, max: 1e9, noNaN: true }),
        fc.constantFrom('full', 'short'),
        (value, digits) => {
          fc.pre(value !== 1);
          const text = ratio(value, digits);
          if (text.startsWith('just')) return text.includes(value > 1 ? 'above' : 'below');
          const read = Number(text.replaceAll(',', ''));
          return read !== 1 && read > 1 === value > 1;
        },
      ),
    );
  });
});

describe('a relative change', () => {
  it('claims no digit that the ratio does not have: 2.3 times is 130% higher, not 132%', () => {
    expect(changePercent(2.3158, 'short')).toBe('130%');
    expect(changePercent(2.3158, 'full')).toBe('132%');
    expect(changePercent(0.43, 'full')).toBe('57%');
  });
});

describe('percentages', () => {
  it('have three significant digits, two in sentences', () => {
    expect([percent(44 / 75, 'full'), percent(44 / 75, 'short')]).toEqual(['58.7%', '59%']);
    expect([percent(18 / 1204, 'full'), percent(9 / 2377, 'short')]).toEqual(['1.50%', '0.38%']);
  });

  it('are 0% and 100% only where they are exact', () => {
    expect([percent(0, 'full'), percent(1, 'short')]).toEqual(['0%', '100%']);
    expect(percent(0.99996, 'short')).toBe('99.996%');
  });
});

describe('counts', () => {
  it('are grouped by commas and keep a typographic minus', () => {
    expect([count(1204), count(1_000_000_000), fixed(-1204.5, 1)]).toEqual([
      '1,204',
      '1,000,000,000',
      '\u22121,204.5',
    ]);
  });

  it('that are not whole are said to be about that', () => {
    expect(count(31_920.4)).toBe('about 31,920');
  });
});

describe('the working', () => {
  it('shows at least four decimals and five significant digits of the smallest number', () => {
    const long = (values: number[]) => values.map(working(values));
    expect(long([2.31578947368, 1.46830884089, 3.65242021098])).toEqual(['2.3158', '1.4683', '3.6524']);
    expect(long([0.0111638808795, 0.00486855273718, 0.0199591315724])).toEqual([
      '0.0111639',
      '0.0048686',
      '0.0199591',
    ]);
  });
});

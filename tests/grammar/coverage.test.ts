import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import type { Question, SharesQuestion } from '../../grammar/question.ts';
import { readLine } from '../../grammar/read-line.ts';
import { commandLineLimits } from '../../src/answer/answer-line.ts';
import { coverageCorpus } from './coverage-lines.ts';

function shares(line: string): SharesQuestion {
  const reading = readLine(line, commandLineLimits);
  if (reading.kind === 'question' && reading.question.kind === 'shares') return reading.question;
  throw new Error(`${line}: ${JSON.stringify(reading)}`);
}

/** A question without places and remarks, for comparing two spellings of one figure. */
const bare = (value: Question): unknown =>
  JSON.parse(
    JSON.stringify(value, (key, each: unknown) => (key === 'span' || key === 'remarks' ? undefined : each)),
  );

describe('coverage that is not one number, and cases of unknown group', () => {
  it.each(coverageCorpus)('%j', (line, canonical) => {
    const first = shares(line);
    expect(printCanonical(first)).toBe(canonical);
    expect(bare(shares(canonical))).toEqual(bare(first));
  });
});

describe('how a coverage is known', () => {
  const cases = 'cases: no helmet 44, helmet 31; coverage: ';
  const known = (coverage: string) => shares(`${cases}${coverage}`).groups.map((group) => group.known);

  it('a range has both ends, and the other group its mirror image', () => {
    expect(known('helmet 55-65%')).toEqual([
      { kind: 'range', low: { text: '35%', value: 0.35 }, high: { text: '45%', value: 0.45 } },
      { kind: 'range', low: { text: '55%', value: 0.55 }, high: { text: '65%', value: 0.65 } },
    ]);
    expect(shares(`${cases}helmet 55-65%`).groups[1]?.coverage).toMatchObject({
      value: 0.6,
      low: 0.55,
      high: 0.65,
    });
  });

  it('a sample keeps its two counts; so does a percentage that stands beside them', () => {
    const expected = [
      { kind: 'sample', inGroup: 190, sampled: 500 },
      { kind: 'sample', inGroup: 310, sampled: 500 },
    ];
    expect(known('helmet 310 of 500')).toEqual(expected);
    expect(known('helmet 62% (310 of 500)')).toEqual(expected);
  });

  it('an interval of its own keeps its level, or none', () => {
    expect(known('no helmet 38% (34 to 42)')[0]).toMatchObject({ kind: 'interval', level: null });
    expect(known('no helmet 38% (90% CI 34 to 42)')[0]).toMatchObject({ level: { text: '90%', value: 0.9 } });
  });

  it('growth keeps which end came first', () => {
    expect(known('helmet from 60% to 20%')[1]).toMatchObject({ start: { value: 0.6 }, end: { value: 0.2 } });
    expect(known('helmet from 60% to 20%')[0]).toMatchObject({ start: { value: 0.4 }, end: { value: 0.8 } });
  });

  it('by period has one share for sentences: its mean over all cases', () => {
    const { groups } = shares(
      'helmet: 31 of 75; coverage by month: 20%, 30%, 45%, 60%; cases by month: 30, 25, 12, 8',
    );
    expect(groups[0]?.coverage.value).toBeCloseTo((30 * 0.2 + 25 * 0.3 + 12 * 0.45 + 8 * 0.6) / 75, 14);
  });

  it('about 38% is 38%, taken as given, with a remark', () => {
    expect(known('no helmet about 38%')[0]).toEqual({ kind: 'given' });
    expect(shares(`${cases}no helmet about 38%`).remarks.map(({ id }) => id)).toEqual([
      'about-taken-as-given',
    ]);
  });
});

describe('the words of coverage elsewhere in a line', () => {
  it.each([
    ['from abroad: 3 of 900 vs local: 4 of 800', 'counts'],
    ['10-12% vs 4%', 'stated'],
    ['10-12% of night staff, 4% of day staff', 'stated'],
    ['unknown: 3 of 900 vs known: 4 of 800', 'counts'],
    ['unknown 18 vs known 9', 'bare-counts'],
    ['try again: 3 of 900 vs first try: 4 of 800', 'counts'],
  ])('%j is %s', (line, kind) => {
    const reading = readLine(line, commandLineLimits);
    expect(reading.kind === 'question' ? reading.question.kind : reading).toBe(kind);
  });
});

import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { questionFor, read } from '../support/question-for.ts';

const shifts = 'night: 18 of 1,204 vs day: 9 of 2,377';
const ages =
  'by age: "under 40": night: 3 of 900 vs day: 40 of 9,000 | "40 and over": night: 80 of 2,000 vs day: 6 of 100';

describe('a pasted table', () => {
  it.each([
    ['night\t18\t1,204\nday\t9\t2,377', shifts],
    ['shift\tincidents\tshifts\nnight\t18\t1204\nday\t9\t2377', shifts],
    ['night  18  1,204\nday  9  2,377', shifts],
    ['night   18   1 204\r\nday   9   2 377\r\n', shifts],
    ['| shift | cases | total |\n|---|---|---|\n| night | 18 | 1,204 |\n| day | 9 | 2,377 |', shifts],
    ['night\t18 of 1,204\nday\t9 of 2,377', shifts],
    ['night\t18\t1,204\nday\t9\t2,377\ntotal\t27\t3,581', shifts],
    ['night\t18\t1,204\nday\t9\t2,377\nlevel 90%', `${shifts}; level 90%`],
    ['18-29\t3\t900\n30-39\t4\t800', '"18-29": 3 of 900 vs "30-39": 4 of 800'],
    ['north\t<5\t900\nsouth\t31\t1,100', 'north: <5 of 900 vs south: 31 of 1,100'],
    [
      'age\tnight cases\tnight total\tday cases\tday total\nunder 40\t3\t900\t40\t9,000\n40 and over\t80\t2,000\t6\t100',
      ages,
    ],
    ['age  night  day\nunder 40  3/900  40/9,000\n40 and over  80/2,000  6/100', ages],
    [
      'age\tnight\tday\nunder 40\t3 of 900\t40 of 9,000\n40 and over\t80 of 2,000\t6 of 100\nall\t83 of 2,900\t46 of 9,100',
      ages,
    ],
    [
      'under 40\t3\t900\t40\t9,000\n40 and over\t80\t2,000\t6\t100',
      '"under 40": 3 of 900 vs 40 of 9,000 | "40 and over": 80 of 2,000 vs 6 of 100',
    ],
  ])('%j is the line that says the same', (line, canonical) => {
    expect(printCanonical(questionFor(line))).toBe(canonical);
  });

  it('says that it left out a row that is the sum of the others', () => {
    expect(questionFor('night\t18\t1,204\nday\t9\t2,377\ntotal\t27\t3,581').remarks).toMatchObject([
      { id: 'total-row-left-out', text: 'total' },
    ]);
  });

  it('whose total is not the sum is refused at that row, with the sums', () => {
    const line = 'night\t18\t1,204\nday\t9\t2,377\ntotal\t28\t3,581';
    const reading = read(line);
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe('total-not-sum');
    expect(line.slice(reading.diagnosis.span.from, reading.diagnosis.span.to)).toBe('total\t28\t3,581');
    expect(reading.diagnosis.message).toContain('27 and 3,581');
  });

  it('with a count above its total is asked whether the second column are those without, with both added up', () => {
    const reading = read('night\t18\t12\nday\t9\t2,377');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe('second-column');
    const [suggestion] = reading.diagnosis.suggestions;
    expect(printCanonical(questionFor(suggestion?.line ?? ''))).toBe('night: 18 of 30 vs day: 9 of 2,386');
  });

  it('keeps the places of what was typed', () => {
    const line = 'night\t18\t1,204\nday\t1.5\t2,377';
    const reading = read(line);
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(line.slice(reading.diagnosis.span.from, reading.diagnosis.span.to)).toBe('1.5');
  });

  it('with single spaces is asked about, with every row written out', () => {
    const reading = read('Night 18 1,204\nDay 9 2,377');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe('two-numbers');
    expect(reading.diagnosis.suggestions.map(({ line }) => line)).toEqual([
      'Night 18 of 1,204; Day 9 of 2,377',
    ]);
  });

  it('is not seen where lines merely hold wide gaps', () => {
    expect(questionFor('night:  18 of 1,204\nday:  9 of 2,377').kind).toBe('counts');
    expect(read('a b  c d\ne f  g h').kind).toBe('diagnosis');
  });
});

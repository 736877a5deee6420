import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { questionFor, read } from '../support/question-for.ts';

/** Lines that were once answered although they had been misread. */
describe('a line that is easily misread', () => {
  it.each([
    [
      '18 incidents from 1,204 shifts vs 9 incidents from 2,377 shifts',
      '18 incidents of 1,204 shifts vs 9 of 2,377 shifts',
    ],
    ['half of 80 vs a third of 90', '40 of 80 vs 30 of 90'],
    ['\u00bd of 80 vs 3 of 100', '40 of 80 vs 3 of 100'],
    ['half vs a third', '1 in 2 vs 1 in 3'],
    ['night 8:30: 3 of 900 vs night 9:30: 4 of 800', '"night 8:30": 3 of 900 vs "night 9:30": 4 of 800'],
    ['18 of 1,204 vs\n9 of 2,377', '18 of 1,204 vs 9 of 2,377'],
    ['18 of 1,204\nvs 9 of 2,377', '18 of 1,204 vs 9 of 2,377'],
    ['58.7% of cases, 38% of riders', '58.7% of cases, 38% of riders'],
    ['delays 4.2% \u2192 8.1%', 'from 4.2% to 8.1%'],
    ['ferry 412/1000 v bus 3/90', 'ferry: 412 of 1,000 vs bus: 3 of 90'],
  ])('%j is read as %j', (line, canonical) => {
    expect(printCanonical(questionFor(line))).toBe(canonical);
  });

  it.each([
    ['hundred of 900 vs 3 of 100', 'unread-name', 'hundred of 900 vs'],
    ['* of 900 vs 3 of 100', 'unread-name', 'of 900 vs'],
    ['18 of NaN', 'not-a-number', 'NaN'],
    ['slow 240 ms of 310 ms', 'measurement', 'ms'],
    ['3 of 900 vs 4 of 800; of 75 cases', 'clause-does-not-fit', 'of 75 cases'],
  ])('%j is refused as %s at %j', (line, id, place) => {
    const reading = read(line);
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe(id);
    expect(line.slice(reading.diagnosis.span.from, reading.diagnosis.span.to).trim()).toBe(place);
  });

  it('with points between the thousands is repaired in all its numbers at once', () => {
    const reading = read('a 18 of 1.204 vs b 9 of 2.377');
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.suggestions.map(({ line }) => line)).toEqual(['a 18 of 1,204 vs b 9 of 2,377']);
  });

  it('keeps such a name where it stands in quotation marks', () => {
    expect(printCanonical(questionFor('"half of": 3 of 900 vs "vs": 4 of 800'))).toBe(
      '"half of": 3 of 900 vs "vs": 4 of 800',
    );
  });
});

import { describe, expect, it } from 'vitest';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { readLine } from '../../grammar/read-line.ts';
import { slackLimits } from '../../src/answer/answer-line.ts';
import { bare, questionFor, read } from '../support/question-for.ts';

const ages =
  'by age: "under 40": night: 3 of 900 vs day: 40 of 9,000 | "40 and over": night: 80 of 2,000 vs day: 6 of 100';
const nameless = ages.replace('by age: ', '');
const lines =
  'by line: east: new bus: 4 in 1,200 days vs old bus: 9 in 2,000 days | west: new bus: 2 in 900 days vs old bus: 6 in 1,500 days';
const helmets =
  'by age: "under 40": no helmet: 12 of 32 cases, 30% of riders | "40 and over": no helmet: 32 of 43 cases, 45% of riders';

const corpus: readonly (readonly [string, string])[] = [
  [
    'by age: under 40: night 3 of 900 vs day 40 of 9,000 | 40 and over: night 80 of 2,000 vs day 6 of 100',
    ages,
  ],
  [
    'by age: under 40: night: 3 of 900 vs day: 40 of 9,000; 40 and over: night: 80 of 2,000 vs day: 6 of 100',
    ages,
  ],
  ['by age\nunder 40: night 3/900, day 40/9000\n40 and over: night 80/2000, day 6/100', ages],
  [
    'by age:\nunder 40: night: 3 of 900 vs day: 40 of 9,000\n40 and over: day: 6 of 100 vs night: 80 of 2,000',
    ages,
  ],
  ['under 40: night 3 of 900 vs day 40 of 9,000\n40 and over: night 80 of 2,000 vs day 6 of 100', nameless],
  [
    'night 3 of 900 vs day 40 of 9,000 | night 80 of 2,000 vs day 6 of 100',
    'night: 3 of 900 vs day: 40 of 9,000 | night: 80 of 2,000 vs day: 6 of 100',
  ],
  [
    'by age: 18-29: 3 of 900 vs 40 of 9,000 | 30-39: 80 of 2,000 vs 6 of 100',
    'by age: "18-29": 3 of 900 vs 40 of 9,000 | "30-39": 80 of 2,000 vs 6 of 100',
  ],
  [
    'by line: east: new bus 4 in 1,200 days vs old bus 9 in 2,000 days | west: new bus 2 in 900 days vs old bus 6 in 1,500 days',
    lines,
  ],
  [
    'by age: under 40: no helmet 12 of 32 cases, 30% of riders | 40 and over: no helmet 32 of 43 cases, 45% of riders',
    helmets,
  ],
  [
    'by age: under 40: no helmet 12 of 32 cases, 30% of riders\n40 and over: no helmet 32 of 43 cases, 45% of riders',
    helmets,
  ],
  [
    'by age: under 40: night 3 of 900 vs day 40 of 9,000',
    'night: 3 of 900 vs day: 40 of 9,000; among under 40',
  ],
  ['by bus: 3 of 900 vs by ferry: 4 of 800', 'by bus: 3 of 900 vs by ferry: 4 of 800'],
  ['x: 3 of 900 | y: 4 of 800', 'x: 3 of 900 vs y: 4 of 800'],
  [`${ages}; level 90%; exact`, `${ages}; level 90%; exact`],
];

describe('layers are read as a person means them', () => {
  it.each(corpus)('%j', (line, canonical) => {
    expect(printCanonical(questionFor(line))).toBe(canonical);
  });

  it('and reading the canonical form again gives the same question', () => {
    for (const [line] of corpus) {
      const first = questionFor(line);
      expect(bare(questionFor(printCanonical(first))), line).toEqual(bare(first));
    }
  });

  it('L2: parts of one group each are groups, parts of more are layers, and one layer alone is neither', () => {
    expect(questionFor('x: 3 of 900; y: 4 of 800').kind).toBe('counts');
    expect(questionFor('x 3 of 900, y 4 of 800; x 3 of 90, y 4 of 80').kind).toBe('strata');
    expect(questionFor('under 40: night 3 of 900 vs day 40 of 9,000')).toMatchObject({
      kind: 'counts',
      clauses: { among: 'under 40' },
    });
  });
});

describe('layers that cannot be put together', () => {
  const refused: readonly (readonly [string, string, string])[] = [
    ['a: night 3 of 900 vs day 40 of 9,000 | b: night 80 of 2,000', 'layer-of-one', 'b: night 80 of 2,000'],
    [
      'a: night 3 of 900 vs day 40 of 9,000 | b: night 80 of 2,000 vs noon 6 of 100',
      'layers-differ',
      'b: night 80 of 2,000 vs noon 6 of 100',
    ],
    [
      'a: night 3 of 900 vs day 40 of 9,000 | a: night 80 of 2,000 vs day 6 of 100',
      'same-layer-twice',
      'a: night 80 of 2,000 vs day 6 of 100',
    ],
    [
      'a: night 3 per 1,000 days vs day 4 per 1,000 days | b: night 8 per 1,000 days vs day 6 per 1,000 days',
      'layers-as-stated',
      'a: night 3 per 1,000 days vs day 4 per 1,000 days',
    ],
    [
      'a: night 3 of 900 vs day 40 of 9,000 | b: night 80 of 2 vs day 6 of 100',
      'more-cases-than-people',
      '80 of 2',
    ],
  ];

  it.each(refused)('%j is refused as %s at %j', (line, id, place) => {
    const reading = read(line);
    if (reading.kind !== 'diagnosis') throw new Error('it was answered');
    expect(reading.diagnosis.id).toBe(id);
    expect(line.slice(reading.diagnosis.span.from, reading.diagnosis.span.to).trim()).toBe(place);
  });

  it('are at most 24 in Slack', () => {
    const many = (count: number) =>
      Array.from({ length: count }, (_, at) => `"layer ${at}": 3 of 900 vs 4 of 800`).join(' | ');
    expect(readLine(many(24), slackLimits).kind).toBe('question');
    expect(readLine(many(25), slackLimits)).toMatchObject({ diagnosis: { id: 'too-many-layers' } });
  });
});

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fold } from '../../grammar/fold.ts';
import { printCanonical } from '../../grammar/print-canonical.ts';
import { readLine, readStrictly } from '../../grammar/read-line.ts';
import { figuresOf } from '../../grammar/sentence-figures.ts';
import { marksOf } from '../../grammar/sentence-marks.ts';
import { nodesOf } from '../../grammar/sentence-nodes.ts';
import { readSentence } from '../../grammar/sentence.ts';
import { commandLineLimits, slackLimits } from '../../src/answer/answer-line.ts';
import { questionFor, read } from '../support/question-for.ts';
import { incomplete, leftAlone, offered, results, withoutFigure } from './sentence-messages.ts';

const sentence = (message: string) => readSentence(message, (line) => readStrictly(line, commandLineLimits));
function refusal(line: string) {
  const reading = read(line);
  if (reading.kind === 'diagnosis') return reading.diagnosis;
  throw new Error(`${line} was read as ${reading.kind}`);
}
/** A sentence under test may be carried along behind the figure; here only the figure counts. */
const figureOf = (line: string) => line.replace(/; says .*$/, '');
const everyMessage = [
  ...[...offered, ...incomplete, ...results, ...leftAlone].map(([message]) => message),
  ...withoutFigure,
];

describe('a plain sentence', () => {
  it('is tried in at least sixty messages, twelve of them without a figure', () => {
    expect(new Set(everyMessage).size).toBeGreaterThanOrEqual(60);
    expect(withoutFigure.length).toBeGreaterThanOrEqual(12);
  });

  it.each(offered)('%j is offered as a question, and not answered', (message, line) => {
    const { id, message: told, suggestions } = refusal(message);
    expect(id).toBe('confirm');
    expect(figureOf(suggestions[0]?.line ?? '')).toBe(line);
    expect(suggestions[0]?.label).toBe('Yes');
    expect(told).toMatch(/^I found: .*\. Missing: .*\. Is this what you ask\?$/);
  });

  it.each(offered)('%j leads to a line that reads back as itself', (message) => {
    for (const { line } of refusal(message).suggestions) {
      const question = questionFor(line);
      expect(printCanonical(questionFor(printCanonical(question)))).toBe(printCanonical(question));
    }
  });

  it.each(incomplete)('%j lacks the %s', (message, missing, draft) => {
    expect(refusal(message)).toMatchObject({ id: 'incomplete', suggestions: [{ line: draft, label: null }] });
    expect(sentence(message).missing.map(({ id }) => id)).toEqual([missing]);
    expect(sentence(message).figures[0]?.question).toBeNull();
  });

  it.each(results)('%j is a result without its figures', (message, words) => {
    const { id, message: told, span } = refusal(message);
    expect(id).toBe('result-alone');
    expect(message.slice(span.from, span.to)).toBe(words);
    expect(told).toContain(`"${words}" is a result without its figures. Ask for: how many`);
  });

  it.each(withoutFigure)('%j has no figure', (message) => {
    expect(refusal(message).id).toBe('no-figure');
    expect(sentence(message)).toMatchObject({ figures: [], missing: [{ id: 'no-figure' }] });
  });

  it.each(leftAlone)('%j is read strictly as before', (line, canonical) => {
    expect(printCanonical(questionFor(line))).toBe(canonical);
  });

  it('asks which of two percentages of different things is meant, as a line does', () => {
    const { suggestions } = refusal('71% of the injured had no helmet, only 38% of riders go without');
    expect(suggestions.map(({ label }) => label)).toEqual(['Yes', 'No, two separate groups']);
  });

  it('offers no line that would ask something else once it is sent', () => {
    const message = '4.2% of night ferries were late against 2.6% of day ferries';
    const canonicalOf = (strict: typeof readStrictly) =>
      readSentence(message, (line) => strict(line, commandLineLimits)).figures[0]?.question?.canonical;
    const named = 'night ferries: 4.2% vs day ferries: 2.6%';
    expect(canonicalOf(readStrictly)).toBe(named);
    const forgetful: typeof readStrictly = (line, limits) => readStrictly(line === named ? '' : line, limits);
    expect(canonicalOf(forgetful)).toBe('4.2% vs 2.6%');
  });

  it('leaves the impossible refused, whatever the sentence around it', () => {
    expect(refusal('The night shift had 18 of 12 shifts go wrong').id).toBe('more-cases-than-people');
  });
});

describe('several figures', () => {
  const paragraph =
    '44 of the 75 injured cyclists in Harrowmere wore no helmet, while 38% of riders go without, the council said. Injuries rose from 61 to 75 over the year.';

  it('are numbered and chosen from', () => {
    const { id, message, suggestions } = refusal(paragraph);
    expect(id).toBe('confirm');
    expect(message).toMatch(
      /^I found 2 figures\. 1: 44 of 75 .* 2: from 61 to 75 .*Which one do you mean\?$/,
    );
    expect(suggestions.map(({ line }) => line)).toEqual([
      'no helmet: 44 of 75 injured cyclists, 38% of riders',
      'Injuries from 61 to 75',
    ]);
    expect(suggestions.map(({ label }) => label?.slice(0, 3))).toEqual(['1: ', '2: ']);
    expect(sentence(paragraph).missing).toMatchObject([{ id: 'which-figure' }]);
  });

  it('are counted beyond what is offered', () => {
    const many = Array.from({ length: 9 }, (_, index) => `Delays rose from ${index + 412} to 530.`).join(' ');
    expect(refusal(many).message).toMatch(/^I found 9 figures\./);
    expect(refusal(many).suggestions).toHaveLength(3);
  });

  it('say what they leave out', () => {
    const { message } = refusal('31 of 9,240 ferries were late in May. There is talk of 12% of the staff.');
    expect(message).toContain('Left out: 12% (of staff).');
  });
});

describe('found pieces', () => {
  it('are the words they came from, each with its role', () => {
    const message = 'Up 29%! 44 of the 75 people hurt wore no helmet, 38% of riders go without';
    const { found } = sentence(message);
    for (const { text, from, to } of found) expect(message.slice(from, to)).toBe(text);
    expect(found.map(({ text, role }) => [text, role])).toEqual([
      ['Up 29%', 'claim'],
      ['44', 'cases'],
      ['75', 'total'],
      ['38% of riders', 'coverage'],
    ]);
  });

  it.each([
    ['ferry delays went from 412 to 530', [['from 412 to 530', 'change']]],
    ['14 incidents in 5,200 bus-days', [['14 incidents in 5,200 bus-days', 'rate']]],
    ['18 incidents were reported', [['18', 'count']]],
    ['4.2% of night ferries were late', [['4.2% of night ferries', 'share']]],
  ])('of %j', (message, pieces) => {
    expect(sentence(message).found.map(({ text, role }) => [text, role])).toEqual(pieces);
  });

  it('have their places in what was typed, entities and links included', () => {
    const message =
      'Ada &amp; Ben: 44\u00a0of the 75 hurt wore no helmet, 38% of riders don\u2019t \ud83d\udeb2';
    const { found } = sentence(message);
    expect(found.map(({ from, to }) => message.slice(from, to))).toEqual(['44', '75', '38% of riders']);
  });

  it('hold nothing that was struck out', () => {
    const { found, figures } = sentence('~18~ 19 of the 1,204 sailings were late');
    expect(found.map(({ text }) => text)).toEqual(['19', '1,204']);
    expect(figures[0]?.question?.canonical).toMatch(/19 of 1,204/);
  });
});

describe('read "..."', () => {
  it('reads the message between the quotation marks, even one that could be read strictly, with places in the line', () => {
    const line = 'read "night 18 of 1,204 vs day 9 of 2,377"';
    const { id, span, suggestions } = refusal(line);
    expect(id).toBe('confirm');
    expect(line.slice(span.from, span.to)).toBe('18 of 1,204 vs day 9 of 2,377');
    expect(suggestions[0]?.line).toBe('night: 18 of 1,204 vs day: 9 of 2,377');
    expect(refusal('read "nothing here"').id).toBe('no-figure');
  });

  it('is a name where a colon follows', () => {
    expect(questionFor('read: 3 of 900 vs unread: 4 of 800').kind).toBe('counts');
  });

  it('is too long where the line is', () => {
    expect(refusal(`read "${'x'.repeat(4_000)}"`).id).toBe('too-long');
  });
});

const words = [
  '44',
  '75',
  '1,204',
  '38%',
  '29%',
  'of',
  'of the',
  'from',
  'to',
  'in',
  'per',
  'a third',
  'half',
  'one',
  'twice',
  'times',
  'more',
  'up',
  'by',
  'injured',
  'riders',
  'wore',
  'no helmet',
  'werent',
  'and',
  'vs',
  '2023',
  'hours',
  ',',
  '.',
  '(',
  ')',
  '\n',
  'RR',
  '2.3',
  '~9~',
  '\u201c',
  '\u2192',
  '&amp;',
  '\ud83d\udeb2',
  'million',
  'Of',
  'read "',
];
const messages = fc.oneof(
  fc.array(fc.constantFrom(...words), { maxLength: 60 }).map((each) => each.join(' ')),
  fc.string({ unit: 'binary', maxLength: 200 }),
  fc
    .tuple(fc.constantFrom(...everyMessage), fc.nat({ max: 120 }), fc.constantFrom(...words))
    .map(([message, at, word]) => `${message.slice(0, at)}${word}${message.slice(at)}`),
);

describe('any string', () => {
  it('gives found pieces inside the line, with the words that stand there', () => {
    fc.assert(
      fc.property(messages, (message) => {
        const { found, figures } = sentence(message);
        for (const { text, from, to } of found) {
          expect(0 <= from && from <= to && to <= message.length).toBe(true);
          expect(message.slice(from, to)).toBe(text);
        }
        for (const { question, span } of figures) {
          expect(span.to).toBeLessThanOrEqual(message.length);
          if (question !== null)
            expect(readStrictly(question.canonical, commandLineLimits).kind).toBe('question');
        }
      }),
      { numRuns: 4_000 },
    );
  });

  it('gives an offer with a place inside the line, and a first suggestion that is itself answered', () => {
    fc.assert(
      fc.property(messages, (message) => {
        const reading = readLine(message, slackLimits);
        if (reading.kind !== 'diagnosis') return;
        const { id, span, suggestions } = reading.diagnosis;
        expect(0 <= span.from && span.from <= span.to && span.to <= message.length).toBe(true);
        if (id === 'confirm') expect(readLine(suggestions[0]?.line ?? '', slackLimits).kind).toBe('question');
      }),
      { numRuns: 4_000 },
    );
  });
});

/** How often the words of a message are looked at while its figures are found. */
function looks(message: string): number {
  let count = 0;
  const counted = new Proxy(marksOf(fold(message)), {
    get: (marks, key, receiver): unknown => {
      if (typeof key === 'string' && /^\d+$/.test(key)) count += 1;
      return Reflect.get(marks, key, receiver);
    },
  });
  figuresOf(counted, nodesOf(counted));
  return count;
}

describe('the cost of a message', () => {
  it.each([
    ...offered.map(([message]) => `${message}. `),
    '44 of ',
    '1 ',
    'from ',
    'of the 75 injured, ',
    'up ',
    'helmet ',
    '38% of ',
    'most of the injured ',
    '(',
    'in 2023 ',
  ])('%j grows with its length: at 4,000 characters at most 3 times that of 400 for each', (piece) => {
    const of = (length: number) =>
      looks(piece.repeat(Math.ceil(length / piece.length)).slice(0, length)) / length;
    expect(of(4_000)).toBeLessThanOrEqual(3 * Math.max(of(400), 0.05));
  });

  it('asks the strict reader a bounded number of times', () => {
    let asked = 0;
    readSentence('Delays rose by 12% from 412 to 530. '.repeat(110), (line) => {
      asked += 1;
      return readStrictly(line, commandLineLimits);
    });
    expect(asked).toBeGreaterThan(0);
    expect(asked).toBeLessThan(100);
  });
});

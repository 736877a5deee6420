import { describe, expect, it } from 'vitest';
import { renderJson } from '../../src/render/render-json.ts';
import { renderText } from '../../src/render/render-text.ts';
import { fitsPost } from '../../src/render/words/posts.ts';
import { tell } from '../../src/render/words/tell.ts';
import { reportFor } from '../support/report-for.ts';

const words = (line: string) => tell(reportFor(line));
const stated = 'alarm: sensitivity 92%, specificity 97%, prevalence 0.4%';

/** Line, its first sentence. */
const headlines: readonly (readonly [string, string])[] = [
  [stated, 'Of 100 alarms about 11 are real (rounding allows 8 to 14; no interval without counts).'],
  [
    'sensitivity 46 of 50, specificity 194 of 200, prevalence 0.4%; level 90%',
    'Of 100 alarms about 11 are real (90% interval 6 to 19).',
  ],
  [
    'sensitivity 92%, specificity 97%, prevalence 0.2-1%',
    'Of 100 alarms about 5 to 27 are real, over all that the figures allow (no interval without counts).',
  ],
  [
    'sensitivity 46 of 50, specificity 194 of 200, prevalence 0.2-1%',
    'Of 100 alarms about 6 to 24 are real, over all that the figures allow (95% interval 3 to 40).',
  ],
  [
    'sensitivity 99%, specificity 99%, prevalence 1 in 25,000',
    'Of 1,000 alarms about 4 are real (rounding allows 3 to 8; no interval without counts).',
  ],
  [
    'sensitivity 100%, specificity 99.9%, prevalence 30%',
    'Of 10,000 alarms about 9,977 are real (rounding allows 9,964 to 9,989; no interval without counts).',
  ],
  ['tp 9 fp 0 fn 1 tn 90', 'Of 100 alarms all are real (95% interval 70 to 100).'],
  ['tp 0 fp 3 fn 10 tn 90', 'Of 100 alarms none is real (95% interval 0 to 56).'],
  ['tp 0 fp 0 fn 10 tn 90', 'With these figures there is never an alarm, so none can be real or false.'],
  ['tp 46 fp 30 fn 4 tn 920; exact', 'Of 100 alarms about 61 are real (95% interval 49 to 72).'],
];

describe('the first sentence about an alarm', () => {
  it.each(headlines)('%j: %s', (line, headline) => {
    expect(words(line).headline).toBe(headline);
    expect(headline.length).toBeLessThanOrEqual(110);
  });

  it('says "none" and "all" only where that is exact', () => {
    for (const line of headlines.map(([each]) => each)) {
      const estimate = reportFor(line).readings[0]?.estimate ?? null;
      expect(/ none is real| all are real/.test(words(line).headline), line).toBe(
        estimate === 0 || estimate === 1,
      );
    }
  });
});

describe('what may be posted about an alarm', () => {
  it('works the answer out on whole numbers that add up', () => {
    expect(words(stated).posts[0]?.text).toBe(
      'Of 10,000 checked, 40 are real cases and 37 of them raise an alarm; of the 9,960 others, 299 do too. So of 336 alarms 37 are real, about 11 in 100 (rounding allows 8 to 14; no interval without counts).',
    );
    expect(words('tp 46 fp 30 fn 4 tn 920').posts[0]?.text).toBe(
      'Of 1,000 checked, 50 were real cases and 46 of them raised an alarm; of the 950 others, 30 did too. So of 76 alarms 46 were real, about 61 in 100 (95% interval 49 to 71).',
    );
  });

  it('says none and all as such', () => {
    expect(words('sensitivity 92%, specificity 100%, prevalence 0.4% of wells').posts[0]?.text).toBe(
      'Of 10,000 wells, 40 are real cases and 37 of them raise an alarm; of the 9,960 others, none does. So all 37 alarms are real (rounding allows 39 to 100; no interval without counts).',
    );
    expect(words('tp 0 fp 1 fn 10 tn 90').posts[0]?.text).toMatch(
      /10 were real cases and none of them raised an alarm; of the 91 others, 1 did too\. So none of the 1 alarms was real/,
    );
  });

  it('says what silence hides, with the noun that was typed', () => {
    const silence = (line: string) =>
      words(line).posts.find(({ reading }) => reading === 'negative-predictive-value')?.text;
    expect(silence(stated)).toContain('of 10,000 quiet times about 3 hide a real case');
    expect(silence(`${stated} of wells`)).toContain(
      'of 10,000 wells without an alarm about 3 are real cases',
    );
    expect(silence('sensitivity 100%, specificity 97%, prevalence 0.4%')).toContain(
      'none hides a real case (rounding allows 0 to',
    );
  });

  it('uses who is counted as the divisor, where the line says it', () => {
    expect(words(`${stated}; among "wells of the harbour"`).posts[0]?.text).toMatch(
      /^Of 10,000 wells of the harbour, /,
    );
  });

  it('has no short form that would leave out what rounding allows of "all"', () => {
    expect(words('sensitivity 92%, specificity 100%, prevalence 0.4%').shortPost).toBeNull();
    expect(words(stated).shortPost).toBe('Of 100 alarms about 11 are real (no interval without counts).');
  });

  it('fits where 280 characters are the limit, and has no causal wording', () => {
    for (const [line] of headlines) {
      const { posts, cautions, avoid } = words(line);
      for (const { text } of posts) expect(fitsPost(text), text).toBe(true);
      for (const { text } of [...posts, ...cautions, ...avoid])
        expect(text).not.toMatch(/because of|causes?\b|leads? to|due to|thanks to/i);
    }
  });
});

describe('the cautions of an alarm', () => {
  it('show how the prevalence decides, in the spelling that was typed', () => {
    const first = (line: string) => words(line).cautions[0]?.text;
    expect(first(stated)).toBe(
      'The prevalence decides: at 4% instead of 0.4%, about 56 of 100 alarms would be real.',
    );
    expect(first('sensitivity 92%, specificity 97%, prevalence 1 in 250')).toContain(
      'at 1 in 25 instead of 1 in 250',
    );
    expect(first('tp 46 fp 30 fn 4 tn 920')).toContain('at 0.5% instead of 5%, about 13 of 100');
    expect(first('sensitivity 0%, specificity 97%, prevalence 0.4%')).not.toMatch(/about 0 of/);
  });
});

describe('an alarm in the other forms', () => {
  it('has its parts in JSON, with the counts behind them', () => {
    const line = 'water alarm: sensitivity 92% (46 of 50), false alarms 6 of 200, prevalence 1 in 250 wells';
    const json = JSON.parse(renderJson(line, reportFor(line))) as {
      question: Record<string, unknown>;
      groups: unknown[];
      stated: unknown[];
      readings: { id: string; of: string; against: string | null }[];
    };
    expect(json.question).toMatchObject({
      kind: 'alarm',
      name: 'water alarm',
      unit: 'wells',
      sensitivity: { share: 0.92, right: 46, all: 50 },
      specificity: { share: 0.97, wrong: 6, all: 200 },
      prevalence: { share: 0.004, range: { low: 1 / 250.5, high: 1 / 249.5 } },
    });
    expect(json.groups).toEqual([]);
    expect(json.stated).toMatchObject([{ text: '92%', of: 'sensitivity', computed: 0.92, agrees: true }]);
    expect(json.readings.map(({ id }) => id)).toEqual([
      'positive-predictive-value',
      'negative-predictive-value',
      'likelihood-ratio-positive',
      'likelihood-ratio-negative',
      'sensitivity',
      'specificity',
      'prevalence',
    ]);
    expect(json.readings[0]).toMatchObject({ of: 'water alarm', against: null });
  });

  it('holds a percentage beside counts against them, and says which words were left out', () => {
    const text = renderText(
      reportFor('sensitivity 46 of 50 (90%), specificity 97%, prevalence 0.4% in summer'),
      (plain) => plain,
    );
    expect(text).toContain('46 of 50 is 92%. The line has 90%.');
    expect(text).toContain('\u201csummer\u201d was left out.');
  });

  it('shows a formula with the typed numbers for every reading', () => {
    const formulas = (line: string) => words(line).rows.map(({ formula }) => formula);
    expect(formulas('sensitivity 46/50, false alarms 6/200, prevalence 1 in 250')).toEqual([
      '46/50 x 1/250 / (46/50 x 1/250 + 6/200 x (1 - 1/250))',
      '(1 - 6/200) x (1 - 1/250) / ((1 - 6/200) x (1 - 1/250) + (1 - 46/50) x 1/250)',
      '46/50 / (6/200)',
      '(1 - 46/50) / (1 - 6/200)',
      '46/50',
      '1 - 6/200',
      '1/250',
    ]);
    expect(formulas('tp 46 fp 30 fn 4 tn 920').slice(0, 3)).toEqual([
      '46 / (46 + 30)',
      '920 / (920 + 4)',
      '46/(46 + 4) / (30/(920 + 30))',
    ]);
    expect(formulas('sensitivity 92%, specificity 97%, prevalence 0.2-1%').at(-1)).toBe(
      'the middle of 0.2-1%',
    );
  });

  it('says of each reading where its range comes from', () => {
    const values = words('sensitivity 92%, specificity 97%, prevalence 0.2-1%').rows.map(
      ({ value }) => value,
    );
    expect(values[0]).toMatch(/at the middle of what is given, which allows 4\.98% to 27\.2%/);
    expect(values[2]).toMatch(/rounding alone allows 26\.1 to 37\.0/);
  });
});

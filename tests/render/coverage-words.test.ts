import { describe, expect, it } from 'vitest';
import { tell } from '../../src/render/words/tell.ts';
import { reportFor } from '../support/report-for.ts';

const cases = 'cases: no helmet 44, helmet 31; coverage: ';
const words = (line: string) => tell(reportFor(line));
const forms = ['35-41%', '190 of 500', '38% (34 to 42)', 'from 20% to 60%', 'about 38%'];

describe('words about a coverage', () => {
  it('say "taken as exact" of one number alone, and only where it was not "about"', () => {
    expect(words(`${cases}no helmet 38%`).cautions[1]?.text).toBe(
      '38% is taken as exact, for the same people, place and time.',
    );
    for (const form of forms) {
      const { cautions, rows } = words(`${cases}no helmet ${form}`);
      expect(cautions.map(({ text }) => text).join(' ')).not.toMatch(/exact/);
      if (form.startsWith('about')) continue;
      expect(rows.map(({ value }) => value).join(' ')).not.toMatch(/taken as exact/);
    }
  });

  it.each([
    ['35-41%', '35% to 41% of riders', ' and 35% to 41% of riders.'],
    ['190 of 500', '190 of a sample of 500 riders', ' and 190 of 500 riders sampled (38%).'],
    ['38% (34 to 42)', '38% of riders (34% to 42%)', ' and 38% of riders (interval 34% to 42%).'],
    ['from 20% to 60%', 'from 20% to 60% of riders', ', while its share of riders went from 20% to 60%.'],
  ])('%s stands as it was meant in the second line and in every sentence to post', (form, read, posted) => {
    const line = `${cases}no helmet ${form}${form.includes(' of ') ? ' riders' : ' of riders'}`;
    const { readAs, posts } = words(line);
    expect(readAs).toContain(read);
    expect(posts.length).toBeGreaterThan(0);
    for (const { text } of posts) expect(text).toContain(posted);
  });

  it('never leave an assumption out of a sentence to post that needs it', () => {
    for (const { reading, text } of words('cases: helmet 8, no helmet 67; coverage: helmet from 5% to 90%')
      .posts)
      if (reading !== 'case-share') expect(text).toContain('If the risk stayed the same meanwhile, that is');
    for (const { text } of words('cases: a 44, b 31, unknown 12; coverage: a 38%').posts)
      expect(text).toMatch(
        /Of 12 more the group is not known\. If those split like the others, that is .* however they split\)/,
      );
    for (const line of [
      'cases: helmet 8, no helmet 67; coverage: helmet from 5% to 90%',
      'cases: a 44, b 31, unknown 12; coverage: a 38%',
    ])
      expect(words(line).shortPost).toBeNull();
  });

  it('stay within a post\u2019s 280 characters', () => {
    for (const form of forms.slice(0, 4))
      for (const { text } of words(`${cases}no helmet ${form}`).posts)
        expect(text.length).toBeLessThanOrEqual(280);
  });
});

describe('unknown cases', () => {
  const line = (unknown: number) =>
    `cases: no helmet 44, helmet 31, unknown ${unknown}; coverage: no helmet 38%`;

  it('have the three numbers in one line: like the known, however they split, with chance', () => {
    expect(words(line(15)).sides[0]?.line).toBe(
      'Ratio: 2.3 if the 15 unknown split like the known; between 1.6 and 3.1 however they split; with chance 1.04 to 5.',
    );
  });

  it('take the first line over beyond a third of all cases', () => {
    // 37.5 would be a third of 112.5.
    expect(words(line(37)).headline).not.toMatch(/however/i);
    expect(words(line(38)).headline).toBe(
      '1.04 to 4 times, however the 38 unknown split: no difference is shown, nor that there is none.',
    );
  });

  it('do so with a difference shown, too', () => {
    expect(
      words('cases: no helmet 90, helmet 15, unknown 60; coverage: no helmet 38% of riders').headline,
    ).toBe(
      'However the 60 unknown split, \u201cno helmet\u201d had 2.0 to 16 times as many cases per rider as \u201chelmet\u201d.',
    );
  });
});

describe('one point more of coverage', () => {
  const sensitivity = (coverage: string) =>
    words(`${cases}${coverage}`).sides.find(({ topic }) => topic === 'sensitivity')?.line;

  it('is one line with the ratio at the coverage, a point less and a point more', () => {
    expect(sensitivity('no helmet 38%')).toBe(
      'Each point more coverage of \u201cno helmet\u201d lowers the ratio by about 4.2%: at 37%, 38% and 39% it is 2.42, 2.32 and 2.22.',
    );
    expect(sensitivity('helmet 62%')).toBe(
      'Each point more coverage of \u201chelmet\u201d raises the ratio by about 4.2%: at 61%, 62% and 63% it is 2.22, 2.32 and 2.42.',
    );
  });

  it('names no percentage where the curve bends too much for one', () => {
    expect(sensitivity('no helmet 98%')).toMatch(
      /^A point more .* lowers the ratio a great deal: at 97%, 98% and 99% it is /,
    );
  });
});

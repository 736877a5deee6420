import type { KnownBlock } from '@slack/types';
import { describe, expect, it } from 'vitest';
import { renderJson } from '../../src/render/render-json.ts';
import { renderText } from '../../src/render/render-text.ts';
import { partsBehind } from '../../src/render/slack/message.ts';
import type { SlackMessage } from '../../src/render/slack/message.ts';
import { renderPart, renderReply } from '../../src/render/slack/render-reply.ts';
import { renderRoot } from '../../src/render/slack/render-root.ts';
import { tell } from '../../src/render/words/tell.ts';
import { scenarios } from '../scenarios/scenarios.ts';
import { reportFor } from '../support/report-for.ts';

const context = { number: 214, askedBy: 'U0ADA', checkId: 'check-1' };

/** Everything a block shows, as one text. */
function shown(blocks: readonly KnownBlock[]): string {
  const texts: string[] = [];
  const walk = (node: unknown): void => {
    if (Array.isArray(node)) return node.forEach(walk);
    if (node === null || typeof node !== 'object') return;
    if ('text' in node && typeof node.text === 'string') texts.push(node.text);
    Object.values(node).forEach(walk);
  };
  walk(blocks.filter(({ type }) => type !== 'actions'));
  return texts.join(' ');
}

const numbersIn = (text: string) => text.match(/\d[\d,]*(?:\.\d+)?/g) ?? [];
const decoded = (text: string) =>
  text.replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&amp;', '&');

describe.each(Object.entries(scenarios))('%s: every renderer tells the same', (_, line) => {
  const report = reportFor(line);
  const words = tell(report);
  const text = renderText(report, (plain) => plain);
  const json = JSON.parse(renderJson(line, report)) as {
    answer: string;
    cautions: { text: string }[];
    post: { text: string }[];
    missing: { text: string }[];
    avoid: { text: string; because: string }[];
    limits: string;
    readings: { id: string; estimate: number | null }[];
    beside: { text: string; ratios: unknown[] }[];
    says: {
      text: string;
      agreesWith: string[];
      remarks: { id: string; text: string }[];
      instead: string;
    } | null;
  };
  const root = renderRoot(line, report, context);
  const reply = renderReply(report, context);
  const parts = Object.fromEntries(
    partsBehind.map((part) => [part, renderPart(line, report, part)]),
  ) as Record<(typeof partsBehind)[number], SlackMessage>;

  it('has the same headline everywhere', () => {
    expect(text.split('\n')[0]).toBe(words.headline);
    expect(json.answer).toBe(words.headline);
    expect(decoded(root.text)).toContain(words.headline);
    expect(decoded(reply.text).split('\n')[0]).toBe(words.headline);
    expect(shown(root.blocks)).toContain(words.headline);
    expect(shown(reply.blocks)).toContain(words.headline);
  });

  it('shows every caution, post, question and every sentence to avoid in text, in JSON and in Slack', () => {
    const everywhere = [
      ...words.cautions.map((caution) => caution.text),
      ...words.posts.map((post) => post.text),
      ...words.missing.map((question) => question.text),
    ];
    const slack = shown([...reply.blocks, ...Object.values(parts).flatMap((part) => part.blocks)]);
    for (const sentence of everywhere) {
      expect(text).toContain(sentence);
      expect(slack).toContain(sentence);
    }
    expect(json.cautions.map((caution) => caution.text)).toEqual(
      words.cautions.map((caution) => caution.text),
    );
    expect(json.post.map((post) => post.text)).toEqual(words.posts.map((post) => post.text));
    expect(json.missing.map((question) => question.text)).toEqual(
      words.missing.map((question) => question.text),
    );
    for (const { because, text: sentence } of words.avoid) {
      expect(text).toContain(because);
      expect(slack).toContain(because);
      expect(json.avoid.map((avoid) => avoid.text)).toContain(sentence);
    }
  });

  it('shows every reading, with the same digits in text and in Slack', () => {
    const readings = shown(parts.readings.blocks);
    const working = shown(parts.working.blocks);
    for (const { name, value, long } of words.rows) {
      expect(text).toContain(`${name}: ${value}`);
      expect(readings).toContain(`${name}: ${value}`);
      expect(working).toContain(long);
    }
    expect(json.readings).toHaveLength(words.rows.length);
  });

  it('shows what stands side by side in text, in JSON and in Slack, with the same digits', () => {
    const readings = shown(parts.readings.blocks);
    const working = shown(parts.working.blocks);
    for (const { line: sentence, table: rows, working: how } of words.sides) {
      expect(text).toContain(sentence);
      expect(`${readings} ${shown(reply.blocks)}`).toContain(sentence);
      expect(text).toContain(how);
      expect(working).toContain(how);
      for (const row of rows ?? []) for (const cell of row) expect(text).toContain(cell);
      for (const row of rows?.slice(1) ?? []) for (const cell of row) expect(readings).toContain(cell);
    }
    expect(json.beside.map((beside) => beside.text)).toEqual(words.sides.map((side) => side.line));
  });

  it('says the same of the sentence under test in text, in JSON and in Slack', () => {
    const { says } = words;
    if (says === null) return void expect(json.says).toBeNull();
    const { text: sentence, agreesWith, remarks, instead } = says;
    expect(json.says).toMatchObject({ text: sentence, agreesWith, remarks, instead });
    const slack = shown([...reply.blocks, ...parts.readings.blocks]);
    for (const each of [...remarks.map((remark) => remark.text), ...(instead === null ? [] : [instead])]) {
      expect(text).toContain(each);
      expect(slack).toContain(each);
    }
    expect(text).toContain(says.line);
    expect(shown(reply.blocks)).toContain(says.line.replace(/^[A-Z]\w+ (?:\w+ )?it /, ''));
  });

  it('says in the text of every message each number that its blocks show', () => {
    for (const message of [root, reply, ...Object.values(parts)]) {
      const spoken = numbersIn(decoded(message.text));
      for (const number of numbersIn(shown(message.blocks))) expect(spoken).toContain(number);
    }
  });

  it('keeps the limits of the platform', () => {
    for (const message of [root, reply, ...Object.values(parts)]) {
      expect(message.text.length).toBeGreaterThan(0);
      expect(message.text.length).toBeLessThan(4_000);
      expect(message.blocks.length).toBeLessThanOrEqual(50);
      const ids = message.blocks.flatMap((block) => block.block_id ?? []);
      expect(new Set(ids).size).toBe(ids.length);
      for (const block of message.blocks) {
        if (block.type !== 'actions') continue;
        for (const element of block.elements) {
          if (element.type !== 'button') throw new Error('only buttons are expected');
          expect(element.text.text.length).toBeLessThanOrEqual(75);
          expect(element.accessibility_label?.length ?? 0).toBeLessThanOrEqual(75);
          // Somebody who speaks to the screen says the words that stand on the button (WCAG 2.5.3).
          expect(element.accessibility_label).toContain(element.text.text);
        }
      }
    }
  });

  it('fits a phone: at most 750 characters before the buttons, the first line within 110', () => {
    expect(shown(reply.blocks).length).toBeLessThanOrEqual(750);
    expect(words.headline.length).toBeLessThanOrEqual(110);
  });

  it('has one or two cautions and ends with what it is not', () => {
    expect(words.cautions.length).toBeGreaterThanOrEqual(1);
    expect(words.cautions.length).toBeLessThanOrEqual(2);
    expect(text.trimEnd().endsWith(words.limits)).toBe(true);
    expect(reply.text).toContain(words.limits);
    expect(json.limits).toBe(words.limits);
  });

  it('holds no infinity, no NaN, no undefined, no exclamation mark and no claim of truth', () => {
    for (const output of [
      text,
      JSON.stringify(json),
      root.text,
      reply.text,
      ...Object.values(parts).map((part) => part.text),
    ]) {
      expect(output).not.toMatch(/NaN|Infinity|undefined |!|\bverified\b|\btrue\b.*claim/);
    }
  });

  it('claims a difference in no sentence to post where the interval includes none', () => {
    if (!/do not show a difference/.test(words.headline)) return;
    for (const post of words.posts) expect(post.text).toMatch(/do not show a difference/);
  });
});

describe('a sentence under test', () => {
  const sentences = [
    'Riders without a helmet were 1.42 times as likely to be injured as the others were in May',
    '295% higher',
    '2.3 (95% CI 1.2 to 4.4)',
    'no difference',
    '7 times more',
  ];
  it.each(Object.values(scenarios).filter((line) => !/ says |alarm/.test(line)))(
    'leaves the answer to %j within what a phone shows, and nothing lost',
    (line) => {
      for (const sentence of sentences) {
        const report = reportFor(`${line}${line.includes('\t') ? '\n' : '; '}says "${sentence}"`);
        const reply = renderReply(report, context);
        expect(shown(reply.blocks).length, sentence).toBeLessThanOrEqual(750);
        const slack = shown([...reply.blocks, ...renderPart(line, report, 'readings').blocks]);
        const { cautions, says, sides } = tell(report);
        for (const { text } of [...cautions, ...(says?.remarks ?? [])]) expect(slack).toContain(text);
        for (const side of sides) expect(slack).toContain(side.line);
      }
    },
  );
});

describe('typed text in messages', () => {
  it('is escaped in the text and literal in the blocks, so that nothing in it is active', () => {
    const line = '"<!channel> & co": 18 of 1,204 vs "<https://a.example|b>": 9 of 2,377';
    const report = reportFor(line);
    for (const message of [renderRoot(line, report, context), renderReply(report, context)]) {
      expect(message.text.replaceAll('<@U0ADA>', '')).not.toMatch(/[<>]|&(?!amp;|lt;|gt;)/);
      expect(JSON.stringify(message.blocks)).not.toMatch(/"mrkdwn"/);
    }
  });
});

import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readLine } from '../../grammar/read-line.ts';
import { tagTypes } from '../../grammar/tags.ts';
import { commandLineLimits, slackLimits } from '../../src/answer/answer-line.ts';
import { linesToTry } from '../../src/practice/workspace.ts';
import { helpTopics } from '../../src/render/words/help.ts';
import packageFile from '../../package.json' with { type: 'json' };

const at = (path: string) => new URL(`../../${path}`, import.meta.url);
const read = (path: string) => readFileSync(at(path), 'utf8');
const blocks = (text: string, kind: string) =>
  [...text.matchAll(new RegExp(`\`\`\`${kind}\n([\\s\\S]*?)\`\`\``, 'g'))].flatMap(([, lines = '']) =>
    lines.trimEnd().split('\n'),
  );
const section = (text: string, heading: string) =>
  text.split(/^## /m).find((each) => each.startsWith(`${heading}\n`)) ?? '';
/** The kind of question, or the id of the diagnosis. */
const kindOf = (line: string) => {
  const reading = readLine(line, commandLineLimits);
  if (reading.kind === 'question') return reading.question.kind;
  return reading.kind === 'diagnosis' ? reading.diagnosis.id : reading.kind;
};
const readAs = (line: string) => readLine(line, commandLineLimits).kind;

describe('grammar/GRAMMAR.md', () => {
  const text = read('grammar/GRAMMAR.md');

  it.each(blocks(text, 'divisor'))('%j is read', (line) => expect(readAs(line)).toBe('question'));
  it.each([
    ['Counts', 'counts'],
    ['Shares', 'shares'],
    ['Coverage that is not one number', 'shares'],
    ['Cases of unknown group', 'shares'],
    ['Stated percentages and frequencies', 'stated'],
    ['Bare counts', 'bare-counts'],
    ['Alarms', 'alarm'],
    ['Clauses', 'counts'],
    ['Names', 'counts'],
  ])('every example under %s is read as %s', (heading, kind) => {
    const lines = blocks(section(text, heading), 'divisor');
    expect(lines).not.toEqual([]);
    expect(lines.map((line) => [line, kindOf(line)])).toEqual(lines.map((line) => [line, kind]));
  });
  it.each(blocks(text, 'refused'))('%j is refused or asked about', (line) =>
    expect(readAs(line)).toBe('diagnosis'),
  );

  const sentences = blocks(text, 'sentence');
  it.each(sentences.flatMap((line, index) => (line.startsWith('=> ') ? [] : [[line, sentences[index + 1]]])))(
    '%j is offered as %j',
    (line, offered) => {
      const reading = readLine(line ?? '', commandLineLimits);
      if (reading.kind !== 'diagnosis') throw new Error(`it is ${reading.kind}`);
      const [first] = reading.diagnosis.suggestions;
      expect(`=> ${first?.line.replace(/; says .*$/, '')}`).toBe(offered);
      expect(reading.diagnosis.id).toBe(first?.line.includes('...') === true ? 'incomplete' : 'confirm');
    },
  );

  it('states the limits that run', () => {
    const words = (most: number) => most.toLocaleString('en');
    expect(text).toContain(
      `at most ${words(commandLineLimits.characters)} characters (${words(slackLimits.characters)} in Slack) and ${String(commandLineLimits.groups)} groups`,
    );
  });

  it('has the table of the tags that run', () => {
    const rows = tagTypes.map(({ name, LABEL }) => `| ${name} | ${LABEL ?? ''} |`);
    expect(text.slice(text.indexOf('| tag | stands for |'))).toBe(
      `| tag | stands for |\n| --- | --- |\n${rows.join('\n')}\n`,
    );
  });
});

describe('README.md', () => {
  const lines = blocks(read('README.md'), 'divisor');
  const asked = '71% of the injured vs 38% of riders';

  it.each(lines.filter((line) => line !== asked))('%j is read', (line) =>
    expect(readAs(line)).toBe('question'),
  );
  it('is asked about where it says so', () => {
    expect(lines).toContain(asked);
    expect(readAs(asked)).toBe('diagnosis');
  });
});

describe('the help', () => {
  it.each(Object.values(helpTopics).flatMap(({ examples }) => examples))('%j is read', (line) =>
    expect(readAs(line)).toBe('question'),
  );
  it('is found under each of its topics', () => {
    for (const topic of Object.keys(helpTopics)) {
      expect(readLine(topic === 'overview' ? 'help' : `help ${topic}`, commandLineLimits)).toEqual({
        kind: 'help',
        topic,
      });
    }
  });
});

describe('the practice room', () => {
  it('offers lines that lead somewhere: answers first, then a question back and a diagnosis', () => {
    const kinds = linesToTry.map(readAs);
    expect(kinds.slice(0, 2)).toEqual(['question', 'question']);
    expect(kinds.filter((kind) => kind === 'diagnosis').length).toBeGreaterThanOrEqual(2);
  });
});

describe('every document', () => {
  it.each(['README.md', 'DEVELOPERS.md', 'deploy/RUNBOOK.md', 'grammar/GRAMMAR.md'])(
    '%s names only files and scripts that exist',
    (document) => {
      const text = read(document);
      const paths = [...text.matchAll(/`((?:src|grammar|tests|deploy)\/[\w./-]*[\w/])`/g)].map(
        ([, path = '']) => path,
      );
      const linked = [...text.matchAll(/\]\((?!https?:)([^)#]+)\)/g)].map(([, path = '']) => path);
      for (const path of [...paths, ...linked]) expect(existsSync(at(path)), path).toBe(true);
      for (const [, script = ''] of text.matchAll(/npm run ([a-z]+)/g))
        expect(Object.keys(packageFile.scripts)).toContain(script);
    },
  );
});

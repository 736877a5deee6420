import { avoidLine } from './words/avoid.ts';
import type { Diagnosis } from '../../grammar/question.ts';
import { placeExcerpt } from '../../grammar/place-excerpt.ts';
import type { Report } from '../report/report.ts';
import { fitsPost } from './words/posts.ts';
import { tell } from './words/tell.ts';
import type { SaysTold, Telling } from './words/telling.ts';

/** How headings are set off: bold on a terminal, plain elsewhere. */
export type Emphasis = (text: string) => string;

/** The answer as text for a terminal or a file, with everything that stands behind buttons elsewhere. */
export function renderText(report: Report, strong: Emphasis): string {
  const words = tell(report);
  return [
    strong(words.headline),
    words.readAs,
    ...words.remarks,
    '',
    ...saysSection(words, strong),
    ...section('To post', [...words.posts.map(postLine), ...shortLine(words)], strong),
    ...section(
      'Careful',
      words.cautions.map(({ text }) => text),
      strong,
    ),
    ...section(
      'Questions to send',
      words.missing.map(({ text }) => text),
      strong,
    ),
    ...section('Better not', words.avoid.map(avoidLine), strong),
    ...(words.table === null ? [] : [strong('Table'), ...columns(words.table), '']),
    ...words.sides.flatMap(({ title, line, table }) =>
      table === null ? [] : [strong(title), `  ${line}`, ...columns(table), ''],
    ),
    strong('All readings'),
    ...words.rows.map(({ name, value }) => `  ${name}: ${value}`),
    ...words.sides.flatMap(({ line, table }) => (table === null ? [`  ${line}`] : [])),
    '',
    strong('Working'),
    ...[...words.rows.map(workingLine), ...words.sides.map(sideWorking)].map((line) => `  ${line}`),
    '',
    words.limits,
  ].join('\n');
}

/** The sentence under test, what it agrees with, and what would be right instead. */
function saysSection({ says }: Telling, strong: Emphasis): string[] {
  if (says === null) return [];
  const lines = [says.line, ...says.remarks.map(({ text }) => text), ...insteadLine(says)];
  return section(`The line says: ${says.text}`, lines, strong);
}

/** The sentence that would be right, where there is one. */
export const insteadLine = ({ instead }: SaysTold): string[] =>
  instead === null ? [] : [`Instead: ${instead}`];

/** One line of the working: "Risk ratio, night shift against day shift: 18/1,204 / (9/2,377) = 3.9485 (1.8145 to 8.5923). Miettinen-Nurminen score (1985)." */
export function workingLine({ name, formula, long, method }: Telling['rows'][number]): string {
  return `${name}: ${formula} = ${long}.${method === '' ? '' : ` ${method}.`}`;
}

/** The working of what stands side by side. */
export const sideWorking = ({ title, working }: Telling['sides'][number]) => `${title}: ${working}`;

/** A sentence to post; one that does not fit 280 characters says so. */
export const postLine = ({ text }: { readonly text: string }) =>
  fitsPost(text) ? text : `${text} (longer than 280 characters: the names would have to be shortened)`;

/** The sentence of at most 70 characters, where there is one. */
export const shortLine = ({ shortPost }: Telling): string[] =>
  shortPost === null ? [] : [`Short: ${shortPost}`];

function section(title: string, lines: readonly string[], strong: Emphasis): string[] {
  return lines.length === 0 ? [] : [strong(title), ...lines.map((line) => `  ${line}`), ''];
}

function columns(table: readonly (readonly string[])[]): string[] {
  const widths = (table[0] ?? []).map((_, column) =>
    Math.max(...table.map((row) => row[column]?.length ?? 0)),
  );
  return table.map((row) =>
    `  ${row.map((cell, column) => cell.padEnd(widths[column] ?? 0)).join('  ')}`.trimEnd(),
  );
}

/** A refusal as text: what is wrong, where, and what would work. */
export function renderRefusalText(line: string, { message, span, suggestions }: Diagnosis): string {
  const excerpt = placeExcerpt(line, span);
  return [
    message,
    ...(line.length === 0 ? [] : [`  ${excerpt.line}`, `  ${excerpt.marker}`]),
    ...suggestions.map(
      ({ line: suggestion, label }) => `Try: ${suggestion}${label === null ? '' : `   (${label})`}`,
    ),
  ].join('\n');
}

import type { IToken } from 'chevrotain';
import { unquoted } from './clauses.ts';
import { joined, joinCoverageForms, plainShare } from './coverage-forms.ts';
import { diagnosis } from './diagnosis.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import { periodsFromTable } from './period-table.ts';
import type { Diagnosis, Span } from './question.ts';
import * as token from './tokens.ts';
import type { WrittenPeriod } from './written-coverage.ts';

/** The tokens of a line with every coverage that is not one number joined, or the first thing in them that cannot be. */
export interface JoinedCoverage {
  readonly tokens: readonly IToken[];
  readonly fault: Diagnosis | null;
}

type Tokens = readonly IToken[];

/** A stretch between two breaks, with the break in front of it. */
interface Stretch {
  readonly before: IToken | null;
  readonly tokens: Tokens;
}

const breaks: ReadonlySet<unknown> = new Set([token.Newline, token.Semicolon, token.Bar]);
const example = 'coverage by month: Jan 20%, Feb 30%; cases by month: 30, 25';

/**
 * Joins coverage by period with the cases by period: `coverage by month: Jan 20%, Feb 30%; cases by month: 30, 25` becomes one
 * coverage, and the cases by period are taken out of the line. Then joins the other coverages that are not one number.
 */
export function joinCoverages(typedTokens: Tokens, folded: Folded): JoinedCoverage {
  const named = questionMarkNames(typedTokens);
  const tokens = periodsFromTable(named) ?? named;
  const stretches = stretchesOf(tokens);
  const coverageAt = stretches.findIndex(({ tokens: each }) => byAt(each, token.CoverageWord) !== -1);
  const casesAt = stretches.findIndex(({ tokens: each }) => byAt(each, token.CasesWord) === 1);
  const [coverage, cases] = [stretches[coverageAt], stretches[casesAt]];
  const refuse = (id: Parameters<typeof diagnosis>[0], at: Tokens, pieces: string[], lines: string[]) => ({
    tokens,
    fault: diagnosis(id, spanOf(at, folded), pieces, lines),
  });
  if (coverage === undefined && cases === undefined)
    return { tokens: joinCoverageForms(tokens), fault: null };
  const typed = folded.typed.trim();
  if (cases === undefined && coverage !== undefined) {
    const by = coverage.tokens[byAt(coverage.tokens, token.CoverageWord) + 1]?.image ?? 'month';
    const line = `${typed}; cases by ${by}: ...`;
    return refuse('periods-without-cases', coverage.tokens, [by], [line]);
  }
  if (coverage === undefined || cases === undefined) {
    const by = cases?.tokens[2]?.image ?? 'month';
    return refuse(
      'periods-without-coverage',
      cases?.tokens ?? [],
      [by],
      [`${typed}; coverage by ${by}: ...%`],
    );
  }
  const read = periodsIn(coverage.tokens, cases.tokens, folded);
  if ('id' in read)
    return refuse(read.id, read.at, read.pieces, read.id === 'periods-unread' ? [sampleLine] : []);
  const kept = stretches.filter((_, index) => index !== casesAt);
  const out = kept.flatMap((stretch, index) => [
    ...(index === 0 || stretch.before === null ? [] : [stretch.before]),
    ...(stretch === coverage ? read.tokens : stretch.tokens),
  ]);
  return { tokens: joinCoverageForms(out), fault: null };
}

/** `no helmet 44, helmet 31, ? 12`: a question mark between a comma and a number is the name of those nobody knows. */
function questionMarkNames(tokens: Tokens): Tokens {
  const isName = (at: number) =>
    tokens[at]?.tokenType === token.Question &&
    tokens[at - 1]?.tokenType === token.Comma &&
    (tokens[at + 1]?.tokenType === token.NumberToken || tokens[at + 1]?.tokenType === token.Colon);
  if (!tokens.some((_, at) => isName(at))) return tokens;
  return tokens.map((each, at) =>
    isName(at) ? { ...each, tokenType: token.Word, tokenTypeIdx: token.Word.tokenTypeIdx ?? 0 } : each,
  );
}

const sampleLine = `helmet: 31 of 55 cases; ${example}`;

function stretchesOf(tokens: Tokens): Stretch[] {
  const stretches: Stretch[] = [];
  let current: IToken[] = [];
  let before: IToken | null = null;
  const close = () => {
    if (current.length > 0) stretches.push({ before, tokens: current });
    current = [];
  };
  for (const each of tokens) {
    if (!breaks.has(each.tokenType)) {
      current.push(each);
      continue;
    }
    close();
    before = each;
  }
  close();
  return stretches;
}

/** Where `by` stands in `coverage [of NAME] by month ...:`, or -1. */
function byAt(tokens: Tokens, head: IToken['tokenType']): number {
  if (tokens[0]?.tokenType !== head) return -1;
  const colon = tokens.findIndex(({ tokenType }) => tokenType === token.Colon);
  const by = tokens.findIndex(
    ({ tokenType, image }, at) => at > 0 && tokenType === token.Word && /^by$/i.test(image),
  );
  const unit = tokens[by + 1]?.tokenType;
  const hasUnit = unit === token.Word || unit === token.Period;
  return by !== -1 && hasUnit && (colon === -1 || by < colon) ? by : -1;
}

interface Fault {
  readonly id: Parameters<typeof diagnosis>[0];
  readonly at: Tokens;
  readonly pieces: string[];
}

function periodsIn(coverage: Tokens, cases: Tokens, folded: Folded): { readonly tokens: Tokens } | Fault {
  const by = byAt(coverage, token.CoverageWord);
  const [head] = coverage;
  const unit = coverage[by + 1]?.image.toLowerCase() ?? '';
  const firstColon = coverage.findIndex(({ tokenType }) => tokenType === token.Colon);
  const firstNumber = coverage.findIndex(({ tokenType }) => tokenType === token.Percent);
  const lastColon = coverage
    .slice(0, firstNumber === -1 ? undefined : firstNumber)
    .reduce((found, { tokenType }, at) => (tokenType === token.Colon ? at : found), firstColon);
  const from = firstColon === -1 ? by + 2 : lastColon + 1;
  const end = lastPercent(coverage) + 1;
  if (head === undefined || end <= from) return { id: 'periods-unread', at: coverage, pieces: [unit] };
  const name = nameTokens([
    ...coverage.slice(1, by),
    ...coverage.slice(by + 2, firstColon === -1 ? by + 2 : lastColon),
  ]);
  const shares = itemsOf(coverage.slice(from, end));
  const casesColon = cases.findIndex(({ tokenType }) => tokenType === token.Colon);
  const rows = itemsOf(cases.slice(casesColon === -1 ? 3 : casesColon + 1));
  const periods: WrittenPeriod[] = [];
  for (const [index, share] of shares.entries()) {
    const row = rows[index];
    const held = figureOf(share, true, folded);
    if (held === null) return { id: 'periods-unread', at: share, pieces: [unit] };
    if (row === undefined || rows.length !== shares.length)
      return {
        id: 'periods-unequal',
        at: cases,
        pieces: [unit, String(shares.length), String(rows.length)],
      };
    const all = figureOf(row, false, folded);
    if (all === null) return { id: 'periods-unread', at: row, pieces: [unit] };
    if (all.label !== null && all.label.toLowerCase() !== held.label?.toLowerCase())
      return { id: 'period-names', at: row, pieces: [all.label, held.label ?? 'no name'] };
    periods.push({
      label: held.label,
      coverage: held.number,
      coverageAt: held.span,
      allCases: all.number,
      casesAt: all.span,
    });
  }
  if (periods.length < 2 || rows.length !== shares.length)
    return { id: 'periods-unequal', at: cases, pieces: [unit, String(shares.length), String(rows.length)] };
  const form = joined(coverage, from, {
    end,
    text: `by ${unit}`,
    value: meanOverCases(periods),
    coverage: { kind: 'periods', by: unit, periods, casesAt: spanOf(cases, folded) },
  });
  return { tokens: [head, ...name, form, ...coverage.slice(end)] };
}

/** The coverage that the cases would show if the ratio were 1: its mean over all cases. */
function meanOverCases(periods: readonly WrittenPeriod[]): number {
  const all = periods.reduce((sum, { allCases }) => sum + allCases.value, 0);
  const held = periods.reduce(
    (sum, { allCases, coverage }) => sum + allCases.value * plainShare(coverage),
    0,
  );
  return all === 0 ? 0 : Number((held / all).toPrecision(15));
}

/** Without the words and commas that lead to a name: `of helmet`, `for helmet`, `, helmet`. */
function nameTokens(tokens: Tokens): Tokens {
  const leads = ({ tokenType, image }: IToken) =>
    tokenType === token.Of ||
    tokenType === token.Comma ||
    tokenType === token.Colon ||
    /^(?:for|the)$/i.test(image);
  let start = 0;
  let end = tokens.length;
  while (start < end && tokens[start] !== undefined && leads(tokens[start] ?? neverToken)) start += 1;
  while (end > start && leads(tokens[end - 1] ?? neverToken)) end -= 1;
  return tokens.slice(start, end);
}

const neverToken: IToken = { image: '', startOffset: 0, tokenType: token.Other, tokenTypeIdx: 0 };

function lastPercent(tokens: Tokens): number {
  return tokens.reduce((found, { tokenType }, at) => (tokenType === token.Percent ? at : found), -1);
}

/** The items of a list, at its commas. */
function itemsOf(tokens: Tokens): Tokens[] {
  const items: IToken[][] = [[]];
  for (const each of tokens) {
    if (each.tokenType === token.Comma || each.tokenType === token.And) items.push([]);
    else items.at(-1)?.push(each);
  }
  return items.filter((item) => item.length > 0);
}

/** `Jan 20%`, `30`, `Mar: 45`: a number at the end, with or without its sign, and the name in front. */
function figureOf(
  item: Tokens,
  percent: boolean,
  folded: Folded,
): { readonly label: string | null; readonly number: WrittenNumber; readonly span: Span } | null {
  const end = percent ? item.length - 1 : item.length;
  const number = item[end - 1];
  if (number?.tokenType !== token.NumberToken) return null;
  if (percent && item[end]?.tokenType !== token.Percent) return null;
  const name = item
    .slice(0, end - 1)
    .filter(({ tokenType }) => tokenType !== token.Colon && tokenType !== token.Dash);
  const label = textOf(name, folded);
  return {
    label: label === '' ? null : label,
    number: writtenNumber(number.image, null),
    span: spanOf(item.slice(end - 1), folded),
  };
}

function textOf(tokens: Tokens, folded: Folded): string {
  const [first, last] = [tokens[0], tokens.at(-1)];
  if (first === undefined || last === undefined) return '';
  const text = folded.text.slice(first.startOffset, last.startOffset + last.image.length);
  return unquoted(text).replace(/\s+/g, ' ').replace(/"/g, "'").trim();
}

function spanOf(tokens: Tokens, folded: Folded): Span {
  const [first, last] = [tokens[0], tokens.at(-1)];
  if (first === undefined || last === undefined) return { from: 0, to: 0 };
  return typedSpan(folded, first.startOffset, last.startOffset + last.image.length);
}

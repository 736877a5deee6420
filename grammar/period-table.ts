import type { IToken } from 'chevrotain';
import * as token from './tokens.ts';

type Tokens = readonly IToken[];

/**
 * A pasted table of periods as the tokens of the two lists that it stands for, or `null` where the line has none:
 *
 *     month coverage cases
 *     Jan   20%      30
 *     Feb   30%      25
 *
 * The header has both words and no number; the columns stand in its order. Everything else of the line stays as it is.
 */
export function periodsFromTable(tokens: Tokens): Tokens | null {
  const lines = linesOf(tokens);
  const at = lines.findIndex(isHeader);
  const header = lines[at];
  if (header === undefined) return null;
  const rows: Row[] = [];
  let end = at + 1;
  for (; end < lines.length; end += 1) {
    const row = rowOf(lines[end] ?? []);
    if (row === null) break;
    rows.push(row);
  }
  if (rows.length < 2) return null;
  const unit = header.find(({ tokenType }) => tokenType === token.Word || tokenType === token.Period);
  const [coverageWord, casesWord] = [token.CoverageWord, token.CasesWord].map((wanted) =>
    header.find(({ tokenType }) => tokenType === wanted),
  );
  if (coverageWord === undefined || casesWord === undefined) return null;
  const at_ = header[0]?.startOffset ?? 0;
  const made = (tokenType: IToken['tokenType'], image: string): IToken => ({
    image,
    startOffset: at_,
    tokenType,
    tokenTypeIdx: tokenType.tokenTypeIdx ?? 0,
  });
  const head = [made(token.Word, 'by'), unit ?? made(token.Word, 'period'), made(token.Colon, ':')];
  const list = (cells: readonly Tokens[]) =>
    cells.flatMap((cell, index) => (index === 0 ? [...cell] : [made(token.Comma, ','), ...cell]));
  const newline = made(token.Newline, '\n');
  const around = (part: readonly Tokens[], before: boolean) =>
    part.flatMap((line) => (before ? [...line, newline] : [newline, ...line]));
  return [
    ...around(lines.slice(0, at), true),
    coverageWord,
    ...head,
    ...list(rows.map(({ name, coverage }) => [...name, ...coverage])),
    newline,
    casesWord,
    ...head,
    ...list(rows.map(({ cases }) => cases)),
    ...around(lines.slice(end), false),
  ];
}

interface Row {
  readonly name: Tokens;
  readonly coverage: Tokens;
  readonly cases: Tokens;
}

function linesOf(tokens: Tokens): IToken[][] {
  const lines: IToken[][] = [[]];
  for (const each of tokens) {
    if (each.tokenType === token.Newline) lines.push([]);
    else lines.at(-1)?.push(each);
  }
  return lines.filter((line) => line.length > 0);
}

const isHeader = (line: Tokens) =>
  line.length <= 4 &&
  line.some(({ tokenType }) => tokenType === token.CoverageWord) &&
  line.some(({ tokenType }) => tokenType === token.CasesWord) &&
  line.every(({ tokenType }) =>
    [token.Word, token.CoverageWord, token.CasesWord, token.Period].some((each) => each === tokenType),
  );

/** `Jan 20% 30` or `Jan 30 20%`. */
function rowOf(line: Tokens): Row | null {
  const cells = line.filter(({ tokenType }) => tokenType !== token.Bar);
  const types = cells.slice(-3).map(({ tokenType }) => tokenType);
  const name = cells.slice(0, -3);
  const [one, two, three] = cells.slice(-3);
  if (one === undefined || two === undefined || three === undefined || name.length === 0) return null;
  if (types[0] === token.NumberToken && types[1] === token.Percent && types[2] === token.NumberToken)
    return { name, coverage: [one, two], cases: [three] };
  if (types[0] === token.NumberToken && types[1] === token.NumberToken && types[2] === token.Percent)
    return { name, coverage: [two, three], cases: [one] };
  return null;
}

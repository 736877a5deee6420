import { writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import type { Part } from './parts.ts';
import type { ClauseName } from './tags.ts';
import * as token from './tokens.ts';

/** What a part is, if it is a clause; `says` is taken out of the line before. */
export type ClausePart =
  | {
      readonly kind: 'clause';
      readonly name: ClauseName;
      readonly body: string;
      readonly number: WrittenNumber | null;
      readonly numbers?: readonly WrittenNumber[];
    }
  | { readonly kind: 'no-value'; readonly word: string; readonly example: string };

const examples = {
  level: 'level 90%',
  per: 'per 1,000',
  reference: 'reference day shift',
  population: 'population 84,000',
  among: 'among "registered riders, May"',
  period: 'period Jan to Jun',
  source: 'source https://harrowmere.example/table',
  note: 'note "from the May table"',
} as const;

const textClauses = new Map<unknown, 'reference' | 'among' | 'period' | 'source' | 'note'>([
  [token.Reference, 'reference'],
  [token.Among, 'among'],
  [token.Period, 'period'],
  [token.Source, 'source'],
  [token.Note, 'note'],
]);

/**
 * Reads a part as a clause, or returns `null` if it is none. A part is a clause if its first word is a clause word, except
 * where a later colon (not directly behind that word) leads to a figure: `level 1: 3 of 900` is a group.
 */
export function clauseOf(part: Part, folded: string): ClausePart | null {
  const { tokens } = part;
  const [first, second, third] = tokens;
  if (first === undefined) return null;
  const worded = wordClause(part);
  if (worded !== null) return worded;
  if (isNamed(part)) return null;
  const afterWord = first.startOffset + first.image.length;
  const rest = folded
    .slice(afterWord, part.end)
    .replace(/^\s*:?\s*/, '')
    .trim();
  const textClause = textClauses.get(first.tokenType);
  if (textClause !== undefined) {
    const body = unquoted(rest);
    return body === ''
      ? { kind: 'no-value', word: textClause, example: examples[textClause] }
      : { kind: 'clause', name: textClause, body, number: null };
  }
  const number =
    second?.tokenType === token.NumberToken
      ? writtenNumber(second.image, third?.tokenType === token.Magnitude ? third.image : null)
      : null;
  switch (first.tokenType) {
    case token.Level:
      if (number === null)
        return tokens.length <= 2 ? { kind: 'no-value', word: 'level', example: examples.level } : null;
      return tokens.length <= 3 ? { kind: 'clause', name: 'level', body: rest, number } : null;
    case token.Per:
      if (number === null)
        return tokens.length === 1 ? { kind: 'no-value', word: 'per', example: examples.per } : null;
      return { kind: 'clause', name: 'per', body: rest, number };
    case token.Population: {
      const own = second?.tokenType === token.Colon ? numberAfterColon(part) : number;
      if (own === null)
        return tokens.length === 1
          ? { kind: 'no-value', word: 'population', example: examples.population }
          : null;
      return tokens.length <= 4 ? { kind: 'clause', name: 'population', body: rest, number: own } : null;
    }
    case token.Exact:
      return tokens.length === 1 ? { kind: 'clause', name: 'exact', body: '', number: null } : null;
    case token.OnlyMe:
      return tokens.length === 1 ? { kind: 'clause', name: 'onlyMe', body: '', number: null } : null;
    case token.Of:
      // `of 75 cases`, alone in its part.
      return number !== null &&
        tokens.slice(2).every(({ tokenType }) => tokenType === token.Word || tokenType === token.CasesWord)
        ? {
            kind: 'clause',
            name: 'ofCases',
            body: folded
              .slice(second === undefined ? afterWord : second.startOffset + second.image.length, part.end)
              .trim(),
            number,
          }
        : null;
    default:
      return /^try$/i.test(first.image) ? tryClause(tokens) : null;
  }
}

/** `design effect 1.8`, `counted: everyone`: clauses whose words are plain words anywhere else. */
function wordClause({ tokens }: Part): ClausePart | null {
  const words = tokens.map(({ image }) => image.toLowerCase());
  if (/^design effect\b/.test(words.join(' '))) {
    const at = tokens[2]?.tokenType === token.Colon ? 3 : 2;
    const number = tokens[at];
    if (at === 3 && tokens.length > 4) return null;
    if (number?.tokenType !== token.NumberToken || tokens.length > at + 1)
      return { kind: 'no-value', word: 'design effect', example: 'design effect 1.8' };
    return {
      kind: 'clause',
      name: 'designEffect',
      body: number.image,
      number: writtenNumber(number.image, null),
    };
  }
  if (/^counted ?:? (?:everyone|everybody|all|all of them)$/.test(words.join(' ')))
    return { kind: 'clause', name: 'everyone', body: '', number: null };
  return null;
}

function numberAfterColon({ tokens }: Part): WrittenNumber | null {
  const third = tokens[2];
  return third?.tokenType === token.NumberToken ? writtenNumber(third.image, null) : null;
}

/** `try 30%, 38%, 50%`: coverages to work the ratio out at; the sign may stand behind the last one alone. */
function tryClause(tokens: Part['tokens']): ClausePart | null {
  if (tokens.length === 1) return { kind: 'no-value', word: 'try', example: 'try 30%, 38%, 50%' };
  const [, ...rest] = tokens;
  const signs: ReadonlySet<unknown> = new Set([token.Percent, token.Comma, token.And]);
  const numbers = rest.filter(({ tokenType }) => tokenType === token.NumberToken);
  if (rest.at(-1)?.tokenType !== token.Percent) return null;
  if (!rest.every(({ tokenType }) => tokenType === token.NumberToken || signs.has(tokenType))) return null;
  return {
    kind: 'clause',
    name: 'try',
    body: rest.map(({ image }) => image).join(' '),
    number: null,
    numbers: numbers.map(({ image }) => writtenNumber(image, null)),
  };
}

/** Whether a later colon leads to a figure, so that the first word belongs to a name. */
function isNamed({ tokens }: Part): boolean {
  const colon = tokens.findIndex(({ tokenType }, at) => at >= 2 && tokenType === token.Colon);
  if (colon === -1) return false;
  if (
    tokens.slice(0, colon).some(({ tokenType }) => tokenType === token.Address || tokenType === token.Quoted)
  )
    return false;
  if (tokens[1]?.tokenType === token.Colon) return false;
  return tokens.slice(colon + 1).some(({ tokenType }) => tokenType === token.NumberToken);
}

/** Text without the quotation marks around the whole of it. */
export function unquoted(text: string): string {
  const quoted = /^["\u201c\u201e\u00ab](.*?)["\u201d\u201c\u00bb]$/s.exec(text);
  return (quoted?.[1] ?? text).trim();
}

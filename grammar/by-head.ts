import type { IToken } from 'chevrotain';
import * as token from './tokens.ts';

/** Longest name of what the layers are layers of, in words. */
const mostWords = 6;

/**
 * `by age:` in front of layers. It heads them only if another colon, a bar or a line break comes before the first figure:
 * `by bus: 3 of 900 vs by ferry: 4 of 800` is two groups. `head` runs from `by` to its colon or line end, both
 * included.
 */
export function withoutByHead(tokens: readonly IToken[]): {
  readonly head: readonly IToken[] | null;
  readonly tokens: readonly IToken[];
} {
  const none = { head: null, tokens };
  if (!/^by$/i.test(tokens[0]?.image ?? '')) return none;
  const colon = tokens.findIndex(({ tokenType }) => tokenType === token.Colon || tokenType === token.Newline);
  if (colon < 2 || colon > mostWords) return none;
  const next = tokens.findIndex(
    ({ tokenType }, at) => at > colon && (heading.has(tokenType) || tokenType === token.NumberToken),
  );
  // Layers such as `18-29:` and `under 40:` hold numbers themselves: up to the colon that ends their name none of them counts.
  const second = tokens.findIndex(({ tokenType }, at) => at > colon && heading.has(tokenType));
  const figure = tokens.findIndex(
    ({ tokenType }, at) =>
      at > colon && connectors.has(tokenType) && tokens[at - 1]?.tokenType === token.NumberToken,
  );
  if (next === -1 || second === -1 || (figure !== -1 && figure < second)) return none;
  const rest = tokens.slice(colon + 1);
  const start = rest.findIndex(({ tokenType }) => tokenType !== token.Newline);
  return { head: tokens.slice(0, colon + 1), tokens: rest.slice(Math.max(0, start)) };
}

const heading: ReadonlySet<unknown> = new Set([token.Colon, token.Bar, token.Newline]);
const connectors: ReadonlySet<unknown> = new Set([token.Of, token.Slash, token.In, token.Per, token.Percent]);

import type { IToken } from 'chevrotain';
import { figureAt } from './figures.ts';
import * as token from './tokens.ts';

/** A part as a change over time: which figure stands first, and the tokens with a plain separator between the two. */
export interface ChangePart {
  readonly tokens: readonly IToken[];
  /** `back`: the later figure stands first, as in `530, up from 412`. */
  readonly order: 'forth' | 'back';
  /** The word that made it a change. */
  readonly sign: IToken;
  /** A third figure joined on to the two: `from 412 to 530 to 600`. */
  readonly further: IToken | null;
}

type Tokens = readonly IToken[];
const is = (tokens: Tokens, at: number, type: IToken['tokenType']) => tokens[at]?.tokenType === type;
const movement =
  /^(?:is|are|was|were|has|have|had|gone|went|go|rose|risen|rise|fell|fallen|fall|up|down|grew|grown|increased|decreased|dropped|climbed|changed|moved)$/i;

/**
 * Reads a part as a change: `from A to B`, `B, up from A`, `A to B` between complete figures, and an arrow between two
 * figures without names. `null` where it is none. Linear in the length of the part.
 */
export function changeIn(tokens: Tokens): ChangePart | null {
  if (!tokens.some(({ tokenType }) => [token.From, token.To, token.Arrow].includes(tokenType))) return null;
  const figures = figurePlaces(tokens);
  const [first, second] = figures;
  if (
    first === undefined ||
    second === undefined ||
    tokens.some((_, at) => is(tokens, at, token.Colon) && at > first.start)
  )
    return null;
  const third = figures[2];
  const joint = third === undefined ? undefined : tokens[third.start - 1];
  const further = joint !== undefined && joiners.has(joint.tokenType) ? joint : null;
  const made = (
    order: ChangePart['order'],
    signAt: number,
    dropped: readonly [number, number] | null,
    place: readonly [number, number],
  ) => rewritten(tokens, order, signAt, dropped, place, further);
  const fromBefore = first.start - 1;
  const between = second.start - 1;
  if (is(tokens, fromBefore, token.From) && is(tokens, between, token.To))
    return made(
      'forth',
      fromBefore,
      [movementBefore(tokens, fromBefore), fromBefore + 1],
      [between, between + 1],
    );
  if (is(tokens, between, token.From)) {
    const start = movementBefore(tokens, between);
    return start === between
      ? null
      : made('back', between, [movementBefore(tokens, first.start), first.start], [start, between + 1]);
  }
  if (figures.length !== 2) return null;
  const bothConnected = first.connected && second.connected;
  if (is(tokens, between, token.To) && between === first.end && bothConnected)
    return made('forth', between, null, [between, between + 1]);
  // Words behind the arrow would name the second figure, which makes two groups; a question in front of it is a sentence.
  const asked = tokens.slice(0, first.start).some(({ tokenType }) => tokenType === token.Question);
  return is(tokens, between, token.Arrow) && between === first.end && !asked
    ? made('forth', between, null, [between, between + 1])
    : null;
}

interface Place {
  readonly start: number;
  readonly end: number;
  readonly connected: boolean;
}

function figurePlaces(tokens: Tokens): Place[] {
  const places: Place[] = [];
  for (let at = 0; at < tokens.length;) {
    const figure = figureAt(tokens, at);
    if (figure === null) at += 1;
    else {
      const connected = figure.kind !== 'bare' && figure.kind !== 'dangling';
      places.push({ start: figure.start, end: figure.end, connected });
      at = figure.end;
    }
  }
  return places;
}

/** Where the words of movement before this place start: `went`, `are up`, with the comma in front of them. */
function movementBefore(tokens: Tokens, at: number): number {
  let start = at;
  while (start > 0 && (movement.test(tokens[start - 1]?.image ?? '') || is(tokens, start - 1, token.To)))
    start -= 1;
  return start > 0 && is(tokens, start - 1, token.Comma) ? start - 1 : start;
}

const joiners: ReadonlySet<unknown> = new Set([token.To, token.Comma, token.Arrow, token.And]);

/** Leaves out what stands at `dropped`, and puts one separator in the place of what stands at `joint`. */
function rewritten(
  tokens: Tokens,
  order: ChangePart['order'],
  signAt: number,
  dropped: readonly [number, number] | null,
  joint: readonly [number, number],
  further: IToken | null,
): ChangePart | null {
  const sign = tokens[signAt];
  const separator = tokens[joint[0]];
  if (sign === undefined || separator === undefined) return null;
  const kept = tokens.flatMap((each, at): IToken[] => {
    if (dropped !== null && at >= dropped[0] && at < dropped[1]) return [];
    if (at < joint[0] || at >= joint[1]) return [each];
    return at === joint[0] ? [{ ...separator, tokenType: token.Versus }] : [];
  });
  return { tokens: kept, order, sign, further };
}

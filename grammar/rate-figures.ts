import type { IToken } from 'chevrotain';
import { gluedExposure, isExposureWord, unitAt } from './exposures.ts';
import { is, numberOrWordAt, roundBase } from './number-tokens.ts';
import { writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import type { CountValue } from './tags.ts';
import * as token from './tokens.ts';

type Tokens = readonly IToken[];

/** Events over a time, a distance or another exposure, as it stands among the fine tokens of a part. */
export interface RateFigure extends RateBegun {
  readonly kind: 'rate';
  readonly end: number;
  readonly sign: 'in' | 'per';
  readonly exposure: WrittenNumber;
  /** Where the exposure with its unit stands. */
  readonly exposureAt: readonly [number, number];
  readonly unit: string | null;
}

/** `5 a week`, `12 incidents each day`. */
export const isEach = (tokens: Tokens, at: number) =>
  /^(?:an?|each|every)$/i.test(tokens[at]?.image ?? '') && isExposureWord(tokens[at + 1]?.image ?? '');

export interface RateBegun {
  readonly start: number;
  readonly count: CountValue;
  readonly noun: readonly [number, number] | null;
  readonly connector: number;
}

export function eachFigure(begun: RateBegun, tokens: Tokens): RateFigure {
  const at = begun.connector + 1;
  return {
    kind: 'rate',
    ...begun,
    end: at + 1,
    sign: 'per',
    exposure: writtenNumber('1', null),
    exposureAt: [at, at + 1],
    unit: tokens[at]?.image ?? null,
  };
}

/** A count over a time, a distance or, after `per`, over anything; `null` where it is a count of people or a frequency. */
export function rateAt(tokens: Tokens, begun: RateBegun, word: 'of' | 'in' | 'per'): RateFigure | null {
  const { connector } = begun;
  const at = connector + 1;
  const made = (
    sign: 'in' | 'per',
    exposure: WrittenNumber,
    end: number,
    unit: string | null,
  ): RateFigure => ({
    kind: 'rate',
    ...begun,
    end,
    sign,
    exposure,
    exposureAt: [at, end],
    unit,
  });
  const sign = word === 'per' ? 'per' : 'in';
  const slash = is(tokens, connector, token.Slash);
  const joined = word === 'of' && !slash ? null : gluedExposure(tokens[at]?.image ?? '');
  if (joined !== null) return made(sign, joined.number, at + 1, joined.unit);
  const total = numberOrWordAt(tokens, at);
  if (total === null) {
    const unit = word === 'per' ? unitAt(tokens, at, 'per') : null;
    return unit === null ? null : made('per', writtenNumber('1', null), unit[1], wordsOf(tokens, unit));
  }
  const { number, end } = total;
  if (word === 'of' && !slash) return null;
  // One of a unit stands in the singular: `in 1 day`.
  const unit = unitAt(tokens, end, number.value === 1 ? 'one' : sign);
  if (word !== 'per') return unit === null ? null : made(sign, number, unit[1], wordsOf(tokens, unit));
  const measured = unit !== null && (is(tokens, unit[0], token.Per) || isExposure(tokens, unit));
  if (roundBase(number.value) && !measured) return null;
  return made('per', number, unit?.[1] ?? end, unit === null ? null : wordsOf(tokens, unit));
}

const wordsOf = (tokens: Tokens, [from, to]: readonly [number, number]) =>
  tokens
    .slice(from, to)
    .map(({ image }) => image)
    .join(' ')
    .replace(/\.$/, '');

const isExposure = (tokens: Tokens, [from, to]: readonly [number, number]) =>
  isExposureWord(tokens[to - 1]?.image ?? '') || /^(?:a|an|each|every)$/i.test(tokens[from]?.image ?? '');

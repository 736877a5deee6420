import type { Quantity } from '../../grammar/question.ts';
import { dividedByDesignEffect } from '../stats/design-effect.ts';
import type { Interval } from '../stats/interval.ts';
import { envelopeOverCorners, isRange } from './corners.ts';
import type { IntervalMethod, Reading, ReadingInterval } from './reading.ts';

/** An estimate as a reading carries it: an infinite quotient has no value but is unbounded, 0/0 has neither. */
export function estimateOf(value: number): Pick<Reading, 'estimate' | 'unbounded'> {
  return { estimate: Number.isFinite(value) ? value : null, unbounded: value === Infinity };
}

/**
 * The interval for these inputs: at their values, or, where one of them is known only to a range, the outermost limits
 * over everything the ranges allow. A design effect divides all of them first (Rao & Scott 1992, Biometrics 48:577), so every
 * quantity has to be a count, a total or an exposure.
 */
export function intervalOver(
  quantities: readonly Quantity[],
  level: number,
  method: IntervalMethod,
  limits: (values: readonly number[]) => Interval,
  designEffect = 1,
): ReadingInterval {
  const divided = (values: readonly number[]) => limits(dividedByDesignEffect(values, designEffect));
  const envelope = quantities.some(isRange);
  const { low, high } = envelope
    ? envelopeOverCorners(quantities, divided)
    : divided(quantities.map((quantity) => quantity.value));
  return { low, high, level, method, envelope, designEffect };
}

/** Carries an interval through an increasing function; a missing limit stays missing. */
export function mapInterval<T extends Interval>(interval: T, through: (limit: number) => number | null): T {
  const carry = (limit: number | null) => (limit === null ? null : through(limit));
  return { ...interval, low: carry(interval.low), high: carry(interval.high) };
}

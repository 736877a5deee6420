import { attributableFraction, preventedFraction } from '../stats/attributable-fraction.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../stats/hidden-cause-strength.ts';
import { estimateOf, mapInterval } from './estimates.ts';
import { reading } from './reading.ts';
import type { Reading } from './reading.ts';

const change = (ratio: number) => ratio - 1;

/** The relative change that goes with every ratio: RR - 1, signed, with the ratio's limits carried over. */
export function relativeChange(ratio: Reading): Reading {
  return { ...ratio, id: 'relative-change', ...carried(ratio, change), exactBeside: null };
}

/**
 * What else follows from the ratio alone: the fraction of the group's cases above the other group's rate (1 - 1/RR; below
 * a ratio of 1 the prevented fraction, 1 - RR; Miettinen 1974), and how strong a hidden cause would have to be
 * (VanderWeele & Ding 2017). Each has the ratio's limits carried through, so none can contradict it.
 */
export function ratioFollowers(ratio: Reading): Reading[] {
  if (ratio.estimate === null) return [];
  return [...fraction(ratio), ...hiddenCause(ratio)];
}

function fraction(ratio: Reading): Reading[] {
  if (ratio.estimate === null || ratio.estimate === 1) return [];
  if (ratio.estimate > 1) {
    // No upper limit on the ratio is a fraction that reaches 1.
    const interval = ratio.interval && {
      ...mapInterval(ratio.interval, attributableFraction),
      ...(ratio.interval.high === null ? { high: 1 } : {}),
    };
    return [
      {
        ...ratio,
        id: 'attributable-fraction',
        ...carried(ratio, attributableFraction),
        interval,
        exactBeside: null,
      },
    ];
  }
  const flipped = carried(ratio, preventedFraction);
  const swap = <T extends { low: number | null; high: number | null }>(interval: T): T => ({
    ...interval,
    low: interval.high,
    high: interval.low,
  });
  return [
    {
      ...ratio,
      id: 'prevented-fraction',
      ...flipped,
      interval: flipped.interval && swap(flipped.interval),
      roundingRange: flipped.roundingRange && swap(flipped.roundingRange),
      exactBeside: null,
    },
  ];
}

function hiddenCause(ratio: Reading): Reading[] {
  const strength = ratio.estimate === null ? null : hiddenCauseStrength(ratio.estimate);
  if (strength === null) return [];
  return [
    reading({
      id: 'hidden-cause-strength',
      of: ratio.of,
      against: ratio.against,
      estimate: strength,
      whyNoInterval: ratio.interval === null ? ratio.whyNoInterval : null,
      atLimit: ratio.interval === null ? null : hiddenCauseStrengthAtLimit(ratio.interval),
    }),
  ];
}

function carried(ratio: Reading, through: (x: number) => number | null) {
  const estimate = ratio.estimate === null ? null : through(ratio.estimate);
  return {
    ...estimateOf(estimate ?? (ratio.unbounded ? Infinity : NaN)),
    interval: ratio.interval && mapInterval(ratio.interval, through),
    roundingRange: ratio.roundingRange && mapInterval(ratio.roundingRange, through),
  };
}

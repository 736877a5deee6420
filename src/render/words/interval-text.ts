import type { Limits, Reading } from '../../report/reading.ts';
import { amount, changePercent, percent, points, probability, ratio, working } from './numbers.ts';
import type { Digits } from './numbers.ts';

/** "1.5 to 3.7", "up to 2.1", "from 0.72, no upper limit": the limits of a reading in the reading's own unit. */
export function limitsText(reading: Reading, limits: Limits, digits: Digits): string {
  const { low, high } = limits;
  if (reading.id === 'relative-change') return changeLimits(low, high, digits);
  const write = writer(reading, digits);
  if (low === null && high === null) return 'no limit on either side';
  if (low === null) return `no lower limit, up to ${write(high ?? NaN)}`;
  if (high === null) return `${write(low)}, no upper limit`;
  return `${write(low)} to ${write(high)}`;
}

/** An estimate in the reading's own unit; `null` where it has none. */
export function estimateText(reading: Reading, digits: Digits): string | null {
  const { estimate } = reading;
  if (estimate === null) return null;
  if (reading.id === 'relative-change') return changeText(estimate, digits);
  const text = writer(reading, digits)(estimate);
  return pointReadings.has(reading.id) ? `${text} points` : text;
}

/** Differences of shares, shown in percentage points. */
const pointReadings: ReadonlySet<Reading['id']> = new Set([
  'risk-difference',
  'percentage-difference',
  'pooled-risk-difference',
]);

/** Estimate and limits at the long precision of the working, as plain shares and ratios. */
export function workingText(reading: Reading): string {
  const { estimate, interval } = reading;
  const write = working([estimate, interval?.low ?? null, interval?.high ?? null]);
  const value = estimate === null ? (reading.unbounded ? 'no upper end' : 'no value') : write(estimate);
  if (interval === null) return value;
  const low = interval.low === null ? 'no lower limit' : write(interval.low);
  const high = interval.high === null ? 'no upper limit' : write(interval.high);
  return `${value} (${low} to ${high})`;
}

/** "95%", "99.99%". */
export const levelText = (level: number) => `${Number((level * 100).toFixed(4))}%`;

function isShare({ id }: Reading): boolean {
  switch (id) {
    case 'risk':
    case 'case-share':
    case 'population-share':
    case 'break-even-coverage':
    case 'attributable-fraction':
    case 'prevented-fraction':
    case 'population-attributable-fraction':
    case 'sensitivity':
    case 'specificity':
    case 'prevalence':
    case 'positive-predictive-value':
    case 'negative-predictive-value':
      return true;
    default:
      return false;
  }
}

/** "29% higher" of what is counted is "29% more". */
export const countedMore = (text: string) => text.replaceAll('higher', 'more').replaceAll('lower', 'fewer');

function writer(reading: Reading, digits: Digits): (value: number) => string {
  if (isShare(reading)) return (value) => percent(value, digits);
  switch (reading.id) {
    case 'risk-difference':
    case 'pooled-risk-difference':
    case 'percentage-difference':
      return (value) => points(value, digits);
    case 'risk-ratio':
    case 'odds-ratio':
    case 'count-ratio':
    case 'percentage-ratio':
    case 'rate-ratio':
    case 'crude-risk-ratio':
    case 'crude-rate-ratio':
    case 'pooled-risk-ratio':
    case 'pooled-rate-ratio':
    case 'pooled-odds-ratio':
    case 'standardised-risk-ratio':
    case 'likelihood-ratio-positive':
    case 'likelihood-ratio-negative':
      return (value) => ratio(value, digits);
    case 'rate':
    case 'standardised-rate':
    case 'rate-difference':
    case 'pooled-rate-difference': {
      const per = reading.per ?? 1;
      return (value) => amount(value * per, digits);
    }
    case 'homogeneity':
    case 'overall-difference':
      return probability;
    default:
      return (value) => amount(value, digits);
  }
}

/** "130% higher", "57% lower", "no change". `change` is RR - 1. */
export function changeText(change: number, digits: Digits): string {
  if (change === 0) return 'no change';
  return `${changePercent(change + 1, digits)} ${change > 0 ? 'higher' : 'lower'}`;
}

function changeLimits(low: number | null, high: number | null, digits: Digits): string {
  if (low === null && high === null) return 'no limit on either side';
  if (high === null) return `${changeText(low ?? -1, digits)}, no upper limit`;
  if (low === null) return `no lower limit, up to ${changeText(high, digits)}`;
  const sameSide = low > 0 === high > 0 && low !== 0 && high !== 0;
  // Lower changes read from the smaller to the larger, as the higher ones do.
  if (sameSide && high < 0)
    return `${changePercent(high + 1, digits)} to ${changePercent(low + 1, digits)} lower`;
  if (sameSide) return `${changePercent(low + 1, digits)} to ${changePercent(high + 1, digits)} higher`;
  return `${changeText(low, digits)} to ${changeText(high, digits)}`;
}

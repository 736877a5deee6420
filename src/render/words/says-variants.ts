import type { Reading } from '../../report/reading.ts';
import type { IntervalVariant, Says, SaysRemark, VariantLimits } from '../../report/said.ts';
import { methodText } from './reading-methods.ts';

/** What each common way of working out an interval is called, with its source. */
const variantNames: Readonly<Record<Exclude<IntervalVariant, 'own'>, string>> = {
  'exact-beside': 'exact limits',
  log: 'log limits (Katz 1978)',
  'log-with-halves': 'log limits with halves added (Walter 1975)',
  koopman: 'score limits without the factor N/(N-1) (Koopman 1984)',
  'wald-difference': 'Wald limits of the difference',
  'wald-difference-corrected': 'Wald limits of the difference with continuity correction',
  'agresti-caffo': 'limits of Agresti & Caffo (2000)',
  newcombe: 'square-and-add limits (Newcombe 1998)',
  mee: 'score limits without the factor N/(N-1) (Mee 1984)',
  woolf: 'log limits of the odds ratio (Woolf 1955)',
  'woolf-with-halves': 'log limits of the odds ratio with halves added (Gart 1966)',
  cornfield: 'score limits without the factor N/(N-1) (Cornfield 1956)',
  'conditional-exact': 'exact conditional limits (Cornfield 1956)',
  'log-odds': 'log-odds limits (Farrington 1993)',
  'log-odds-with-halves': 'log-odds limits with halves added',
  'exact-odds': 'exact limits of the share of cases, through its odds',
  'log-rates': 'log limits of the rate ratio',
  'log-rates-with-halves': 'log limits of the rate ratio with halves added',
  'exact-rates': 'exact conditional limits of the rate ratio',
  wald: 'Wald limits',
  'agresti-coull': 'limits of Agresti & Coull (1998)',
  'wilson-corrected': 'Wilson limits with continuity correction',
  'clopper-pearson': 'exact limits (Clopper & Pearson 1934)',
};

/** Which variant a published interval is, or how far the nearest is from it. */
export function variantText(
  says: Says,
  { reading, matched, nearest }: Extract<SaysRemark, { id: 'interval-variant' }>,
): string {
  if (nearest === null) return 'There is no interval here that its limits could be held against.';
  const name = nameOf(nearest, reading);
  if (matched)
    return nearest.variant === 'own'
      ? `Its limits are the ones given here: ${name}.`
      : `Its limits are the ${name}; they are consistent with these figures, which are given here with other limits.`;
  const [low, high] = [nearest.limits.low, nearest.limits.high].map((limit) =>
    limit === null ? 'no limit' : written(says, limit),
  );
  return `No common way of working them out gives its limits; the nearest, the ${name}, are ${low ?? ''} to ${high ?? ''}.`;
}

function nameOf({ variant }: VariantLimits, reading: Reading): string {
  if (variant !== 'own') return variantNames[variant];
  return reading.interval === null ? 'limits given here' : methodText(reading.interval);
}

/** A limit in the unit of the sentence, with digits enough to show what is off. */
function written({ clause: { claim } }: Says, limit: number): string {
  const inHundredths =
    claim.kind === 'figure' &&
    claim.measure !== 'ratio' &&
    claim.measure !== 'times-more' &&
    claim.measure !== 'figure';
  const value = Number((inHundredths ? limit * 100 : limit).toPrecision(4));
  return `${value < 0 ? '\u2212' : ''}${String(Math.abs(value))}${inHundredths ? '%' : ''}`;
}

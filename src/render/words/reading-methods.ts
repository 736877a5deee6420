import type { IntervalMethod, Reading, ReadingInterval } from '../../report/reading.ts';
import { alarmMethod } from './alarm-rows.ts';

const sources = {
  wilson: 'Wilson score (Wilson 1927)',
  'clopper-pearson': 'exact (Clopper & Pearson 1934)',
  'miettinen-nurminen': 'Miettinen-Nurminen score (1985)',
  'conditional-exact': 'exact conditional (Cornfield 1956)',
  'wilson-share-odds': 'Wilson limits of the share of cases, through its odds (Orenstein 1985; Wilson 1927)',
  'clopper-pearson-share-odds':
    'exact limits of the share of cases, through its odds (Orenstein 1985; Clopper & Pearson 1934)',
  'rate-score': 'score (Rao 1948)',
  garwood: 'exact (Garwood 1936)',
  'rate-ratio-score': 'score, as the odds of the Wilson limits (Miettinen & Nurminen 1985)',
  'exact-rate-ratio': 'exact conditional, as the odds of the Clopper-Pearson limits (1934)',
  'rate-difference-score': 'Miettinen-Nurminen score for rates (1985)',
  'equal-times-score': 'score of the rate ratio over two times of equal length (Miettinen & Nurminen 1985)',
  'pooled-score':
    'score with Mantel-Haenszel weights (Mantel & Haenszel 1959; Miettinen & Nurminen 1985, strata)',
  'pooled-conditional-score': 'conditional score (Gart 1970; Mehta, Patel & Gray 1985)',
  'pooled-conditional-exact': 'exact conditional (Gart 1970)',
  'pooled-shares-score': 'score (Farrington 1993)',
  'pooled-shares-exact': 'exact tails of the sum of binomial counts (Farrington 1993)',
  'fay-feuer': 'gamma limits (Fay & Feuer 1997)',
  'log-delta': 'delta method on the log scale, weights as known',
  'sampled-coverage':
    'Miettinen-Nurminen score of the odds ratio, cases against the sample (Miettinen & Nurminen 1985)',
  'sampled-coverage-fraction':
    '1 minus the Miettinen-Nurminen score limits of the risk ratio, cases against the sample (Miettinen & Nurminen 1985)',
  'effective-sample':
    'The coverage as from a sample that would have its interval (effective sample), then the Miettinen-Nurminen score of the odds ratio (Miettinen & Nurminen 1985)',
  'effective-sample-fraction':
    'The coverage as from a sample that would have its interval (effective sample), then 1 minus the Miettinen-Nurminen score limits of the risk ratio (Miettinen & Nurminen 1985)',
  'growing-coverage':
    'The wider of two assumptions, constant risk and evenly spread cases, each from the Wilson limits of the share (Wilson 1927)',
  'coverage-by-period': 'Score of the cases of all periods together (Farrington 1993)',
  'as-given': 'The interval that came with the figure',
  'miettinen-nurminen-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985), through the odds of the prevalence (Bayes)',
  'mover-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985) and Wilson limits of the prevalence, combined on logs (Zou & Donner 2008)',
} satisfies Record<IntervalMethod, string>;

/** The name of an interval's method, with its source. */
export function methodOf(reading: Reading): string {
  if (reading.id === 'overall-difference') return 'Pearson 1900, times (N - 1)/N (Campbell 2007)';
  if (reading.id === 'homogeneity')
    return reading.test?.name === 'deviance'
      ? 'Deviance (Farrington 1993); misses most real differences'
      : 'Gart & Nam 1988; misses most real differences';
  if (reading.id === 'hidden-cause-strength') return 'VanderWeele & Ding 2017';
  if (reading.interval === null) return alarmMethod(reading.id);
  return methodText(reading.interval);
}

export function methodText({ method, envelope, unknownToEitherSide, designEffect }: ReadingInterval): string {
  const over = envelope ? ', outermost limits over the range given' : '';
  const unknown =
    unknownToEitherSide === true
      ? ', all unknown cases on one side, then on the other (Horowitz & Manski 2000)'
      : '';
  const divided =
    designEffect === 1
      ? ''
      : `, counts divided by the design effect ${String(designEffect)} (Rao & Scott 1992)`;
  return `${sources[method]}${over}${unknown}${divided}`;
}

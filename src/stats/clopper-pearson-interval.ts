import { checkCases, checkLevel, checkWhole } from './argument-error.ts';
import { binomialUpperTail } from './binomial-tail.ts';
import { bracketedRoot } from './bracketed-root.ts';
import type { Interval } from './interval.ts';

/**
 * Exact interval of a single risk (Clopper & Pearson 1934, Biometrika 26:404): never holds the truth less often than its level.
 *
 * @param cases whole, in [0, total]
 * @param total whole, in [1, 1e15]
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits within [0, 1]; 0 of n has the lower limit 0, n of n the upper limit 1
 * @throws ArgumentError for anything else
 *
 * Accuracy: 1e-12 relative against 40-digit values, for the limit and for what remains of 1.
 */
export function clopperPearsonInterval(cases: number, total: number, level: number): Interval {
  return {
    low: exactLowerLimit(cases, total, level).limit,
    // The upper limit is what the others' lower limit leaves.
    high: exactLowerLimit(total - cases, total, level).rest,
  };
}

/** A limit beside what it leaves of 1, so that the smaller of the two keeps all its digits. */
export interface LimitAndRest {
  readonly limit: number;
  readonly rest: number;
}

/** The exact lower limit of a risk: the p at which P(X >= cases) is half of what the level leaves. */
export function exactLowerLimit(cases: number, total: number, level: number): LimitAndRest {
  checkLevel(level);
  checkCases(cases, total);
  checkWhole(cases, total);
  if (cases === 0) return { limit: 0, rest: 1 };
  const half = (1 - level) / 2;
  if (cases === total)
    return { limit: Math.exp(Math.log(half) / total), rest: -Math.expm1(Math.log(half) / total) };
  // The unknown is the log odds, in which a limit near 0 and one near 1 are equally well told apart.
  const excess = (logOdds: number) => {
    const { limit, rest } = fromLogOdds(logOdds);
    return Math.log(binomialUpperTail(cases, total, limit, rest) / half);
  };
  const observed = Math.log(cases / (total - cases));
  let low = observed - 2 * spreadOf(cases, total);
  while (excess(low) > 0) low -= 2 * (observed - low);
  return fromLogOdds(bracketedRoot(excess, low, observed));
}

/** About one standard error of the log odds. */
const spreadOf = (cases: number, total: number) => Math.sqrt(1 / cases + 1 / (total - cases));

function fromLogOdds(logOdds: number): LimitAndRest {
  const odds = Math.exp(-Math.abs(logOdds));
  const few = odds / (1 + odds);
  const many = 1 / (1 + odds);
  return logOdds < 0 ? { limit: few, rest: many } : { limit: many, rest: few };
}

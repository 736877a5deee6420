import type { TwoGroups } from './interval.ts';

/** Estimates of both risks under p1 = t p2, and the variance they give the difference p1 - t p2. */
export interface ConstrainedRatio {
  readonly risk: number;
  readonly referenceRisk: number;
  /** q1(1 - q1)/n1 + t^2 q2(1 - q2)/n2, without the factor N/(N - 1). */
  readonly variance: number;
}

/**
 * The maximum likelihood estimates of two risks whose ratio is t.
 *
 * The smaller root of N t q2^2 - [t(n1 + x2) + n2 + x1] q2 + (x1 + x2) = 0 (Koopman 1984; Miettinen & Nurminen 1985), written
 * without a subtraction, and the complements from their own quadratics, so that risks near 1 keep their digits too.
 */
export function constrainedRatio(groups: TwoGroups, t: number): ConstrainedRatio {
  const { cases: x1, total: n1, referenceCases: x2, referenceTotal: n2 } = groups;
  const [y1, y2, all] = [n1 - x1, n2 - x2, n1 + n2];
  const spread = t * (n1 + x2) - (n2 + x1);
  const root = Math.sqrt(spread * spread + 4 * t * y1 * y2);
  const referenceRisk = (2 * (x1 + x2)) / (t * (n1 + x2) + n2 + x1 + root);
  const risk = t * referenceRisk;
  // 1 - q1 at t >= 1 and 1 - q2 below, each the positive root of N s^2 - b s - (others)|1 - t| = 0 (N t below 1).
  let rest: number;
  let referenceRest: number;
  if (t >= 1) {
    rest = positiveRoot(all, y1 + y2 - (t - 1) * (n1 + x2), y1 * (t - 1));
    referenceRest = (t - 1 + rest) / t;
  } else {
    referenceRest = positiveRoot(all * t, y1 + y2 - (1 - t) * (all + y2), y2 * (1 - t));
    rest = 1 - t + t * referenceRest;
  }
  return {
    risk,
    referenceRisk,
    variance: (risk * rest) / n1 + (t * t * referenceRisk * referenceRest) / n2,
  };
}

/** The positive root of a s^2 - b s - c = 0, a above 0 and c 0 or above. */
function positiveRoot(a: number, b: number, c: number): number {
  const root = Math.sqrt(b * b + 4 * a * c);
  return b >= 0 ? (b + root) / (2 * a) : (2 * c) / (root - b);
}

import type { Clauses } from '../../grammar/question.ts';
import type { CountsOptions } from './counts-readings.ts';
import { usualLevel } from './report.ts';

/** How the readings of a question are worked out, as its clauses say. */
export const optionsOf = ({ level, exact, per, designEffect }: Clauses): CountsOptions => ({
  level: level?.value ?? usualLevel,
  exact,
  per,
  designEffect: designEffect?.value ?? 1,
});

import type { Question } from '../../../grammar/question.ts';
import { cases, one } from './labels.ts';
import { fixed } from './numbers.ts';

/** "many delays per bus-day": what the rates of two groups are compared in. */
export function manyPer(question: Question): string {
  const single = one(question);
  return single === null
    ? `many ${cases(question)} for ${question.kind === 'rates' ? 'the time watched' : 'its size'}`
    : `many ${cases(question)} per ${single}`;
}

/** "per 1,000 bus-days", "per week". */
export function perExposure(question: Question, per: number): string {
  const { unit } = question;
  if (unit !== null && /^per /.test(unit)) return `per ${fixed(per, 0)} ${unit}`;
  if (per === 1) return `per ${one(question) ?? 'one'}`;
  return `per ${fixed(per, 0)}${unit === null ? '' : ` ${unit}`}`;
}

import type { Quantity } from '../../grammar/question.ts';

/** The sum of several quantities, with what the ranges of its parts allow. */
export function sumOf(parts: readonly Quantity[]): Quantity {
  const sum = (end: 'value' | 'low' | 'high') => parts.reduce((all, quantity) => all + quantity[end], 0);
  const precisions = parts.map(({ precision }) => precision);
  return {
    text: String(sum('value')),
    value: sum('value'),
    low: sum('low'),
    high: sum('high'),
    precision: precisions.includes('range') ? 'range' : precisions.includes('rounded') ? 'rounded' : 'exact',
    span: parts[0]?.span ?? { from: 0, to: 0 },
  };
}

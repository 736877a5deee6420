import { grouped } from './numbers.ts';
import type { SharesGroup } from './question.ts';

/** A group's coverage in its canonical spelling, with what it is a share of: `38% of riders`, `310 of 500 riders`. */
export function withUnit({ coverage, known }: SharesGroup, unit: string | null): string {
  if (unit === null) return coverage.text;
  return `${coverage.text}${known.kind === 'sample' ? '' : ' of'} ${unit}`;
}

/** Coverage by period with the cases by period: `coverage of helmet by month: Jan 20%, Feb 30%; cases by month: 30, 25`. */
export function coverageText(
  { known }: SharesGroup,
  name: string | null,
  unit: string | null,
  spelled: (label: string | null) => string,
): string {
  if (known.kind !== 'periods') return '';
  const { by, periods } = known;
  const shares = periods.map(
    ({ label, coverage }) => `${label === null ? '' : `${spelled(label)} `}${coverage.text}`,
  );
  const of = name === null ? '' : ` of ${spelled(name)}`;
  const what = unit === null ? '' : ` of ${unit}`;
  const counts = periods.map(({ allCases }) => grouped(allCases)).join(', ');
  return `coverage${of} by ${by}: ${shares.join(', ')}${what}; cases by ${by}: ${counts}`;
}

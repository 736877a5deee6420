import type { NaturalFrequencies } from '../../report/natural-frequencies.ts';
import { fixed } from './numbers.ts';

/** Natural frequencies as one sentence and its conclusion, in the present for an example and in the past for what was counted. */

interface Verbs {
  readonly are: string;
  readonly is: string;
  readonly raise: string;
  readonly raises: string;
  readonly do: string;
  readonly does: string;
}

export const forExample: Verbs = {
  are: 'are',
  is: 'is',
  raise: 'raise',
  raises: 'raises',
  do: 'do',
  does: 'does',
};
export const asCounted: Verbs = {
  are: 'were',
  is: 'was',
  raise: 'raised',
  raises: 'raised',
  do: 'did',
  does: 'did',
};

/** "Of 10,000 wells, 40 are real cases and 37 of them raise an alarm; of the 9,960 others, 299 do too. So of 336 alarms 37 are real". */
export function inNaturalNumbers(numbers: NaturalFrequencies, noun: string, verbs: Verbs): string {
  const { base, cases, caught, others, falseAlarms, alarms } = numbers;
  const count = (value: number) => fixed(value, 0);
  const ofThem =
    caught === 0
      ? `none of them ${verbs.raises}`
      : caught === cases
        ? `all of them ${verbs.raise}`
        : `${count(caught)} of them ${caught === 1 ? verbs.raises : verbs.raise}`;
  const too =
    falseAlarms === 0
      ? `none ${verbs.does}`
      : `${count(falseAlarms)} ${falseAlarms === 1 ? verbs.does : verbs.do} too`;
  return `Of ${count(base)} ${noun}, ${count(cases)} ${cases === 1 ? `${verbs.is} a real case` : `${verbs.are} real cases`} and ${ofThem} an alarm; of the ${count(others)} others, ${too}. So ${conclusion(alarms, caught, verbs)}`;
}

function conclusion(alarms: number, caught: number, verbs: Verbs): string {
  if (caught === 0) return `none of the ${fixed(alarms, 0)} alarms ${verbs.is} real`;
  if (caught === alarms) return `all ${fixed(alarms, 0)} alarms ${verbs.are} real`;
  return `of ${fixed(alarms, 0)} alarms ${fixed(caught, 0)} ${caught === 1 ? verbs.is : verbs.are} real`;
}

/** How names of groups are compared: case, hyphens, extra spaces and a final s do not make two names. */
export function nameKey(name: string): string {
  const key = name
    .toLowerCase()
    .replace(/[-_\s]+/g, ' ')
    .trim();
  return key.length > 2 && key.endsWith('s') ? key.slice(0, -1) : key;
}

const earlier = ['before', 'old', 'earlier', 'last', 'previous', 'prior', 'baseline'];
const later = ['after', 'new', 'later', 'recent', 'this', 'current', 'now', 'recently'];
const months = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

/** Where in time a name stands, if its first word or the whole of it says so; comparable only within one scale. */
function timeOf(name: string): { readonly scale: string; readonly at: number } | null {
  const key = nameKey(name);
  const [first = ''] = key.split(' ');
  const year = /^(?:in )?((?:19|20)\d\d)(?:\/\d\d)?$/.exec(key);
  if (year !== null) return { scale: 'year', at: Number(year[1]) };
  const month = months.findIndex(
    (short) =>
      first === short ||
      (first.startsWith(short) &&
        /^(?:january|february|march|april|june?|july?|august|september|october|november|december)$/.test(
          first,
        )),
  );
  if (month !== -1 && key === first) return { scale: 'month', at: month };
  if (earlier.includes(first)) return { scale: 'order', at: 0 };
  return later.includes(first) ? { scale: 'order', at: 1 } : null;
}

/** Whether a name says a time: `last year`, `2023`, `before`. */
export const isTimeName = (name: string) => timeOf(name) !== null;

/** The index of the earlier of two groups whose names are ordered in time (before/after, old/new, years, months), else `null`. */
export function earlierOf(names: readonly (string | null)[]): number | null {
  if (names.length !== 2) return null;
  const lone = names.map((name) => name !== null && loneEarlier.test(name));
  if (lone[0] !== lone[1] && names.every((name) => name !== null)) return lone[0] === true ? 0 : 1;
  const [first, second] = names.map((name) => (name === null ? null : timeOf(name)));
  if (first == null || second == null || first.scale !== second.scale || first.at === second.at) return null;
  return first.at < second.at ? 0 : 1;
}

const pureTime =
  /^(?:before|after|earlier|later|previously|now|then|recently|(?:last|this|previous|current) \w+|(?:in )?(?:19|20)\d\d(?:\/\d\d)?)$/i;
const loneEarlier = /^(?:before|earlier|previously|last (?:year|month|week))$/i;

/**
 * Whether two groups are one thing at two times: both names are times and nothing else (`last year` and `this year`, but not `old
 * pump` and `new pump`, which may run side by side), or one of them is only "before".
 */
export function areTimes(names: readonly (string | null)[]): boolean {
  if (earlierOf(names) === null) return false;
  const isTime = (name: string | null) =>
    name !== null && (pureTime.test(name) || timeOf(name)?.scale === 'month');
  return names.every(isTime) || names.some((name) => name !== null && loneEarlier.test(name));
}

const outcomes: readonly (readonly [RegExp, RegExp])[] = [
  [/^cases?$/, /^controls?$/],
  [/^(?:ill|sick|infected|diseased)\b/, /^(?:not (?:ill|sick|infected)|well|healthy)\b/],
];

/** Whether two names say that the rows were chosen by outcome: ill and well, cases and controls. */
export function chosenByOutcome(names: readonly (string | null)[]): boolean {
  if (names.length !== 2) return false;
  const [first = '', second = ''] = names.map((name) => (name ?? '').toLowerCase());
  return outcomes.some(
    ([one, other]) => (one.test(first) && other.test(second)) || (other.test(first) && one.test(second)),
  );
}

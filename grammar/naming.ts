import { diagnosis, linesToTry } from './diagnosis.ts';
import { earlierOf, nameKey } from './labels.ts';
import { refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';

/** What the words around the figures mean: names, the unit, and what a case is called. */
interface Naming {
  readonly labels: readonly (string | null)[];
  readonly unit: string | null;
  readonly caseNoun: string | null;
}

/**
 * Words before a figure are its name. Words after it are the unit if a name stands before, or if they are the same after every
 * figure; otherwise they are the name.
 */
export function namingOf(items: readonly Item[]): Naming {
  const nouns = items
    .map(({ figure }) => (figure.kind === 'count' ? figure.noun?.text : null) ?? null)
    .filter((noun) => noun !== null);
  const afters = items.map(({ after }) => after?.text ?? null);
  // `ferry delays 412 last year 530 this year`: the words behind name the times, those in front what is counted.
  if (earlierOf(afters) !== null && items[1]?.name === null)
    return { labels: afters, unit: null, caseNoun: items[0]?.name?.text ?? nouns[0] ?? null };
  const named = items.some(({ name }) => name !== null);
  const present = afters.filter((after) => after !== null);
  const same = present.length > 0 && present.every((after) => nameKey(after) === nameKey(present[0] ?? ''));
  const isUnit = named || (same && items.length > 1 && present.length >= 1);
  const labels = items.map(({ name, after }) => name?.text ?? (isUnit ? null : (after?.text ?? null)));
  return { labels, unit: isUnit && same ? (present[0] ?? null) : null, caseNoun: nouns[0] ?? null };
}

/** The group that the others are compared with: the named one, the earlier one, or the last. */
export function referenceOf(labels: readonly (string | null)[], setting: Setting): Settled<number> {
  const { clauses, referenceSpan } = setting.given;
  if (clauses.reference !== null) {
    const key = nameKey(clauses.reference);
    const index = labels.findIndex((label) => label !== null && nameKey(label) === key);
    if (index !== -1) return settled(index);
    const known = labels
      .map((label, at) => label ?? (at === 0 ? 'the first group' : 'the second group'))
      .join(', ');
    return refused(
      diagnosis('reference-unknown', referenceSpan ?? { from: 0, to: 0 }, [clauses.reference, known]),
    );
  }
  const earlier = earlierOf(labels);
  if (earlier === null || earlier === labels.length - 1) return settled(labels.length - 1);
  return settled(earlier);
}

/** Words that end in a connector, or hold a total, are no name: what was meant as a figure there could not be read as one. */
const isNoName = (label: string) =>
  /(?:^|\s)(?:of|from|per|than|to|vs\.?)$/i.test(label) ||
  /(?:^|\s)(?:of|vs\.?) \d/i.test(label) ||
  /^(?:is|are|was|were) that\b/i.test(label);

const isQuoted = (from: number, typed: string) => /["\u201c\u201e\u00ab]/.test(typed[from] ?? '');

/** The same name twice is refused, and so are too many groups and a person as a name. */
export function checkNames(
  items: readonly Item[],
  labels: readonly (string | null)[],
  setting: Setting,
): Settled<null> {
  const beyond = items[setting.mostGroups];
  if (beyond !== undefined)
    return refused(diagnosis('too-many-groups', beyond.span, [String(setting.mostGroups)]));
  const seen = new Set<string>();
  for (const [index, label] of labels.entries()) {
    const item = items[index];
    if (label === null || item === undefined) continue;
    const place = item.name ?? item.after ?? item;
    if (isNoName(label) && !isQuoted(place.span.from, setting.typed))
      return refused(diagnosis('unread-name', place.span, [label], linesToTry.slice(0, 2)));
    if (label.startsWith('@')) return refused(diagnosis('mention-as-name', place.span));
    if (seen.has(nameKey(label))) return refused(diagnosis('same-name-twice', place.span, [label]));
    seen.add(nameKey(label));
  }
  return settled(null);
}

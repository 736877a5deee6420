import { unitKey } from './exposures.ts';
import type { Item } from './tree.ts';

/** How long a group was watched, where the words behind its figure say so: `18 of 1,204 in 30 days`. */
export interface Watched {
  readonly text: string;
  readonly amount: number;
  readonly unit: string;
}

const timeBehind =
  /(?:^|\s)(?:in|over|within|during) (\d[\d,]*(?:\.\d+)?) ((?:\S+[ -])?(?:seconds?|minutes?|hours?|days?|nights?|weeks?|months?|quarters?|years?))$/i;

/** The time behind an item's figure, and the item without those words. */
export function withoutWatched(item: Item): { readonly item: Item; readonly watched: Watched | null } {
  const found = item.after === null ? null : timeBehind.exec(item.after.text);
  if (item.after === null || found?.[1] === undefined || found[2] === undefined)
    return { item, watched: null };
  const rest = item.after.text.slice(0, found.index).trim();
  return {
    item: { ...item, after: rest === '' ? null : { ...item.after, text: rest } },
    watched: {
      text: `${found[1]} ${found[2]}`,
      amount: Number(found[1].replaceAll(',', '')),
      unit: found[2],
    },
  };
}

/** Whether two times are the same length. */
export const sameWatched = (one: Watched | null, other: Watched | null): boolean =>
  one === null || other === null
    ? one === other
    : one.amount === other.amount && unitKey(one.unit) === unitKey(other.unit);

import type { Span } from './question.ts';

/** Characters shown around the place; a longer excerpt wraps on a phone and the marker then points at nothing. */
const around = 24;

/**
 * The place of a diagnosis, for two lines of fixed-width text: at most 24 characters before and after it, and a marker
 * under it. Line ends and tabs are shown as spaces so that the marker stays under its place.
 */
export function placeExcerpt(
  line: string,
  { from, to }: Span,
): { readonly line: string; readonly marker: string } {
  const end = Math.min(Math.max(to, from + 1), from + around);
  const start = Math.max(0, from - around);
  const stop = Math.min(line.length, end + around);
  const before = start > 0 ? '\u2026' : '';
  const after = stop < line.length ? '\u2026' : '';
  const shown = line.slice(start, stop).replace(/\s/g, ' ');
  const width = Math.max(1, Math.min(end, Math.max(line.length, from + 1)) - from);
  return {
    line: `${before}${shown}${after}`,
    marker: `${' '.repeat(before.length + from - start)}${'^'.repeat(width)}`,
  };
}

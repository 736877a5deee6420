import { fixture } from './error-of.ts';

type Seen = 'primary' | 'secondary' | 'memory';
type Printed = string | { readonly [key: string]: Printed } | readonly Printed[];
interface Source {
  readonly id: string;
  readonly source: string;
  readonly place: string;
  readonly seen: Seen;
  readonly outputs: Printed;
}

/** A row that holds some of a source's printed figures against src/stats. `figures` are paths in the source's `outputs`. */
export interface Checked {
  readonly id: string;
  readonly figures: readonly string[];
  /** Where these figures were seen in another way than the rest. */
  readonly seen?: Seen;
  readonly note?: string;
}

const { list, added } = fixture<{ readonly list: readonly Source[]; readonly added: readonly Source[] }>(
  'published-sources.json',
);
/** The worked examples that were collected, and two more. */
export const sources = new Map([...list, ...added].map((each) => [each.id, each]));

function sourceOf(id: string): Source {
  const found = sources.get(id);
  if (found === undefined) throw new Error(`no source ${id}`);
  return found;
}

/** All figures printed in a source, by path: `wilson.0` and `wilson.1`. */
export const figuresOf = (id: string) => new Map(flat(sourceOf(id).outputs, ''));

function flat(printed: Printed, path: string): readonly (readonly [string, string])[] {
  if (typeof printed === 'string') return [[path, printed]];
  return Object.entries(printed).flatMap(([key, each]) => flat(each, path === '' ? key : `${path}.${key}`));
}

/** The paths that a path stands for: itself or all below it. */
export function pathsUnder(id: string, path: string): readonly string[] {
  const found = [...figuresOf(id).keys()].filter((each) => each === path || each.startsWith(`${path}.`));
  if (found.length === 0) throw new Error(`${id} prints no ${path}`);
  return found;
}

/** The figures as printed, in the order of their paths; `null` for an infinity, which is no limit to us. */
export const printedOf = (id: string, paths: readonly string[]) =>
  paths
    .flatMap((path) => pathsUnder(id, path))
    .map((path) => {
      const figure = figuresOf(id).get(path) ?? '';
      return figure === 'Inf' ? null : figure;
    });

/** The source in full, as a title names it. */
export function named({ id, seen, note }: Pick<Checked, 'id' | 'seen' | 'note'>): string {
  const source = sourceOf(id);
  const how = { primary: 'seen', secondary: 'seen quoted', memory: 'from memory' }[seen ?? source.seen];
  return `${source.source} ${source.place}; ${how}${note === undefined ? '' : `; ${note}`}`;
}

/** Half a unit in the last printed place. */
export const halfUnit = (printed: string) => 0.5 * 10 ** -(printed.split('.')[1]?.length ?? 0);

/** Whether a value prints as the figure, and a hair more for values that end in a 5. */
export const printsAs = (value: number | null, figure: string | null) =>
  value === null || figure === null
    ? value === figure
    : Math.abs(value - Number(figure)) <= halfUnit(figure) * 1.0000002;

import { describe, expect, it } from 'vitest';
import { fixture } from './error-of.ts';
import { nameOf, valuesOf } from './published-methods.ts';
import type { MethodName } from './published-methods.ts';
import { figuresOf, named, pathsUnder, printedOf, printsAs, sources } from './published-sources.ts';
import type { Checked } from './published-sources.ts';

interface Worked {
  readonly method: MethodName;
  readonly input: readonly (readonly number[])[];
  readonly level?: number;
  /** The place of the figure among the method's values, where it is one of them. */
  readonly at?: number;
  /** What the printed figure counts per: 100 for per cent. */
  readonly per?: number;
}
const published = fixture<{
  readonly rows: readonly (Checked & Worked)[];
  readonly screening: readonly Checked[];
  readonly curves: readonly Checked[];
  readonly mortalityRatios: readonly Checked[];
}>('published.json');
const unchecked = fixture<{
  readonly contradicted: readonly (Omit<Checked, 'figures'> &
    Worked & { readonly figure: string; readonly at: number; readonly ours: string; readonly why: string })[];
  readonly notCovered: readonly {
    readonly reason: string;
    readonly figures: Readonly<Record<string, readonly string[]>>;
  }[];
}>('published-unchecked.json');

const numbers = (input: readonly (readonly number[])[]) => input.map((row) => row.join(', ')).join(' | ');

describe('printed figures come out to the digits printed', () => {
  for (const row of published.rows) {
    const { id, figures, method, input, level, per, at } = row;
    const printed = printedOf(id, figures);
    const times = per === undefined ? '' : `, times ${per}`;
    it(`${nameOf(method)} of ${numbers(input)}${times} is ${printed.join(' and ')} (${named(row)})`, () => {
      const values = valuesOf(method, input, level, per).filter((_, each) => at === undefined || each === at);
      expect(values.length).toBe(printed.length);
      values.forEach((value, each) => {
        expect(printsAs(value, printed[each] ?? null), `${value} for ${printed[each]}`).toBe(true);
      });
    });
  }
});

describe('printed figures that the counts contradict', () => {
  for (const row of unchecked.contradicted) {
    const { id, figure, method, input, level, per, at, ours, why } = row;
    const [printed = null] = printedOf(id, [figure]);
    it(`${figure} is printed as ${printed}, and ${nameOf(method)} of ${numbers(input)} is ${ours}: ${why} (${named(row)})`, () => {
      const value = valuesOf(method, input, level, per)[at] ?? null;
      expect(printsAs(value, ours), `${value} for ${ours}`).toBe(true);
      expect(printsAs(value, printed)).toBe(false);
    });
  }
});

describe('the collected worked examples', () => {
  it('are 76, with two more, and each of their 639 printed figures is checked, contradicted or listed with the reason, once', () => {
    const claims = [
      ...[published.rows, published.screening, published.curves, published.mortalityRatios]
        .flat()
        .map(({ id, figures }) => ({ id, figures })),
      ...unchecked.contradicted.map(({ id, figure }) => ({ id, figures: [figure] })),
      ...unchecked.notCovered.flatMap(({ figures }) =>
        Object.entries(figures).map(([id, paths]) => ({ id, figures: paths })),
      ),
    ];
    const claimed = claims.flatMap(({ id, figures }) =>
      figures.flatMap((figure) => pathsUnder(id, figure).map((path) => `${id} ${path}`)),
    );
    const printed = [...sources.keys()].flatMap((id) =>
      [...figuresOf(id).keys()].map((path) => `${id} ${path}`),
    );
    expect(claimed.toSorted()).toEqual(printed.toSorted());
    expect([sources.size, printed.length]).toEqual([78, 639]);
  });

  for (const { reason, figures } of unchecked.notCovered)
    it(`are not covered in ${Object.keys(figures).join(', ')} where the figure is of this kind. ${reason}`, () => {
      for (const [id, paths] of Object.entries(figures))
        for (const path of paths) expect(pathsUnder(id, path)).not.toEqual([]);
    });
});

import { diagnosis } from './diagnosis.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { grouped, writtenNumber } from './numbers.ts';
import type { Diagnosis, ReadingRemark } from './question.ts';

/** A pasted table as the line that says the same, with the places of what was typed; or what is wrong with it. */
export type TableReading =
  | { readonly kind: 'none' }
  | { readonly kind: 'line'; readonly folded: Folded }
  | { readonly kind: 'fault'; readonly fault: Diagnosis };

/** A cell of the table: its text, and where it stands in the folded text. */
interface Cell {
  readonly text: string;
  readonly from: number;
  readonly to: number;
}
type Row = readonly Cell[];

const numeric = /^<?\d[\d,.' ]*(?:k|m|bn)?$/i;
const figure = /^<?\d[\d,.']* ?(?:of|out of|in|\/) ?\d[\d,.']*$/i;
const totalName = /^(?:grand )?(?:total|totals|all|both|sum|overall|together)$/i;
const columnWord = /^(?:cases?|counts?|events?|incidents?|n|no|number|totals?|all|of|people|out of)$/i;

/**
 * Reads a pasted table: rows of cells with tabs, two or more spaces or bars between them. A first row without numbers names the
 * groups. Label, count and total make a group a row; with two or more pairs of count and total, or figures such as `3/900`, the
 * rows are layers. A row "total" that is the sum of the columns is left out, with a remark. Linear in the length of the line.
 */
export function tableOf(folded: Folded): TableReading {
  const lines = linesOf(folded.text);
  const rows = lines.map(({ from, to }) => cellsOf(folded.text, from, to));
  const width = Math.max(...rows.map((row) => row.length));
  const data = rows.filter((row) => row.length === width && row.slice(1).every(({ text }) => isFigure(text)));
  if (
    width < 3 &&
    !(width === 2 && data.length > 1 && data.every(([, cell]) => figure.test(cell?.text ?? '')))
  )
    return { kind: 'none' };
  if (data.length < 2) return { kind: 'none' };
  const [first] = rows;
  const header = first !== undefined && first !== data[0] && first.length > 1 ? first : null;
  const rest = rows.filter((row) => row.length > 0 && row !== header && !data.includes(row));
  // Anything else that has several cells is no table that can be read.
  if (rest.some((row) => row.length > 1)) return { kind: 'none' };
  const paired = data.every((row) => row.slice(1).every(({ text }) => numeric.test(text)));
  if (paired && width % 2 === 0) return { kind: 'none' };
  if (!paired && !data.every((row) => row.slice(1).every(({ text }) => figure.test(text))))
    return { kind: 'none' };
  const { rows: kept, remark, fault } = withoutTotal(data, folded);
  if (fault !== null) return { kind: 'fault', fault };
  const swapped = paired ? countAboveTotal(kept, folded) : null;
  if (swapped !== null) return { kind: 'fault', fault: swapped };
  return { kind: 'line', folded: written(kept, header, rest, paired, folded, remark) };
}

const isFigure = (text: string) => numeric.test(text) || figure.test(text);

function linesOf(text: string): { readonly from: number; readonly to: number }[] {
  const lines: { from: number; to: number }[] = [];
  let from = 0;
  for (const line of text.split('\n')) {
    lines.push({ from, to: from + line.length });
    from += line.length + 1;
  }
  return lines;
}

/** The cells of one line; a line without a tab, a wide gap or a leading bar is one cell. */
function cellsOf(text: string, from: number, to: number): Cell[] {
  const line = text.slice(from, to);
  const separator = /^\s*\|/.test(line) ? /\|/g : line.includes('\t') ? /\t/g : / {2,}/g;
  const cells: Cell[] = [];
  let start = 0;
  const push = (end: number) => {
    const piece = line.slice(start, end);
    const lead = piece.length - piece.trimStart().length;
    cells.push({
      text: piece.trim(),
      from: from + start + lead,
      to: from + start + lead + piece.trim().length,
    });
  };
  for (const found of line.matchAll(separator)) {
    push(found.index);
    start = found.index + found[0].length;
  }
  push(line.length);
  // Bars at both ends, and space at the ends of a line, make empty cells.
  while (cells.length > 0 && cells[0]?.text === '') cells.shift();
  while (cells.length > 0 && cells.at(-1)?.text === '') cells.pop();
  return cells.some(({ text: cell }) => /^-+$/.test(cell)) ? [] : cells;
}

const valueOf = ({ text }: Cell) => writtenNumber(text.replace(/ /g, ''), null).value;

/** A row "total" that equals the sums of the columns is left out; one that does not is refused. */
function withoutTotal(
  data: readonly Row[],
  folded: Folded,
): {
  readonly rows: readonly Row[];
  readonly remark: ReadingRemark | null;
  readonly fault: Diagnosis | null;
} {
  const total = data.find(([label]) => totalName.test(label?.text ?? ''));
  if (total === undefined || data.length < 3) return { rows: data, remark: null, fault: null };
  const rows = data.filter((row) => row !== total);
  const parts = (row: Row) =>
    row
      .slice(1)
      .flatMap(({ text }) =>
        text.split(/ ?(?:of|out of|in|\/) ?/i).map((piece) => valueOf({ text: piece, from: 0, to: 0 })),
      );
  const sums = rows.map(parts).reduce((sum, row) => sum.map((value, at) => value + (row[at] ?? 0)));
  const label = total[0];
  const last = total.at(-1);
  const span = typedSpan(folded, label?.from ?? 0, last?.to ?? 0);
  const hidden = rows.some((row) => row.some(({ text }) => text.startsWith('<')));
  if (!hidden && parts(total).some((value, at) => value !== sums[at])) {
    const name = label?.text ?? '';
    return {
      rows,
      remark: null,
      fault: diagnosis('total-not-sum', span, [name, sums.map(grouped).join(' and ')]),
    };
  }
  const text = label?.text ?? '';
  return { rows, remark: { id: 'total-row-left-out', text, readAs: '', span }, fault: null };
}

/** Where a count exceeds its total the second column may be those without: asked, with both added up. */
function countAboveTotal(rows: readonly Row[], folded: Folded): Diagnosis | null {
  for (const row of rows) {
    for (let at = 1; at + 1 < row.length; at += 2) {
      const [count, total] = [row[at], row[at + 1]];
      if (count === undefined || total === undefined || count.text.startsWith('<')) continue;
      if (valueOf(count) <= valueOf(total)) continue;
      const added = rows
        .map((each) => {
          const pairs = each.slice(1).flatMap((cell, place) => {
            const other = each[place + 2];
            return place % 2 === 0 && other !== undefined
              ? [`${cell.text} of ${grouped(valueOf(cell) + valueOf(other))}`]
              : [];
          });
          return `"${each[0]?.text ?? ''}": ${pairs.join(' vs ')}`;
        })
        .join('; ');
      const span = typedSpan(folded, count.from, total.to);
      return diagnosis('second-column', span, [count.text, total.text], [added]);
    }
  }
  return null;
}

/** The names of the groups in a header over pairs of columns, or over one column each. */
function groupNames(header: Row | null, groups: number, paired: boolean): readonly string[] {
  const cells = header?.slice(-groups * (paired ? 2 : 1)).map(({ text }) => text) ?? [];
  if (!paired) return cells.length === groups ? cells : [];
  if (header !== null && header.length - 1 === groups) return header.slice(1).map(({ text }) => text);
  if (cells.length !== groups * 2) return [];
  return Array.from({ length: groups }, (_, at) => {
    const words = (cells[at * 2] ?? '').split(' ');
    while (words.length > 1 && columnWord.test(words.at(-1) ?? '')) words.pop();
    return words.join(' ');
  });
}

/** Writes the table as a line, each piece with the place of its cell. */
function written(
  rows: readonly Row[],
  header: Row | null,
  rest: readonly Row[],
  paired: boolean,
  folded: Folded,
  remark: ReadingRemark | null,
): Folded {
  const groups = ((rows[0]?.length ?? 1) - 1) / (paired ? 2 : 1);
  const names = groups > 1 ? groupNames(header, groups, paired) : [];
  const line = new LineWriter(folded);
  const by = header?.[0];
  if (groups > 1 && by !== undefined && header?.length === rows[0]?.length && by.text !== '') {
    line.add('by "', by);
    line.cell(by);
    line.add('":\n', by);
  }
  for (const row of rows) {
    const [label] = row;
    if (label === undefined) continue;
    line.add('"', label);
    line.cell(label);
    line.add('": ', label);
    for (let group = 0; group < groups; group += 1) {
      const at = 1 + group * (paired ? 2 : 1);
      const [count, total] = [row[at], row[at + 1]];
      if (count === undefined) continue;
      if (group > 0) line.add(' vs ', count);
      if (names[group] !== undefined) line.add(`"${names[group] ?? ''}": `, count);
      line.cell(count);
      if (!paired || total === undefined) continue;
      line.add(' of ', count);
      line.cell(total);
    }
    line.add('\n', row.at(-1) ?? label);
  }
  for (const row of rest) {
    const [cell] = row;
    if (cell === undefined) continue;
    line.cell(cell);
    line.add('\n', cell);
  }
  return line.folded(remark);
}

/** Puts a folded text together out of cells and what stands between them. */
class LineWriter {
  #text = '';
  readonly #from: number[] = [];
  readonly #to: number[] = [];
  readonly #source: Folded;

  constructor(source: Folded) {
    this.#source = source;
  }

  /** A cell as it stands, with the places of its characters. */
  cell({ from, to }: Cell): void {
    for (let at = from; at < to; at += 1) {
      this.#text += (this.#source.text[at] ?? '').replace('"', "'");
      this.#from.push(this.#source.from[at] ?? 0);
      this.#to.push(this.#source.to[at] ?? 0);
    }
  }

  /** What was not typed, at the place of a cell. */
  add(text: string, { from, to }: Cell): void {
    const place = typedSpan(this.#source, from, to);
    for (const unit of text.split('')) {
      this.#text += unit;
      this.#from.push(place.from);
      this.#to.push(place.to);
    }
  }

  folded(remark: ReadingRemark | null): Folded {
    const { remarks, typed } = this.#source;
    this.#from.push(typed.length);
    return {
      text: this.#text,
      from: this.#from,
      to: this.#to,
      remarks: remark === null ? remarks : [...remarks, remark],
      typed,
    };
  }
}

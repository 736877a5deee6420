import { plainShare } from './coverage-forms.ts';
import { diagnosis } from './diagnosis.ts';
import { countQuantity, refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Clauses, Quantity, Span } from './question.ts';
import type { TreePart } from './tree.ts';

type ClausePart = Extract<TreePart, { kind: 'clause' }>;

/** The clauses of a line, and the number of all cases from `of 75 cases`. */
export interface SettledClauses {
  readonly clauses: Clauses;
  readonly ofCases: { readonly quantity: Quantity; readonly noun: string | null } | null;
  /** Where `reference` stood, for a name that is no group. */
  readonly referenceSpan: Span | null;
  /** Where `try` stood, for a question without coverage. */
  readonly trySpan?: Span;
}

const none: Clauses = {
  level: null,
  per: null,
  reference: null,
  population: null,
  among: null,
  period: null,
  source: null,
  note: null,
  exact: false,
  designEffect: null,
  everyone: false,
  onlyMe: false,
};

export const noClauses = none;

const clauseWords: Partial<Record<ClausePart['name'], string>> = {
  onlyMe: 'only me',
  ofCases: 'of ... cases',
  designEffect: 'design effect',
  everyone: 'counted: everyone',
};
/** How many coverages a table of ratios may have: more do not fit a message. */
const mostTried = 6;

/** Settles the clauses one by one; the first that cannot be is refused with its place. */
export function settleClauses(parts: readonly ClausePart[], typed: string): Settled<SettledClauses> {
  let found: SettledClauses = { clauses: none, ofCases: null, referenceSpan: null };
  const seen = new Set<string>();
  for (const part of parts) {
    const word = clauseWords[part.name] ?? part.name;
    if (seen.has(part.name)) return refused(diagnosis('clause-twice', part.span, [word]));
    seen.add(part.name);
    const next = withClause(found, part, typed);
    if (!next.ok) return next;
    found = next.value;
  }
  if (found.clauses.exact && found.clauses.designEffect !== null) {
    const span = parts.find(({ name }) => name === 'designEffect')?.span ?? { from: 0, to: typed.length };
    return refused(diagnosis('exact-with-design-effect', span));
  }
  return settled(found);
}

function withClause(found: SettledClauses, part: ClausePart, typed: string): Settled<SettledClauses> {
  const { clauses } = found;
  const set = (more: Partial<Clauses>) =>
    settled<SettledClauses>({ ...found, clauses: { ...clauses, ...more } });
  switch (part.name) {
    case 'level': {
      const text = `${part.number?.text ?? part.body.replace('%', '')}%`;
      const value = Number(((part.number?.value ?? NaN) / 100).toPrecision(15));
      if (!(value >= 0.5 && value <= 0.9999))
        return refused(diagnosis('level-out-of-range', part.span, [text]));
      return set({ level: { value, text } });
    }
    case 'per':
      if (part.number === null || part.number.value < 1 || !Number.isInteger(part.number.value)) {
        return refused(diagnosis('not-whole', part.span, [part.body]));
      }
      return set({ per: part.number.value });
    case 'population':
    case 'ofCases': {
      if (part.number === null)
        return refused(diagnosis('clause-without-value', part.span, [part.name, 'population 84,000']));
      const quantity = countQuantity({ written: part.number, suppressed: false }, part.span, typed);
      if (!quantity.ok) return quantity;
      if (quantity.value.value === 0)
        return refused(diagnosis('total-zero', part.span, [quantity.value.text]));
      if (part.name === 'population') return set({ population: quantity.value });
      const noun = part.body === '' ? null : part.body;
      return settled({ ...found, ofCases: { quantity: quantity.value, noun } });
    }
    case 'reference':
      return settled({ ...found, clauses: { ...clauses, reference: part.body }, referenceSpan: part.span });
    case 'among':
    case 'period':
    case 'source':
    case 'note':
      return set({ [part.name]: part.body });
    case 'designEffect': {
      const text = part.number?.text ?? part.body;
      const value = part.number?.value ?? NaN;
      if (!(value >= 1 && value <= 1_000))
        return refused(diagnosis('design-effect-range', part.span, [text]));
      return set({ designEffect: { value, text } });
    }
    case 'everyone':
      return set({ everyone: true });
    case 'exact':
      return set({ exact: true });
    case 'onlyMe':
      return set({ onlyMe: true });
    case 'try': {
      const shares = part.numbers.map((number) => ({ text: `${number.text}%`, value: plainShare(number) }));
      const odd = shares.find(({ value }) => value <= 0 || value >= 1);
      if (odd !== undefined) return refused(diagnosis('coverage-at-end', part.span, [odd.text]));
      if (shares.length > mostTried)
        return refused(diagnosis('too-many-tried', part.span, [String(mostTried)]));
      return settled({ ...found, clauses: { ...clauses, tryCoverages: shares }, trySpan: part.span });
    }
  }
}

import { areTimes } from './labels.ts';
import type { Mark } from './sentence-marks.ts';
import type {
  ChangeNode,
  ClaimNode,
  CountNode,
  PairNode,
  RateNode,
  SentenceNode,
} from './sentence-node-types.ts';
import { complete, named, quoted } from './sentence-drafts.ts';
import type { FigureDraft } from './sentence-drafts.ts';
import { sharesFigure, loneShare, loneCases, twoShares } from './sentence-shares.ts';
import { isOutcome, nounKey, settingOf, subjectBefore } from './sentence-words.ts';

/** Puts the found pieces of a message together into figures, each piece into one. */
export function figuresOf(marks: readonly Mark[], nodes: readonly SentenceNode[]): FigureDraft[] {
  const claims = new Map<number, ClaimNode>();
  for (const node of nodes) if (node.kind === 'claim') claims.set(node.end, node);
  const pieces = withoutStatedShares(
    marks,
    nodes.filter((node) => node.kind !== 'claim' && node.kind !== 'count'),
  );
  const figures: FigureDraft[] = [];
  for (let at = 0; at < pieces.length;) {
    const { figure, used } = figureAt(marks, pieces, at, claims);
    figures.push(figure);
    at += used;
  }
  if (figures.length > 0) return figures;
  const counts = nodes.filter((node) => node.kind === 'count');
  const counted = countsFigure(marks, counts);
  return counted === null ? [] : [counted];
}

/** A percentage in brackets beside its count, or the count in brackets beside its percentage, is not a figure of its own. */
function withoutStatedShares(marks: readonly Mark[], nodes: readonly SentenceNode[]): SentenceNode[] {
  return nodes.filter((node, index) => {
    if (node.kind !== 'share') return true;
    const [before, after] = [nodes[index - 1], nodes[index + 1]];
    const opened = marks[node.start - 1]?.kind === 'open';
    if (before?.kind === 'pair' && opened && node.start - before.total.end <= 4) return false;
    const opens = after?.kind === 'pair' && ['open', 'comma'].includes(marks[after.start - 1]?.kind ?? '');
    return !(opens && after.start - node.end <= 1 && (after.mostOf || after.phrase.noun === ''));
  });
}

interface Taken {
  readonly figure: FigureDraft;
  readonly used: number;
}

function figureAt(
  marks: readonly Mark[],
  nodes: readonly SentenceNode[],
  at: number,
  claims: ReadonlyMap<number, ClaimNode>,
): Taken {
  const node = nodes[at];
  const next = nodes[at + 1];
  const near = next !== undefined && node !== undefined && next.sentence - node.sentence <= 1;
  switch (node?.kind) {
    case 'pair': {
      const group = pairsFrom(nodes, at);
      if (group.length > 1) return { figure: countsOf(group), used: group.length };
      if (near && next.kind === 'share') {
        const figure = sharesFigure(node, next);
        if (figure !== null) return { figure, used: 2 };
      }
      const cases = node.mostOf || (isOutcome(node.phrase.noun) && node.phrase.predicate.length > 0);
      return { figure: cases ? loneCases(node) : countsOf([node]), used: 1 };
    }
    case 'share': {
      const figure =
        near && next.kind === 'share'
          ? twoShares(node, next)
          : near && next.kind === 'pair' && pairsFrom(nodes, at + 1).length === 1
            ? sharesFigure(next, node)
            : null;
      return figure === null ? { figure: loneShare(node), used: 1 } : { figure, used: 2 };
    }
    case 'change': {
      const own = { ...node, subject: node.subject ?? subjectOfClaim(marks, node, claims) };
      const both = near && next.kind === 'change' ? perOther(own, next) : null;
      return both === null ? { figure: changeOf(own), used: 1 } : { figure: both, used: 2 };
    }
    case 'rate': {
      if (near && next.kind === 'rate') return { figure: ratesOf([node, next]), used: 2 };
      return { figure: ratesOf([node]), used: 1 };
    }
    default:
      throw new Error('claims and lone counts are left out before');
  }
}

/** The pairs that make one comparison: in one sentence, or of the same thing in sentences that follow each other. */
function pairsFrom(nodes: readonly SentenceNode[], at: number): PairNode[] {
  const group: PairNode[] = [];
  for (let place = at; place < nodes.length; place += 1) {
    const node = nodes[place];
    const last = group.at(-1);
    if (node?.kind !== 'pair') break;
    if (last !== undefined && node.sentence !== last.sentence) {
      const same = node.phrase.noun === '' || lastWord(node.phrase.noun) === lastWord(last.phrase.noun);
      if (node.sentence - last.sentence > 1 || !same) break;
    }
    group.push(node);
  }
  return group;
}

const lastWord = (noun: string) => nounKey(noun.split(' ').at(-1) ?? '');

function countsOf(pairs: readonly PairNode[]): FigureDraft {
  const { names, unit } = namesOf(pairs);
  const [first] = pairs;
  const noun = first === undefined || first.caseNoun === '' || first.cases.share ? '' : ` ${first.caseNoun}`;
  const line = (withNames: boolean, withNouns: boolean) =>
    pairs
      .map(({ cases, total }, index) => {
        const name = withNames ? named(names[index] ?? null) : '';
        const of = `${cases.text}${withNouns && index === 0 ? noun : ''} of ${total.text}`;
        return `${name}${of}${withNouns && unit !== '' ? ` ${unit}` : ''}`;
      })
      .join(' vs ');
  return complete(
    pairs,
    ['counts'],
    [line(true, true), line(true, false), line(false, true), line(false, false)],
  );
}

/** The names of groups: what their totals are called where that differs, else the words around them, else none. */
function namesOf(pairs: readonly PairNode[]): {
  readonly names: readonly (string | null)[];
  readonly unit: string;
} {
  const nouns = pairs.map(({ phrase }) => phrase.noun);
  if (pairs.length > 1 && distinct(nouns)) return { names: nouns, unit: '' };
  const unit = nouns.find((noun) => noun !== '') ?? '';
  const subjects = pairs.map(({ subject }) => subject);
  const said = pairs.map(({ phrase }) => (pairs.length > 1 ? settingOf(phrase.predicate) : null));
  const mixed = subjects.map((subject, index) => subject ?? said[index] ?? null);
  const names = [subjects, said, mixed].find((each) => distinct(each.map((name) => name ?? '')));
  return { names: names ?? pairs.map(() => null), unit };
}

const distinct = (names: readonly string[]) =>
  names.every((name) => name !== '') && new Set(names.map(nounKey)).size === names.length;

function ratesOf(rates: readonly RateNode[]): FigureDraft {
  const subjects = rates.map(({ subject }) => subject ?? '');
  const said = rates.map(({ phrase }) => settingOf(phrase.predicate) ?? '');
  const names = [subjects, said].find(distinct);
  const line = (chosen: readonly string[] | undefined) =>
    rates.map(({ text }, index) => `${named(chosen?.[index] ?? null)}${text}`).join(' vs ');
  return complete(rates, ['rates'], [line(names), line(undefined)]);
}

const fromTo = (subject: string | null, { earlier, later }: ChangeNode) =>
  `${subject === null ? '' : `${quoted(subject)} `}from ${earlier.text} to ${later.text}`;

/** `"2023": 412 delays vs "2024": 530`, where the years stand in the sentence. */
function atTimes({ earlier, later, times, subject }: ChangeNode): string[] {
  if (times === null) return [];
  const of = subject === null || earlier.form !== 'count' ? '' : ` ${subject}`;
  return [of, ''].map((noun) => `"${times[0]}": ${earlier.text}${noun} vs "${times[1]}": ${later.text}`);
}

function changeOf(change: ChangeNode): FigureDraft {
  return complete(
    [change],
    ['bare-counts', 'counts', 'stated', 'rates'],
    [...atTimes(change), fromTo(change.subject, change), fromTo(null, change)],
  );
}

/** `Ferry delays are up 29% from 412`: what rose stands in front of the claim. */
function subjectOfClaim(
  marks: readonly Mark[],
  change: ChangeNode,
  claims: ReadonlyMap<number, ClaimNode>,
): string | null {
  const before = marks[change.start - 1]?.kind === 'comma' ? change.start - 1 : change.start;
  const claim = claims.get(before);
  return claim === undefined ? null : subjectBefore(marks, claim.start);
}

/** Two changes side by side, of which one may be counted out of the other: delays from 412 to 530, crossings from 10,400 to 12,900. */
function perOther(one: ChangeNode, other: ChangeNode): FigureDraft | null {
  if (one.earlier.form !== 'count' || other.earlier.form !== 'count') return null;
  const smaller = one.earlier.value < other.earlier.value && one.later.value < other.later.value;
  const larger = one.earlier.value > other.earlier.value && one.later.value > other.later.value;
  if (!smaller && !larger) return null;
  const [cases, totals] = smaller ? [one, other] : [other, one];
  const line = (subject: string | null, unit: string | null) =>
    `${subject === null ? '' : `${quoted(subject)} `}from ${cases.earlier.text} of ${totals.earlier.text} to ${cases.later.text} of ${totals.later.text}${unit === null ? '' : ` ${unit}`}`;
  return complete(
    [one, other],
    ['counts'],
    [line(cases.subject, totals.subject), line(null, totals.subject), line(null, null)],
    { line: fromTo(null, one), label: `Only ${one.earlier.text} to ${one.later.text}` },
  );
}

/** Counts without totals: two of one thing are compared as they stand, one alone needs its total. */
function countsFigure(marks: readonly Mark[], counts: readonly CountNode[]): FigureDraft | null {
  const [one, other] = counts;
  if (one === undefined) return null;
  const versus =
    other !== undefined && marks.slice(one.end, other.start).some(({ kind }) => kind === 'versus');
  const alike =
    other !== undefined &&
    (other.noun === '' || one.noun === '' || nounKey(one.noun) === nounKey(other.noun));
  if (other === undefined || other.sentence !== one.sentence || !(alike || versus)) {
    const noun = one.noun === '' ? '' : ` ${one.noun}`;
    const draft = `${one.amount.text}${noun} of ...`;
    return { nodes: [one], lines: [], kinds: [], draft, missing: ['total'], coverage: null, instead: null };
  }
  const pair = [one, other];
  const said = pair.map(({ predicate }) => settingOf(predicate) ?? '');
  const subjects = pair.map(({ subject }) => subject ?? '');
  const names = [said, subjects].find(distinct) ?? [null, null];
  const line = (chosen: readonly (string | null)[]) =>
    pair.map(({ amount }, index) => `${named(chosen[index] ?? null)}${amount.text}`).join(' vs ');
  const overTime = areTimes(names);
  const draft = pair
    .map(({ amount }, index) => `${named(names[index] ?? null)}${amount.text} of ...`)
    .join(' vs ');
  return {
    nodes: pair,
    lines: [line(names), line([null, null])],
    kinds: ['bare-counts'],
    draft,
    missing: overTime ? [] : ['totals'],
    coverage: null,
    instead: null,
  };
}

import { grouped } from './numbers.ts';
import type { PairNode, SentenceNode, ShareNode } from './sentence-node-types.ts';
import { complete, named, quoted } from './sentence-drafts.ts';
import type { FigureDraft } from './sentence-drafts.ts';
import { isNegated, isOutcome, nameOf, nounKey, relatedNames, settingOf, timeOf } from './sentence-words.ts';

/** Shares of cases beside shares of everybody: which of two figures is which, and what the group is called. */

const unnamed = 'this group';

/** `44 of 75 injured wore no helmet, 38% of riders go without`, or `null` where the percentage is of something else. */
export function sharesFigure(pair: PairNode, share: ShareNode): FigureDraft | null {
  if (share.noun === null && !share.coverage) return null;
  if (share.noun !== null && nounKey(share.noun) === nounKey(pair.phrase.noun)) return null;
  if (!belongs(pair, share)) return null;
  const nodes = [pair, share].sort((one, other) => one.start - other.start);
  const caseNoun = pair.phrase.noun === '' ? 'cases' : pair.phrase.noun;
  return sharesOf(nodes, {
    figure: (noun) => `${pair.cases.text} of ${pair.total.text} ${noun}`,
    noun: caseNoun,
    said: pair.phrase.predicate,
    counts: pair.cases.share ? null : [pair.cases.value, pair.total.value],
    coverage: share,
    subject: pair.subject,
    instead: null,
  });
}

/** Whether a percentage can be the coverage of counts: in one sentence, or of what befell people, or said of the same thing. */
function belongs(pair: PairNode, share: ShareNode): boolean {
  if (pair.sentence === share.sentence || pair.mostOf || isOutcome(pair.phrase.noun)) return true;
  const [ofCases, ofAll] = [nameOf(pair.phrase.predicate), nameOf(share.predicate)];
  return ofCases !== null && (ofAll === null ? share.predicate.length > 0 : relatedNames(ofCases, ofAll));
}

/** `71% of the injured had no helmet, 38% of riders go without`; two groups where both are shares of one thing. */
export function twoShares(one: ShareNode, other: ShareNode): FigureDraft | null {
  const nodes = [one, other];
  const lastWord = (noun: string | null) => nounKey(noun?.split(' ').at(-1) ?? '');
  if (one.coverage || other.coverage) return null;
  const nested = one.noun !== null && other.noun !== null && isOutcome(one.noun) !== isOutcome(other.noun);
  const alikeNouns = one.noun !== null && other.noun !== null && lastWord(one.noun) === lastWord(other.noun);
  if (one.noun === null || other.noun === null || (alikeNouns && !nested)) {
    if (one.sentence !== other.sentence) return null;
    const said = nodes.map(({ predicate }) => settingOf(predicate));
    const times = nodes.map(({ predicate }) => timeOf(predicate));
    const nouns = nodes.map(({ noun }, index) => noun ?? said[index] ?? null);
    const alike = nouns[0] != null && nouns[1] != null && nounKey(nouns[0]) === nounKey(nouns[1]);
    const names = alike ? said : nouns;
    const subjects = nodes.map(({ subject }) => subject);
    return complete(
      nodes,
      ['stated'],
      [
        ...(times.includes(null) ? [] : [pairOf(times, nodes)]),
        pairOf(names, nodes),
        pairOf(subjects, nodes),
        pairOf([null, null], nodes),
      ],
    );
  }
  const swapped = isOutcome(other.noun) && !isOutcome(one.noun);
  const [cases, coverage] = swapped ? [other, one] : [one, other];
  const separate = pairOf([one.noun, other.noun], nodes);
  return sharesOf(nodes, {
    figure: (noun) => `${cases.text} of ${noun}`,
    noun: cases.noun ?? 'cases',
    said: cases.predicate,
    counts: null,
    coverage,
    subject: cases.subject,
    instead: { line: separate, label: 'No, two separate groups' },
  });
}

const pairOf = (names: readonly (string | null)[], shares: readonly ShareNode[]) =>
  shares
    .map(({ text }, index) => `${names.includes(null) ? '' : named(names[index] ?? null)}${text}`)
    .join(' vs ');

interface CasesBeside {
  readonly figure: (noun: string) => string;
  readonly noun: string;
  readonly said: readonly string[];
  readonly counts: readonly [number, number] | null;
  readonly coverage: ShareNode;
  readonly subject: string | null;
  readonly instead: FigureDraft['instead'];
}

function sharesOf(nodes: readonly SentenceNode[], given: CasesBeside): FigureDraft | null {
  const { coverage, figure, noun, said, counts, subject, instead } = given;
  const [ofCases, ofAll] = [nameOf(said), nameOf(coverage.predicate)];
  if (ofCases !== null && ofAll !== null && !relatedNames(ofCases, ofAll)) return null;
  const name = ofCases ?? ofAll ?? subject ?? coverage.subject ?? unnamed;
  const opposite = areOpposite(said, coverage.predicate);
  if (opposite) {
    // `44 of 75 wore no helmet, though 62% of riders wear one`: the percentage is of the others.
    const [own, rest] = isNegated(said)
      ? [name, name.replace(/^(?:no|not) /, '')]
      : [name, ofAll ?? `no ${name}`];
    if (counts === null || own === rest) return null;
    const [cases, total] = counts;
    const of = coverage.noun === null ? '' : ` of ${coverage.noun}`;
    const head = `cases: ${quoted(own)} ${grouped(cases)}, ${quoted(rest)} ${grouped(total - cases)}; coverage: ${quoted(rest)} ${coverage.text}`;
    return { ...complete(nodes, ['shares'], [`${head}${of}`, head], instead), coverage };
  }
  const of = coverage.noun === null ? '' : `, ${coverage.text} of ${coverage.noun}`;
  const draft = complete(
    nodes,
    ['shares'],
    [
      ...(of === '' ? [] : [`${named(name)}${figure(noun)}${of}`, `${named(name)}${figure('cases')}${of}`]),
      `${named(name)}${figure(noun)}; coverage ${coverage.text}`,
      `${named(name)}${figure('cases')}; coverage ${coverage.text}`,
    ],
    instead,
  );
  return { ...draft, coverage };
}

/** Words that only take up what was said: `60% of the injured did`. */
const takesUp = /^(?:did|do|does|so|too|have|had|are|were)$/i;

/** Whether one is said of those with, the other of those without. After `werent wearing` a bare `do` is the opposite, after `go without` it is the same. */
function areOpposite(one: readonly string[], other: readonly string[]): boolean {
  if (one.length === 0 || other.length === 0) return false;
  const [short, full] = one.every((word) => takesUp.test(word)) ? [one, other] : [other, one];
  if (short.every((word) => takesUp.test(word)))
    return full.some((word) => /n['\u2019]?t$|^not$/i.test(word));
  return isNegated(one) !== isNegated(other);
}

/** `Most of the injured (44 of 75) wore no helmet`: what share of everybody goes without? */
export function loneCases(pair: PairNode): FigureDraft {
  const { cases, total, phrase } = pair;
  const noun = phrase.noun === '' ? 'cases' : phrase.noun;
  const draft = `${nameOf(phrase.predicate) ?? unnamed}: ${cases.text} of ${total.text} ${noun}, ...% of ...`;
  return { nodes: [pair], lines: [], kinds: [], draft, missing: ['coverage'], coverage: null, instead: null };
}

/** One percentage: of cases it needs the share of everybody, of anything else a second group. */
export function loneShare(share: ShareNode): FigureDraft {
  const { text, noun, predicate, percentage } = share;
  const base = { nodes: [share], lines: [], kinds: [], coverage: null, instead: null };
  if (noun !== null && (isOutcome(noun) || !percentage || predicate.length > 0)) {
    const draft = `${nameOf(predicate) ?? unnamed}: ${text} of ${noun}, ...% of ...`;
    if (isOutcome(noun)) return { ...base, draft, missing: ['coverage'] };
  }
  return { ...base, draft: `${noun === null ? '' : `${noun}: `}${text} vs ...`, missing: ['second-group'] };
}

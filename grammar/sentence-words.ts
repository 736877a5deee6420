import type { Mark } from './sentence-marks.ts';

/** What words around a figure say: who is counted, what was found of them, and what a group of them may be called. */

/** Farther than this a phrase is not followed: it keeps the cost of a line linear, and names short. */
export const reach = 12;

const negation = /^(?:no|not|without|never|none|neither|lack(?:s|ed|ing)?|.+n['\u2019]?t|cannot)$/i;
const negatedVerb =
  /^(?:do|does|did|is|are|was|were|has|have|had|ca|could|wo|would|should)n['\u2019]?t$|^cannot$/i;
const verbs = new Set(
  (
    'is are was were be been being am has have had having do does did go goes went gone going wear wears wore wearing worn ' +
    'involve involves involved involving use uses used using ride rides rode take takes took travel travels travelled carry carries ' +
    'carried come comes came coming happen happens happened occur occurs occurred occurring work works worked live lives lived ' +
    'lack lacks lacked lacking say says said got get gets own owns owned hold holds held make makes made account accounts ' +
    'saw see sees record recorded report reported reports count counted call called show shows showed found find finds ' +
    'need needs needed stay stays stayed sit sits sat stood stand stands begin begins began leave leaves left run runs ran ' +
    'arrive arrives arrived fail fails failed can could will would may might should must'
  ).split(' '),
);
const changing =
  /^(?:up|down|rise|rises|rose|risen|rising|fall|falls|fell|fallen|falling|grow|grows|grew|grown|growing|climb|climbs|climbed|drop|drops|dropped|increase|increases|increased|decrease|decreases|decreased|jump|jumps|jumped|cut|cuts|reduce|reduces|reduced|double|doubles|doubled|doubling|treble|trebled|triple|tripled|halve|halves|halved|halving|change|changes|changed|more|fewer|less|higher|lower|soared|slumped|declined?)$/i;
const attribute = /^(?:with|without|not|no|never|aged|who|which|that|whom|whose)$/i;
const place =
  /^(?:at|on|by|during|since|after|before|through|throughout|across|near|when|where|because|last|this|under|over|for|as)$/i;
const joiner =
  /^(?:and|or|but|while|whereas|though|although|yet|compared|only|just|even|however|so|if|&|versus|too|either|also|please|thanks|cheers)$/i;
const article = /^(?:the|a|an|all|our|their|its|his|her|any|some|these|those|this|that|every|each)$/i;
const filler =
  /^(?:the|a|an|any|their|our|its|his|her|been|being|to|from|on|at|in|of|for|by|as|just|only|also|still|often|there|ever|actually|already|who|which|that)$/i;
const pronoun = /^(?:them|these|those|us|whom|which|it|they|who)$/i;

/** What befalls people rather than who they are: a percentage of these is a share of cases. */
const outcomeNoun =
  /(?:^|[ -])(?:injuries|injury|deaths?|casualt(?:y|ies)|victims?|cases?|patients?|admissions?|accidents?|crash(?:es)?|incidents?|collisions?|complaints?|infections?|poisonings?|drownings?|delays?|breakdowns?|failures?|faults?|errors?|falls|thefts?|fires?|spills?|offences?|burglar(?:y|ies))$/i;
const outcomeWord =
  /(?:^|[ -])(?:injured|hurt|killed|dead|died|admitted|hospitali[sz]ed|infected|ill|sick|poisoned|drowned|wounded|stranded)(?: |$)|^(?:late|delayed|contaminated|cancelled)(?: |$)/i;

export const isOutcome = (noun: string) => outcomeNoun.test(noun) || outcomeWord.test(noun);
export const isPronoun = (word: string) => pronoun.test(word);
export const isChanging = (word: string) => changing.test(word);
export const isJoiner = (word: string) => joiner.test(word);
export const isVerb = (word: string) => verbs.has(word.toLowerCase()) || negatedVerb.test(word);
const startsPredicate = (word: string) => isVerb(word) || attribute.test(word) || changing.test(word);

/** The words behind a figure: who is counted (`people hurt`), and what is said of them (`werent wearing a helmet`). */
export interface Phrase {
  readonly noun: string;
  readonly predicate: readonly string[];
  /** Index behind the last mark that was taken. */
  readonly end: number;
  /** Index behind the noun. */
  readonly nounEnd: number;
}

const isPlain = ({ kind }: Mark) =>
  kind === 'word' || kind === 'in' || kind === 'of' || kind === 'from' || kind === 'to';

/** Reads the phrase that starts at a mark; it ends at punctuation, a joining word or another figure. */
export function phraseAt(marks: readonly Mark[], start: number): Phrase {
  const noun: string[] = [];
  const predicate: string[] = [];
  let at = start;
  let nounEnd = start;
  let inNoun = true;
  for (; at < start + reach; at += 1) {
    const mark = marks[at];
    if (mark === undefined || !isPlain(mark) || joiner.test(mark.text)) break;
    const state = noun.length > 0 && /^(?:late|delayed|contaminated|cancelled)$/i.test(mark.text);
    if (inNoun && (state || mark.kind !== 'word' || startsPredicate(mark.text) || place.test(mark.text)))
      inNoun = false;
    if (!inNoun) predicate.push(mark.text);
    else if (noun.length > 0 || !article.test(mark.text)) noun.push(mark.text);
    if (inNoun) nounEnd = at + 1;
  }
  const short = noun.length <= 4 ? noun.join(' ') : '';
  return { noun: short, predicate, end: at, nounEnd };
}

const settingWord = /^(?:in|at|on|by|from|during|of|last|this|to|near|across)$/i;

/** What a group may be called after what is said of it: `werent wearing a helmet` is `no helmet`; `null` where nothing is left. */
export function nameOf(predicate: readonly string[]): string | null {
  let negated = false;
  let bareNot = false;
  // `in Harrowmere wore no helmet`: where they were comes before what is said of them.
  const verb = predicate.findIndex(isVerb);
  let at = verb > 0 && settingWord.test(predicate[0] ?? '') ? verb : 0;
  for (; at < predicate.length; at += 1) {
    const word = predicate[at] ?? '';
    if (negation.test(word)) {
      negated = true;
      bareNot = word.toLowerCase() === 'not' || negatedVerb.test(word);
    } else if (isVerb(word)) {
      if (!/^(?:is|are|was|were|be|been|being|had|has|have|do|does|did)$/i.test(word)) bareNot = false;
    } else if (filler.test(word)) {
      if (/^(?:a|an|any|their|our)$/i.test(word)) bareNot = false;
    } else break;
  }
  const rest: string[] = [];
  for (; at < predicate.length && rest.length < 4; at += 1) {
    const word = predicate[at] ?? '';
    if (
      place.test(word) ||
      isVerb(word) ||
      (rest.length > 0 && /^(?:in|of|from|to|at|the|a|an|who|which|that|with|without)$/i.test(word))
    )
      break;
    rest.push(word);
  }
  if (rest.length === 0) return null;
  if (rest.every((word) => pointing.test(word))) return null;
  const name = rest.join(' ');
  if (!negated) return name;
  return bareNot ? `not ${name}` : `no ${name}`;
}

/** The words in front of a figure that may name what it counts: `on night shifts`, `ferry delays are up`. */
export function subjectBefore(marks: readonly Mark[], end: number): string | null {
  const words: string[] = [];
  let year: string | null = marks[end - 1]?.kind === 'comma' ? yearBehind(marks, end - 2) : null;
  if (year !== null) return year;
  for (let at = end - 1; at >= Math.max(0, end - reach); at -= 1) {
    const mark = marks[at];
    year = yearBehind(marks, at);
    if (mark === undefined || (mark.kind !== 'word' && mark.kind !== 'colon' && mark.kind !== 'in')) break;
    if (mark.kind === 'colon') {
      if (words.length > 0) break;
      continue;
    }
    if (joiner.test(mark.text)) break;
    words.unshift(mark.text);
  }
  // `The council says 31 of 9,240`: who says it is not who is counted.
  words.splice(0, words.findLastIndex((word) => saying.test(word)) + 1);
  while (words.length > 0 && isSetting(words.at(-1) ?? '')) words.pop();
  while (words.length > 0 && isOpening(words[0] ?? '')) words.shift();
  // `Helmet use is 62%`: there it is no verb.
  const verb = words.findIndex((word) => word !== 'use' && (isVerb(word) || changing.test(word)));
  const named = verb === -1 ? words : words.slice(0, verb);
  if (named.length === 0) return year;
  if (named.length > 4 || named.every((word) => pronoun.test(word))) return null;
  return named.join(' ');
}

/** `in 2023 there were 412`: the year that ends at a mark. */
const yearBehind = (marks: readonly Mark[], at: number): string | null =>
  marks[at - 1]?.kind === 'in' && /^(?:19|20)\d\d$/.test(marks[at]?.text ?? '')
    ? (marks[at]?.text ?? null)
    : null;

const saying =
  /^(?:says?|said|reports?|reported|counted|found|claims?|claimed|tells?|told|writes|wrote|wrong|right)$/i;
const isSetting = (word: string) =>
  (word !== 'use' && isVerb(word)) ||
  changing.test(word) ||
  article.test(word) ||
  place.test(word) ||
  /^(?:in|there|by|with|we|they|it|had|now)$/i.test(word);
const isOpening = (word: string) =>
  article.test(word) ||
  place.test(word) ||
  isVerb(word) ||
  /^(?:in|among|amongst|with|there|we|they|it|i|can|so|now|then|about|most|many|few|of|half)$/i.test(word);

/** `Most of the injured, 44 of 75, wore ...`: the noun that the figure in brackets or commas belongs to. */
export function mostOfBefore(marks: readonly Mark[], end: number): string | null {
  const words: string[] = [];
  for (let at = end - 1; at >= Math.max(0, end - reach); at -= 1) {
    const mark = marks[at];
    if (mark === undefined) return null;
    if (mark.kind === 'of')
      return words.length > 0 && words.length <= 4 && isAmount(marks[at - 1]) ? words.join(' ') : null;
    if ((mark.kind === 'comma' || mark.kind === 'open') && at === end - 1) continue;
    if (mark.kind !== 'word') return null;
    if (!article.test(mark.text)) words.unshift(mark.text);
  }
  return null;
}

const amount = /^(?:most|many|some|few|more|majority|all|part|number|share|half|third|proportion)$/i;
const isAmount = (mark: Mark | undefined) =>
  mark !== undefined && (mark.kind === 'percent' || mark.kind === 'fraction' || amount.test(mark.text));

/** How nouns are compared: case and a final s do not make two. */
export const nounKey = (noun: string) => noun.toLowerCase().replace(/s$/, '');

/** Whether what is said is that something is not so: `werent wearing a helmet`, `go without`. */
export const isNegated = (predicate: readonly string[]) => predicate.some((word) => negation.test(word));

/** Words that only point back: `62% of riders wear one`. */
const pointing = /^(?:no|not|one|ones|none|so|it|them|any)$/i;

/** Whether two names can be of one thing: they share a word, or one of them only points back. */
export function relatedNames(one: string, other: string): boolean {
  const words = (name: string) =>
    name
      .split(' ')
      .filter((word) => !pointing.test(word))
      .map((word) => nounKey(word).slice(0, 5));
  const [own, others] = [words(one), words(other)];
  return own.length === 0 || others.length === 0 || own.some((word) => others.includes(word));
}

/** Where or when, which may name a group: `late at night` is `night`, `by day were reported` is `day`; `null` where neither is said. */
export function settingOf(predicate: readonly string[]): string | null {
  const time = timeOf(predicate);
  if (time !== null) return time;
  const at = predicate.findIndex((word) => /^(?:in|at|on|by|from|during|with|without|aged)$/i.test(word));
  if (at === -1) return null;
  const rest = predicate.slice(at);
  const verb = rest.findIndex((word, index) => index > 0 && isVerb(word));
  return nameOf(verb === -1 ? rest : rest.slice(0, verb));
}

/** `530 delays this year`, `412 in 2023`. */
export function timeOf(predicate: readonly string[]): string | null {
  const at = predicate.findIndex((word) => /^(?:last|this|previous)$/i.test(word));
  if (
    at !== -1 &&
    /^(?:year|month|week|quarter|season|spring|summer|autumn|winter)$/i.test(predicate[at + 1] ?? '')
  )
    return `${predicate[at] ?? ''} ${predicate[at + 1] ?? ''}`;
  return null;
}

/** `among the injured 71%`, `of riders, 38%`: the noun that stands in front of its percentage. */
export function nounBefore(marks: readonly Mark[], end: number): string | null {
  const words: string[] = [];
  for (let at = end - 1; at >= Math.max(0, end - 6); at -= 1) {
    const mark = marks[at];
    if (mark === undefined) return null;
    if (mark.kind === 'comma' && at === end - 1) continue;
    if (mark.kind === 'of' || /^(?:among|amongst)$/i.test(mark.text))
      return words.length === 0 ? null : words.join(' ');
    if (mark.kind !== 'word' || isVerb(mark.text) || words.length > 3) return null;
    if (!article.test(mark.text) && !joiner.test(mark.text)) words.unshift(mark.text);
  }
  return null;
}

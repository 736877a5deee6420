import { amountAt, isYear, nounBetween, overAt, sideAt, totalAfter } from './sentence-amounts.ts';
import type { Amount } from './sentence-amounts.ts';
import { claimAt } from './sentence-claims.ts';
import { countAt } from './sentence-counts.ts';
import type { Mark } from './sentence-marks.ts';
import type { ChangeNode, PairNode, RateNode, SentenceNode, ShareNode } from './sentence-node-types.ts';
import {
  isChanging,
  isPronoun,
  mostOfBefore,
  nounBefore,
  phraseAt,
  subjectBefore,
} from './sentence-words.ts';

/** Finds the figures of a message in the order in which they stand. Looks a bounded way ahead at each mark: linear in the message. */
export function nodesOf(marks: readonly Mark[]): SentenceNode[] {
  const nodes: SentenceNode[] = [];
  let sentence = 0;
  let byFrom = false;
  for (let at = 0; at < marks.length;) {
    const node: SentenceNode | null = claimAt(marks, at, sentence) ?? nodeAt(marks, at, sentence, byFrom);
    if (node === null) {
      if (marks[at]?.kind === 'stop') sentence += 1;
      at += 1;
      continue;
    }
    byFrom ||= node.kind === 'pair' && marks[node.total.start - 1]?.kind === 'from';
    nodes.push(node);
    at = Math.max(at + 1, node.end);
  }
  return nodes;
}

function nodeAt(marks: readonly Mark[], at: number, sentence: number, byFrom: boolean): SentenceNode | null {
  return (
    changeAt(marks, at, sentence) ??
    totalFirstAt(marks, at, sentence) ??
    pairAt(marks, at, sentence, byFrom) ??
    rateAt(marks, at, sentence) ??
    shareAt(marks, at, sentence) ??
    countAt(marks, at, sentence)
  );
}

const startOf = (marks: readonly Mark[], at: number) => (marks[at - 1]?.kind === 'about' ? at - 1 : at);

function changeAt(marks: readonly Mark[], at: number, sentence: number): ChangeNode | null {
  const mark = marks[at];
  const behind = marks[at - 1]?.text ?? '';
  if (/^aged?s?$/i.test(behind)) return null;
  const isFrom = mark?.kind === 'from';
  const first = sideAt(marks, isFrom ? at + 1 : at);
  if (first === null) return null;
  const time = yearAt(marks, first.end);
  const noun = nounBetween(marks, time?.end ?? first.end);
  const sign = marks[noun.end];
  const subject = subjectBefore(marks, at);
  const moving = isFrom || /^(?:went|moved)$/i.test(behind) || isChanging(behind) || first.form !== 'count';
  if (sign?.kind === 'arrow' || (sign?.kind === 'to' && moving)) {
    const second = sideAt(marks, noun.end + 1);
    if (second === null || second.form !== first.form) return null;
    const years = [first, second].every(({ text, form }) => form === 'count' && /^(?:19|20)\d\d$/.test(text));
    const clock = /^(?:am|pm|o'clock)$/i.test(marks[second.end]?.text ?? '');
    if (years || clock) return null;
    const until = yearAt(marks, second.end);
    const times = time !== null && until !== null ? ([time.text, until.text] as const) : null;
    const end = until?.end ?? second.end;
    return { kind: 'change', earlier: first, later: second, times, subject, start: at, end, sentence };
  }
  if (isFrom) return null;
  // `530 delays, up from 412`, `rose to 530 from 412`
  let place = noun.end;
  if (marks[place]?.kind === 'comma' || marks[place]?.kind === 'open') place += 1;
  let said = marks[at - 1]?.kind === 'to';
  while (place < noun.end + 4 && isChanging(marks[place]?.text ?? '')) {
    said = true;
    place += 1;
  }
  if (!said || marks[place]?.kind !== 'from') return null;
  const earlier = sideAt(marks, place + 1);
  if (earlier === null || earlier.form !== first.form) return null;
  const toBefore = marks[at - 1]?.kind === 'to' ? subjectBefore(marks, at - 1) : subject;
  const own = noun.text === '' ? toBefore : noun.text;
  return {
    kind: 'change',
    earlier,
    later: first,
    times: null,
    subject: own,
    start: at,
    end: earlier.end,
    sentence,
  };
}

/** `in 2023` behind a figure. */
function yearAt(marks: readonly Mark[], at: number): { readonly text: string; readonly end: number } | null {
  const year = marks[at]?.kind === 'in' ? amountAt(marks, at + 1) : null;
  return year !== null && isYear(year) ? { text: year.text, end: year.end } : null;
}

/** `Of the 75 injured, 44 wore no helmet`; `75 injured, 44 of them without`; `1,204 staff, of whom 18 were off sick`. */
function totalFirstAt(marks: readonly Mark[], at: number, sentence: number): PairNode | null {
  const opening =
    marks[at]?.kind === 'of' && (at === 0 || ['stop', 'comma', 'open'].includes(marks[at - 1]?.kind ?? ''));
  const total = opening ? totalAfter(marks, at + 1) : amountAt(marks, at);
  if (total === null || isYear(total)) return null;
  const phrase = phraseAt(marks, total.end);
  if (phrase.noun === '') return null;
  // What stands between the noun and the comma, `in Harrowmere`, does not matter.
  let place = phrase.end;
  if (marks[place]?.kind === 'comma' || marks[place]?.kind === 'open') place += 1;
  else if (!opening) return null;
  const ofWhom = marks[place]?.kind === 'of' && isPronoun(marks[place + 1]?.text ?? '');
  const cases = amountAt(marks, ofWhom ? place + 2 : place);
  if (cases === null || cases.value > total.value || marks[cases.end]?.kind === 'percent') return null;
  const ofThem = marks[cases.end]?.kind === 'of' && isPronoun(marks[cases.end + 1]?.text ?? '');
  if (!opening && !ofWhom && !ofThem) return null;
  if (opening && marks[cases.end]?.kind === 'of' && !ofThem) return null;
  const after = phraseAt(marks, ofThem ? cases.end + 2 : cases.end);
  return {
    kind: 'pair',
    cases: { ...cases, share: false },
    total,
    caseNoun: '',
    phrase: {
      ...phrase,
      predicate: [...(after.noun === '' ? [] : after.noun.split(' ')), ...after.predicate],
    },
    subject: null,
    mostOf: false,
    start: total.start,
    end: after.end,
    sentence,
  };
}

function pairAt(marks: readonly Mark[], at: number, sentence: number, byFrom: boolean): PairNode | null {
  const amount = amountAt(marks, at);
  if (amount === null) return null;
  const isShare = marks[amount.end]?.kind === 'percent';
  const noun = nounBetween(marks, isShare ? amount.end + 1 : amount.end);
  const connector = marks[noun.end]?.kind;
  const of = connector === 'of' || (connector === 'slash' && noun.text === '');
  const from =
    connector === 'from' &&
    !isShare &&
    (noun.text !== '' || byFrom) &&
    !isChanging(marks[noun.end - 1]?.text ?? '');
  let total: Amount | null = null;
  let caseNoun = noun.text;
  if (of || from) total = totalAfter(marks, noun.end + 1);
  else {
    const over = overAt(marks, amount);
    if (over?.form === 'pair') {
      total = over.total;
      caseNoun = over.noun;
    }
  }
  if (total === null || (!isShare && amount.value > total.value)) return null;
  if (marks[total.end]?.kind === 'percent' || marks[total.end]?.kind === 'slash') return null;
  if (from && marks[total.end]?.kind === 'to') return null;
  const phrase = phraseAt(marks, total.end);
  const before = startOf(marks, amount.start);
  const most = phrase.noun === '' ? mostOfBefore(marks, before) : null;
  // `Most of the injured (44 of 75) wore no helmet`: what is said of them stands behind the bracket or comma.
  const closed = ['close', 'comma'].includes(marks[phrase.end]?.kind ?? '');
  const after =
    most !== null && phrase.predicate.length === 0 && closed ? phraseAt(marks, phrase.end + 1) : phrase;
  const said =
    after === phrase
      ? phrase.predicate
      : [...after.noun.split(' ').filter((word) => word !== ''), ...after.predicate];
  return {
    kind: 'pair',
    cases: {
      ...amount,
      text: isShare ? `${amount.text}%` : amount.text,
      share: isShare,
      end: isShare ? amount.end + 1 : amount.end,
    },
    total,
    caseNoun,
    phrase: { ...phrase, noun: most ?? phrase.noun, predicate: said },
    subject: most === null ? subjectBefore(marks, before) : null,
    mostOf: most !== null,
    start: amount.start,
    end: Math.max(total.end, after === phrase ? phrase.nounEnd : after.nounEnd),
    sentence,
  };
}

function rateAt(marks: readonly Mark[], at: number, sentence: number): RateNode | null {
  const amount = amountAt(marks, at);
  if (amount === null) return null;
  const over = overAt(marks, amount);
  if (over?.form !== 'rate') return null;
  const subject = subjectBefore(marks, startOf(marks, amount.start));
  return {
    kind: 'rate',
    text: over.text,
    subject,
    phrase: phraseAt(marks, over.end),
    start: amount.start,
    end: over.end,
    sentence,
  };
}

function shareAt(marks: readonly Mark[], at: number, sentence: number): ShareNode | null {
  const sign = shareSign(marks, at);
  if (sign === null) return null;
  const { text, start, end, percentage } = sign;
  const next = marks[end];
  const among = /^(?:among|amongst|for)$/i.test(next?.text ?? '');
  const named = next?.kind === 'of' || among;
  // `38% of the riders`: the article belongs to the sign before it.
  const phrase = phraseAt(marks, named ? end + 1 : end);
  const hasNoun = named || !percentage;
  const before = startOf(marks, start);
  const own = hasNoun && phrase.noun !== '' && !isPronoun(phrase.noun) ? phrase.noun : null;
  const noun = own ?? (named ? null : nounBefore(marks, before));
  const predicate = hasNoun
    ? phrase.predicate
    : [...phrase.noun.split(' ').filter((word) => word !== ''), ...phrase.predicate];
  return {
    kind: 'share',
    text,
    percentage,
    noun,
    predicate,
    subject: subjectBefore(marks, before),
    coverage: [1, 2].some((back) => /^coverage$/i.test(marks[before - back]?.text ?? '')),
    start,
    end: hasNoun ? Math.max(end, phrase.nounEnd) : end,
    sentence,
  };
}

function shareSign(marks: readonly Mark[], at: number) {
  const first = marks[at]?.kind === 'about' ? at + 1 : at;
  const mark = marks[first];
  if (mark === undefined) return null;
  if (mark.kind === 'range' && marks[first + 1]?.kind === 'percent')
    return { text: `${mark.text}%`, start: first, end: first + 2, percentage: true };
  const between = betweenAt(marks, first);
  if (between !== null) return between;
  const side = sideAt(marks, first);
  if (side?.form === 'percentage') return { text: side.text, start: first, end: side.end, percentage: true };
  if (side?.form === 'frequency') return { text: side.text, start: first, end: side.end, percentage: false };
  const amount = amountAt(marks, first);
  const over = amount === null ? null : overAt(marks, amount);
  if (over?.form === 'frequency') return { text: over.text, start: first, end: over.end, percentage: false };
  if (mark.kind !== 'fraction') return null;
  const next = marks[first + 1];
  const ofThem = next?.kind === 'of' || /^(?:the|all|our|those)$/i.test(next?.text ?? '');
  return ofThem ? { text: mark.text, start: first, end: first + 1, percentage: false } : null;
}

/** `between 55% and 65%`: one percentage that is a range. */
function betweenAt(marks: readonly Mark[], at: number) {
  if (!/^between$/i.test(marks[at]?.text ?? '')) return null;
  const low = amountAt(marks, at + 1);
  if (low === null) return null;
  const and = marks[low.end]?.kind === 'percent' ? low.end + 1 : low.end;
  const high = /^(?:and|to)$/i.test(marks[and]?.text ?? '') ? amountAt(marks, and + 1) : null;
  if (high === null || marks[high.end]?.kind !== 'percent') return null;
  return { text: `${low.text}-${high.text}%`, start: at, end: high.end + 1, percentage: true };
}

import { diagnosis } from './diagnosis.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import type { Diagnosis } from './question.ts';
import { readClaim } from './says-claim.ts';
import type { SaysClause } from './claim.ts';

/** A line without its sentence under test, and that sentence; or what is wrong with it. */
export interface SaysCut {
  readonly folded: Folded;
  readonly says: SaysClause | null;
  readonly fault: Diagnosis | null;
}

/** A stretch of the folded text, `to` exclusive. */
interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** The clause with its word, and the sentence in it. */
interface Found extends Stretch {
  readonly sentence: Stretch;
}

const breaks = /[;|\n]/;
const saysOrQuoted =
  /"[^"\n]*"|[\u201c\u201e][^\u201c\u201d\n]*[\u201c\u201d]|\u00ab[^\u00bb\n]*\u00bb|(?<![^\s;|,.?(])says(?=[\s:"\u201c\u201e\u00ab;|]|$)/gi;

/**
 * Takes `says ...` out of a folded line, before anything else reads it: its words would be taken for names and figures. It counts
 * only at a part's start, after a figure, or before a quotation mark, so that `Survey says yes: 44 of 75` stays a name.
 */
export function cutSays(folded: Folded): SaysCut {
  if (!/says/i.test(folded.text)) return { folded, says: null, fault: null };
  const { text } = folded;
  const first = nextSays(text, 0);
  if (first === null) return { folded, says: null, fault: null };
  const again = nextSays(text, first.to);
  const place = ({ from, to }: Stretch) => typedSpan(folded, from, to);
  if (again !== null) return { folded, says: null, fault: diagnosis('clause-twice', place(again), ['says']) };
  const sentence = tidy(text.slice(first.sentence.from, first.sentence.to));
  if (sentence === '') {
    const fault = diagnosis('clause-without-value', place(first), ['says', 'says "twice as often"']);
    return { folded, says: null, fault };
  }
  return {
    folded: without(folded, first),
    says: { text: sentence, claim: readClaim(sentence) },
    fault: null,
  };
}

/** Straight quotation marks inside become single ones, so that the sentence can be printed and read again. */
const tidy = (sentence: string) => sentence.replace(/"/g, "'").replace(/\s+/g, ' ').trim();

function nextSays(text: string, start: number): Found | null {
  const pattern = new RegExp(saysOrQuoted);
  pattern.lastIndex = start;
  for (let found = pattern.exec(text); found !== null; found = pattern.exec(text)) {
    if (!/^says$/i.test(found[0])) continue;
    const clause = clauseAt(text, found.index);
    if (clause !== null) return clause;
  }
  return null;
}

function clauseAt(text: string, from: number): Found | null {
  const lead = /^\s*:?[ \t]*/.exec(text.slice(from + 4, from + 40))?.[0] ?? '';
  const body = from + 4 + lead.length;
  // A line break behind the word leaves it without a sentence.
  if (/\n/.test(lead))
    return counts(text, from, '') ? { from, to: from + 4, sentence: { from: from + 4, to: from + 4 } } : null;
  const opening = text[body] ?? '';
  if (opening === '"') return straight(text, from, body + 1);
  if (/[\u201c\u201e\u00ab]/.test(opening)) return directed(text, from, body + 1, opening);
  const end = endOfPart(text, body);
  const loose = /\s+(?:only me|level \d[\d.]* ?%)\s*$/i.exec(text.slice(body, end));
  const to = loose === null ? end : body + loose.index;
  return counts(text, from, text.slice(body, to)) ? { from, to, sentence: { from: body, to } } : null;
}

function endOfPart(text: string, from: number): number {
  const found = text.slice(from).search(breaks);
  return found === -1 ? text.length : from + found;
}

const figure = /\d(?:[\d,.]*\d)?(?:k|m|bn)?\s*(?:%|percent\b|per cent\b|[)\]])?\s*$/i;
const connected = /\d\s*(?:of|out of|in|per|\/)\s*\d|\d ?%(?: of)?/i;
/** Whether a bare `says` with this sentence is the clause: at a part's start or after a figure, and with no group behind it. */
function counts(text: string, from: number, sentence: string): boolean {
  const before = text.slice(0, from);
  const start = Math.max(before.lastIndexOf(';'), before.lastIndexOf('|'), before.lastIndexOf('\n')) + 1;
  const part = before.slice(start);
  const colon = sentence.indexOf(':');
  // `says yes: 3 of 900`, and `44 of 75 says yes vs 31 of 80 says no`: names of groups.
  if (colon !== -1 && connected.test(sentence.slice(colon))) return false;
  if (/^\s*$/.test(part)) return true;
  if (/\d\s*(?:of|out of|\/)\s*\d/i.test(sentence)) return false;
  if (readClaim(tidy(sentence)).kind !== 'none') return figure.test(part) || connected.test(part);
  return figure.test(part) && !/says/i.test(part);
}

/**
 * In straight quotation marks: to the first mark before a semicolon, a bar, the end of the line or another clause. A missing one
 * is forgiven, and the part's end is taken.
 */
function straight(text: string, from: number, body: number): Found {
  const lineEnd = text.slice(body).search(/\n/);
  const line = text.slice(body, lineEnd === -1 ? text.length : body + lineEnd);
  const marks = [...line.matchAll(/"/g)].map(({ index }) => index);
  // An even number behind the opening one leaves it without a mark of its own.
  const within = marks.length % 2 === 0 ? line.slice(0, endOfPart(line, 0)) : line;
  const closing =
    /"(?=\s*(?:[;|]|$|(?:level|per|reference|among|source|note|period|population|exact|only me)\b))/i.exec(
      within,
    );
  const at = closing?.index ?? (marks[0] !== undefined && marks[0] < within.length ? marks[0] : null);
  if (at === null) {
    const end = body + endOfPart(line, 0);
    return { from, to: end, sentence: { from: body, to: end } };
  }
  return { from, to: body + at + 1, sentence: { from: body, to: body + at } };
}

/** In typographic quotation marks, which have a direction and may therefore stand inside one another. */
function directed(text: string, from: number, body: number, opening: string): Found {
  const [opens, closes] = opening === '\u00ab' ? ['\u00ab', '\u00bb'] : ['\u201c\u201e', '\u201d'];
  let depth = 1;
  for (let at = body; at < text.length && text[at] !== '\n'; at += 1) {
    const unit = text[at] ?? '';
    // German usage opens low and closes with what opens elsewhere.
    if (closes.includes(unit) || (opening === '\u201e' && unit === '\u201c')) depth -= 1;
    else if (opens.includes(unit)) depth += 1;
    if (depth === 0) return { from, to: at + 1, sentence: { from: body, to: at } };
  }
  const end = endOfPart(text, body);
  return { from, to: end, sentence: { from: body, to: end } };
}

/** The folded line without a stretch and the spaces in front of it. */
function without(folded: Folded, { from, to }: Stretch): Folded {
  let start = from;
  while (start > 0 && /[ \t,]/.test(folded.text[start - 1] ?? '')) start -= 1;
  const cut = <T>(all: readonly T[]) => [...all.slice(0, start), ...all.slice(to)];
  return {
    ...folded,
    text: folded.text.slice(0, start) + folded.text.slice(to),
    from: cut(folded.from),
    to: cut(folded.to),
  };
}

import type { ReadingRemark, Span } from './question.ts';

/** A typed line with the many ways of typing one thing folded into one, and the way back to what was typed. */
export interface Folded {
  readonly text: string;
  /** For each unit of `text` and one past its end: where it starts in the typed line. */
  readonly from: readonly number[];
  /** For each unit of `text`: where it ends in the typed line, exclusive. */
  readonly to: readonly number[];
  readonly remarks: readonly ReadingRemark[];
  readonly typed: string;
}

/** The place in the typed line of a stretch of the folded text. */
export function typedSpan(folded: Folded, from: number, to: number): Span {
  const start = folded.from[Math.min(from, folded.text.length)] ?? folded.typed.length;
  const end = to > from ? (folded.to[Math.min(to, folded.text.length) - 1] ?? start) : start;
  return { from: start, to: Math.max(start, end) };
}

const entities: Readonly<Record<string, string>> = { '&amp;': '&', '&lt;': '<', '&gt;': '>' };

// A fixed table, never Unicode's compatibility forms: those would make 12041 of 1,204 with a footnote mark.
const single: Readonly<Record<string, string>> = {
  '\r': '\n',
  '\u2028': '\n',
  '\u2029': '\n',
  '\u000b': '\n',
  '\u000c': '\n',
  '\u0085': '\n',
  '\u2010': '-',
  '\u2011': '-',
  '\u2012': '-',
  '\u2013': '-',
  '\u2014': '-',
  '\u2015': '-',
  '\u2212': '-',
  '\uff0d': '-',
  '\u2018': "'",
  '\u2019': "'",
  '\u201b': "'",
  '\u2032': "'",
  '\u2044': '/',
  '\u2215': '/',
  '\u00bd': 'half',
  '\u2153': 'a third',
  '\u2154': 'two thirds',
  '\u00bc': 'a quarter',
  '\u00be': 'three-quarters',
  '\u3000': ' ',
  '\u1680': ' ',
  '\u2000': ' ',
  '\u2001': ' ',
  '\u2002': ' ',
  '\u2003': ' ',
  '\u2004': ' ',
  '\u2005': ' ',
  '\u2006': ' ',
  '\u2008': ' ',
  '\u205f': ' ',
};

const hardSpace = /[\u00a0\u2007\u2009\u202f]/;
const dropped = /[\u200b-\u200f\u00ad\u2060\ufeff\u202a-\u202e\u2066-\u2069]/;
const footnote = /[\u00b2\u00b3\u00b9\u2070\u2074-\u2079\u2020\u2021]/;
const digit = /\d/;
const threeDigits = /\d{3}(?!\d)/y;

// Most lines hold nothing that has to be folded, and are their own map.
const needsNoFolding = /^[A-Za-z0-9 ,.:;|%()/\n"+?@#=-]*$/;
const bulletOrEmoji = /(?:^|\n)[ \t]*(?:-[ \t]|\d{1,2}[.)][ \t])|(?:^|\s):[a-z]/;

function unfolded(typed: string): Folded {
  const from = Array.from({ length: typed.length + 1 }, (_, at) => at);
  return { text: typed, from, to: from.slice(1), remarks: [], typed };
}

/** Folds a typed line in one pass. Its cost is linear in the length of the line. */
export function fold(typed: string): Folded {
  if (needsNoFolding.test(typed) && !bulletOrEmoji.test(typed)) return unfolded(typed);
  const out: string[] = [];
  const from: number[] = [];
  const to: number[] = [];
  const remarks: ReadingRemark[] = [];
  const emit = (text: string, start: number, end: number) => {
    for (const unit of text.split('')) {
      out.push(unit);
      from.push(start);
      to.push(end);
    }
  };
  const remark = (id: ReadingRemark['id'], text: string, readAs: string, start: number, end: number) =>
    remarks.push({ id, text, readAs, span: { from: start, to: end } });
  const groupsDigits = (at: number) => {
    threeDigits.lastIndex = at + 1;
    return digit.test(out.at(-1) ?? '') && threeDigits.test(typed);
  };

  let lineStart = true;
  let at = 0;
  while (at < typed.length) {
    const unit = typed[at] ?? '';
    const bullet = lineStart
      ? match(/[ \t]*(?:[-*>\u2022\u2013\u00b7][ \t]+|\d{1,2}[.)][ \t]+(?=\D))/y, typed, at)
      : null;
    if (bullet !== null) {
      at += bullet.length;
      lineStart = false;
      continue;
    }
    lineStart = unit === '\n' || unit === '\r';
    const piece = special(typed, at);
    if (piece !== null) {
      if (piece.remark !== null) remark(piece.remark, piece.text, piece.shown, at, at + piece.length);
      emit(piece.shown === '' || piece.remark !== null ? ' ' : piece.shown, at, at + piece.length);
      at += piece.length;
      continue;
    }
    if (unit === '\r' && typed[at + 1] === '\n') {
      emit('\n', at, at + 2);
      at += 2;
      continue;
    }
    const after = digit.test(out.at(-1) ?? '');
    if (dropped.test(unit) || unit === '`') {
      // Nothing is emitted: these have no width, or only set text off.
    } else if (footnote.test(unit) && after) {
      remark('footnote-dropped', unit, out.join('').match(/[\d,.]+$/)?.[0] ?? '', at, at + 1);
    } else if (hardSpace.test(unit)) {
      emit(groupsDigits(at) ? ',' : ' ', at, at + 1);
    } else if ((unit === "'" || unit === '\u2019') && groupsDigits(at)) {
      emit(',', at, at + 1);
    } else if (unit === '\u00b7' && after && digit.test(typed[at + 1] ?? '')) {
      emit('.', at, at + 1);
    } else if ((unit === '*' || unit === '_') && setsOff(typed, at)) {
      // Bold and italic marks of a message.
    } else if (unit >= '\uff01' && unit <= '\uff5e') {
      emit(String.fromCharCode(unit.charCodeAt(0) - 0xfee0), at, at + 1);
    } else {
      emit(single[unit] ?? unit, at, at + 1);
    }
    at += 1;
  }
  from.push(typed.length);
  return { text: out.join(''), from, to, remarks, typed };
}

interface Piece {
  readonly length: number;
  readonly text: string;
  /** What stands in its place. */
  readonly shown: string;
  readonly remark: ReadingRemark['id'] | null;
}

/** Slack's links and entities, struck-out text and emoji names. */
function special(typed: string, at: number): Piece | null {
  const unit = typed[at];
  if (unit === '&') {
    const entity = match(/&(?:amp|lt|gt);/y, typed, at);
    return entity === null
      ? null
      : { length: entity.length, text: entity, shown: entities[entity] ?? entity, remark: null };
  }
  if (unit === '<') {
    const link = match(/<(?:https?:|mailto:|#|@|!)[^<>\n]{0,2000}>/y, typed, at);
    return link === null ? null : { length: link.length, text: link, shown: linkText(link), remark: null };
  }
  if (unit === '~') {
    const struck = match(/~(?=\S)[^~\n]{0,200}\S~(?!\w)|~\S~(?!\w)/y, typed, at);
    return struck === null
      ? null
      : { length: struck.length, text: struck, shown: '', remark: 'struck-out-dropped' };
  }
  if (unit === ':' && /^$|\s/.test(typed[at - 1] ?? '')) {
    const emoji = match(/:[a-z][a-z0-9_+-]{0,60}:(?=\s|$)/y, typed, at);
    return emoji === null ? null : { length: emoji.length, text: emoji, shown: '', remark: 'emoji-dropped' };
  }
  return null;
}

/** `<url|words>` gives the words, `<#C1|harbour>` gives `#harbour`, an address alone stays an address. */
function linkText(link: string): string {
  const inside = link.slice(1, -1);
  const bar = inside.indexOf('|');
  const words = bar === -1 ? '' : inside.slice(bar + 1);
  if (inside.startsWith('#')) return `#${words === '' ? 'channel' : words}`;
  if (inside.startsWith('@')) return `@${words === '' ? 'person' : words}`;
  if (inside.startsWith('!')) return words === '' ? inside.slice(1) : words;
  return words === '' || /^https?:/.test(inside) ? (bar === -1 ? inside : inside.slice(0, bar)) : words;
}

/** Whether a star or underscore at this place sets text off, as in a message: glued to what it encloses, loose outside. */
function setsOff(typed: string, at: number): boolean {
  const before = typed[at - 1] ?? ' ';
  const after = typed[at + 1] ?? ' ';
  const opens = /[\s("]/.test(before) && /\S/.test(after);
  const closes = /\S/.test(before) && /[\s.,;:!?)"]/.test(after);
  return opens || closes;
}

function match(pattern: RegExp, text: string, at: number): string | null {
  pattern.lastIndex = at;
  return pattern.exec(text)?.[0] ?? null;
}

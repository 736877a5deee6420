import type { ClaimedNumber, ClaimMeasure } from './claim.ts';
import {
  claimedNumber,
  directionAround,
  directionBehind,
  fraction,
  fractionValue,
  numeral,
  percentSign,
  rangeBefore,
  scaledNumber,
  wordNumber,
} from './says-words.ts';

/** What one pattern found: the figure without what stands around it. */
export interface Piece {
  readonly measure: ClaimMeasure;
  readonly number: ClaimedNumber;
  readonly direction: 'up' | 'down' | null;
  readonly from: number;
  readonly to: number;
  /** What the limits of an interval that goes with it are per. */
  readonly per?: number;
}
type Reader = (text: string) => Piece | null;

const search = (pattern: string, read: (found: RegExpExecArray, text: string) => Piece | null): Reader => {
  const compiled = new RegExp(pattern, 'g');
  return (text) => {
    compiled.lastIndex = 0;
    for (let found = compiled.exec(text); found !== null; found = compiled.exec(text)) {
      const piece = read(found, text);
      if (piece !== null) return piece;
    }
    return null;
  };
};
const placed = (found: RegExpExecArray, back = 0) => ({
  from: found.index + back,
  to: found.index + found[0].length,
});
const shareOf = (spelled: string, zeros: 'change' | 'other') =>
  scaledNumber(claimedNumber(spelled, zeros), 0.01);

/** One of so many: the digits that vary are those of the larger number where the smaller is 1. */
function frequency(count: string, base: string): ClaimedNumber {
  const [own, all] = [claimedNumber(count, 'other'), claimedNumber(base, 'other')];
  if (own.value === 1 && all.value > 1) return { value: 1 / all.value, low: 1 / all.high, high: 1 / all.low };
  return scaledNumber(own, 1 / all.value);
}

/** A number, or what lies between two where it is the end of a range. */
function numberOrRange(text: string, from: number, spelled: string, what: 'change' | 'other'): ClaimedNumber {
  const number = claimedNumber(spelled, what);
  const start = rangeBefore(text, from);
  const low = start === null ? null : claimedNumber(start, what);
  if (low === null || low.value >= number.value) return number;
  return { value: (low.value + number.value) / 2, low: low.low, high: number.high };
}

const points = search(
  `(${numeral})(?:${percentSign}[ -]?|[ -](?:percentage|per ?cent)[ -])?[ -]?(?:points?|pp|ppts?|pts)(?![a-z])`,
  (found, text) => {
    const { from, to } = placed(found);
    return {
      measure: 'points',
      number: shareOf(found[1] ?? '', 'other'),
      direction: directionAround(text, from, to),
      from,
      to,
    };
  },
);

const more = '(?:more|extra|additional|fewer|less|higher|lower)';
const extra = search(
  `(${numeral}) (${more})(?: [a-z-]+){0,3}? (?:per|in every|for every|in|out of|of every|of) (?:every |each )?(${numeral})|(${numeral}) (?:per|in|out of) (${numeral})(?: [a-z-]+){0,2}? (${more})(?![a-z])`,
  (found) => {
    const [, count, word, base, otherCount, otherBase, otherWord] = found;
    const number = frequency(count ?? otherCount ?? '', base ?? otherBase ?? '');
    if (!(number.value <= 1)) return null;
    const down = /fewer|less|lower/.test(word ?? otherWord ?? '');
    const per = claimedNumber(base ?? otherBase ?? '', 'other').value;
    return { measure: 'extra', number, direction: down ? 'down' : 'up', ...placed(found), per };
  },
);

/** "Per 1,000 shifts: about 15 against about 3.8, 11 more". */
const extraPer = search(
  `(?<![a-z])(?:per|in|of) (${numeral})[^.;]*?(?:[:,][^;]*?[ ,])(${numeral}) (${more})(?! than \\d)(?![a-z])`,
  (found) => {
    const [whole, base, count, word] = found;
    const number = frequency(count ?? '', base ?? '');
    const from = found.index + whole.lastIndexOf(count ?? '');
    const direction = /fewer|less|lower/.test(word ?? '') ? 'down' : 'up';
    if (!(number.value <= 1)) return null;
    return {
      measure: 'extra',
      number,
      direction,
      from,
      to: found.index + whole.length,
      per: claimedNumber(base ?? '', 'other').value,
    };
  },
);

/** "6 more", of which nobody says per what. */
const moreAlone = search(`(${numeral}) (?:more|fewer)(?![a-z])`, (found, text) => {
  const from = found.index;
  const to = from + (found[1] ?? '').length;
  const number = claimedNumber(found[1] ?? '', 'other');
  return { measure: 'figure', number, direction: directionBehind(text, to), from, to };
});

const change = search(`(${numeral})${percentSign}`, (found, text) => {
  const { from, to } = placed(found);
  const spelled = found[1] ?? '';
  const rest = text.slice(to);
  if (/^ (?:as|of the (?:risk|rate|odds|chance|level))(?![a-z])/.test(rest))
    return { measure: 'ratio', number: shareOf(spelled, 'other'), direction: null, from, to };
  if (/^ of(?![a-z])/.test(rest)) return null;
  const direction = directionAround(text, from, to);
  return direction === null
    ? null
    : {
        measure: 'change',
        number: scaledNumber(numberOrRange(text, from, spelled, 'change'), 0.01),
        direction,
        from,
        to,
      };
});

const halfAgain = search(
  'half (?:as (?:many|much|often|likely|high) again|again as (?:many|much|often|likely|high))',
  (found) => ({ measure: 'change', number: wordNumber(0.5), direction: 'up', ...placed(found) }),
);

const times = search(
  `(${numeral})(?: ?times| ?\u00d7| ?x|[ -]?fold)(?![a-z])(?! (?:a|per|each|every) (?:day|week|month|year))`,
  (found, text) => {
    const { from, to } = placed(found);
    const number = numberOrRange(text, from, found[1] ?? '', 'other');
    const direction = directionBehind(text, to);
    if (direction !== null && !/fold$/.test(found[0]))
      return { measure: 'times-more', number, direction, from, to };
    // "A 3-fold drop" is a third.
    const inverse = { value: 1 / number.value, low: 1 / number.high, high: 1 / number.low };
    const down = direction === 'down' || (direction === null && directionAround(text, from, to) === 'down');
    return {
      measure: 'ratio',
      number: down && number.value > 1 && number.low > 0 ? inverse : number,
      direction: null,
      from,
      to,
    };
  },
);

const wordRatios: readonly (readonly [RegExp, number])[] = [
  [/twice|doubl|twofold/, 2],
  [/thrice|tripl|treb|threefold/, 3],
  [/quadrupl|fourfold/, 4],
  [/fivefold/, 5],
  [/halv|in half/, 0.5],
];
const worded = search(
  '(?<![a-z])(?:twice|doubl(?:e|ed|es|ing)|thrice|tripl(?:e|ed|es|ing)|trebl(?:e|ed|es|ing)|quadrupl(?:e|ed|es|ing)|twofold|threefold|fourfold|fivefold|halv(?:e|ed|es|ing)|in half)(?![a-z])',
  (found) => {
    const value = wordRatios.find(([pattern]) => pattern.test(found[0]))?.[1];
    return value === undefined
      ? null
      : { measure: 'ratio', number: wordNumber(value), direction: null, ...placed(found) };
  },
);

const fractions = search(`(?<![a-z])${fraction}`, (found, text) => {
  const { from, to } = placed(found);
  const number = wordNumber(fractionValue(found[0]));
  const rest = text.slice(to);
  if (/^ (?:as |the (?!cases)|of (?:the |its )?(?:risk|rate|odds|chance|level|number))/.test(rest))
    return { measure: 'ratio', number, direction: null, from, to };
  const direction = directionAround(text, from, to);
  if (direction !== null && !/^ of /.test(rest)) return { measure: 'change', number, direction, from, to };
  if (/^ of /.test(rest)) return { measure: 'share', number, direction: null, from, to };
  return /half/.test(found[0]) ? { measure: 'ratio', number, direction: null, from, to } : null;
});

const most = search('(?<![a-z])(?:most of|most|the majority|a majority|majority)(?![a-z])', (found) => ({
  // More than half, however much more.
  measure: 'share',
  number: { value: 0.5, low: 0.5, high: 1 },
  direction: null,
  ...placed(found),
}));

const namedRatio = search(
  `(?<![a-z])(?:risk ratio|relative risk|rate ratio|odds ratio|ratio|r\\.?r\\.?|i\\.?r\\.?r\\.?|o\\.?r\\.?)(?: (?:was|is|of))?[ :=,]*(${numeral})(?!${percentSign})`,
  (found) => {
    const spelled = found[1] ?? '';
    const back = found[0].length - spelled.length;
    return {
      measure: 'ratio',
      number: claimedNumber(spelled, 'other'),
      direction: null,
      ...placed(found, back),
    };
  },
);

const shares = search(
  `(${numeral}) (?:in|out of|of|per) (?:every |each |the )?(${numeral})`,
  (found, text) => {
    const number = frequency(found[1] ?? '', found[2] ?? '');
    const { from, to } = placed(found);
    // What is counted per hour is no share.
    if (!(number.value <= 1) || number.value === 0) return null;
    return /^(?:%| ?per ?cent)/.test(text.slice(to))
      ? null
      : { measure: 'share', number, direction: null, from, to };
  },
);

const percentages = search(`(${numeral})${percentSign}`, (found, text) => {
  const { from, to } = placed(found);
  // A level belongs to an interval.
  if (/^ ?(?:ci|confidence|interval)(?![a-z])/.test(text.slice(to))) return null;
  const isShare =
    /^ (?:of|risk|chance|probability|likelihood|rate|were|was|had|are|is)(?![a-z])/.test(text.slice(to)) ||
    /(?:risk|chance|probability|likelihood|rate|share)(?: (?:was|is|of))? (?:about |only |just )?$/.test(
      text.slice(0, from),
    );
  return {
    measure: isShare ? 'share' : 'percentage',
    number: shareOf(found[1] ?? '', 'other'),
    direction: null,
    from,
    to,
  };
});

const figures = search(`(${numeral})(?!\\s*[:/]\\d)`, (found, text) => {
  const { from, to } = placed(found);
  // A year is no figure to hold.
  if (/^(?:19|20)\d\d$/.test(found[1] ?? '') || /^(?:one|two)$/.test(found[1] ?? '')) return null;
  return {
    measure: 'figure',
    number: claimedNumber(found[1] ?? '', 'other'),
    direction: directionAround(text, from, to),
    from,
    to,
  };
});

/** In the order of how much the words say. */
export const comparisons: readonly Reader[] = [
  points,
  extra,
  extraPer,
  halfAgain,
  change,
  times,
  worded,
  fractions,
  namedRatio,
  moreAlone,
];
/** Shares, and a number without anything else last. */
export const figuresAlone: readonly Reader[] = [shares, percentages, most, figures];

import type { Claim, ClaimedInterval, ClaimedNumber, ClaimMeasure, FigureClaim } from './claim.ts';
import {
  claimedNumber,
  directionAround,
  directionBehind,
  fraction,
  fractionValue,
  hedgeAtEnd,
  numeral,
  rangeBefore,
  percentSign,
  scaledNumber,
  wordNumber,
} from './says-words.ts';

/** What one pattern found: the figure without what stands around it. */
interface Piece {
  readonly measure: ClaimMeasure;
  readonly number: ClaimedNumber;
  readonly direction: 'up' | 'down' | null;
  readonly from: number;
  readonly to: number;
  /** What the limits of an interval that goes with it are per. */
  readonly per?: number;
}
type Reader = (text: string) => Piece | null;

/** Reads a sentence under test into what it claims. Never throws, whatever the words are; linear in their number. */
export function readClaim(sentence: string): Claim {
  // One unit for one unit, so that places stay places.
  const text = sentence.replace(/["\u201c\u201d\u201e\u00ab\u00bb]/g, ' ').toLowerCase();
  if (text.length !== sentence.length) return { kind: 'none' };
  if (notShown.test(text)) return { kind: 'not-shown' };
  if (noDifference.test(text)) return { kind: 'no-difference' };
  for (const read of comparisons) {
    const piece = read(text);
    if (piece !== null) return claimOf(text, piece);
  }
  if (alike.test(text)) return { kind: 'no-difference' };
  for (const read of figuresAlone) {
    const piece = read(text);
    if (piece !== null) return claimOf(text, piece);
  }
  return { kind: /significan/.test(text) ? 'shown' : 'none' };
}

const notShown =
  /(?:no|not|without)(?: a| any)?(?: statistically)? significan|non-?significan|insignifican|no evidence of|not? shown|(?:do|does|did) not show|no difference (?:is|was) shown/;
const noDifference =
  /(?<![a-z])(?:no(?: real| clear| measurable| relevant)? (?:difference|change|effect|increase|rise|decrease|drop)|not differ|no (?:more|less) (?:likely|often)|no (?:higher|lower))(?![a-z])/;
/** Said only where nothing is compared in figures: "if both times are equally long" claims nothing. */
const alike =
  /(?<![a-z])(?:same (?:risk|rate|chance|odds|as)|the same|unchanged|equally|just as (?:likely|often|many|high))(?![a-z])/;

function claimOf(text: string, { measure, number, direction, from, to, per = 1 }: Piece): FigureClaim {
  const interval = intervalBehind(text, to, measure, per);
  const behind = text.slice(to, to + 12);
  const before = hedgeAtEnd(text.slice(0, from));
  const hedge = before ?? (/^ or so(?![a-z])/.test(behind) ? 'about' : null);
  return {
    kind: 'figure',
    measure,
    ...number,
    text: text.slice(from, to).trim(),
    direction,
    // More than halved is less than half.
    hedge: hedge !== null && text.startsWith('halv', from) ? turnedHedge[hedge] : hedge,
    about: aboutOf(text, from, to),
    interval,
    at: from,
  };
}

const turnedHedge = {
  about: 'about',
  nearly: 'over',
  over: 'below',
  'at-least': 'at-most',
  'at-most': 'at-least',
  below: 'over',
} as const;

/** What the words near the figure say it is about. */
function aboutOf(text: string, from: number, to: number): FigureClaim['about'] {
  const near = text.slice(Math.max(0, from - 40), to + 60);
  if (/(?<![a-z])(?:odds|o\.?r\.?(?=[ :=]*\d))/.test(near)) return 'odds';
  if (/(?<![a-z])(?:risks?|chances?|likely|likelier|likelihood|probability|dangerous)(?![a-z])/.test(near))
    return 'risk';
  return /^ ?(?:of|in) (?:the |all |those )*(?:cases|incidents|injured|injuries|admitted|admissions|casualties|victims)(?![a-z])/.test(
    text.slice(to),
  )
    ? 'cases'
    : null;
}

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
const comparisons: readonly Reader[] = [
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
const figuresAlone: readonly Reader[] = [shares, percentages, most, figures];

const limits = new RegExp(
  `(?:(\\d+(?:\\.\\d+)?) ?% ?(?:ci|c\\.i\\.|confidence interval|interval|confidence limits)|[([]|(?<![a-z])(?:ci|interval)(?![a-z]))[:,= ]*(?:ci|of|from|was|is|interval)?[:,= ]*(-?)(${numeral.replace('(?<![\\d.,a-z])', '')})(?:${percentSign})?(?: (?:more|fewer|higher|lower))?(?: to |-| - |, | and )(-?)(${numeral.replace('(?<![\\d.,a-z])', '')})`,
  'g',
);

/** The interval that stands somewhere behind the figure, in the figure's own measure. */
function intervalBehind(
  text: string,
  to: number,
  measure: ClaimMeasure,
  per: number,
): ClaimedInterval | null {
  const all = [...text.slice(to).matchAll(limits)];
  // One with its level is the figure's; another may be that of a coverage.
  const found = all.find(([, level]) => level !== undefined) ?? all[0];
  if (found === undefined) return null;
  const [, level, lowSign = '', low = '', highSign = '', high = ''] = found;
  const inHundredths =
    measure === 'change' || measure === 'points' || measure === 'share' || measure === 'percentage';
  const limit = (sign: string, spelled: string) =>
    scaledNumber(
      claimedNumber(spelled, measure === 'change' ? 'limit' : 'other'),
      ((sign === '-' ? -1 : 1) * (inHundredths ? 0.01 : 1)) / per,
    );
  const share = level === undefined ? null : Number(level) / 100;
  return {
    low: limit(lowSign, low),
    high: limit(highSign, high),
    level: share !== null && share >= 0.5 && share <= 0.9999 ? share : null,
  };
}

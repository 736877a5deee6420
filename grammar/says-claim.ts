import type { Claim, ClaimedInterval, ClaimMeasure, FigureClaim } from './claim.ts';
import { comparisons, figuresAlone } from './says-readers.ts';
import type { Piece } from './says-readers.ts';
import { claimedNumber, hedgeAtEnd, numeral, percentSign, scaledNumber } from './says-words.ts';

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

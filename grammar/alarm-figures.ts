import type { IToken } from 'chevrotain';
import { alarmWordsIn } from './alarm-words.ts';
import { figureAt } from './figures.ts';
import type { Figure } from './figures.ts';
import { writtenNumber } from './numbers.ts';
import type { ShareValue } from './tags.ts';
import * as token from './tokens.ts';

/** The figures of an alarm: those of every line, and besides them a percentage with two ends (`0.2% to 1%`). */

type Tokens = readonly IToken[];

const is = (tokens: Tokens, at: number, type: IToken['tokenType']) => tokens[at]?.tokenType === type;

/** The figure that starts at this token as an alarm takes it, or `null`. */
export function alarmFigureAt(tokens: Tokens, at: number): Figure | null {
  const range = rangeAt(tokens, at);
  if (range !== null) return range;
  const figure = figureAt(tokens, at);
  if (figure === null) return null;
  switch (figure.kind) {
    case 'counts': {
      // `tp 46 fp of ...`: a noun that is an alarm word belongs to the next figure.
      const { noun } = figure;
      if (noun === null || alarmWordsIn(tokens.slice(...noun).map(({ image }) => image)).length === 0)
        return figure;
      return { kind: 'bare', start: at, end: noun[0], count: figure.count };
    }
    case 'year':
      // `3 in 2000` beside "prevalence" is no year.
      return {
        kind: 'counts',
        start: figure.start,
        end: figure.end,
        count: { written: figure.count, suppressed: false },
        noun: null,
        connector: figure.end - 2,
        total: writtenNumber(figure.year, null),
        totalAt: [figure.end - 1, figure.end],
        eachCountedOnce: false,
      };
    case 'bare':
    case 'dangling':
    case 'share':
    case 'share-of':
      return figure;
    default:
      return frequencyOfTimes(tokens, at) ?? figure;
  }
}

/** `1 in 250 days`: days are what is counted here, not an exposure. */
function frequencyOfTimes(tokens: Tokens, at: number): Figure | null {
  const alone = figureAt(tokens.slice(at, at + 3), 0);
  return alone?.kind === 'share' ? { ...alone, start: at, end: at + alone.end } : null;
}

/** `0.2% to 1%`, `0.2 to 1%`, `0.2%-1%`, `1 in 400 to 1 in 100`. */
function rangeAt(tokens: Tokens, at: number): Figure | null {
  const low = figureAt(tokens, at);
  if (low === null || (low.kind !== 'share' && low.kind !== 'bare')) return null;
  const high = upperEnd(
    tokens,
    low.end,
    is(tokens, at - 1, token.Word) && tokens[at - 1]?.image === 'between',
  );
  if (high === null) return null;
  const text = low.kind === 'share' ? low.share.text : `${low.count.written.text}%`;
  const share = low.kind === 'share' ? rangeOf(text, low.share, high.share) : rangeOf(text, null, high.share);
  return share === null ? null : { kind: 'share', start: at, end: high.end, share, ofNoun: high.ofNoun };
}

interface UpperEnd {
  readonly share: ShareValue;
  readonly end: number;
  readonly ofNoun: boolean;
}

function upperEnd(tokens: Tokens, at: number, between: boolean): UpperEnd | null {
  const joins =
    is(tokens, at, token.To) || is(tokens, at, token.Dash) || (between && is(tokens, at, token.And));
  if (joins) {
    const next = figureAt(tokens, at + 1);
    return next?.kind === 'share' && next.share.precision !== 'range'
      ? { share: next.share, end: next.end, ofNoun: next.ofNoun }
      : null;
  }
  // Glued to the sign of the lower end: `0.2%-1%`.
  const glued = /^-(\d+(?:\.\d+)?)$/.exec(tokens[at]?.image ?? '');
  if (glued === null || !is(tokens, at - 1, token.Percent) || !is(tokens, at + 1, token.Percent)) return null;
  const written = writtenNumber(glued[1] ?? '', null);
  const value = written.value / 100;
  return {
    share: {
      text: `${written.text}%`,
      value,
      low: value,
      high: value,
      precision: 'exact',
      form: 'percentage',
    },
    end: at + 2,
    ofNoun: is(tokens, at + 2, token.Of),
  };
}

/** A share between two ends as given; percentages in the spelling that reads back as itself. */
function rangeOf(text: string, low: ShareValue | null, high: ShareValue): ShareValue | null {
  if (text.endsWith('%') && high.text.endsWith('%')) {
    const [from, to] = [Number(text.slice(0, -1)), Number(high.text.slice(0, -1))];
    if (!(from < to)) return null;
    return {
      text: `${text.slice(0, -1)}-${high.text}`,
      value: (from + to) / 200,
      low: from / 100,
      high: to / 100,
      precision: 'range',
      form: 'percentage',
    };
  }
  if (low === null || !(low.value < high.value)) return null;
  return {
    text: `${low.text} to ${high.text}`,
    value: (low.value + high.value) / 2,
    low: low.value,
    high: high.value,
    precision: 'range',
    form: low.form,
  };
}

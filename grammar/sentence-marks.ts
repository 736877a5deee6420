import type { TokenType } from 'chevrotain';
import type { Folded } from './fold.ts';
import { joinSpacedNumbers } from './odd-figures.ts';
import * as token from './tokens.ts';

export type MarkKind =
  | 'number'
  | 'range'
  | 'percent'
  | 'of'
  | 'in'
  | 'per'
  | 'from'
  | 'to'
  | 'slash'
  | 'versus'
  | 'arrow'
  | 'about'
  | 'magnitude'
  | 'number-word'
  | 'fraction'
  | 'word'
  | 'comma'
  | 'colon'
  | 'open'
  | 'close'
  | 'stop';

/** One word or sign of a plain sentence. Positions are those of the folded text, `to` exclusive. */
export interface Mark {
  readonly kind: MarkKind;
  readonly text: string;
  readonly from: number;
  readonly to: number;
}

const kinds: ReadonlyMap<TokenType, MarkKind> = new Map<TokenType, MarkKind>([
  [token.NumberToken, 'number'],
  [token.Range, 'range'],
  [token.Percent, 'percent'],
  [token.PerMille, 'percent'],
  [token.Of, 'of'],
  [token.In, 'in'],
  [token.Per, 'per'],
  [token.From, 'from'],
  [token.To, 'to'],
  [token.Slash, 'slash'],
  [token.Versus, 'versus'],
  [token.Against, 'versus'],
  [token.Arrow, 'arrow'],
  [token.About, 'about'],
  [token.Magnitude, 'magnitude'],
  [token.NumberWord, 'number-word'],
  [token.FractionWord, 'fraction'],
  [token.Comma, 'comma'],
  [token.Dash, 'comma'],
  [token.Colon, 'colon'],
  [token.Open, 'open'],
  [token.Close, 'close'],
  [token.Newline, 'stop'],
  [token.Semicolon, 'stop'],
  [token.Bar, 'stop'],
  [token.Question, 'stop'],
]);

/** Words at whose full stop no sentence ends. */
const abbreviation = /^(?:dr|mr|mrs|ms|st|no|nos|approx|ca|vs|v|e\.g|i\.e|etc|p\.c|fig)\.$/i;

/**
 * Cuts a folded message into the words and signs that the reader of plain sentences goes by. Quotation marks are left out, since a
 * sentence may stand inside them; a full stop becomes a mark of its own.
 */
export function marksOf(folded: Folded): Mark[] {
  // A space for each quotation mark keeps every position.
  const text = folded.text.replace(/["\u201c\u201d\u201e\u00ab\u00bb]/g, ' ');
  const marks: Mark[] = [];
  for (const { image: typed, startOffset, tokenType } of joinSpacedNumbers(token.fineTokensOf(text))) {
    const image = typed.trimEnd();
    const kind = kinds.get(tokenType) ?? (image === '!' ? 'stop' : 'word');
    const ends =
      (kind === 'word' || kind === 'number') && /[^.]\.+$/.test(image) && !abbreviation.test(image);
    const shown = ends ? image.replace(/\.+$/, '') : image;
    // `1,204hours`: the lexer cuts a number off what it cannot read as a whole; half of it would be a wrong figure.
    const cut =
      kind === 'number' &&
      /^,\d/.test(text.slice(startOffset + typed.length, startOffset + typed.length + 2));
    marks.push({ kind: cut ? 'word' : kind, text: shown, from: startOffset, to: startOffset + shown.length });
    if (ends)
      marks.push({
        kind: 'stop',
        text: '.',
        from: startOffset + shown.length,
        to: startOffset + image.length,
      });
  }
  return marks;
}

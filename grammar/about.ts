import type { IToken } from 'chevrotain';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import type { ReadingRemark } from './question.ts';
import * as token from './tokens.ts';

/** Leaves "about" and its like out in front of a number, which is taken as given, with a remark. */
export function withoutAbout(
  tokens: readonly IToken[],
  folded: Folded,
): { readonly tokens: readonly IToken[]; readonly remarks: readonly ReadingRemark[] } {
  const remarks: ReadingRemark[] = [];
  const kept = tokens.filter((each, at) => {
    const next = tokens[at + 1];
    if (each.tokenType !== token.About || next?.tokenType !== token.NumberToken) return true;
    const percent = tokens[at + 2]?.tokenType === token.Percent ? '%' : '';
    const readAs = `${next.image.trim()}${percent}`;
    const span = typedSpan(folded, each.startOffset, next.startOffset + next.image.length);
    remarks.push({ id: 'about-taken-as-given', text: `${each.image} ${readAs}`, readAs, span });
    return false;
  });
  return { tokens: kept, remarks };
}

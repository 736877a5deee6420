import { createToken } from 'chevrotain';
import type { IToken, TokenType } from 'chevrotain';
import type { WrittenNumber } from './numbers.ts';
import type { Precision } from './question.ts';
import type { WrittenCoverage } from './written-coverage.ts';

/** What the tagging pass makes of the fine tokens: few types, each with its meaning already settled, so that LL(1) suffices. */

const tag = (name: string, words: string): TokenType =>
  createToken({ name, pattern: /NEVER MATCHED/, label: words });

export const ByHeadTag = tag('ByHead', '"by age:", in front of layers');
export const LayerTag = tag('Layer', 'the name of a layer');
export const NameTag = tag('Name', 'the name of a group');
export const NameColonTag = tag('NameColon', 'a colon after a name');
export const CasesTag = tag('Cases', 'a count');
export const CaseNounTag = tag('CaseNoun', 'what a case is called');
export const OfTag = tag('OfSign', '"of"');
export const TotalTag = tag('Total', 'a total');
export const PerSignTag = tag('PerSign', '"per", or "in" before a time or distance');
export const ExposureTag = tag('Exposure', 'a time, a distance or another exposure');
export const ShareTag = tag('Share', 'a percentage or a frequency');
export const ShareNounTag = tag('ShareNoun', 'what a percentage is of');
export const StatedTag = tag('Stated', 'a percentage beside a count');
export const AfterTag = tag('After', 'words after a figure');
export const SeparatorTag = tag('Separator', 'what stands between two groups');
export const BreakTag = tag('Break', 'a semicolon, a bar or a new line');
export const CasesHeadTag = tag('CasesHead', '"cases:"');
export const CoverageHeadTag = tag('CoverageHead', '"coverage:"');
export const ChangeHeadTag = tag(
  'ChangeHead',
  '"from ... to ...", "up from" or an arrow between two figures',
);
export const AlarmHeadTag = tag('AlarmHead', '"alarm:", or the words of an alarm');
export const ClauseTag = tag('Clause', 'a clause');

export const tagTypes: readonly TokenType[] = [
  ByHeadTag,
  LayerTag,
  NameTag,
  NameColonTag,
  CasesTag,
  CaseNounTag,
  OfTag,
  TotalTag,
  PerSignTag,
  ExposureTag,
  ShareTag,
  ShareNounTag,
  StatedTag,
  AfterTag,
  SeparatorTag,
  BreakTag,
  CasesHeadTag,
  CoverageHeadTag,
  ChangeHeadTag,
  AlarmHeadTag,
  ClauseTag,
];

/** A share as typed, before it has a place. */
export interface ShareValue {
  readonly text: string;
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly precision: Precision;
  readonly form: 'percentage' | 'frequency';
  /** Coverage that is not one number: only inside a coverage. */
  readonly coverage?: WrittenCoverage;
}

/** A count as typed. `suppressed`: `<5`, anything from 0 to one less. */
export interface CountValue {
  readonly written: WrittenNumber;
  readonly suppressed: boolean;
}

export type ClauseName =
  | 'level'
  | 'per'
  | 'reference'
  | 'population'
  | 'among'
  | 'period'
  | 'source'
  | 'note'
  | 'exact'
  | 'onlyMe'
  | 'designEffect'
  | 'everyone'
  | 'ofCases'
  | 'try';

export type TagPayload =
  | { readonly kind: 'text'; readonly text: string }
  | { readonly kind: 'count'; readonly count: CountValue }
  | { readonly kind: 'share'; readonly share: ShareValue }
  | { readonly kind: 'exposure'; readonly number: WrittenNumber; readonly unit: string | null }
  | {
      readonly kind: 'clause';
      readonly name: ClauseName;
      readonly body: string;
      readonly number: WrittenNumber | null;
      /** The coverages of `try`. */
      readonly numbers?: readonly WrittenNumber[];
    }
  | { readonly kind: 'none' };

/** A tag as the parser takes it; offsets are in the folded text. */
export interface Tagged extends IToken {
  readonly payload: TagPayload;
}

export const payloadOf = (token: IToken): TagPayload =>
  (token.payload as TagPayload | undefined) ?? { kind: 'none' };

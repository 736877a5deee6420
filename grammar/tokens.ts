import { createToken, Lexer } from 'chevrotain';
import type { ITokenConfig, TokenType } from 'chevrotain';

/**
 * The fine tokens of a folded line. Nothing is ever an error: the last type takes any character. Patterns avoid the `u`
 * flag and `\p{}`, which the lexer drops without a word; a word is anything but this ASCII punctuation.
 */

const wordCharacters = '[^\\s!"#$%&()+,/:;<=>?\\[\\]^`{|}~\\u201c\\u201d\\u201e\\u00ab\\u00bb\\u2030\\u2192]';
const wordEnd = `(?!${wordCharacters})`;

export const Word = createToken({
  name: 'Word',
  pattern: new RegExp(wordCharacters + '+'),
  line_breaks: false,
});

/** A keyword: longest spelling first, ending where a word ends. */
const keyword = (name: string, spellings: string): TokenType =>
  createToken({
    name,
    pattern: new RegExp(`(?:${spellings})${wordEnd}`, 'i'),
    longer_alt: Word,
    line_breaks: false,
  });
const sign = (name: string, pattern: RegExp, more: Partial<ITokenConfig> = {}): TokenType =>
  createToken({ name, pattern, line_breaks: false, ...more });

export const Newline = sign('Newline', /\n/, { line_breaks: true });
const Space = sign('Space', /[ \t]+/, { group: Lexer.SKIPPED });
export const Address = sign('Address', /https?:\/\/[^\s|;"]+/i);
export const Quoted = sign(
  'Quoted',
  /"[^"\n]*"|[\u201c\u201e][^\u201c\u201d\n]*[\u201c\u201d]|\u00ab[^\u00bb\n]*\u00bb/,
);
export const YearPair = sign('YearPair', /(?:19|20)\d\d\/\d\d(?![\d,.])/);
export const Range = sign('Range', new RegExp(`\\d+(?:\\.\\d+)?-\\d+(?:\\.\\d+)?${wordEnd}`));
export const NumberToken = sign(
  'Number',
  new RegExp(`(?:\\d+(?:,\\d+)*(?:\\.\\d+)?|\\.\\d+)(?:k|m|bn)?(?:\\.(?!\\S))?${wordEnd}`, 'i'),
);
export const Percent = sign(
  'Percent',
  new RegExp(`%|per[ -]?cent${wordEnd}|p\\.c\\.|pct${wordEnd}|pc${wordEnd}`, 'i'),
);
export const PerMille = sign('PerMille', /\u2030/);
export const Colon = sign('Colon', /:/);
export const Semicolon = sign('Semicolon', /;/);
export const Bar = sign('Bar', /\|/);
export const Comma = sign('Comma', /,/);
export const Slash = sign('Slash', /\//);
export const Dash = sign('Dash', /-+(?=\s|$)/);
export const Arrow = sign('Arrow', /\u2192|->|=>/);
export const Less = sign('Less', /</);
export const Open = sign('Open', /[([]/);
export const Close = sign('Close', /[)\]]/);
export const Equals = sign('Equals', /=/);
export const Ampersand = sign('Ampersand', /&/);
export const Question = sign('Question', /\?/);

export const Of = keyword('Of', 'out of(?: the| all| our)?|of(?: the| all| our)?');
export const In = keyword('In', 'in');
export const Per = keyword('Per', 'per');
export const Versus = keyword('Versus', 'versus|vs\\.?|v\\.?');
export const Against = keyword(
  'Against',
  'against|compared (?:with|to)|(?:worse |better |higher |lower )?than',
);
export const And = keyword('And', 'and|or');
export const From = keyword('From', 'from');
export const To = keyword('To', 'to');
export const CasesWord = keyword('Cases', 'cases');
export const CoverageWord = keyword('Coverage', 'coverage');
export const Level = keyword('Level', 'level');
export const Reference = keyword('Reference', 'reference');
export const Population = keyword('Population', 'population');
export const Among = keyword('Among', 'among');
export const Period = keyword('Period', 'period');
export const Source = keyword('Source', 'source');
export const Note = keyword('Note', 'note');
export const Exact = keyword('Exact', 'exact');
export const OnlyMe = keyword('OnlyMe', 'only me');
export const Says = keyword('Says', 'says');
export const FewerThan = keyword('FewerThan', '(?:fewer|less) than|under');
export const About = keyword(
  'About',
  'about|around|roughly|approximately|approx\\.?|ca\\.?|nearly|almost|over|some',
);
export const Magnitude = keyword('Magnitude', 'hundred|thousand|million|billion');
export const NumberWord = keyword(
  'NumberWord',
  'one|two|three|four|five|six|seven|eight|nine|ten|eleven|twelve|twenty|thirty|forty|fifty|sixty|seventy|eighty|ninety|dozen',
);
export const FractionWord = keyword(
  'FractionWord',
  'a half|half|(?:a|one) third|two thirds|(?:a|one) quarter|three[ -]quarters|a fifth|a tenth',
);
export const Other = sign('Other', /[^]/, { line_breaks: true });

/** In the order in which they are tried. */
export const fineTokens: readonly TokenType[] = [
  Newline,
  Space,
  Address,
  Quoted,
  YearPair,
  Range,
  NumberToken,
  Percent,
  PerMille,
  Dash,
  Arrow,
  Of,
  In,
  Per,
  Versus,
  Against,
  From,
  CasesWord,
  CoverageWord,
  Level,
  Reference,
  Population,
  Among,
  Period,
  Source,
  Note,
  Exact,
  OnlyMe,
  Says,
  FewerThan,
  About,
  FractionWord,
  Magnitude,
  NumberWord,
  And,
  To,
  Word,
  Colon,
  Semicolon,
  Bar,
  Comma,
  Slash,
  Less,
  Open,
  Close,
  Equals,
  Ampersand,
  Question,
  Other,
];

let lexer: Lexer | null = null;

/** Cuts a folded line into fine tokens. */
export function fineTokensOf(text: string) {
  lexer ??= new Lexer([...fineTokens], {
    positionTracking: 'onlyOffset',
    skipValidations: true,
    ensureOptimizations: false,
  });
  return lexer.tokenize(text).tokens;
}

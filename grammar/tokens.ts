import { createToken, Lexer } from 'chevrotain';
import type { ITokenConfig, TokenType } from 'chevrotain';

/**
 * The fine tokens of a folded line. Nothing is ever an error: the last type takes any character. Patterns avoid the `u`
 * flag and `\p{}`, which the lexer drops without a word; a word is anything but this ASCII punctuation.
 */

const wordCharacters = '[^\\s!"#$%&()+,/:;<=>?\\[\\]^`{|}~\\u201c\\u201d\\u201e\\u00ab\\u00bb\\u2030\\u2192]';
const wordEnd = `(?!${wordCharacters})`;

/** Every code unit below 256, and one for each of the lexer's buckets above. */
const anyStart = [
  ...Array.from({ length: 256 }, (_, code) => code),
  ...Array.from({ length: 257 }, (_, bucket) => Math.min(65_535, 256 + bucket * 255)),
];
const wordCharacter = new RegExp(wordCharacters);

export const Word = createToken({
  name: 'Word',
  pattern: new RegExp(wordCharacters + '+'),
  line_breaks: false,
  start_chars_hint: anyStart.filter((code) => code > 255 || wordCharacter.test(String.fromCharCode(code))),
});

/** Characters that a token can start with, so that the lexer need not work them out from the pattern at every start. */
const starts = (characters: string): string[] => [...characters];
const eitherCase = (letters: string): string[] => starts(letters.toLowerCase() + letters.toUpperCase());
const digits = starts('0123456789');

/** A keyword: longest spelling first, ending where a word ends. `letters` are those that its spellings start with. */
const keyword = (name: string, letters: string, spellings: string): TokenType =>
  createToken({
    name,
    pattern: new RegExp(`(?:${spellings})${wordEnd}`, 'i'),
    longer_alt: Word,
    line_breaks: false,
    start_chars_hint: eitherCase(letters),
  });
const sign = (
  name: string,
  pattern: RegExp,
  first: (string | number)[],
  more: Partial<ITokenConfig> = {},
): TokenType => createToken({ name, pattern, line_breaks: false, start_chars_hint: first, ...more });

export const Newline = sign('Newline', /\n/, ['\n'], { line_breaks: true });
const Space = sign('Space', /[ \t]+/, [' ', '\t'], { group: Lexer.SKIPPED });
export const Address = sign('Address', /https?:\/\/[^\s|;"]+/i, eitherCase('h'));
export const Quoted = sign(
  'Quoted',
  /"[^"\n]*"|[\u201c\u201e][^\u201c\u201d\n]*[\u201c\u201d]|\u00ab[^\u00bb\n]*\u00bb/,
  ['"', '\u201c', '\u201e', '\u00ab'],
);
export const YearPair = sign('YearPair', /(?:19|20)\d\d\/\d\d(?![\d,.])/, ['1', '2']);
/** `8:30` in a name: its colon ends nothing. */
export const Clock = sign('Clock', /\d{1,2}:\d\d(?![\d,.])(?!\s*(?:of|out|in|per|\/|%))/i, digits);
export const Range = sign('Range', new RegExp(`\\d+(?:\\.\\d+)?-\\d+(?:\\.\\d+)?${wordEnd}`), digits);
export const NumberToken = sign(
  'Number',
  new RegExp(`(?:\\d+(?:,\\d+)*(?:\\.\\d+)?|\\.\\d+)(?:k|m|bn)?(?:\\.(?!\\S))?${wordEnd}`, 'i'),
  [...digits, '.'],
);
export const Percent = sign(
  'Percent',
  new RegExp(`%|per[ -]?cent${wordEnd}|p\\.c\\.|pct${wordEnd}|pc${wordEnd}`, 'i'),
  ['%', 'p', 'P'],
);
export const PerMille = sign('PerMille', /\u2030/, ['\u2030']);
export const Colon = sign('Colon', /:/, [':']);
export const Semicolon = sign('Semicolon', /;/, [';']);
export const Bar = sign('Bar', /\|/, ['|']);
export const Comma = sign('Comma', /,/, [',']);
export const Slash = sign('Slash', /\//, ['/']);
export const Dash = sign('Dash', /-+(?=\s|$)/, ['-']);
export const Arrow = sign('Arrow', /\u2192|->|=>/, ['\u2192', '-', '=']);
export const Less = sign('Less', /</, ['<']);
export const Open = sign('Open', /[([]/, ['(', '[']);
export const Close = sign('Close', /[)\]]/, [')', ']']);
export const Equals = sign('Equals', /=/, ['=']);
export const Ampersand = sign('Ampersand', /&/, ['&']);
export const Question = sign('Question', /\?/, ['?']);

export const Of = keyword('Of', 'o', 'out of(?: the| all| our)?|of(?: the| all| our)?');
export const In = keyword('In', 'i', 'in');
export const Per = keyword('Per', 'p', 'per');
export const Versus = keyword('Versus', 'v', 'versus|vs\\.?|v\\.?');
export const Against = keyword(
  'Against',
  'acwbhlt',
  'against|compared (?:with|to)|(?:worse |better |higher |lower )?than',
);
export const And = keyword('And', 'ao', 'and|or');
export const From = keyword('From', 'f', 'from');
export const To = keyword('To', 't', 'to');
export const CasesWord = keyword('Cases', 'c', 'cases');
export const CoverageWord = keyword('Coverage', 'c', 'coverage');
export const Level = keyword('Level', 'l', 'level');
export const Reference = keyword('Reference', 'r', 'reference');
export const Population = keyword('Population', 'p', 'population');
export const Among = keyword('Among', 'a', 'among');
export const Period = keyword('Period', 'p', 'period');
export const Source = keyword('Source', 's', 'source');
export const Note = keyword('Note', 'n', 'note');
export const Exact = keyword('Exact', 'e', 'exact');
export const OnlyMe = keyword('OnlyMe', 'o', 'only me');
export const Says = keyword('Says', 's', 'says');
export const FewerThan = keyword('FewerThan', 'flu', '(?:fewer|less) than|under');
export const About = keyword(
  'About',
  'arcnos',
  'about|around|roughly|approximately|approx\\.?|ca\\.?|nearly|almost|over|some',
);
export const Magnitude = keyword('Magnitude', 'htmb', 'hundred|thousand|million|billion');
export const NumberWord = keyword(
  'NumberWord',
  'otfsned',
  'one|two|three|four|five|six|seven|eight|nine|ten|eleven|twelve|twenty|thirty|forty|fifty|sixty|seventy|eighty|ninety|dozen',
);
export const FractionWord = keyword(
  'FractionWord',
  'ahot',
  'a half|half|(?:a|one) third|two thirds|(?:a|one) quarter|three[ -]quarters|a fifth|a tenth',
);
export const Other = sign('Other', /[^]/, anyStart, { line_breaks: true });

/** In the order in which they are tried. */
export const fineTokens: readonly TokenType[] = [
  Newline,
  Space,
  Address,
  Quoted,
  YearPair,
  Clock,
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
    ensureOptimizations: true,
  });
  return lexer.tokenize(text).tokens;
}

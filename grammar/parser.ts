import { CstParser } from 'chevrotain';
import type { CstNode, IRecognitionException } from 'chevrotain';
import * as tags from './tags.ts';
import type { Tagged } from './tags.ts';

/**
 * The grammar of a tagged line. LL(1) without a report of ambiguity: which words are a name and which follow a figure is
 * settled by the tags before the parser sees them, so no optional name ever meets an optional name.
 */
export class LineParser extends CstParser {
  constructor(skipValidations: boolean) {
    super([...tags.tagTypes], {
      maxLookahead: 1,
      skipValidations,
      recoveryEnabled: false,
      nodeLocationTracking: 'none',
    });
    this.performSelfAnalysis();
  }

  /** line: [ ByHead ] part { Break part } */
  readonly line = this.RULE('line', () => {
    this.OPTION(() => this.CONSUME(tags.ByHeadTag));
    this.SUBRULE(this.part);
    this.MANY(() => {
      this.CONSUME(tags.BreakTag);
      this.SUBRULE2(this.part);
    });
  });

  /** part: Clause | [ CasesHead | CoverageHead | ChangeHead | AlarmHead ] list */
  readonly part = this.RULE('part', () => {
    this.OR([
      { ALT: () => this.CONSUME(tags.ClauseTag) },
      {
        ALT: () => {
          this.CONSUME(tags.CasesHeadTag);
          this.SUBRULE(this.list);
        },
      },
      {
        ALT: () => {
          this.CONSUME(tags.CoverageHeadTag);
          this.SUBRULE2(this.list);
        },
      },
      {
        ALT: () => {
          this.CONSUME(tags.ChangeHeadTag);
          this.SUBRULE3(this.list);
        },
      },
      {
        ALT: () => {
          this.CONSUME(tags.AlarmHeadTag);
          this.SUBRULE4(this.list);
        },
      },
      { ALT: () => this.SUBRULE5(this.list) },
    ]);
  });

  /** list: item { [ Separator ] item } */
  readonly list = this.RULE('list', () => {
    this.SUBRULE(this.item);
    this.MANY(() => {
      this.OPTION(() => this.CONSUME(tags.SeparatorTag));
      this.SUBRULE2(this.item);
    });
  });

  /** item: [ Layer ] [ Name [ NameColon ] ] [ CaseNoun ] figure { Stated } [ After ] */
  readonly item = this.RULE('item', () => {
    this.OPTION5(() => this.CONSUME(tags.LayerTag));
    this.OPTION(() => this.CONSUME(tags.NameTag));
    this.OPTION2(() => this.CONSUME(tags.NameColonTag));
    this.OPTION3(() => this.CONSUME(tags.CaseNounTag));
    this.SUBRULE(this.figure);
    this.MANY(() => this.CONSUME(tags.StatedTag));
    this.OPTION4(() => this.CONSUME(tags.AfterTag));
  });

  /** figure: Cases [ CaseNoun ] [ Of Total | PerSign Exposure ] | Share [ Of Total ] [ ShareNoun ] */
  readonly figure = this.RULE('figure', () => {
    this.OR([
      {
        ALT: () => {
          this.CONSUME(tags.CasesTag);
          this.OPTION(() => this.CONSUME(tags.CaseNounTag));
          this.OPTION2(() => {
            this.OR2([
              {
                ALT: () => {
                  this.CONSUME(tags.OfTag);
                  this.CONSUME(tags.TotalTag);
                },
              },
              {
                ALT: () => {
                  this.CONSUME(tags.PerSignTag);
                  this.CONSUME(tags.ExposureTag);
                },
              },
            ]);
          });
        },
      },
      {
        ALT: () => {
          this.CONSUME(tags.ShareTag);
          this.OPTION3(() => {
            this.CONSUME2(tags.OfTag);
            this.CONSUME2(tags.TotalTag);
          });
          this.OPTION4(() => this.CONSUME(tags.ShareNounTag));
        },
      },
    ]);
  });
}

let parser: LineParser | null = null;

/** Parses a tagged line. The parser is built on first use, without its own checks, which a test runs. */
export function parseTags(tagged: readonly Tagged[]): {
  readonly tree: CstNode;
  readonly errors: readonly IRecognitionException[];
} {
  parser ??= new LineParser(true);
  parser.input = [...tagged];
  const tree = parser.line();
  return { tree, errors: parser.errors };
}

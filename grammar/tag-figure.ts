import type { IToken } from 'chevrotain';
import type { Figure } from './figures.ts';
import type { TagWriter } from './tag-writer.ts';
import * as tags from './tags.ts';

/** Writes the tags of one figure. */
export function writeFigure(writer: TagWriter, tokens: readonly IToken[], figure: Figure): void {
  switch (figure.kind) {
    case 'bare':
      writer.pushTokens(tags.CasesTag, tokens, figure.start, figure.end, {
        kind: 'count',
        count: figure.count,
      });
      return;
    case 'dangling':
      writer.pushTokens(tags.CasesTag, tokens, figure.start, figure.connector, {
        kind: 'count',
        count: figure.count,
      });
      writer.pushTokens(tags.OfTag, tokens, figure.connector, figure.connector + 1);
      return;
    case 'counts':
      writeCount(writer, tokens, figure);
      writer.pushTokens(
        tags.OfTag,
        tokens,
        figure.connector,
        figure.connector + 1,
        figure.eachCountedOnce ? { kind: 'text', text: 'in' } : { kind: 'none' },
      );
      writer.pushTokens(tags.TotalTag, tokens, ...figure.totalAt, {
        kind: 'count',
        count: { written: figure.total, suppressed: false },
      });
      return;
    case 'share-of':
      writer.pushTokens(tags.ShareTag, tokens, figure.start, figure.totalAt[0] - 1, {
        kind: 'share',
        share: figure.share,
      });
      writer.pushTokens(tags.OfTag, tokens, figure.totalAt[0] - 1, figure.totalAt[0]);
      writer.pushTokens(tags.TotalTag, tokens, ...figure.totalAt, {
        kind: 'count',
        count: { written: figure.total, suppressed: false },
      });
      return;
    case 'share':
      writer.pushTokens(tags.ShareTag, tokens, figure.start, figure.end, {
        kind: 'share',
        share: figure.share,
      });
      return;
    case 'rate':
      writeCount(writer, tokens, figure);
      writer.pushTokens(
        tags.PerSignTag,
        tokens,
        figure.connector,
        figure.connector + 1,
        figure.sign === 'in' ? { kind: 'text', text: 'in' } : { kind: 'none' },
      );
      writer.pushTokens(tags.ExposureTag, tokens, ...figure.exposureAt, {
        kind: 'exposure',
        number: figure.exposure,
        unit: figure.unit,
      });
      return;
    case 'year':
      writer.pushTokens(tags.CasesTag, tokens, figure.start, figure.start + 1, {
        kind: 'count',
        count: { written: figure.count, suppressed: false },
      });
      if (figure.noun !== null) writer.words(tags.CaseNounTag, tokens, ...figure.noun);
      writer.pushTokens(tags.AfterTag, tokens, figure.end - 1, figure.end, {
        kind: 'text',
        text: figure.year,
      });
      return;
  }
}

/** A count with what a case is called, before its connector. */
function writeCount(
  writer: TagWriter,
  tokens: readonly IToken[],
  figure: Extract<Figure, { kind: 'counts' | 'rate' }>,
): void {
  const end = figure.noun === null ? figure.connector : figure.noun[0];
  writer.pushTokens(tags.CasesTag, tokens, figure.start, end, { kind: 'count', count: figure.count });
  if (figure.noun !== null) writer.words(tags.CaseNounTag, tokens, ...figure.noun);
}

import type { Question } from '../../../grammar/question.ts';
import type { Reading } from '../../report/reading.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import { boundsHeadline } from './bounds-headline.ts';
import { changeText, countedMore, estimateText, levelText, limitsText } from './interval-text.ts';
import { cases, Label, label, perOne, plainLabel, capital } from './labels.ts';
import { percent, ratio } from './numbers.ts';
import { compared, fits, firstLineLength, intervalNote, neitherShown, shorten } from './ratio-words.ts';
import { manyPer, perExposure } from './rate-words.ts';
import { quantityText } from './read-as.ts';
import { strataHeadline } from './strata-words.ts';

/** The first line of the answer, complete in itself. */
export function headlineFor(report: Report): string {
  const { question } = report;
  if (question.groups.length === 1) return oneGroup(report);
  const ratios = readingsOf(report, report.headline);
  const [first] = ratios;
  if (first === undefined) throw new Error(`the report has no reading for its headline ${report.headline}`);
  return ratios.length > 1 ? manyGroups(report, ratios) : twoGroups(report, first);
}

function oneGroup(report: Report): string {
  if (report.question.kind === 'rates') {
    const [rate] = readingsOf(report, 'rate');
    if (rate === undefined) throw new Error('a report of one rate has no rate');
    return `${Label(report.question, 0)}: ${estimateText(rate, 'short') ?? ''} ${perExposure(report.question, rate.per ?? 1)} (${intervalNote(rate)}).`;
  }
  const [risk] = readingsOf(report, 'risk');
  if (risk?.estimate == null) throw new Error('a report of one group has no risk');
  return `${Label(report.question, 0)}: ${percent(risk.estimate, 'short')} (${intervalNote(risk)}).`;
}

function twoGroups(report: Report, reading: Reading): string {
  const { question } = report;
  const group = label(question, reading.of);
  const reference = label(question, reading.against ?? 0);
  const note = intervalNote(reading);
  if (question.kind === 'counts' && question.chosenByOutcome) {
    const value = reading.estimate === null ? 'without a value' : ratio(reading.estimate, 'short');
    return `Odds ratio ${value} (${note}), ${group} against ${reference}.`;
  }
  if (question.kind === 'strata') return strataHeadline(report, question, reading);
  const direction = shownDirection(report, reading);
  const bounds = boundsHeadline(report, direction);
  if (bounds !== null) return bounds;
  if (direction === 'none-shown') {
    const what = reading.interval === null ? 'These figures are few' : `These figures fit ${fits(reading)}`;
    return `${what}: ${neitherShown}.`;
  }
  if (reading.unbounded || reading.estimate === null) return withoutValue(report, reading, note);
  switch (question.kind) {
    case 'rates':
      return shorten(
        question.overTime
          ? `${capital(group)}: ${compared(reading, manyPer(question), reference)}.`
          : `${capital(perOne(question))}, ${group} had ${compared(reading, `many ${cases(question)}`, reference)}.`,
      );
    case 'counts':
      if (question.overTime)
        return shorten(`${capital(group)}: ${cases(question)} ${compared(reading, 'often', reference)}.`);
      return shorten(`${capital(group)} had ${cases(question)} ${compared(reading, 'often', reference)}.`);
    case 'shares':
      return shorten(
        `${capital(perOne(question))}, ${group} had ${compared(reading, `many ${cases(question)}`, reference)}.`,
      );
    case 'stated':
      return `${capital(group)}: ${compared(reading, 'often', reference)}.`;
    case 'bare-counts':
      if (question.overTime) return changed(report, reading);
      return `${capital(group)} counts ${compared(reading, 'many', reference)}. Out of how many?`;
  }
}

/** "After: 530 against 412 before, 29% more (95% interval 13% to 46% more)." */
function changed({ question, readings }: Report, reading: Reading): string {
  if (question.kind !== 'bare-counts') return '';
  const change = readings.find(({ id, of }) => id === 'relative-change' && of === reading.of);
  const [later, earlier] = [question.groups[reading.of], question.groups[reading.against ?? 0]];
  if (change?.estimate == null || later === undefined || earlier === undefined) return '';
  const limits =
    change.interval === null
      ? ''
      : ` (${levelText(change.interval.level)} interval ${countedMore(limitsText(change, change.interval, 'full'))})`;
  const noun = question.caseNoun;
  return `${Label(question, reading.of)}: ${quantityText(later.cases)}${noun === null ? '' : ` ${noun}`} against ${quantityText(earlier.cases)} ${earlierTime(question, reading.against ?? 0)}, ${countedMore(changeText(change.estimate, 'full'))}${limits}.`;
}

/** "before", "in 2023", "last year". */
function earlierTime(question: Question, index: number): string {
  const text = label(question, index);
  return /^(?:19|20)\d\d$/.test(text) ? `in ${text}` : text;
}

function withoutValue(report: Report, reading: Reading, note: string): string {
  const { question } = report;
  const group = Label(question, reading.of);
  const reference = label(question, reading.against ?? 0);
  if (reading.estimate === null && !reading.unbounded)
    return `Neither ${label(question, reading.of)} nor ${reference} has a case: no ratio.`;
  const low = reading.interval?.low ?? null;
  return low === null
    ? `${group} has ${cases(question)}, ${reference} none: no ratio has an upper end (${note}).`
    : `${group} had ${cases(question)} at least ${ratio(low, 'short')} times as often as ${reference} (${note}).`;
}

function manyGroups(report: Report, ratios: readonly Reading[]): string {
  const { question } = report;
  const reference = plainLabel(question, ratios[0]?.against ?? 0);
  const each = ratios.map((reading) => {
    const value = reading.estimate === null ? 'no value' : ratio(reading.estimate, 'short');
    const limits = reading.interval === null ? '' : ` (${limitsText(reading, reading.interval, 'short')})`;
    return `${plainLabel(question, reading.of)} ${value}${limits}`;
  });
  const name =
    {
      'count-ratio': 'Counts',
      'percentage-ratio': 'Ratio',
      'rate-ratio': 'Rate ratio',
      'pooled-rate-ratio': 'Rate ratio within layers',
      'pooled-risk-ratio': 'Risk ratio within layers',
    }[report.headline as string] ?? 'Risk ratio';
  const line = `${name} against ${reference}: ${each.join(', ')}.`;
  return line.length <= firstLineLength
    ? line
    : `${ratios.length} groups against ${reference}: each ratio stands in the table.`;
}

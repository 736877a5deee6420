import type { Reading } from '../../report/reading.ts';
import { directionOf, readingsOf } from '../../report/report.ts';
import type { Direction, GroupedReport as Report } from '../../report/report.ts';
import { limitsText } from './interval-text.ts';
import { cases, Label, label, perOne, plainLabel, capital } from './labels.ts';
import { percent, ratio } from './numbers.ts';
import { compared, fits, intervalNote, neitherShown } from './ratio-words.ts';

const within = 110;

/** The first line of the answer, complete in itself. */
export function headlineFor(report: Report): string {
  const { question } = report;
  if (question.groups.length === 1) return oneGroup(report);
  const ratios = readingsOf(report, report.headline);
  const [first] = ratios;
  if (first === undefined) throw new Error(`the report has no reading for its headline ${report.headline}`);
  return ratios.length > 1 ? manyGroups(report, ratios) : twoGroups(report, first);
}

/** Which way the figures point. With `exact` a ratio of counts has no interval of its own; the odds ratio's exact one then decides. */
export function shownDirection(report: Report, ratioReading: Reading): Direction {
  if (ratioReading.whyNoInterval !== 'no-exact-form') return directionOf(ratioReading);
  const odds = readingsOf(report, 'odds-ratio').find(({ of }) => of === ratioReading.of);
  return directionOf(odds ?? ratioReading);
}

function oneGroup(report: Report): string {
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
  const direction = shownDirection(report, reading);
  if (direction === 'none-shown') {
    const what = reading.interval === null ? 'These figures are few' : `These figures fit ${fits(reading)}`;
    return `${what}: ${neitherShown}.`;
  }
  if (reading.unbounded || reading.estimate === null) return withoutValue(report, reading, note);
  switch (question.kind) {
    case 'counts':
      return shorten(`${capital(group)} had ${cases(question)} ${compared(reading, 'often', reference)}.`);
    case 'shares':
      return shorten(
        `${capital(perOne(question))}, ${group} had ${compared(reading, `many ${cases(question)}`, reference)}.`,
      );
    case 'stated':
      return `${capital(group)}: ${compared(reading, 'often', reference)}.`;
    case 'bare-counts':
      return `${capital(group)} counts ${compared(reading, 'many', reference)}. Out of how many?`;
  }
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
    { 'count-ratio': 'Counts', 'percentage-ratio': 'Ratio' }[report.headline as string] ?? 'Risk ratio';
  const line = `${name} against ${reference}: ${each.join(', ')}.`;
  return line.length <= within
    ? line
    : `${ratios.length} groups against ${reference}: each ratio stands in the table.`;
}

/** Leaves the words "95% interval" out where the line would otherwise run past what a notification shows. */
function shorten(line: string): string {
  return line.length <= within ? line : line.replace(/[\d.]+% interval /, '');
}

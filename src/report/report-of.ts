import type { GroupedQuestion, Question } from '../../grammar/question.ts';
import { alarmReport } from './alarm-report.ts';
import { bareCountsReport } from './bare-counts-report.ts';
import { withCaution } from './cautions.ts';
import { couldShow } from './could-show.ts';
import { countsReport } from './counts-report.ts';
import { optionsOf } from './options.ts';
import { ratesReport } from './rates-report.ts';
import type { Reading } from './reading.ts';
import { readingsOf } from './report.ts';
import type { GroupedReport, Report } from './report.ts';
import { saysFor } from './says.ts';
import { levelForAll, severalGroups } from './several-groups.ts';
import { sharesReport } from './shares-report.ts';
import { statedReport } from './stated-report.ts';
import { strataReport } from './strata-report.ts';

/** Works out the report of a question. */
export function reportOf(question: Question): Report {
  return question.kind === 'alarm'
    ? alarmReport(question)
    : withComparisons({ ...reportOfGroups(question), question });
}

/** What every comparison of groups needs, whatever it compares: all groups at once, and what would have shown. */
function withComparisons(report: GroupedReport): Report {
  const { question } = report;
  const { overall, againstRest } = severalGroups(question, optionsOf(question.clauses));
  const seen = couldShow(report, readingsOf(report, report.headline)[0]);
  const readings = overall === null ? report.readings : [overall, ...atOnce(report)];
  const cautions = seen === null ? report.cautions : withCaution(report.cautions, 'could-have-shown');
  const whole: GroupedReport = { ...report, readings, cautions, againstRest, couldShow: seen };
  const at = (level: number) => ({ ...reportOfGroups(atLevel(question, level)), question });
  return { ...whole, says: saysFor(whole, at) };
}

const atLevel = (question: GroupedQuestion, value: number): GroupedQuestion => ({
  ...question,
  clauses: { ...question.clauses, level: { value, text: '' } },
});

function reportOfGroups(question: GroupedQuestion): Report {
  switch (question.kind) {
    case 'counts':
      return countsReport(question);
    case 'shares':
      return sharesReport(question);
    case 'stated':
      return statedReport(question);
    case 'rates':
      return ratesReport(question);
    case 'strata':
      return strataReport(question);
    case 'bare-counts':
      return bareCountsReport(question);
  }
}

/** The ratios of several pairs with a second interval each, that holds for all the pairs at once. */
function atOnce(report: GroupedReport): readonly Reading[] {
  const { question, headline } = report;
  const pairs = readingsOf(report, headline).length;
  const value = levelForAll(report.level, pairs);
  if (value === null) return report.readings;
  const wider = reportOfGroups(atLevel(question, value));
  const second = readingsOf(wider, headline);
  return report.readings.map((each) => {
    const limits = each.id === headline ? second.find(({ of }) => of === each.of)?.interval : null;
    return limits == null ? each : { ...each, atOnce: { low: limits.low, high: limits.high, pairs } };
  });
}

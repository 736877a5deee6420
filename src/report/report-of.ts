import type { Question } from '../../grammar/question.ts';
import { bareCountsReport } from './bare-counts-report.ts';
import { countsReport } from './counts-report.ts';
import type { Report } from './report.ts';
import { ratesReport } from './rates-report.ts';
import { sharesReport } from './shares-report.ts';
import { statedReport } from './stated-report.ts';
import { strataReport } from './strata-report.ts';

/** Works out the report of a question. */
export function reportOf(question: Question): Report {
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

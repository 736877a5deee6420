import type { Question } from '../../grammar/question.ts';
import { alarmReport } from './alarm-report.ts';
import { bareCountsReport } from './bare-counts-report.ts';
import { countsReport } from './counts-report.ts';
import type { Report } from './report.ts';
import { sharesReport } from './shares-report.ts';
import { statedReport } from './stated-report.ts';

/** Works out the report of a question. */
export function reportOf(question: Question): Report {
  switch (question.kind) {
    case 'counts':
      return countsReport(question);
    case 'shares':
      return sharesReport(question);
    case 'stated':
      return statedReport(question);
    case 'bare-counts':
      return bareCountsReport(question);
    case 'alarm':
      return alarmReport(question);
  }
}

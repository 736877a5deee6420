import { readingsOf } from '../../report/report.ts';
import type { Direction, Report } from '../../report/report.ts';
import { capital, cases, label, perOne } from './labels.ts';
import { count, ratio } from './numbers.ts';
import { intervalNote } from './ratio-words.ts';

/** Beyond this part of all cases the unknown ones decide the answer, and the first line gives the bounds (common practice). */
const mostUnknown = 1 / 3;
const within = 110;

/** The first line where more than a third of the cases are of unknown group: between which ratios the truth lies. Else `null`. */
export function boundsHeadline(report: Report, direction: Direction): string | null {
  const { question, variants } = report;
  if (question.kind !== 'shares' || question.unknownCases === null) return null;
  const unknown = question.unknownCases.value;
  const known = question.totalCases?.value ?? 0;
  const rows = variants?.find(({ topic }) => topic === 'unknown')?.rows ?? [];
  if (unknown / (unknown + known) <= mostUnknown || rows.length === 0) return null;
  const [reading] = readingsOf(report, 'risk-ratio');
  const low = rows.find(({ id }) => id === 'all-in-reference')?.estimate ?? null;
  const high = rows.find(({ id }) => id === 'all-in-group')?.estimate ?? null;
  const range =
    high === null
      ? `${low === null ? 'any ratio' : `${ratio(low, 'short')} times or more`}`
      : `${low === null ? 'up' : ratio(low, 'short')} to ${ratio(high, 'short')} times`;
  if (reading === undefined) return null;
  const note = ` (${intervalNote(reading)})`;
  const [start, end] =
    direction === 'none-shown'
      ? [
          `${capital(range)}, however the ${count(unknown)} unknown split`,
          ': no difference is shown, nor that there is none.',
        ]
      : [
          `However the ${count(unknown)} unknown split, ${label(question, reading.of)} had ${range} as many ${cases(question)} ${perOne(question)} as ${label(question, reading.against ?? 0)}`,
          '.',
        ];
  const full = `${start}${note}${end}`;
  return full.length <= within ? full : `${start}${end}`;
}

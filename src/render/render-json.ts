import { printCanonical } from '../../grammar/print-canonical.ts';
import type { Diagnosis, Question } from '../../grammar/question.ts';
import type { Reading } from '../report/reading.ts';
import type { Report } from '../report/report.ts';
import { statedPlaces } from '../report/alarm-report.ts';
import { alarmParts } from './alarm-json.ts';
import { whyText } from './words/reading-row.ts';
import { plainLabel } from './words/labels.ts';
import { tell } from './words/tell.ts';

/** The version of the JSON report; it changes when a field changes its meaning or goes. */
const schema = 1;

/** The report as one line of JSON: plain shares and ratios at full double precision, never per cent, never rounded. */
export function renderJson(line: string, report: Report): string {
  const words = tell(report);
  const { question } = report;
  return JSON.stringify({
    schema,
    line,
    question: {
      kind: question.kind,
      canonical: printCanonical(question),
      unit: question.unit,
      ...(question.kind === 'alarm' ? alarmParts(question) : {}),
      clauses: clausesOf(question),
    },
    groups: groupsOf(question),
    readings: words.rows.map(({ reading, formula }) => readingOf(question, reading, formula)),
    headline: report.headline,
    answer: words.headline,
    stated: report.stated.map(({ group, stated, computed, agrees }) => ({
      text: stated.text,
      value: stated.value,
      of: question.kind === 'alarm' ? statedPlaces[group] : plainLabel(question, group),
      computed,
      agrees,
      remarks: [],
    })),
    says: null,
    remarks: words.remarks,
    cautions: words.cautions,
    missing: words.missing,
    post: words.posts,
    avoid: words.avoid,
    limits: words.limits,
  });
}

/** A refusal as one line of JSON: positions in the line as typed, UTF-16 units, `to` exclusive. */
export function renderRefusalJson(line: string, diagnosis: Diagnosis): string {
  const { id, message, span, suggestions } = diagnosis;
  return JSON.stringify({
    schema,
    line,
    error: {
      id,
      message,
      from: span.from,
      to: span.to,
      try: suggestions.map((suggestion) => suggestion.line),
    },
  });
}

function groupsOf(question: Question) {
  switch (question.kind) {
    case 'counts':
      return question.groups.map(({ cases, total }, index) => ({
        label: plainLabel(question, index),
        cases: cases.value,
        total: total.value,
        ...rangeOf('cases', cases),
        ...rangeOf('total', total),
      }));
    case 'shares':
      return question.groups.map(({ cases, caseShare, coverage }, index) => ({
        label: plainLabel(question, index),
        cases: cases === null ? null : cases.value,
        caseShare: caseShare.value,
        coverage: coverage.value,
      }));
    case 'stated':
      return question.groups.map(({ share }, index) => ({
        label: plainLabel(question, index),
        share: share.value,
      }));
    case 'alarm':
      return [];
    case 'bare-counts':
      return question.groups.map(({ cases }, index) => ({
        label: plainLabel(question, index),
        cases: cases.value,
      }));
  }
}

function rangeOf(name: string, { low, high }: { readonly low: number; readonly high: number }) {
  return low === high ? {} : { [`${name}Range`]: { low, high } };
}

function clausesOf(question: Question) {
  const { level, per, reference, population, among, period, source, note, exact, onlyMe } = question.clauses;
  return {
    level: level?.value ?? null,
    per,
    reference,
    population: population?.value ?? null,
    among,
    period,
    source,
    note,
    exact,
    onlyMe,
  };
}

function readingOf(question: Question, reading: Reading, formula: string) {
  const {
    id,
    of,
    against,
    estimate,
    unbounded,
    interval,
    whyNoInterval,
    roundingRange,
    per,
    ranges,
    atLimit,
    exactBeside,
  } = reading;
  return {
    id,
    of: plainLabel(question, of),
    against: against === null ? null : plainLabel(question, against),
    estimate,
    ...(unbounded ? { unbounded } : {}),
    interval:
      interval === null
        ? null
        : { low: interval.low, high: interval.high, level: interval.level, method: methodId(reading) },
    whyNoInterval: whyNoInterval === null ? null : whyText(whyNoInterval),
    roundingRange,
    ...(per === null ? {} : { per }),
    ...(ranges === null ? {} : { ranges }),
    ...(id === 'hidden-cause-strength' ? { atLimit } : {}),
    ...(exactBeside === null ? {} : { exact: { low: exactBeside.low, high: exactBeside.high } }),
    working: formula,
  };
}

const methodId = ({ interval }: Reading) =>
  interval === null ? '' : `${interval.method}${interval.envelope ? ', outer envelope' : ''}`;

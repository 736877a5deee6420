import { printCanonical } from '../../grammar/print-canonical.ts';
import type { Diagnosis, Question } from '../../grammar/question.ts';
import type { Reading } from '../report/reading.ts';
import type { Report } from '../report/report.ts';
import { layerName } from './words/strata-words.ts';
import { statedPlaces } from '../report/alarm-report.ts';
import { alarmParts } from './alarm-json.ts';
import { whyText } from './words/reading-row.ts';
import { plainLabel } from './words/labels.ts';
import { tell } from './words/tell.ts';
import type { Telling } from './words/telling.ts';

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
      kind: question.overTime && question.kind !== 'strata' ? 'change' : question.kind,
      canonical: printCanonical(question),
      unit: question.unit,
      ...(question.kind === 'shares' && question.unknownCases !== null
        ? { unknownCases: question.unknownCases.value }
        : {}),
      ...(question.kind === 'alarm' ? alarmParts(question) : {}),
      clauses: clausesOf(question),
    },
    groups: groupsOf(question),
    readings: words.rows.map(({ reading, formula }) => readingOf(question, reading, formula)),
    headline: report.headline,
    couldShow: report.couldShow ?? null,
    answer: words.headline,
    stated: report.stated.map(({ group, stated, computed, agrees }) => ({
      text: stated.text,
      value: stated.value,
      of: question.kind === 'alarm' ? statedPlaces[group] : plainLabel(question, group),
      computed,
      agrees,
      remarks: [],
    })),
    beside: besideOf(report, words.sides),
    says: saysOf(words),
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

function groupsOf(question: Question): readonly object[] {
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
      return question.groups.map(({ cases, caseShare, coverage, known }, index) => ({
        label: plainLabel(question, index),
        cases: cases === null ? null : cases.value,
        caseShare: caseShare.value,
        coverage: coverage.value,
        ...(known.kind === 'given' ? {} : { coverageKnown: known }),
      }));
    case 'stated':
      return question.groups.map(({ share }, index) => ({
        label: plainLabel(question, index),
        share: share.value,
      }));
    case 'strata':
      return question.layers.flatMap(({ question: layer }, at) =>
        groupsOf(layer).map((group) => ({ layer: layerName(question, at), ...group })),
      );
    case 'rates':
      return question.groups.map(({ cases, exposure }, index) => ({
        label: plainLabel(question, index),
        cases: cases.value,
        exposure: exposure.value,
        ...rangeOf('cases', cases),
        ...rangeOf('exposure', exposure),
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

function saysOf({ says }: Telling) {
  if (says === null) return null;
  const { text, agreesWith, remarks, instead, line } = says;
  return { text, agreesWith, remarks, instead, answer: line };
}

/** Ratios under other assumptions, side by side; numbers as in the readings. */
function besideOf({ question, variants = [] }: Report, sides: Telling['sides']) {
  return variants.map(({ topic, coverageOf, rows, slope }, index) => ({
    topic,
    coverageOf: plainLabel(question, coverageOf),
    ...(slope === null ? {} : { slope }),
    ratios: rows.map(({ id, of, against, coverage, estimate, unbounded, interval }) => ({
      id,
      of: plainLabel(question, of),
      against: plainLabel(question, against),
      coverage,
      estimate,
      ...(unbounded ? { unbounded } : {}),
      interval,
    })),
    text: sides[index]?.line ?? '',
  }));
}

function rangeOf(name: string, { low, high }: { readonly low: number; readonly high: number }) {
  return low === high ? {} : { [`${name}Range`]: { low, high } };
}

function clausesOf(question: Question) {
  const {
    level,
    per,
    reference,
    population,
    among,
    period,
    source,
    note,
    exact,
    designEffect,
    everyone,
    onlyMe,
    tryCoverages,
    says,
  } = question.clauses;
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
    designEffect: designEffect?.value ?? null,
    countedEveryone: everyone,
    onlyMe,
    ...(says === undefined ? {} : { says: says.text }),
    ...(tryCoverages === undefined ? {} : { try: tryCoverages.map(({ value }) => value) }),
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
    layer,
    test,
    rest,
    atOnce,
  } = reading;
  return {
    id,
    of: plainLabel(question, of),
    against: rest ? 'the rest' : against === null ? null : plainLabel(question, against),
    estimate,
    ...(unbounded ? { unbounded } : {}),
    interval:
      interval === null
        ? null
        : { low: interval.low, high: interval.high, level: interval.level, method: methodId(reading) },
    whyNoInterval: whyNoInterval === null ? null : whyText(whyNoInterval),
    roundingRange,
    ...(per === null || id !== 'extra-cases' ? {} : { per }),
    ...(ranges === null ? {} : { ranges }),
    ...(id === 'hidden-cause-strength' ? { atLimit } : {}),
    ...(exactBeside === null ? {} : { exact: { low: exactBeside.low, high: exactBeside.high } }),
    ...(layer === null || question.kind !== 'strata' ? {} : { layer: layerName(question, layer) }),
    ...(test === null ? {} : { statistic: test.statistic, test: `${test.name}, ${test.degrees} df` }),
    ...(atOnce === null ? {} : { atOnce }),
    working: formula,
  };
}

const methodId = ({ interval }: Reading) =>
  interval === null
    ? ''
    : `${interval.method}${interval.envelope ? ', outer envelope' : ''}${interval.unknownToEitherSide === true ? ', unknown cases to either side' : ''}`;

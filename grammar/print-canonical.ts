import { unitOfOne } from './exposures.ts';
import { grouped } from './numbers.ts';
import { alarmFigures } from './print-alarm.ts';
import { coverageText, withUnit } from './print-coverage.ts';
import type { Question, Quantity, RatesGroup, SharesQuestion, StrataQuestion } from './question.ts';

/** The canonical spelling of a question. Reading it again gives the same question. */
export function printCanonical(question: Question): string {
  return [changePart(question) ?? figurePart(question), ...clauseParts(question)].join('; ');
}

function figurePart(question: Question): string {
  switch (question.kind) {
    case 'strata':
      return strataPart(question);
    case 'rates':
      return question.groups
        .map((group, index) => `${named(group.label)}${rate(question, group, index)}`)
        .join(' vs ');
    case 'counts': {
      const groups = question.groups.map(({ label, cases, total, stated }, index) => {
        const noun = index === 0 && question.caseNoun !== null ? ` ${question.caseNoun}` : '';
        const unit = question.unit === null ? '' : ` ${question.unit}`;
        const beside = stated === null ? '' : ` (${stated.text})`;
        const counts = / of /.test(cases.text) ? cases.text : `${cases.text}${noun} of ${total.text}`;
        return `${named(label)}${counts}${beside}${unit}`;
      });
      return groups.join(' vs ');
    }
    case 'shares':
      return sharesPart(question);
    case 'stated': {
      const groups = question.groups.map(
        ({ label, share }) =>
          `${named(label)}${share.text}${question.unit === null || !share.text.endsWith('%') ? '' : ` of ${question.unit}`}`,
      );
      return groups.join(' vs ');
    }
    case 'alarm':
      return `${question.name === null ? 'alarm: ' : named(question.name)}${alarmFigures(question)}`;
    case 'bare-counts':
      return question.groups
        .map(({ label, cases }, index) => {
          const noun = index === 0 && question.caseNoun !== null ? ` ${question.caseNoun}` : '';
          return `${named(label)}${cases.text}${noun}`;
        })
        .join(' vs ');
  }
}

/** `from 412 to 530`: a change whose times have no names of their own. */
function changePart(question: Question): string | null {
  if (
    !question.overTime ||
    question.kind === 'shares' ||
    question.kind === 'strata' ||
    question.kind === 'alarm'
  )
    return null;
  if (question.groups.length !== 2) return null;
  if (question.groups.map(({ label }) => label?.toLowerCase()).join() !== 'before,after') return null;
  const unit = question.unit === null ? '' : ` ${question.unit}`;
  const noun = question.caseNoun === null ? '' : `${named(question.caseNoun).replace(/: $/, '')} `;
  switch (question.kind) {
    case 'rates':
      return `from ${question.groups.map((group, index) => rate(question, group, index)).join(' to ')}`;
    case 'counts':
      if (question.groups.some(({ stated, cases }) => stated !== null || / of /.test(cases.text)))
        return null;
      return `${noun}from ${question.groups.map(({ cases, total }) => `${cases.text} of ${total.text}`).join(' to ')}${unit}`;
    case 'stated':
      if (question.unit !== null) return null;
      return `from ${question.groups.map(({ share }) => share.text).join(' to ')}`;
    case 'bare-counts':
      return `${noun}from ${question.groups.map(({ cases }) => cases.text).join(' to ')}`;
  }
}

/** `by age: under 40: night: 3 of 900 vs day: 40 of 9,000 | ...` */
function strataPart({ by, layers }: StrataQuestion): string {
  const head = by === null ? '' : `by ${bare(by)}: `;
  const each = layers.map(({ label, question }) => {
    const figures = question.kind === 'shares' ? layeredShares(question) : figurePart(question);
    return `${named(label)}${figures}`;
  });
  return `${head}${each.join(' | ')}`;
}

/** `no helmet: 12 of 32 cases, 30% of riders` */
function layeredShares({ groups, totalCases, caseNoun, unit }: SharesQuestion): string {
  const [first] = groups;
  if (first?.cases == null || totalCases === null) return '';
  return `${named(first.label)}${first.cases.text} of ${totalCases.text} ${caseNoun ?? 'cases'}, ${first.coverage.text} of ${unit ?? 'all'}`;
}

/** `14 incidents in 5,200 bus-days`, `3 per 1,000 bus-days`. */
function rate(
  { caseNoun, unit }: Question,
  { cases, exposure, connector }: RatesGroup,
  index: number,
): string {
  const noun = index === 0 && caseNoun !== null ? ` ${caseNoun}` : '';
  const one = exposure.value === 1 && unit !== null;
  const base = one && connector === 'per' ? '' : `${exposure.text} `;
  const over = `${base}${one ? unitOfOne(unit) : (unit ?? '')}`;
  return `${cases.text}${noun} ${connector} ${over}`.trimEnd();
}

function sharesPart(question: Extract<Question, { kind: 'shares' }>): string {
  const { groups, totalCases, caseNoun, unit } = question;
  const of = unit === null ? '' : ` of ${unit}`;
  const [first, second] = groups;
  const countOf = (cases: Quantity) => cases.text;
  if (first !== undefined && second?.label === null && groups.length === 2) {
    // One group was named; the other is what remains.
    const noun = caseNoun ?? 'cases';
    const share =
      first.cases !== null && first.cases.precision === 'exact' && totalCases !== null
        ? `${countOf(first.cases)} of ${totalCases.text} ${noun}`
        : `${first.caseShare.text} of ${noun}`;
    const total =
      first.cases !== null && first.cases.precision !== 'exact' && totalCases !== null
        ? `; of ${totalCases.text} ${noun}`
        : '';
    const coverage = `${first.coverage.text}${of === '' ? '' : of}`;
    if (first.known.kind === 'periods')
      return `${named(first.label)}${share}; ${coverageText(first, null, unit, bare)}${total}`;
    if (first.known.kind !== 'given')
      return `${named(first.label)}${share}; coverage ${withUnit(first, unit)}${total}`;
    return of === ''
      ? `${named(first.label)}${share}; coverage ${coverage}${total}`
      : `${named(first.label)}${share}, ${coverage}${total}`;
  }
  const cases = groups.map(
    ({ label, cases: counted, caseShare }) =>
      `${bare(label)} ${counted !== null && counted.precision !== 'range' ? countOf(counted) : counted?.text.startsWith('<') === true ? counted.text : caseShare.text}`,
  );
  const { unknownCases } = question;
  if (unknownCases !== null) cases.push(`unknown ${unknownCases.text}`);
  const stated = groups.filter(({ coverageImplied }) => !coverageImplied);
  const byPeriod = stated.find(({ known }) => known.kind === 'periods');
  const coverage = stated.map((group) => `${bare(group.label)} ${withUnit(group, unit)}`);
  const withTotal = groups.some(
    ({ cases: counted }) =>
      counted === null || (counted.precision === 'range' && !counted.text.startsWith('<')),
  );
  const total =
    totalCases !== null && (withTotal || caseNoun !== null)
      ? `; of ${totalCases.text} ${caseNoun ?? 'cases'}`
      : '';
  const held =
    byPeriod === undefined
      ? `coverage: ${coverage.join(', ')}`
      : coverageText(byPeriod, byPeriod.label, unit, bare);
  return `cases: ${cases.join(', ')}; ${held}${total}`;
}

/** Names that a reader could take for something else stand in quotation marks. */
// Letters by ranges: a Unicode property class takes milliseconds to compile, which the command line would pay at every start.
const letters = 'A-Za-z\u00c0-\u1fff\u2c00-\ud7ff\uf900-\ufaff';
const plainName = new RegExp(`^[${letters}][${letters}' -]*$`);
const plainText = new RegExp(`^[${letters}0-9][${letters}0-9 '-]*$`);
const keywordInName =
  /(?:^| )(?:of|out|in|per|vs?|versus|against|compared|than|and|or|from|to|cases|coverage|level|reference|population|among|period|source|note|exact|only|says|fewer|less|under|about|around|roughly|over|some|nearly|almost|approx|approximately|ca|half|third|quarter|thirds|quarters|fifth|tenth|hundred|thousand|million|billion|is|are|was|were|pc|pct|percent|help|design|counted|try|no|a|one|two|three|four|five|six|seven|eight|nine|ten|eleven|twelve|twenty|thirty|forty|fifty|sixty|seventy|eighty|ninety|dozen|significant|significantly|ok|different|k|m|bn|n)(?: |$)/i;

const bare = (label: string | null) =>
  label === null ? '' : plainName.test(label) && !reserved(label) ? label : `"${label}"`;
const named = (label: string | null) => (label === null ? '' : `${bare(label)}: `);

/** `no helmet` and `out of hours` read back as they are; most keywords do not. */
const reserved = (label: string) =>
  keywordInName.test(label.replace(/^no /i, '')) || /\s{2}|^\s|\s$|^-|-$|- | -/.test(label);

function clauseParts({ clauses }: Question): string[] {
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
  } = clauses;
  return [
    ...(level === null ? [] : [`level ${level.text}`]),
    ...(per === null ? [] : [`per ${grouped(per)}`]),
    ...(reference === null ? [] : [`reference ${quote(reference)}`]),
    ...(population === null ? [] : [`population ${population.text}`]),
    ...(among === null ? [] : [`among ${quote(among)}`]),
    ...(period === null ? [] : [`period ${quote(period)}`]),
    ...(source === null ? [] : [`source ${/^https?:\/\/[^\s|;"]+$/.test(source) ? source : quote(source)}`]),
    ...(note === null ? [] : [`note ${quote(note)}`]),
    ...(clauses.says === undefined ? [] : [`says "${clauses.says.text}"`]),
    ...(clauses.tryCoverages === undefined
      ? []
      : [`try ${clauses.tryCoverages.map(({ text }) => text).join(', ')}`]),
    ...(exact ? ['exact'] : []),
    ...(designEffect === null ? [] : [`design effect ${designEffect.text}`]),
    ...(everyone ? ['counted: everyone'] : []),
    ...(onlyMe ? ['only me'] : []),
  ];
}

const quote = (text: string) => (plainText.test(text) ? text : `"${text.replaceAll('"', "'")}"`);

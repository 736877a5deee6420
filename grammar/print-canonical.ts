import { grouped } from './numbers.ts';
import { alarmFigures } from './print-alarm.ts';
import type { Question, Quantity } from './question.ts';

/** The canonical spelling of a question. Reading it again gives the same question. */
export function printCanonical(question: Question): string {
  return [figurePart(question), ...clauseParts(question)].join('; ');
}

function figurePart(question: Question): string {
  switch (question.kind) {
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
        .map(
          ({ label, cases }) =>
            `${named(label)}${cases.text}${question.unit === null ? '' : ` ${question.unit}`}`,
        )
        .join(' vs ');
  }
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
    return of === ''
      ? `${named(first.label)}${share}; coverage ${coverage}${total}`
      : `${named(first.label)}${share}, ${coverage}${total}`;
  }
  const cases = groups.map(
    ({ label, cases: counted, caseShare }) =>
      `${bare(label)} ${counted !== null && counted.precision !== 'range' ? countOf(counted) : counted?.text.startsWith('<') === true ? counted.text : caseShare.text}`,
  );
  const coverage = groups
    .filter(({ coverageImplied }) => !coverageImplied)
    .map(({ label, coverage: held }) => `${bare(label)} ${held.text}${of}`);
  const withTotal = groups.some(
    ({ cases: counted }) =>
      counted === null || (counted.precision === 'range' && !counted.text.startsWith('<')),
  );
  const total =
    totalCases !== null && (withTotal || caseNoun !== null)
      ? `; of ${totalCases.text} ${caseNoun ?? 'cases'}`
      : '';
  return `cases: ${cases.join(', ')}; coverage: ${coverage.join(', ')}${total}`;
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
  const { level, per, reference, population, among, period, source, note, exact, onlyMe } = clauses;
  return [
    ...(level === null ? [] : [`level ${level.text}`]),
    ...(per === null ? [] : [`per ${grouped(per)}`]),
    ...(reference === null ? [] : [`reference ${quote(reference)}`]),
    ...(population === null ? [] : [`population ${population.text}`]),
    ...(among === null ? [] : [`among ${quote(among)}`]),
    ...(period === null ? [] : [`period ${quote(period)}`]),
    ...(source === null ? [] : [`source ${/^https?:\/\/[^\s|;"]+$/.test(source) ? source : quote(source)}`]),
    ...(note === null ? [] : [`note ${quote(note)}`]),
    ...(exact ? ['exact'] : []),
    ...(onlyMe ? ['only me'] : []),
  ];
}

const quote = (text: string) => (plainText.test(text) ? text : `"${text.replaceAll('"', "'")}"`);

import type { Question } from '../../../grammar/question.ts';
import { alarmName } from './alarm-read-as.ts';

/** How a group is called in sentences, and what one of the counted is called. All from what was typed. */

const ordinals = [
  'first',
  'second',
  'third',
  'fourth',
  'fifth',
  'sixth',
  'seventh',
  'eighth',
  'ninth',
  'tenth',
];
const longest = 40;

/** The typed label, or "the first group"; the implied other group of a coverage line is "everybody else". */
export function plainLabel(question: Question, index: number): string {
  if (question.kind === 'alarm') return alarmName(question);
  const label = question.groups[index]?.label ?? null;
  if (label !== null)
    return label.length > longest ? `${label.slice(0, longest - 1).trimEnd()}\u2026` : label;
  if (
    question.kind === 'shares' ||
    (question.kind === 'strata' && question.layers[0]?.question.kind === 'shares')
  )
    return question.groups.length === 2 && index === 1 ? 'the others' : groupName(index);
  return question.groups.length === 1 ? 'this group' : groupName(index);
}

const groupName = (index: number) => `the ${ordinals[index] ?? `${index + 1}th`} group`;

/** Words that make a label read badly inside a sentence unless it is quoted: "no helmet had ...". */
const wantsQuotes =
  /^(?:no|not|non|never|without|with|under|over|up|less|more|at|above|below|in|on|from|to|of|by|yes|before|after|[^A-Za-z\u00c0-\uffff])/i;

function quoted(question: Question): boolean {
  if (question.kind === 'alarm') return false;
  // "As before", "after" and "2023" are words of time here, not names.
  const time = question.overTime ? /^(?:before|after|(?:19|20)\d\d)$/i : null;
  return question.groups.some(
    ({ label }) =>
      label !== null && time?.test(label) !== true && (wantsQuotes.test(label) || /[:;,."()]/.test(label)),
  );
}

/** The label inside a sentence: in quotation marks where any label of the question would read badly without. */
export function label(question: Question, index: number): string {
  const plain = plainLabel(question, index);
  if (question.kind === 'alarm') return plain;
  return question.groups[index]?.label != null && quoted(question) ? `\u201c${plain}\u201d` : plain;
}

/** The label at the start of a sentence. */
export const Label = (question: Question, index: number) => capital(label(question, index));

/** With a capital at the front, also behind an opening quotation mark. */
export function capital(text: string): string {
  const at = text.startsWith('\u201c') ? 1 : 0;
  const first = String.fromCodePoint(text.codePointAt(at) ?? 32);
  return text.slice(0, at) + first.toUpperCase() + text.slice(at + first.length);
}

/** What cases are called: the typed noun where it is a plural, else "cases". */
export function cases(question: Question): string {
  const noun = question.caseNoun;
  return noun !== null && /[^s]s$/i.test(noun) ? noun : 'cases';
}

/** What all cases together are called: "75 injured", "75 cases". */
export const casesAsTyped = (question: Question) => question.caseNoun ?? 'cases';

/** What the counted are called, in the plural: "riders", else "the population". */
export const population = (question: Question) => question.clauses.among ?? question.unit ?? 'the population';

const irregular: Readonly<Record<string, string>> = {
  people: 'person',
  children: 'child',
  men: 'man',
  women: 'woman',
  staff: 'member of staff',
  buses: 'bus',
};

/** One of the counted: "rider", "shift", "person"; `null` where the line names no unit or its singular is not known. */
export function one(question: Question): string | null {
  const { unit } = question;
  if (unit === null) return null;
  const words = unit.split(' ');
  const last = words.pop()?.toLowerCase() ?? '';
  const singular =
    irregular[last] ??
    (/ies$/.test(last)
      ? last.replace(/ies$/, 'y')
      : /(?:sh|ch|x|ss)es$/.test(last)
        ? last.slice(0, -2)
        : /[^s]s$/.test(last)
          ? last.slice(0, -1)
          : null);
  return singular === null ? null : [...words, singular].join(' ');
}

/** "Per rider", or "For its size" where nobody said what is counted. */
export function perOne(question: Question): string {
  const single = one(question);
  return single === null ? 'for its size' : `per ${single}`;
}

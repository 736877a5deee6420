import type { GroupedQuestion as Question } from '../../grammar/question.ts';
import type { Reading } from './reading.ts';
import type { GroupedReport as Report } from './report.ts';
import type { SaysPair } from './said.ts';

/**
 * The pairs that a sentence may be about, the likeliest first. A sentence that names no group is about the first one (in a change,
 * the later); with several groups it may then be about any of them.
 */
export function pairsFor(report: Report, sentence: string): readonly SaysPair[] {
  const { question } = report;
  const pairs = report.readings.filter(
    ({ id, layer, rest }) => id === report.headline && layer === null && !rest,
  );
  const { subject, reference } = namedIn(question, sentence);
  if (pairs.length === 0 || pairs.every(({ against }) => against === null)) {
    const only = subject ?? 0;
    return [{ of: only, against: null, turned: false, subject: only, named: subject !== null }];
  }
  const direct = (reading: Reading, named: boolean): SaysPair => ({
    of: reading.of,
    against: reading.against,
    turned: false,
    subject: reading.of,
    named,
  });
  if (subject === null) return pairs.map((reading) => direct(reading, false));
  const own = pairs.filter(({ of }) => of === subject);
  if (own.length > 0) return own.map((reading) => direct(reading, true));
  const turned = pairs.filter(({ of }) => reference === null || of === reference);
  return turned.map((reading) => ({
    of: reading.of,
    against: reading.against,
    turned: true,
    subject,
    named: true,
  }));
}

const comparing =
  /(?:than|as|against|versus|vs\.?|compared (?:with|to)|relative to)(?: (?:the|those|people|riders|in|on|at|for|of|with|among|who))* $/;

/** The first group named that is not what another is compared with; and the one that is. */
function namedIn(question: Question, sentence: string): { subject: number | null; reference: number | null } {
  let text = ` ${sentence.toLowerCase().replace(/[^a-z0-9\u00c0-\u1fff\u2c00-\ud7ff\uf900-\ufaff]+/g, ' ')} `;
  const labels = question.groups.map(({ label }, index) => label?.toLowerCase() ?? implied(question, index));
  const order = labels
    .map((label, index) => ({ label: label ?? '', index }))
    // "No helmet" before "helmet", which it holds.
    .sort((a, b) => b.label.length - a.label.length);
  const found: { readonly index: number; readonly at: number; readonly compared: boolean }[] = [];
  for (const { label, index } of order) {
    const others = labels.filter((_, at) => at !== index);
    let first: { readonly index: number; readonly at: number; readonly compared: boolean } | null = null;
    for (const name of namesOf(label, others)) {
      const at = text.indexOf(` ${name} `);
      const plural = at === -1 ? text.indexOf(` ${name}s `) : at;
      if (plural === -1) continue;
      first ??= { index, at: plural, compared: comparing.test(text.slice(0, plural + 1)) };
      // What was taken for one group is no name of another; as many units, so that places stay.
      text = text.replaceAll(` ${name}`, ` ${'_'.repeat(name.length)}`);
    }
    if (first !== null) found.push(first);
  }
  const first = [...found].sort((a, b) => a.at - b.at);
  const subject = first.find(({ compared }) => !compared)?.index ?? null;
  const reference = first.find(({ compared }) => compared)?.index ?? null;
  if (subject !== null && subject !== reference) return { subject, reference };
  // "... than day": about the other of two groups.
  const other = question.groups.length === 2 && reference !== null ? 1 - reference : null;
  return { subject: other, reference };
}

/** The other group of a coverage line: "helmet" beside "no helmet". */
function implied({ kind, groups }: Question, index: number): string | null {
  const other = groups[1 - index]?.label?.toLowerCase();
  if (kind !== 'shares' || groups.length !== 2 || other === undefined) return null;
  return other.startsWith('no ') ? other.slice(3) : `no ${other}`;
}

const tooCommon =
  /^(?:before|after|the|and|with|without|group|other|rest|new|old|one|two|all|not|more|less|over|under)$/;

/** How a group may be called: its label, "without a helmet" for "no helmet", or a word that it alone has. */
function namesOf(label: string, others: readonly (string | null)[]): string[] {
  const plain = label.replace(/[^a-z0-9\u00c0-\u1fff\u2c00-\ud7ff\uf900-\ufaff]+/g, ' ').trim();
  if (plain === '' || tooCommon.test(plain)) return [];
  const without = /^no (.+)$/.exec(plain)?.[1];
  const own = plain
    .split(' ')
    .filter((word) => word.length > 2 && !tooCommon.test(word))
    .filter((word) => others.every((other) => other === null || !` ${other} `.includes(word)));
  return [
    plain,
    ...(without === undefined ? [] : [`without a ${without}`, `without ${without}`, `without an ${without}`]),
    ...(without === undefined ? own : []),
  ];
}

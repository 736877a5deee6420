import { answerGiven, figureText, missing, withPercentSigns } from './alarm-missing.ts';
import { alarmShare, quotient } from './alarm-shares.ts';
import { cellOf, isShare, wordOf } from './alarm-sides.ts';
import type { Cell, Sided, Sides } from './alarm-sides.ts';
import type { AlarmWord } from './alarm-words.ts';
import { diagnosis } from './diagnosis.ts';
import { countQuantity, refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { AlarmShare, Question, ReadingRemark } from './question.ts';
import type { Setting } from './setting.ts';
import type { Item, Words } from './tree.ts';

/** An alarm: sensitivity, specificity and prevalence, or its four counts. */
export function settleAlarm(items: readonly Item[], name: Words | null, setting: Setting): Settled<Question> {
  const clause = clauseThatDoesNotGo(setting);
  if (clause !== null) return refused(clause);
  const asked = items.find((item) => wordOf(item) === 'accuracy' || wordOf(item) === 'result');
  if (asked !== undefined) return refused(answerGiven(asked, items, setting));
  const remarks: ReadingRemark[] = [...setting.remarks];
  let sides: Sides = {
    sensitivity: null,
    specificity: null,
    prevalence: null,
    caught: null,
    missed: null,
    falseAlarms: null,
    quiet: null,
  };
  for (const item of items) {
    const next = withItem(sides, item, items, setting);
    if (!next.ok) return next;
    remarks.push(...next.remarks);
    sides = next.value;
  }
  const sensitivity = sideOf(sides.sensitivity, sides.caught, sides.missed, 'Caught and missed');
  if (!sensitivity.ok) return sensitivity;
  const specificity = sideOf(sides.specificity, sides.quiet, sides.falseAlarms, 'Quiet and false alarms');
  if (!specificity.ok) return specificity;
  const fourCounts = [sensitivity, specificity].every(({ value }) => value?.given.kind === 'cells');
  const unplaced = items.find((item) => wordOf(item) === null);
  const prevalence = sides.prevalence?.value ?? null;
  if (sensitivity.value === null || specificity.value === null || (prevalence === null && !fourCounts))
    return refused(missing(sides, items, setting));
  if (unplaced !== undefined)
    return refused(
      diagnosis('unread-alarm', unplaced.span, [
        setting.typed.slice(unplaced.span.from, unplaced.span.to).trim(),
      ]),
    );
  if (name !== null && name.text.startsWith('@')) return refused(diagnosis('mention-as-name', name.span));
  return settled({
    kind: 'alarm',
    name: name?.text ?? null,
    sensitivity: sensitivity.value,
    specificity: specificity.value,
    prevalence,
    clauses: setting.given.clauses,
    unit: items.find((item) => wordOf(item) === 'prevalence')?.after?.text ?? null,
    caseNoun: null,
    overTime: false,
    remarks,
  });
}

function clauseThatDoesNotGo({ given, typed }: Setting) {
  const whole = { from: 0, to: typed.length };
  if (given.clauses.reference !== null)
    return diagnosis('alarm-clause', given.referenceSpan ?? whole, ['reference']);
  if (given.ofCases !== null) return diagnosis('alarm-clause', given.ofCases.quantity.span, ['of ... cases']);
  return given.clauses.population === null
    ? null
    : diagnosis('alarm-clause', given.clauses.population.span, ['population']);
}

function withItem(sides: Sides, item: Item, items: readonly Item[], setting: Setting): Settled<Sides> {
  const word = wordOf(item);
  if (word === null || word === 'accuracy' || word === 'result') return settled(sides);
  if (!isShare(item)) return withCell(sides, word, item, items, setting);
  const turned =
    word === 'miss rate' || word === 'missed' || word === 'false alarm rate' || word === 'false alarms';
  const value = alarmShare(item, turned, setting);
  if (!value.ok) return value;
  const side = { value: value.value, word };
  switch (word) {
    case 'sensitivity':
    case 'caught':
    case 'miss rate':
    case 'missed':
      return once(sides.sensitivity, side, item, value.remarks, (kept) => ({ ...sides, sensitivity: kept }));
    case 'specificity':
    case 'quiet':
    case 'false alarm rate':
    case 'false alarms':
      return once(sides.specificity, side, item, value.remarks, (kept) => ({ ...sides, specificity: kept }));
    case 'prevalence': {
      const { share } = value.value;
      return share.low <= 0 || share.high >= 1
        ? refused(diagnosis('prevalence-at-end', share.span, [figureText(item, setting)]))
        : once(sides.prevalence, side, item, value.remarks, (kept) => ({ ...sides, prevalence: kept }));
    }
  }
}

/** A figure given twice is refused, unless the two say the same: `specificity 97%, false alarm rate 3%`. */
function once(
  before: Sided | null,
  side: Sided,
  item: Item,
  remarks: readonly ReadingRemark[],
  into: (kept: Sided) => Sides,
): Settled<Sides> {
  if (before === null) return settled(into(side), remarks);
  return Math.abs(before.value.share.value - side.value.share.value) < 1e-9
    ? settled(into(before), remarks)
    : refused(diagnosis('alarm-word-twice', item.name?.span ?? item.span, [side.word]));
}

function withCell(
  sides: Sides,
  word: AlarmWord,
  item: Item,
  items: readonly Item[],
  setting: Setting,
): Settled<Sides> {
  if (item.figure.kind !== 'count') throw new Error('a bare count is a count');
  const key = cellOf(word);
  if (key === null) {
    const { countSpan } = item.figure;
    const typed = setting.typed.slice(countSpan.from, countSpan.to).trim();
    return refused(diagnosis('alarm-share-due', countSpan, [typed], withPercentSigns(items, setting)));
  }
  if (sides[key] !== null)
    return refused(diagnosis('alarm-word-twice', item.name?.span ?? item.span, [word]));
  const count = countQuantity(item.figure.count, item.figure.countSpan, setting.typed);
  return count.ok ? settled({ ...sides, [key]: { count: count.value } }, count.remarks) : count;
}

/** A side as given, or from its two cells; `null` where neither is there. */
function sideOf(
  given: Sided | null,
  right: Cell | null,
  wrong: Cell | null,
  words: string,
): Settled<AlarmShare | null> {
  if (given !== null) {
    const double = right ?? wrong;
    return double === null
      ? settled(given.value)
      : refused(diagnosis('alarm-word-twice', double.count.span, [given.word]));
  }
  if (right === null || wrong === null) return settled(null);
  const span = {
    from: Math.min(right.count.span.from, wrong.count.span.from),
    to: Math.max(right.count.span.to, wrong.count.span.to),
  };
  if (right.count.low + wrong.count.low <= 0) return refused(diagnosis('alarm-no-case', span, [words]));
  return settled({
    share: quotient(right.count, wrong.count, span, (x, y) => x / (x + y)),
    given: { kind: 'cells', right: right.count, wrong: wrong.count },
  });
}

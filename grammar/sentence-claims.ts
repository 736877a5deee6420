import { amountAt } from './sentence-amounts.ts';
import type { Mark } from './sentence-marks.ts';
import { isChanging } from './sentence-words.ts';

/** Where a result stands in a sentence: `up 29%`, `4 times more dangerous`, `cut ... by 57%`, `RR 2.3 (95% CI 1.5-3.7)`. */
interface Claim {
  readonly kind: 'claim';
  readonly start: number;
  readonly end: number;
  readonly sentence: number;
}

const comparing =
  /^(?:more|less|fewer|higher|lower|greater|smaller|safer|likelier|worse|better|faster|slower|as|up|down|increase|decrease|rise|fall|drop|jump|cut|reduction|growth|surge|decline|riskier|deadlier)$/i;
const inWords =
  /^(?:twice|thrice|doubled?|doubles|doubling|trebled?|tripled?|triples|quadrupled?|halved?|halves|halving|twofold|threefold|tenfold)$/i;
const gluedTimes = /^\d+(?:\.\d+)?(?:x|-fold|fold|-times)$/i;
const ratioName = /^(?:rr|or|hr|irr|ratio|risk)$/i;

/** The claim that starts at a mark, or `null`. */
export function claimAt(marks: readonly Mark[], at: number, sentence: number): Claim | null {
  const end = claimEnd(marks, at);
  return end === null ? null : { kind: 'claim', start: ratioAt(marks, at) ?? at, end, sentence };
}

function claimEnd(marks: readonly Mark[], at: number): number | null {
  const text = (place: number) => marks[place]?.text ?? '';
  if (marks[at]?.kind === 'word') {
    const own = text(at);
    if (inWords.test(own)) return likely(marks, at + 1);
    if (gluedTimes.test(own)) return likely(marks, at + 1);
    if (isChanging(own)) return moved(marks, at);
    return null;
  }
  const fraction = marks[at]?.kind === 'fraction';
  if (fraction && (comparing.test(text(at + 1)) || /^by$/i.test(text(at - 1)))) return likely(marks, at + 1);
  const named = ratioAt(marks, at) !== null;
  const amount = marks[at]?.kind === 'about' ? null : amountAt(marks, at);
  if (amount === null) return null;
  const next = marks[amount.end];
  if (
    named &&
    next?.kind !== 'percent' &&
    next?.kind !== 'of' &&
    next?.kind !== 'slash' &&
    !Number.isInteger(amount.value)
  )
    return interval(marks, amount.end);
  // `failed 31 times` counts; `4 times more`, `4 times the risk` compares.
  if (/^times$/i.test(next?.text ?? ''))
    return comparing.test(text(amount.end + 1)) || /^(?:the|than|that|safer)$/i.test(text(amount.end + 1))
      ? likely(marks, amount.end + 1)
      : null;
  if (/^(?:points?|pp|percentage)$/i.test(next?.text ?? ''))
    return likely(marks, amount.end + (/^percentage$/i.test(next?.text ?? '') ? 2 : 1));
  if (next?.kind !== 'percent') return null;
  if (/^points?$/i.test(text(amount.end + 1))) return likely(marks, amount.end + 2);
  if (comparing.test(text(amount.end + 1))) return likely(marks, amount.end + 1);
  if (/^(?:ci|confidence)$/i.test(text(amount.end + 1))) return interval(marks, at);
  return /^by$/i.test(text(at - 1)) ? amount.end + 1 : null;
}

/** `RR 2.3`, `an odds ratio of 1.8`: where the name of the ratio in front of a number stands. */
function ratioAt(marks: readonly Mark[], at: number): number | null {
  const text = (place: number) => marks[place]?.text ?? '';
  const behind = marks[at - 1]?.kind === 'of' || /^(?:is|was|=)$/.test(text(at - 1)) ? at - 2 : at - 1;
  if (!ratioName.test(text(behind))) return null;
  if (/^(?:ratio|risk)$/i.test(text(behind)))
    return /^(?:odds|risk|rate|hazard|relative)$/i.test(text(behind - 1)) ? behind - 1 : null;
  return /^[A-Z]{2,3}$/.test(text(behind)) ? behind : null;
}

/** `up 29%`, `rose by about 12%`, `cut head injuries by 57%`, `cut by half`: the percentage ends it; without one it is no claim. */
function moved(marks: readonly Mark[], at: number): number | null {
  for (let place = at + 1; place <= at + 5; place += 1) {
    const mark = marks[place];
    if (mark === undefined) return null;
    const by = /^by$/i.test(marks[place - 1]?.text ?? '');
    if (mark.kind === 'fraction') return by ? place + 1 : null;
    if (mark.kind === 'about') continue;
    const amount = amountAt(marks, place);
    if (amount !== null) {
      const next = marks[amount.end];
      const direct = place === at + 1 || by || marks[place - 1]?.kind === 'about';
      if (
        next?.kind === 'percent' &&
        direct &&
        marks[amount.end + 1]?.kind !== 'of' &&
        marks[amount.end + 1]?.kind !== 'to'
      )
        return amount.end + 1;
      return null;
    }
    if (mark.kind !== 'word') return null;
  }
  return null;
}

/** `more likely`, `as often as`: the words that say of what a number of times is. */
function likely(marks: readonly Mark[], at: number): number {
  let end = at;
  while (
    end < at + 4 &&
    /^(?:more|less|fewer|higher|lower|greater|safer|as|likely|often|many|much|common|dangerous|deadly|frequent|risky|up|down|increase|decrease|rise|fall|drop|reduction|cut|points?)$/i.test(
      marks[end]?.text ?? '',
    )
  )
    end += 1;
  return end;
}

/** The interval in brackets behind a ratio: `(95% CI 1.5-3.7)`. */
function interval(marks: readonly Mark[], at: number): number {
  if (marks[at]?.kind !== 'open' && marks[at]?.kind !== 'number') return at;
  for (let place = at + 1; place < at + 10; place += 1) {
    const mark = marks[place];
    if (mark === undefined || mark.kind === 'stop') return at;
    if (mark.kind === 'close') return place + 1;
  }
  return at;
}

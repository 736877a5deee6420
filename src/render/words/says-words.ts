import type { FigureClaim } from '../../../grammar/claim.ts';
import type { Reading } from '../../report/reading.ts';
import type { GroupedReport as Report } from '../../report/report.ts';
import type { Says, SaysPair, SaysRemark } from '../../report/said.ts';
import { changeText, estimateText, levelText, limitsText } from './interval-text.ts';
import { capital, cases, label, perOne } from './labels.ts';
import { fixed, ratio } from './numbers.ts';
import { postsFor } from './posts.ts';
import { perExposure } from './rate-words.ts';
import { comparison, intervalNote } from './ratio-words.ts';
import { variantText } from './says-variants.ts';
import type { SaysTold } from './telling.ts';

/** The sentence under test in words. It is never graded: the words say which readings it agrees with, and what else was found. */
export function saysTold(report: Report): SaysTold | null {
  const says = report.says ?? null;
  if (says === null) return null;
  const remarks = says.remarks.map((remark) => ({
    id: remark.id,
    text: remarkText(report, says, remark),
  }));
  const line = agreementText(report, says);
  const [first] = remarks;
  return {
    text: says.clause.text,
    line,
    agreesWith: [...new Set(says.agreesWith.map(({ id }) => id))],
    remarks,
    instead: says.instead === null ? null : insteadText(report, says.instead),
    short: first === undefined ? line : `${line} ${first.text}`,
  };
}

function agreementText(report: Report, says: Says): string {
  if (says.held === 'no-figure') return 'There is no figure in it that could be held against these.';
  if (says.held === 'no-reading')
    return 'Nothing here measures what it says, so it could not be held against these figures.';
  if (says.held === 'given') return 'It repeats a figure as given; there is no comparison in it to hold.';
  if (says.held === 'count-difference') return 'It is the difference of the two counts as given.';
  const { claim } = says.clause;
  const [reading] = says.agreesWith;
  if (reading === undefined) {
    const nearest =
      says.remarks.length > 0 || says.instead === null || claim.kind !== 'figure'
        ? ''
        : `; ${nameOf(report, says.instead)} is ${valueText(report, says.instead, says.pair)}`;
    return `As worded it agrees with none of the readings${nearest}.`;
  }
  if (claim.kind === 'shown')
    return `As worded it agrees with ${nameOf(report, reading)}: its interval does not include “no difference”.`;
  if (claim.kind === 'not-shown')
    return `As worded it agrees with ${nameOf(report, reading)}: its interval includes “no difference”.`;
  const named = says.agreesWith.map(
    (each) => `${nameOf(report, each)} (${valueText(report, each, says.pair)})`,
  );
  return `As worded it agrees with ${named.join(' and ')}.`;
}

/** "the risk ratio", "the risk of night". */
function nameOf(report: Report, { id, of, against }: Reading): string {
  const own = against === null ? ` of ${label(report.question, of)}` : '';
  return `the ${names[id] ?? id.replaceAll('-', ' ')}${own}`;
}

const names: Partial<Record<Reading['id'], string>> = {
  'case-share': 'share of the cases',
  'population-share': 'coverage',
  'count-ratio': 'ratio of the counts',
  'percentage-ratio': 'ratio as stated',
  'percentage-difference': 'difference as stated',
  'crude-risk-ratio': 'risk ratio all together',
  'crude-rate-ratio': 'rate ratio all together',
  'one-extra-per': 'number per extra case',
  'attributable-fraction': 'fraction above the other rate',
  'prevented-fraction': 'fraction below the other rate',
  'population-attributable-fraction': 'fraction of all cases above the other rate',
};

/** A reading's value in its own unit, turned round where the sentence is. */
function valueText({ question }: Report, reading: Reading, pair: SaysPair | null): string {
  const { id, estimate, against, per } = reading;
  const turned = pair?.turned === true && against !== null && estimate !== null;
  if (turned && id === 'relative-change') return changeText(1 / (estimate + 1) - 1, 'full');
  if (/ratio$/.test(id)) {
    const value = estimate === null ? null : turned ? 1 / estimate : estimate;
    return value === null ? 'no value' : `${ratio(value, 'full')} times`;
  }
  const shown: Reading = turned ? { ...reading, estimate: -estimate } : reading;
  const text = estimateText(shown, 'full') ?? 'no value';
  if (id === 'extra-cases') return `${text} per ${fixed(per ?? 1, 0)}`;
  if (id === 'rate' || id === 'rate-difference' || id === 'pooled-rate-difference')
    return `${text} ${perExposure(question, per ?? 1)}`;
  return id === 'one-extra-per' ? `one for every ${text}` : text;
}

const figureOf = (says: Says): FigureClaim | null =>
  says.clause.claim.kind === 'figure' ? says.clause.claim : null;

/** The claim's own words, without a quotation mark that it may hold. */
const claimed = (says: Says) => figureOf(says)?.text ?? says.clause.text;

function remarkText(report: Report, says: Says, remark: SaysRemark): string {
  const { question } = report;
  const own = label(question, says.pair.subject);
  const { reading } = remark;
  // The words of the figures go the way the readings do.
  const value = reading === null ? '' : valueText(report, reading, says.pair);
  switch (remark.id) {
    case 'points-called-per-cent': {
      const change = sibling(report, remark.reading, ['relative-change']);
      const difference = sibling(report, remark.reading, [
        'risk-difference',
        'percentage-difference',
        'pooled-risk-difference',
      ]);
      const [points, relative] = [difference, change].map((each) =>
        each === null ? '' : valueText(report, each, says.pair),
      );
      return remark.called === 'per-cent'
        ? `${claimed(says)} fits the difference in percentage points (${points}); as a relative change it is ${relative}.`
        : `${claimed(says)} fits the relative change (${relative}); in percentage points the difference is ${points}.`;
    }
    case 'odds-ratio-as-risk': {
      const plain = sibling(report, remark.reading, ['risk-ratio', 'pooled-risk-ratio']);
      return plain === null
        ? `That is the odds ratio (${value}); from rows chosen by outcome no risk can be read.`
        : `That is the odds ratio (${value}); the risk ratio is ${valueText(report, plain, says.pair)}.`;
    }
    case 'share-as-risk':
      return shareRemark(report, says, remark);
    case 'other-way-round':
      return `It goes the other way round: for ${label(question, says.pair.subject)} against ${label(question, otherOf(says.pair))} the figures give ${value}.`;
    case 'from-wrong-base':
      return baseRemark(report, says, remark, own, value);
    case 'rounded-first':
      return `It follows from figures rounded first (${remark.from.map((each) => written(each, remark)).join(' and ')}); from the figures as given it is ${value}.`;
    case 'decimal-slip': {
      const places = Math.abs(remark.places);
      const words = places === 1 ? 'one place' : places === 2 ? 'two places' : `${String(places)} places`;
      return `The figures give ${value}; the line has ${claimed(says)}, its decimal point ${words} further to the ${remark.places > 0 ? 'right' : 'left'}.`;
    }
    case 'hedge-too-strong':
      return `The figures give ${value}, which does not go with “${hedgeText(figureOf(says))} ${claimed(says)}”.`;
    case 'ambiguous-more':
      return ambiguous(report, says, remark.reading);
    case 'no-difference-shown':
      return noDifference(remark);
    case 'interval-variant':
      return variantText(says, remark);
  }
}

const otherOf = ({ of, against, subject }: SaysPair) => (subject === of ? (against ?? of) : of);

/** The reading of another id about the same pair. */
function sibling(report: Report, { of, against }: Reading, ids: readonly Reading['id'][]): Reading | null {
  return (
    report.readings.find(
      (each) => ids.includes(each.id) && each.of === of && each.against === against && each.layer === null,
    ) ?? null
  );
}

function shareRemark(
  report: Report,
  says: Says,
  { reading, is }: Extract<SaysRemark, { id: 'share-as-risk' }>,
): string {
  const { question } = report;
  const headline = report.readings.find(
    ({ id, of, against }) => id === report.headline && of === says.pair.of && against === says.pair.against,
  );
  const per =
    headline === undefined
      ? ''
      : ` ${capital(perOne(question))} it is ${valueText(report, headline, says.pair)} as many.`;
  const share = estimateText(reading, 'full') ?? '';
  switch (is) {
    case 'share':
      return `${share} is the share of the ${cases(question)} that fell to ${label(question, reading.of)}, not a risk.${per}`;
    case 'cases-against-cases':
      return `That sets the ${cases(question)} of one group against those of the other, whatever the size of the groups.${per}`;
    case 'share-against-coverage':
      return `That sets a share of the ${cases(question)} (${share}) against a share of everybody, not against the other group.${per}`;
  }
}

function baseRemark(
  { question }: Report,
  says: Says,
  { base }: Extract<SaysRemark, { id: 'from-wrong-base' }>,
  own: string,
  value: string,
): string {
  const other = label(question, otherOf(says.pair));
  switch (base) {
    case 'own':
      return `${claimed(says)} is the difference over the figure of ${own}; over that of ${other} it is ${value}.`;
    case 'whole':
      return `${claimed(says)} is the whole figure as a percentage of that of ${other}, not what it is higher or lower by; that is ${value}.`;
    case 'change':
      return `${claimed(says)} is by how much it is higher; the ratio is ${value}.`;
    case 'counts':
      return `That sets the counts against each other, whatever they are out of; ${perOne(question)} it is ${value}.`;
    case 'other-total':
      return `That is what ${own} counts over another total; over its own it is ${value}.`;
  }
}

function written(value: number, { unit, decimals }: Extract<SaysRemark, { id: 'rounded-first' }>): string {
  const text = value.toLocaleString('en-US', {
    minimumFractionDigits: Math.max(0, decimals),
    maximumFractionDigits: Math.max(0, decimals),
  });
  return unit === 'percent' ? `${text}%` : unit === 'ratio' ? `${text} times` : text;
}

function hedgeText(claim: FigureClaim | null): string {
  switch (claim?.hedge ?? null) {
    case 'about':
      return 'about';
    case 'nearly':
      return 'nearly';
    case 'over':
      return 'more than';
    case 'at-least':
      return 'at least';
    case 'at-most':
      return 'up to';
    case 'below':
      return 'less than';
    case null:
      return '';
  }
}

function ambiguous(report: Report, says: Says, reading: Reading | null): string {
  const claim = figureOf(says);
  const value = claim?.value ?? NaN;
  if (claim?.direction === 'down')
    return `“Times fewer” has no fixed meaning; write what part of the other it is, or by how many per cent it is lower.`;
  const [few, many] = [value, value + 1].map((each) => String(Number(each.toFixed(6))));
  const here =
    reading === null
      ? ''
      : reading.id === 'relative-change'
        ? ' Here the second fits.'
        : ` Here the first fits (${valueText(report, reading, says.pair)}).`;
  return `“${claimed(says)} more” is ${few ?? ''} times as many to some and ${many ?? ''} times to others.${here}`;
}

function noDifference({
  reading,
  claims,
  shown,
}: Extract<SaysRemark, { id: 'no-difference-shown' }>): string {
  const { interval } = reading;
  const limits =
    interval === null
      ? 'The interval'
      : `The ${levelText(interval.level)} interval (${limitsText(reading, interval, 'full')})`;
  if (shown) return `${limits} leaves “no difference” out: these figures do show one.`;
  return claims === 'none'
    ? `${limits} includes “no difference” and much else: that none is shown does not show that there is none.`
    : `${limits} includes “no difference”: the figures show no difference, nor that there is none.`;
}

/** A sentence that would be right: the one to post about that reading, else the reading in a sentence of its own. */
function insteadText(report: Report, reading: Reading): string {
  const { question } = report;
  const post =
    question.groups.length > 2 ? undefined : postsFor(report).find(({ reading: id }) => id === reading.id);
  if (post !== undefined && (reading.against !== null || reading.of === 0)) return post.text;
  const own = capital(label(question, reading.of));
  const note =
    reading.interval === null && reading.whyNoInterval === null ? '' : ` (${intervalNote(reading)})`;
  if (reading.against === null) return `${own}: ${valueText(report, reading, null)}${note}.`;
  const other = label(question, reading.against);
  if (/ratio$/.test(reading.id) && reading.estimate !== null && reading.id !== 'odds-ratio') {
    const { words, joiner, figure } = comparison(reading.estimate, 'often');
    return `${own}: ${words} ${joiner} ${other}${figure === null ? '' : `, ${figure}`}${note}.`;
  }
  return `${own} against ${other}: ${valueText(report, reading, null)}${note}.`;
}

/**
 * The catalogue of messages about a line. Two lines at most, in the words of a person in a hurry, never a parser's. Each entry
 * is a function of the pieces it quotes.
 */
export const messages = {
  'empty-line': () => 'Type the figure as you were given it. Three lines to try:',
  'no-figure': () =>
    'I found no figure in this. Type how many out of how many, or a percentage, as you were given it.',
  'too-long': (most: string) =>
    `The line is longer than ${most} characters. Leave out what is not part of the figure.`,
  'too-many-groups': (most: string) =>
    `There are more than ${most} groups. Send them in two lines, each with the group to compare with.`,
  'total-missing': (count: string) => `${count} of what? I need a total after "of".`,
  'second-total-missing': (name: string) =>
    `${name} has a count but no total, and the other group has one. Out of how many?`,
  'group-missing': (word: string) => `${word} what? I need a second group after it.`,
  'joined-number': (joined: string) => `Is this one number, ${joined}? A space inside a number makes it two.`,
  'two-numbers': (count: string, total: string) =>
    `${count} and ${total}: a count and its total? Put "of" between them.`,
  'not-whole': (text: string) =>
    `${text} is not a whole number. A count of people or events has no decimals.`,
  'decimal-or-thousands': (text: string) =>
    `${text} can be read as a decimal or as thousands, and a count is due here.`,
  'too-large': (text: string) => `${text} is larger than anything I can count.`,
  negative: (text: string) => `${text} is negative. A count cannot be.`,
  'not-a-number': (text: string) => `I cannot read ${text} as a number. Write the digits in full.`,
  measurement: (text: string) =>
    `${text} is a measurement. I compare how often something happened: how many were over the line, out of how many?`,
  money: (text: string) =>
    `${text} is an amount of money. I compare how often something happened: how many, out of how many?`,
  'more-cases-than-people': (cases: string, total: string) =>
    `${cases} of ${total}: more cases than people. The other way round?`,
  'total-zero': (text: string) => `${text}: out of nobody. A total has to be at least 1.`,
  'share-above-one': (text: string) => `${text} is more than all of them. A share goes up to 100%.`,
  'coverage-at-end': (text: string) =>
    `Coverage of ${text} leaves nobody to compare with. It has to lie between 0% and 100%.`,
  'coverage-missing': (names: string) =>
    `These are cases by group. What share of everybody is ${names}? Add its coverage.`,
  'coverage-adds-up': (sum: string) =>
    `The coverages add up to ${sum}. Together the groups cannot be more than everybody.`,
  'shares-add-up': (sum: string) =>
    `The shares of the cases add up to ${sum}. They cannot be more than all cases.`,
  'coverage-unknown-group': (known: string, other: string) => `I know ${known}; whose coverage is ${other}?`,
  'coverage-of-several': () => 'There are more than two groups. Say the coverage of each, or of all but one.',
  'cases-by-group': () => 'I need the cases of at least two groups, or how many of all cases: "44 of 75".',
  'no-count-fits': (share: string, total: string) => `No count out of ${total} gives ${share}.`,
  'same-name-twice': (name: string) => `${name} stands twice. Give the two groups different names.`,
  'total-first': (total: string) => `The total, ${total}, stands first. Put the count before it.`,
  'one-share': (share: string) => `${share} of what, compared with what? I need a second group, or a count.`,
  'one-count': (count: string) => `${count} out of how many? Add the total, or a second group.`,
  'mixed-figures': () => 'Some groups have counts and others percentages. Write all of them the same way.',
  'per-in-the-middle': (text: string) => `"${text}" belongs at the end, after the last group.`,
  'level-out-of-range': (text: string) => `A level of ${text} is outside 50% to 99.99%.`,
  'clause-without-value': (word: string, example: string) =>
    `"${word}" needs something after it, as in "${example}".`,
  'design-effect-range': (text: string) =>
    `A design effect of ${text} cannot be: it is 1 where all come singly, and larger where they come together.`,
  'design-effect-too-large': (effect: string, total: string) =>
    `A design effect of ${effect} leaves less than one of a total of ${total}. Is it the right one?`,
  'exact-with-design-effect': () =>
    'Exact limits need whole counts, and a design effect divides them. Leave one of the two out.',
  'design-effect-and-form': () =>
    'I take a design effect into account where coverage is one number and every group is known. Leave one of the two out.',
  'clause-twice': (word: string) => `"${word}" stands twice. Once is enough.`,
  'reference-unknown': (name: string, known: string) => `There is no group ${name}. The groups are ${known}.`,
  'clauses-only': () => 'There is no figure here, only what goes with one. Put the figure first.',
  'date-in-figure': (text: string) =>
    `${text} looks like a date. A date belongs after "period"; two figures need "vs" between them.`,
  'population-too-small': (text: string) =>
    `In a population of ${text} a group would have more cases than people. Is it the right population?`,
  'mention-as-name': () => 'A person cannot be the name of a group here. Write the name out without the @.',
  'two-readings-shares': (one: string, ofOne: string, other: string, ofOther: string) =>
    `${one} is a share of ${ofOne}, ${other} a share of ${ofOther}. I can work out the ratio per person from the two, or compare them as two separate groups.`,
  'year-or-people': (text: string) => `${text}: a year, or that many people?`,
  'unread-name': (name: string) =>
    `I cannot read "${name}" as a name. Groups stand as "name: count of total".`,
  'clause-does-not-fit': (clause: string) =>
    `"${clause}" goes with shares of cases and their coverage, and this line has none. Leave it out, or add the coverage.`,
  'unread-part': (text: string) =>
    `I cannot place "${text}" here. Groups stand as "name: count of total", with "vs" between them.`,
  'change-of-two': () => 'A change has two figures, the earlier and the later. Send one change at a time.',
  'years-or-counts': (one: string, other: string) =>
    `${one.replace(',', '')} and ${other.replace(',', '')}: years, or counts? Years belong after "period"; counts of that size take a comma.`,
  'different-times': (one: string, other: string) =>
    `Watched for different times, ${one} and ${other}: shares cannot be compared then, but rates per person and time can.`,
  'layer-of-one': (name: string) =>
    `${name} has one group, other layers have more. Each layer needs the same groups.`,
  'layers-as-stated': () =>
    'A stated rate has no counts behind it, so layers cannot be put together. Give the counts and what they are over.',
  'layers-differ': (one: string, other: string) =>
    `One layer has ${one}, another ${other}. Each layer needs the same groups, in the same order and unit.`,
  'same-layer-twice': (name: string) => `The layer ${name} stands twice. Give each layer its own name.`,
  'too-many-layers': (most: string) => `There are more than ${most} layers. Put small ones together.`,
  'total-not-sum': (name: string, sums: string) =>
    `The row ${name} is not the sum of the others, which is ${sums}. Which of them is right?`,
  'second-column': (count: string, total: string) =>
    `${count} is more than ${total}. Is the second column the total, or those without? If those without, send this.`,
  'whole-not-exact': (name: string) =>
    `${name} contains the other groups, and what remains cannot be worked out from rounded or hidden counts.`,
  'whole-too-small': (whole: string, parts: string) =>
    `${whole}: the other groups, ${parts} together, are no part of that. Which of them is right?`,
  'units-differ': (one: string, other: string) =>
    `One is over ${one}, the other over ${other}. Give both in one unit.`,
  'exposure-zero': (text: string) => `${text}: over nothing. A time or distance has to be above 0.`,
  'coverage-no-share': () =>
    'Coverage is a share: a percentage, or how many of a sample, as in "310 of 500".',
  'coverage-upside-down': (low: string, high: string) =>
    `${low} to ${high}: the second end has to be the larger one. The other way round?`,
  'range-at-end': (end: string) =>
    `A range of coverage cannot reach ${end}: one of the groups could be nobody. Give a narrower one.`,
  'interval-without-value': (value: string, low: string, high: string) =>
    `${value} does not lie between ${low} and ${high}. An interval has to hold the figure that it belongs to.`,
  'growth-without-change': (from: string) => `From ${from} to ${from} is no change. Write ${from} alone.`,
  'growth-at-one-end': (from: string) =>
    `Coverage of ${from} all the time leaves nobody to compare with. One end may be 0% or 100%, not both.`,
  'coverage-two-forms': () =>
    'The two coverages do not complete each other. Give one; the other is what remains.',
  'coverage-form-of-several': () =>
    'With three or more groups I read each coverage as one number. Send two groups at a time.',
  'sample-as-count': (share: string, total: string) =>
    `Several counts out of ${total} are ${share}. Write the count of the sample itself.`,
  'sample-and-percentage': (sample: string, gives: string, stated: string) =>
    `${sample} is ${gives}, and the line has ${stated}. Leave one of them out.`,
  'population-and-form': (population: string) =>
    `With a population of ${population} every figure comes from counts, and those need one coverage and known groups.`,
  'exact-and-form': () =>
    'There are exact limits for one coverage and for a sample, not for coverage like this. Leave out "exact".',
  'periods-without-cases': (by: string) =>
    `Coverage by ${by} needs the cases by ${by} too: all of them, whatever their group.`,
  'periods-without-coverage': (by: string) =>
    `These are cases by ${by}. Add the coverage by ${by}, or leave them out.`,
  'periods-unread': (by: string) =>
    `I need one percentage for each ${by}, and one number of cases for each, in the same order.`,
  'periods-unequal': (by: string, coverages: string, cases: string) =>
    `Coverage by ${by} has ${coverages} figures, the cases have ${cases}. Each ${by} needs both, and two at least.`,
  'period-names': (cases: string, coverage: string) =>
    `The cases have ${cases} where the coverage has ${coverage}. The two lists have to go together.`,
  'periods-do-not-add-up': (periods: string, groups: string) =>
    `The cases by period add up to ${periods}, those of the groups to ${groups}. They have to be the same cases.`,
  'period-at-end': (coverage: string) =>
    `In a period with a coverage of ${coverage} there is nobody to compare with. Leave it out, with its cases.`,
  'periods-need-counts': () =>
    'Coverage by period needs each group as a whole number of cases, and all of them known.',
  'unknown-not-counted': () =>
    'Cases of unknown group are read as a count beside the counts of two groups: "no helmet 44, helmet 31, unknown 12".',
  'try-without-coverage': () => '"try" works the ratio out at several coverages, and this line has none.',
  'too-many-tried': (most: string) => `"try" takes up to ${most} coverages. Send the rest in a second line.`,
  'alarm-missing': (missing: string) =>
    `Missing: ${missing}. An alarm takes sensitivity, specificity and prevalence, or the four counts of alarms and silences.`,
  'alarm-accuracy': (text: string) =>
    `"${text}" can mean how many real cases are caught, or how many of all calls are right.`,
  'alarm-result': (word: string) =>
    `${word} is what I work out. It takes sensitivity, specificity and prevalence.`,
  'alarm-share-due': (text: string) =>
    `Is ${text} a percentage or a count? Put "%" behind it, or "of" and a total.`,
  'alarm-word-twice': (word: string) => `"${word}" stands twice, with two figures. Which one is it?`,
  'alarm-compared': () => 'I read one alarm at a time, without "vs" in it. Send each in a line of its own.',
  'alarm-no-case': (words: string) => `${words} are both 0: nothing follows from nobody.`,
  'alarm-clause': (word: string) => `"${word}" does not go with an alarm: there are no groups in it.`,
  'prevalence-at-end': (text: string) =>
    `With a prevalence of ${text} there is nothing to tell apart. It has to lie between 0% and 100%.`,
  'unread-alarm': (text: string) => `I cannot place "${text}" in this alarm. Which of its figures is it?`,
} satisfies Record<string, (...pieces: string[]) => string>;

export type MessageId = keyof typeof messages;

/** The words of a message. */
export function messageText(id: MessageId, ...pieces: readonly string[]): string {
  const words: (...given: string[]) => string = messages[id];
  return words(...pieces);
}

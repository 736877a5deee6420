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
  'unread-part': (text: string) =>
    `I cannot place "${text}" here. Groups stand as "name: count of total", with "vs" between them.`,
  'not-yet-rate': () =>
    'This is a rate over time or distance. I read counts of people or events so far: how many, out of how many?',
  'not-yet-change': () =>
    'This is a change over time. I read it so far as two groups: how many of how many before, and after.',
  'not-yet-coverage': () =>
    'I read coverage as one number so far, not as a range or as something that grew. Send the line once for each end.',
  'not-yet-clause': (word: string) =>
    `I do not read "${word}" yet. Leave it out and I answer the figure itself.`,
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
  'not-yet-whole': (name: string) =>
    `${name} contains the other group. I compare a group with the rest, without those counted in it.`,
  'not-yet-layers': () => 'I do not read groups within layers yet. Send one layer at a time.',
} satisfies Record<string, (...pieces: string[]) => string>;

export type MessageId = keyof typeof messages;

/** The words of a message. */
export function messageText(id: MessageId, ...pieces: readonly string[]): string {
  const words: (...given: string[]) => string = messages[id];
  return words(...pieces);
}

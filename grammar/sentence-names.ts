import type { Question } from './question.ts';

/** Names that nobody would give a group: they hold a sentence, or only the words of a question. */

const sentenceVerb =
  /^(?:is|are|was|were|had|has|have|wore|wear|wears|wearing|go|goes|went|involves?|involved|did|does|do|dont|doesnt|werent|wasnt|isnt|arent|didnt|(?:do|does|did|is|are|was|were|has|have|had|wo|ca|could|would)n['\u2019]t|said|says|say|take|takes|took|use|uses|used)$/i;
const askingWords =
  /^(?:can i say|can we say|is that|is it|does that|does it|so|that|to|from|of the|who|which|most|it|the)(?: |$)/i;
const onlyAsking =
  /^(?:and|but|while|though|although|yet|whereas|however|only|with|by|for|on|at|to|from|is that|is it|that|it|so|the|who|which|than|then)$/i;
const endsInside = /[a-z]{3,}[.?!] |[?!]$/i;
const startsWithWho = /^(?:we|they|i|you|he|she|there) /i;
const politeness = /(?:^| )(?:please|thanks|thank you|cheers|thx)(?:[!. ]|$)/i;
const startsInSign = /^(?:in|at|on|by|after|before|last|this) /i;
const endsInSign = / (?:from|of|in|to|per|than)$/i;
const holdsQuotation = /^'.+' /;
const sixWords = 6;

/** Whether a word is a verb that makes a sentence of a name. */
export const isOddNoun = (word: string) => sentenceVerb.test(word.replace(/[.,?!]+$/, ''));

/** Whether what is counted is called something that nobody counts: `in May`, `were late`. */
const isOddUnit = (unit: string) =>
  startsInSign.test(unit) || politeness.test(unit) || unit.split(' ').some(isOddNoun);

/** Whether a name of a group is a sentence, or what is left of one. */
function isOddName(name: string): boolean {
  const words = name.split(/\s+/);
  return (
    words.length > sixWords ||
    endsInside.test(name) ||
    onlyAsking.test(name) ||
    startsWithWho.test(name) ||
    endsInSign.test(name) ||
    politeness.test(name) ||
    holdsQuotation.test(name) ||
    (words.length > 2 && askingWords.test(name)) ||
    words.some(isOddNoun)
  );
}

/** A name so long, with a verb in it, that not even a colon makes it one. */
const isSentence = (name: string) => {
  const words = name.split(/\s+/);
  return words.length > sixWords && words.some(isOddNoun);
};

/** A name without the end of the sentence that clings to it: `day staff had an incident` is `day staff`. */
export function nameBeforeVerb(name: string): string {
  const words = name.split(' ');
  const verb = words.findIndex(isOddNoun);
  return verb < 1 ? name : words.slice(0, verb).join(' ');
}

/** Names that hold a sentence, in a line that does not set them off with a colon or quotation marks. */
export function hasOddNames(question: Question, line: string): boolean {
  const plain = () => line.toLowerCase().replace(/\s+/g, ' ');
  const inQuotes = (name: string) =>
    /["\u201c\u201e\u00ab]/.test(plain()[plain().indexOf(name.toLowerCase()) - 1] ?? '');
  const setOff = (name: string) => plain().includes(`${name.toLowerCase()}:`) || inQuotes(name);
  const names = namesIn(question);
  const { unit, caseNoun } = question;
  return (
    names.some((name) => isOddName(name) && (isSentence(name) ? !inQuotes(name) : !setOff(name))) ||
    [unit, caseNoun].some((noun) => noun !== null && isOddUnit(noun))
  );
}

/** The names of all groups, in every layer. */
function namesIn(question: Question): string[] {
  if (question.kind === 'alarm') return [];
  if (question.kind === 'strata') return question.layers.flatMap(({ question: layer }) => namesIn(layer));
  const labels: readonly (string | null)[] = question.groups.map(({ label }) => label);
  return labels.filter((label) => label !== null);
}

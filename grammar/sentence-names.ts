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
export const isOddUnit = (unit: string) =>
  startsInSign.test(unit) || politeness.test(unit) || unit.split(' ').some(isOddNoun);

/** Whether a name of a group is a sentence, or what is left of one. */
export function isOddName(name: string): boolean {
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
export const isSentence = (name: string) => {
  const words = name.split(/\s+/);
  return words.length > sixWords && words.some(isOddNoun);
};

/** A name without the end of the sentence that clings to it: `day staff had an incident` is `day staff`. */
export function nameBeforeVerb(name: string): string {
  const words = name.split(' ');
  const verb = words.findIndex(isOddNoun);
  return verb < 1 ? name : words.slice(0, verb).join(' ');
}

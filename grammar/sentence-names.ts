/** Names that nobody would give a group: they hold a sentence, or only the words of a question. */

const sentenceVerb =
  /^(?:is|are|was|were|had|has|have|wore|wear|wears|wearing|go|goes|went|involves?|involved|did|does|do|dont|doesnt|werent|wasnt|isnt|arent|didnt|(?:do|does|did|is|are|was|were|has|have|had|wo|ca|could|would)n['\u2019]t|said|says|say|take|takes|took|use|uses|used)$/i;
const askingWords =
  /^(?:can i say|can we say|is that|is it|does that|does it|so|that|to|from|of the|who|which|most|it|the)(?: |$)/i;
const onlyAsking = /^(?:to|from|is that|is it|that|it|so|the|who|which|than|then)$/i;
const endsInside = /[a-z]{3,}[.?!] |[?!]$/i;
const endsInSign = / (?:from|of|in|to|per|than)$/i;
const holdsQuotation = /^'.+' /;
const sixWords = 6;

/** Whether a word is a verb that makes a sentence of a name. */
export const isOddNoun = (word: string) => sentenceVerb.test(word.replace(/[.,?!]+$/, ''));

/** Whether a name of a group is a sentence, or what is left of one. */
export function isOddName(name: string): boolean {
  const words = name.split(/\s+/);
  return (
    words.length > sixWords ||
    endsInside.test(name) ||
    onlyAsking.test(name) ||
    endsInSign.test(name) ||
    holdsQuotation.test(name) ||
    (words.length > 2 && askingWords.test(name)) ||
    words.some(isOddNoun)
  );
}

/** A name without the end of the sentence that clings to it: `day staff had an incident` is `day staff`. */
export function nameBeforeVerb(name: string): string {
  const words = name.split(' ');
  const verb = words.findIndex(isOddNoun);
  return verb < 1 ? name : words.slice(0, verb).join(' ');
}

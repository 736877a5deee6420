/**
 * What a person typed, out of the text that Slack hands over: mentions and links as the words that were seen, then the three
 * entities, once. Positions in a diagnosis are positions in this text.
 */
export function typedText(text: string): string {
  return text
    .replace(
      /<([@#!])([^<>|\n]*)(?:\|([^<>\n]*))?>/g,
      (_, sign: string, id: string, words: string | undefined) => {
        const shown = words === undefined || words === '' ? id : words;
        return sign === '!' ? shown : `${sign}${shown}`;
      },
    )
    .replace(
      /<(https?:[^<>|\n]*|mailto:[^<>|\n]*)(?:\|([^<>\n]*))?>/g,
      (_, address: string, words: string | undefined) => words ?? address,
    )
    .replace(/&(amp|lt|gt);/g, (_, name: 'amp' | 'lt' | 'gt') => entities[name]);
}

const entities = { amp: '&', lt: '<', gt: '>' } as const;

/** A mention's text without the bot's own name in it. */
export const withoutMention = (text: string, botUserId: string): string =>
  text.replaceAll(new RegExp(`<@${botUserId}(?:\\|[^<>]*)?>`, 'g'), ' ').trim();

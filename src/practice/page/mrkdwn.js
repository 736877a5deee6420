// Slack's mrkdwn, as far as a message may use it: code, bold, italic, struck out, quotations, mentions, links, three entities.
import { linkTo, make } from './elements.js';

const inline = new RegExp(
  [
    '`(?<code>[^`\\n]+)`',
    '<(?<token>[^<>\\n]+)>',
    ...[
      ['bold', '\\*'],
      ['italic', '_'],
      ['struck', '~'],
    ].map(
      ([name, mark]) =>
        `(?<![\\p{L}\\p{N}])${mark}(?=\\S)(?<${name}>[^${mark}\\n]*[^${mark}\\n\\s])${mark}(?![\\p{L}\\p{N}])`,
    ),
  ].join('|'),
  'gu',
);
const tags = { bold: 'strong', italic: 'em', struck: 's' };

/** The three entities, once. */
export const decoded = (text) =>
  text.replace(/&(amp|lt|gt);/g, (_, name) => ({ amp: '&', lt: '<', gt: '>' })[name]);

/** What stands between `<` and `>`: a person, a channel, a word for many, or a link. */
function tokenNode(token, names) {
  const [address, words] = token.split('|');
  if (address.startsWith('@'))
    return document.createTextNode(`@${names[address.slice(1)] ?? words ?? address.slice(1)}`);
  if (address.startsWith('#')) return document.createTextNode(words || address);
  if (address.startsWith('!')) return document.createTextNode(words ?? `@${address.slice(1)}`);
  return linkTo(decoded(address), decoded(words ?? address));
}

function inlineNodes(text, names) {
  const out = document.createDocumentFragment();
  let at = 0;
  for (const match of text.matchAll(inline)) {
    out.append(decoded(text.slice(at, match.index)));
    at = match.index + match[0].length;
    const { code, token } = match.groups;
    if (code !== undefined) out.append(make('code', decoded(code)));
    else if (token !== undefined) out.append(tokenNode(token, names));
    else {
      const [name, inside] = Object.entries(match.groups).find(([, value]) => value !== undefined);
      const node = make(tags[name]);
      node.append(inlineNodes(inside, names));
      out.append(node);
    }
  }
  out.append(decoded(text.slice(at)));
  return out;
}

/** A text in mrkdwn as elements: boxes, quotations and paragraphs. */
export function mrkdwnNodes(text, names) {
  const out = document.createDocumentFragment();
  text.split(/```\n?([\s\S]*?)\n?```/).forEach((piece, index) => {
    if (index % 2 === 1) out.append(make('pre', decoded(piece)));
    // Lines of a quotation and other lines take turns.
    else
      for (const [run] of piece.matchAll(/(?:^(?:&gt;|>).*(?:\n|$))+|(?:^(?!&gt;|>).*(?:\n|$))+/gm)) {
        const quoted = /^(?:&gt;|>)/.test(run);
        const inside = quoted ? run.replaceAll(/^(?:&gt;|>) ?/gm, '') : run;
        if (inside.trim() === '') continue;
        const node = make(quoted ? 'blockquote' : 'p');
        node.append(inlineNodes(inside.trim(), names));
        out.append(node);
      }
  });
  return out;
}

/** A message's top-level text as a screen reader has it: entities, mentions and links as plain words. */
export const spokenText = (text, names) =>
  decoded(
    text.replace(/<([^<>\n]+)>/g, (_, token) => {
      const [address, words] = token.split('|');
      return address.startsWith('@')
        ? `@${names[address.slice(1)] ?? words ?? address.slice(1)}`
        : (words ?? address);
    }),
  );

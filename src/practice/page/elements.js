// Makes elements. Nothing typed ever becomes markup: words go in as text nodes only.

/** @param {string} tag @param {string} [text] @param {string} [name] the class */
export function make(tag, text, name) {
  const node = document.createElement(tag);
  if (text !== undefined) node.textContent = text;
  if (name !== undefined) node.className = name;
  return node;
}

/** A link where the address is one of the web, else its words alone. */
export function linkTo(address, words) {
  if (!/^https?:\/\//i.test(address)) return document.createTextNode(words);
  const link = make('a', words);
  link.href = address;
  link.target = '_blank';
  link.rel = 'noreferrer';
  return link;
}

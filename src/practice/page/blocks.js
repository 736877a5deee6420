// Turns Block Kit, as the bot posted it, into elements.
import { linkTo, make } from './elements.js';
import { mrkdwnNodes } from './mrkdwn.js';

/**
 * Renders a message's blocks.
 * @param {readonly object[]} blocks
 * @param {Record<string, string>} names people's names by their ids
 * @param {(action: string) => void} press called with a button's action id
 */
export function renderBlocks(blocks, names, press) {
  const out = document.createDocumentFragment();
  for (const block of blocks) out.append(blockNode(block, names, press));
  return out;
}

function blockNode(block, names, press) {
  switch (block.type) {
    case 'section': {
      const node = make('div', undefined, 'section');
      if (block.text) node.append(textNodes(block.text, names));
      if (block.fields) {
        const fields = make('div', undefined, 'fields');
        for (const field of block.fields) {
          const cell = make('div');
          cell.append(textNodes(field, names));
          fields.append(cell);
        }
        node.append(fields);
      }
      if (block.accessory) node.append(elementNode(block.accessory, names, press));
      return node;
    }
    case 'header':
      return make('h4', block.text.text);
    case 'context':
      return row(block.elements, 'small context', names, press);
    case 'actions':
      return row(block.elements, 'keys', names, press);
    case 'divider':
      return make('hr');
    case 'image':
      return pictureNode(block);
    case 'rich_text':
      return richText(block.elements, names);
    case 'table':
      return tableNode(block, names);
    default:
      return make('p', `(a block of the type ${block.type})`);
  }
}

function row(elements, name, names, press) {
  const node = make('div', undefined, name);
  for (const element of elements) node.append(elementNode(element, names, press));
  return node;
}

function elementNode(element, names, press) {
  switch (element.type) {
    case 'button': {
      const button = make('button', element.text.text);
      button.type = 'button';
      button.dataset.action = element.action_id;
      if (element.accessibility_label) button.setAttribute('aria-label', element.accessibility_label);
      button.addEventListener('click', () => press(element.action_id));
      return button;
    }
    case 'image':
      return pictureNode(element);
    case 'plain_text':
    case 'mrkdwn':
      return textNodes(element, names);
    default:
      return make('span', `(an element of the type ${element.type})`);
  }
}

const textNodes = (text, names) =>
  text.type === 'mrkdwn' ? mrkdwnNodes(text.text, names) : make('p', text.text);

/** No picture is loaded from anywhere: its words stand for it. */
const pictureNode = ({ alt_text: alt }) => make('p', `Picture: ${alt}`, 'picture');

function richText(elements, names) {
  const out = document.createDocumentFragment();
  for (const element of elements) out.append(richElement(element, names));
  return out;
}

function richElement(element, names) {
  switch (element.type) {
    case 'rich_text_quote':
      return withPieces(make('blockquote'), element.elements, names);
    case 'rich_text_preformatted':
      return withPieces(make('pre'), element.elements, names);
    case 'rich_text_list': {
      const list = make(element.style === 'ordered' ? 'ol' : 'ul');
      if (element.style === 'ordered' && element.offset) list.start = element.offset + 1;
      if (element.indent) list.classList.add(`indent-${Math.min(element.indent, 3)}`);
      for (const item of element.elements) list.append(withPieces(make('li'), item.elements, names));
      return list;
    }
    default:
      return withPieces(make('p'), element.elements, names);
  }
}

const styles = { bold: 'strong', italic: 'em', strike: 's', code: 'code' };

function withPieces(node, pieces, names) {
  for (const piece of pieces) {
    let inside = pieceNode(piece, names);
    for (const [style, tag] of Object.entries(styles)) {
      if (piece.style?.[style] !== true) continue;
      const around = make(tag);
      around.append(inside);
      inside = around;
    }
    node.append(inside);
  }
  return node;
}

function pieceNode(piece, names) {
  switch (piece.type) {
    case 'user':
      return document.createTextNode(names[piece.user_id] ?? piece.user_id);
    case 'link':
      return linkTo(piece.url, piece.text ?? piece.url);
    case 'emoji':
      return document.createTextNode(`:${piece.name}:`);
    default:
      return document.createTextNode(piece.text ?? '');
  }
}

function tableNode({ rows, column_settings: columns = [] }, names) {
  const frame = make('div', undefined, 'scroll');
  frame.tabIndex = 0;
  frame.setAttribute('role', 'group');
  frame.setAttribute('aria-label', 'Table');
  const table = make('table');
  rows.forEach((cells, index) => {
    const line = make('tr');
    cells.forEach((cell, column) => {
      const node = make(index === 0 ? 'th' : 'td');
      if (index === 0) node.scope = 'col';
      if (cell.type === 'rich_text') node.append(richText(cell.elements, names));
      else node.textContent = cell.text ?? String(cell.value ?? '');
      if (cell.type === 'raw_number' || columns[column]?.align === 'right') node.className = 'right';
      line.append(node);
    });
    table.append(line);
  });
  frame.append(table);
  return frame;
}

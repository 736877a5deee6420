// Turns Block Kit, as the bot posted it, into elements. Nothing typed ever becomes markup: only text nodes are made.

/** @param {string} tag @param {string} [text] @param {string} [name] */
export function make(tag, text, name) {
  const node = document.createElement(tag);
  if (text !== undefined) node.textContent = text;
  if (name !== undefined) node.className = name;
  return node;
}

/** Renders a message's blocks. `names` gives people's names, `press` is called with a button's action id. */
export function renderBlocks(blocks, names, press) {
  const out = document.createDocumentFragment();
  for (const block of blocks) {
    switch (block.type) {
      case 'rich_text':
        for (const element of block.elements) out.append(richElement(element, names));
        break;
      case 'actions': {
        const row = make('div', undefined, 'keys');
        for (const element of block.elements) {
          const button = make('button', element.text.text);
          button.type = 'button';
          button.dataset.action = element.action_id;
          if (element.accessibility_label) button.setAttribute('aria-label', element.accessibility_label);
          button.addEventListener('click', () => press(element.action_id));
          row.append(button);
        }
        out.append(row);
        break;
      }
      case 'table':
        out.append(tableOf(block.rows));
        break;
      case 'divider':
        out.append(make('hr'));
        break;
      case 'section':
      case 'header':
        out.append(make('p', block.text?.text ?? ''));
        break;
      default:
        out.append(make('p', `(a block of the type ${block.type})`));
    }
  }
  return out;
}

function richElement(element, names) {
  switch (element.type) {
    case 'rich_text_quote':
      return withPieces(make('blockquote'), element.elements, names);
    case 'rich_text_preformatted':
      return withPieces(make('pre'), element.elements, names);
    case 'rich_text_list': {
      const list = make('ul');
      for (const item of element.elements) list.append(withPieces(make('li'), item.elements, names));
      return list;
    }
    default:
      return withPieces(make('p'), element.elements, names);
  }
}

function withPieces(node, pieces, names) {
  for (const piece of pieces) {
    const text =
      piece.type === 'user' ? (names[piece.user_id] ?? piece.user_id) : (piece.text ?? piece.url ?? '');
    if (piece.style?.bold) node.append(make('strong', text));
    else if (piece.style?.italic) node.append(make('em', text));
    else if (piece.style?.code) node.append(make('code', text));
    else node.append(document.createTextNode(text));
  }
  return node;
}

function tableOf(rows) {
  const frame = make('div', undefined, 'scroll');
  frame.tabIndex = 0;
  frame.setAttribute('role', 'group');
  frame.setAttribute('aria-label', 'Table');
  const table = make('table');
  rows.forEach((cells, index) => {
    const row = make('tr');
    for (const cell of cells) {
      const node = make(index === 0 ? 'th' : 'td', cell.text ?? '');
      if (index === 0) node.scope = 'col';
      row.append(node);
    }
    table.append(row);
  });
  frame.append(table);
  return frame;
}

/** A message's top-level text with its three entities and its mentions, as plain words. */
export function spokenText(text, names) {
  return text
    .replace(/<@([^>|]+)(?:\|[^>]*)?>/g, (_, id) => names[id] ?? id)
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&amp;', '&');
}

// The sheet of answers: one entry a thread, the newest on top. What did not change stays the same element, so that nothing
// that a person has focused, opened or begun to write is lost when something else arrives.
import { renderBlocks } from './blocks.js';
import { make } from './elements.js';
import { mrkdwnNodes, spokenText } from './mrkdwn.js';

/**
 * @param {HTMLElement} place
 * @param {{ press(ts: string, action: string): void, write(threadTs: string, line: string): Promise<void> }} deeds
 */
export function createSheet(place, deeds) {
  /** Threads by the time stamp of their first message. */
  let threads = new Map();
  return {
    /** Forgets what is shown, as when somebody else looks. */
    clear() {
      threads = new Map();
      place.replaceChildren();
    },
    draw(messages, names) {
      const groups = new Map();
      for (const message of messages) {
        const ts = threadOf(message);
        groups.set(ts, [...(groups.get(ts) ?? []), message]);
      }
      const next = new Map();
      for (const [ts, said] of groups) {
        const thread = threads.get(ts) ?? createThread(ts, deeds);
        thread.draw(said, names);
        next.set(ts, thread);
      }
      threads = next;
      const entries = [...next.values()].map(({ node }) => node).reverse();
      arrange(place, entries.length > 0 ? entries : [emptyEntry(place)]);
    },
    /** The element of a message. */
    find: (ts) => place.querySelector(`[data-ts="${CSS.escape(ts)}"]`),
  };
}

const threadOf = ({ ts, threadTs }) => threadTs ?? ts;

/** Makes `nodes` the children of `parent`; those that are there already are not moved. */
function arrange(parent, nodes) {
  for (const child of [...parent.children]) if (!nodes.includes(child)) child.remove();
  nodes.forEach((node, index) => {
    if (parent.children[index] !== node) parent.insertBefore(node, parent.children[index] ?? null);
  });
}

function emptyEntry(place) {
  const old = place.querySelector('.empty');
  if (old !== null) return old;
  const entry = make('div', undefined, 'ruled empty');
  entry.append(
    make('div', undefined, 'margin'),
    make('p', 'Nothing yet. Take a line to try, or type your own.', 'text'),
  );
  return entry;
}

function createThread(ts, deeds) {
  const node = make('article', undefined, 'ruled entry');
  const margin = make('div', undefined, 'margin');
  const text = make('div', undefined, 'text');
  const first = make('div');
  const replies = make('div', undefined, 'replies');
  const foot = make('div', undefined, 'foot');
  text.append(first, replies, foot);
  node.append(margin, text);
  /** What is shown of each message: how it stood when it was drawn, and its element. */
  const shown = new Map();
  let heading = '';
  const element = (message, names) => {
    const key = JSON.stringify(message);
    const before = shown.get(message.ts);
    if (before?.key === key) return before.node;
    const made = messageNode(message, names, deeds, message.threadTs !== null);
    shown.set(message.ts, { key, node: made });
    return made;
  };
  return {
    node,
    draw(messages, names) {
      const [root, ...others] = messages[0].threadTs === null ? messages : [undefined, ...messages];
      arrange(first, root === undefined ? [] : [element(root, names)]);
      arrange(
        replies,
        others.map((message) => element(message, names)),
      );
      const said = root ?? others[0];
      const alone = root?.onlyFor ?? null;
      node.classList.toggle('alone', alone !== null);
      const label = `${names[said.user] ?? said.user} ${clockTime(said.ts)}`;
      if (label !== heading) {
        heading = label;
        const title = make('h3');
        title.append(make('span', names[said.user] ?? said.user, 'name'), ' ', timeNode(said.ts));
        title.id = `entry-${ts}`;
        margin.replaceChildren(title);
        node.setAttribute('aria-labelledby', title.id);
      }
      // Nobody can answer under what only one person sees.
      if (alone !== null) foot.replaceChildren();
      else if (foot.childElementCount === 0) foot.append(...writingNodes(ts, deeds));
    },
  };
}

/** The button "Write in this thread", and the form that it opens. */
function writingNodes(ts, deeds) {
  const open = make('button', 'Write in this thread', 'quiet');
  open.type = 'button';
  const form = make('form', undefined, 'writing');
  form.hidden = true;
  const label = make('label', 'A line for @Divisor in this thread');
  const line = make('textarea');
  line.rows = 1;
  line.id = `line-${ts}`;
  label.htmlFor = line.id;
  line.autocomplete = 'off';
  line.spellcheck = false;
  line.enterKeyHint = 'send';
  const send = make('button', 'Ask', 'main');
  const leave = make('button', 'Leave', 'quiet');
  leave.type = 'button';
  const keys = make('div', undefined, 'send');
  keys.append(send, leave);
  form.append(label, line, keys);
  const show = (writing) => {
    form.hidden = !writing;
    open.hidden = writing;
    (writing ? line : open).focus();
  };
  open.addEventListener('click', () => show(true));
  leave.addEventListener('click', () => show(false));
  sendOnEnter(line, form);
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    send.disabled = true;
    deeds
      .write(ts, line.value)
      .then((taken) => {
        if (taken) line.value = '';
      })
      .finally(() => {
        send.disabled = false;
        line.focus({ preventScroll: true });
      });
  });
  return [open, form];
}

/** Enter sends; with Shift, or while a word is still being composed, it does what it always does. */
export function sendOnEnter(line, form) {
  line.addEventListener('keydown', (event) => {
    if (event.key !== 'Enter' || event.shiftKey || event.isComposing) return;
    event.preventDefault();
    form.requestSubmit();
  });
}

function messageNode(message, names, deeds, named) {
  const node = make('div', undefined, message.onlyFor === null ? 'message' : 'message slip');
  node.dataset.ts = message.ts;
  if (message.onlyFor !== null) {
    node.setAttribute('role', 'note');
    node.append(make('p', `Only ${names[message.onlyFor] ?? message.onlyFor} sees this`, 'private'));
  }
  if (named) {
    const who = make('p', undefined, 'who');
    who.append(make('span', names[message.user] ?? message.user, 'name'), ' ', timeNode(message.ts));
    node.append(who);
  }
  if (message.blocks.length === 0) {
    node.append(mrkdwnNodes(message.text, names));
    return node;
  }
  node.append(renderBlocks(message.blocks, names, (action) => deeds.press(message.ts, action)));
  const aloud = make('details');
  aloud.append(make('summary', 'As read aloud'), make('p', spokenText(message.text, names), 'spoken'));
  node.append(aloud);
  return node;
}

const momentOf = (ts) => new Date(Number(ts) * 1000);
const clockTime = (ts) => momentOf(ts).toTimeString().slice(0, 5);

function timeNode(ts) {
  const node = make('time', clockTime(ts));
  node.dateTime = momentOf(ts).toISOString();
  return node;
}

import { make, renderBlocks, spokenText } from './blocks.js';

const $ = (id) => document.getElementById(id);
const [desk, line, send, leave, place, trouble, sheet] = [
  'desk',
  'line',
  'send',
  'leave',
  'place',
  'trouble',
  'sheet',
].map($);

let state = null;
let person = null;
let channel = null;
/** The thread that is written in, by the time stamp of its first message. */
let thread = null;
let shownBefore = new Map();

async function ask(path, body) {
  const answer = await fetch(path, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  if (!answer.ok) throw new Error((await answer.json()).error);
}

async function load() {
  const answer = await fetch('state');
  state = await answer.json();
  person ??= state.people[0].id;
  channel ??= state.channels[0].id;
  if ($('people').childElementCount === 0) furnish();
  draw();
}

function furnish() {
  choices(
    $('people'),
    'person',
    state.people,
    (each) => `${each.name}, ${each.work}`,
    (id) => {
      person = id;
      shownBefore = new Map();
      draw();
    },
  );
  choices(
    $('channels'),
    'channel',
    state.channels,
    (each) => each.name,
    (id) => {
      channel = id;
      thread = null;
      shownBefore = new Map();
      draw();
    },
  );
  for (const text of state.linesToTry) {
    const button = make('button', text);
    button.type = 'button';
    button.addEventListener('click', () => {
      line.value = text;
      line.focus();
    });
    $('tries').append(button);
  }
}

function choices(into, name, entries, words, chosen) {
  entries.forEach((entry, index) => {
    const label = make('label');
    const input = make('input');
    input.type = 'radio';
    input.name = name;
    input.value = entry.id;
    input.checked = index === 0;
    input.addEventListener('change', () => chosen(entry.id));
    label.append(input, ` ${words(entry)}`);
    into.append(label);
  });
}

function draw() {
  const names = Object.fromEntries([...state.people, state.bot].map(({ id, name }) => [id, name]));
  place.textContent = thread === null ? '' : 'You write in the thread: the line goes to @Divisor there.';
  leave.hidden = thread === null;
  const seen = state.messages.filter(
    (message) => message.channel === channel && (message.onlyFor === null || message.onlyFor === person),
  );
  const roots = seen.filter(
    (message) => message.threadTs === null || !seen.some(({ ts }) => ts === message.threadTs),
  );
  // Entries that did not change stay the same elements, so that a screen reader hears only what is new.
  const next = new Map();
  const entries = roots.map((root) => {
    const replies = seen.filter((message) => message.threadTs === root.ts);
    const key = JSON.stringify([root, replies]);
    const node = shownBefore.get(key) ?? entryOf(root, replies, names);
    next.set(key, node);
    return node;
  });
  shownBefore = next;
  if (entries.length === 0)
    entries.push(make('p', 'The sheet is empty. Pick a line above, or type your own.', 'empty'));
  sheet.replaceChildren(...entries);
}

function entryOf(message, replies, names) {
  const entry = make('article', undefined, message.onlyFor === null ? 'entry' : 'entry private');
  entry.dataset.ts = message.ts;
  const who =
    message.onlyFor === null
      ? (names[message.user] ?? message.user)
      : `Only ${names[message.onlyFor] ?? 'you'} sees this`;
  entry.append(make('div', who, 'who'));
  const body = make('div', undefined, 'body');
  const spoken = spokenText(message.text, names);
  if (message.blocks.length > 0) {
    body.append(renderBlocks(message.blocks, names, (action) => press(message.ts, action)));
    const aloud = make('details');
    aloud.append(make('summary', 'As read aloud'), make('pre', spoken));
    body.append(aloud);
  } else {
    body.append(make('p', spoken));
  }
  entry.append(body);
  if (message.threadTs === null && message.onlyFor === null) {
    const under = make('div', undefined, 'thread');
    for (const reply of replies) under.append(entryOf(reply, [], names));
    const write = make('button', 'Write in this thread');
    write.type = 'button';
    write.addEventListener('click', () => {
      thread = message.ts;
      draw();
      line.focus();
      window.scrollTo({ top: 0 });
    });
    under.append(write);
    entry.append(under);
  }
  return entry;
}

async function press(messageTs, action) {
  await tell(() => ask('press', { person, messageTs, action }));
}

async function tell(work) {
  trouble.textContent = '';
  try {
    await work();
  } catch (error) {
    trouble.textContent = error.message || 'The practice room does not answer. Is it still running?';
  }
}

desk.addEventListener('submit', (event) => {
  event.preventDefault();
  const typed = line.value;
  send.disabled = true;
  void tell(async () => {
    await ask('type', { person, channel, threadTs: thread, line: typed });
    line.value = '';
    await load();
    sheet.lastElementChild?.scrollIntoView({ block: 'nearest' });
  }).finally(() => {
    send.disabled = false;
    line.focus();
  });
});

line.addEventListener('keydown', (event) => {
  if (event.key !== 'Enter' || event.shiftKey || event.isComposing) return;
  event.preventDefault();
  desk.requestSubmit();
});

leave.addEventListener('click', () => {
  thread = null;
  draw();
  line.focus();
});

new EventSource('changes').addEventListener('message', () => void load());
await load();

// The page of the practice room: who types where, the lines to try, and what comes back.
import { make } from './elements.js';
import { spokenText } from './mrkdwn.js';
import { createSheet, sendOnEnter } from './sheet.js';

const $ = (id) => document.getElementById(id);
const [desk, line, send, trouble, announcement] = ['desk', 'line', 'send', 'trouble', 'announcement'].map($);

let person = null;
let channel = null;
/** Messages that were shown before; `null` where everything is new, as after a change of person. */
let seen = null;
/** The newest question to the server for what is to be shown. */
let newest = null;

const sheet = createSheet($('sheet'), {
  press: (messageTs, action) => void act('press', { person, messageTs, action }),
  write: async (threadTs, typed) => (await act('type', { person, channel, threadTs, line: typed })) !== null,
});

/** Fetches what this person sees here and draws it; the newest of several questions is the one that counts. */
function load() {
  const mine = (async () => {
    const query = person === null ? '' : `?${new URLSearchParams({ person, channel })}`;
    const state = await answerOf(await fetch(`state${query}`));
    if (mine !== newest) return newest;
    if (person === null) {
      ({ person, channel } = state);
      furnish(state);
    }
    draw(state);
  })();
  newest = mine;
  return mine;
}

function draw({ people, channels, bot, messages }) {
  const names = Object.fromEntries([...people, bot].map(({ id, name }) => [id, name]));
  const here = channels.find(({ id }) => id === channel)?.name ?? '';
  $('sheet-title').textContent = `The ${here}, as ${names[person]} sees it`;
  sheet.draw(messages, names);
  const fresh = seen === null ? [] : messages.filter(({ ts }) => !seen.has(ts));
  seen = new Set(messages.map(({ ts }) => ts));
  const heard = fresh
    .filter(({ user }) => user === bot.id)
    .map(({ text, onlyFor }) => {
      const [first] = spokenText(text, names).split('\n');
      return onlyFor === null ? `${bot.name}: ${first}` : `Only ${names[onlyFor]} sees this: ${first}`;
    });
  if (heard.length > 0) announcement.textContent = [...new Set(heard)].join(' ');
}

function furnish({ people, channels, linesToTry }) {
  const change = (set) => (id) => {
    set(id);
    seen = null;
    sheet.clear();
    void attempt(load);
  };
  choices(
    $('people'),
    'person',
    people,
    ({ name, work }) => `${name}, ${work}`,
    change((id) => (person = id)),
  );
  choices(
    $('channels'),
    'channel',
    channels,
    ({ name }) => `the ${name}`,
    change((id) => (channel = id)),
  );
  for (const text of linesToTry) {
    const button = make('button', text);
    button.type = 'button';
    button.addEventListener('click', () => {
      line.value = text;
      line.focus();
    });
    const item = make('li');
    item.append(button);
    $('tries').append(item);
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
    label.append(input, make('span', words(entry)));
    into.append(label);
  });
}

async function answerOf(response) {
  const body = await response.json();
  if (!response.ok) throw new Error(body.error);
  return body;
}

/** Types or presses, then shows what came of it. Comes back with what is new, or `null` where it was not taken. */
const act = (path, body) =>
  attempt(async () => {
    const before = seen ?? new Set();
    await answerOf(
      await fetch(path, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(body),
      }),
    );
    await load();
    const fresh = [...(seen ?? [])].filter((ts) => !before.has(ts));
    const [first] = fresh;
    if (first !== undefined) sheet.find(first)?.scrollIntoView({ block: 'nearest' });
    return fresh;
  });

async function attempt(work) {
  trouble.textContent = '';
  try {
    return await work();
  } catch (error) {
    trouble.textContent =
      error instanceof TypeError
        ? 'The practice room does not answer. Start it again with npm start; this page finds it by itself.'
        : error.message;
    return null;
  }
}

desk.addEventListener('submit', (event) => {
  event.preventDefault();
  const typed = line.value;
  send.disabled = true;
  void act('type', { person, channel, threadTs: null, line: typed })
    .then((fresh) => {
      const answered = fresh?.some((ts) => sheet.find(ts)?.classList.contains('slip') === false);
      // What was not understood stays, to be put right.
      if (answered && line.value === typed) line.value = '';
    })
    .finally(() => {
      send.disabled = false;
      line.focus({ preventScroll: true });
    });
});
sendOnEnter(line, desk);

const changes = new EventSource('changes');
changes.addEventListener('message', () => void attempt(load));
changes.addEventListener('error', () => {
  trouble.textContent =
    'The practice room does not answer. Start it again with npm start; this page finds it by itself.';
});

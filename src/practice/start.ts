import { readFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { HealthRoute } from '../slack/health.ts';
import { createRoom } from './room.ts';
import type { Room, RoomParts } from './room.ts';
import { botPerson, channels, linesToTry, people } from './workspace.ts';

export interface PracticeOptions extends RoomParts {
  readonly host: string;
  readonly port: number;
  readonly routes: (ready: () => boolean) => readonly HealthRoute[];
}

export interface PracticeRoom {
  readonly address: string;
  stop(): Promise<void>;
}

/** Longest body that is read: a line of 4,000 characters, each of them escaped, with room to spare. */
const longestBody = 64 * 1024;

const files: Readonly<Record<string, readonly [file: string, type: string]>> = {
  '/': ['index.html', 'text/html; charset=utf-8'],
  '/page.css': ['page.css', 'text/css; charset=utf-8'],
  '/page.js': ['page.js', 'text/javascript; charset=utf-8'],
  '/blocks.js': ['blocks.js', 'text/javascript; charset=utf-8'],
};

const safety = {
  'content-security-policy':
    "default-src 'none'; script-src 'self'; style-src 'self'; connect-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'",
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'cache-control': 'no-store',
};

/** Opens the practice room: a page on this machine in front of the same bot. */
export async function startPracticeRoom(options: PracticeOptions): Promise<PracticeRoom> {
  const room = await createRoom(options);
  await room.bot.start();
  const routes = options.routes(() => room.bot.ready());
  const listeners = new Set<ServerResponse>();
  room.store.onChange(() => {
    for (const listener of listeners) listener.write('data: changed\n\n');
  });
  const server = createServer((request, response) => {
    handle(request, response, { room, routes, listeners, host: options.host }).catch((error: unknown) => {
      options.log.write('error', 'practice-fault', {
        fault: error instanceof Error ? error.message : String(error),
      });
      if (!response.headersSent) say(response, 500, { error: 'Something went wrong here.' });
      else response.end();
    });
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port, options.host, resolve);
  });
  const { port } = server.address() as AddressInfo;
  return {
    address: `http://${options.host}:${port}`,
    async stop() {
      for (const listener of listeners) listener.end();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      await room.bot.stop();
    },
  };
}

interface Around {
  readonly room: Room;
  readonly routes: readonly HealthRoute[];
  readonly listeners: Set<ServerResponse>;
  readonly host: string;
}

async function handle(
  request: IncomingMessage,
  response: ServerResponse,
  { room, routes, listeners, host }: Around,
): Promise<void> {
  if (!isOurs(request, host))
    return say(response, 403, { error: 'This page answers only under its own address.' });
  const path = (request.url ?? '').split('?')[0] ?? '';
  const key = `${request.method ?? ''} ${path}`;
  const file = request.method === 'GET' ? files[path] : undefined;
  if (file !== undefined) {
    const [name, type] = file;
    response.writeHead(200, { ...safety, 'content-type': type });
    response.end(await readFile(new URL(`./page/${name}`, import.meta.url)));
    return;
  }
  const route = request.method === 'GET' ? routes.find((each) => each.path === path) : undefined;
  if (route !== undefined) return route.handler(request, response);
  switch (key) {
    case 'GET /state':
      return say(response, 200, {
        people,
        channels,
        bot: botPerson,
        linesToTry,
        messages: room.store.messages,
      });
    case 'GET /changes':
      response.writeHead(200, { ...safety, 'content-type': 'text/event-stream' });
      response.write('data: changed\n\n');
      listeners.add(response);
      request.on('close', () => listeners.delete(response));
      return;
    case 'POST /type': {
      const typed = await fields(request, response);
      if (typed === null) return;
      const { person, channel, threadTs, line } = typed;
      if (!isPerson(person) || !isChannel(channel) || typeof line !== 'string')
        return say(response, 400, { error: 'Who typed what, and where?' });
      await room.type({ person, channel, threadTs: typeof threadTs === 'string' ? threadTs : null, line });
      await room.bot.idle();
      return say(response, 200, { ok: true });
    }
    case 'POST /press': {
      const pressed = await fields(request, response);
      if (pressed === null) return;
      const { person, messageTs, action } = pressed;
      if (!isPerson(person) || typeof messageTs !== 'string' || typeof action !== 'string')
        return say(response, 400, { error: 'Who pressed what?' });
      const there = await room.press({ person, messageTs, action });
      if (!there) return say(response, 404, { error: 'There is no such button for this person.' });
      await room.bot.idle();
      return say(response, 200, { ok: true });
    }
    default:
      return say(response, 404, { error: 'Nothing here.' });
  }
}

const isPerson = (id: unknown): id is string => people.some((person) => person.id === id);
const isChannel = (id: unknown): id is string => channels.some((channel) => channel.id === id);

/** Only under its own name and only from its own page: no other site may type here. */
function isOurs(request: IncomingMessage, host: string): boolean {
  const port = request.socket.localPort;
  const names = [host, 'localhost', '127.0.0.1', '[::1]'].map((name) => `${name}:${port}`);
  const named = names.includes(request.headers.host ?? '');
  const { origin } = request.headers;
  return named && (origin === undefined || names.some((name) => origin === `http://${name}`));
}

function say(response: ServerResponse, status: number, body: object): void {
  response.writeHead(status, { ...safety, 'content-type': 'application/json; charset=utf-8' });
  response.end(JSON.stringify(body));
}

/** The JSON object in a request, or `null` after having said what is wrong with it. */
async function fields(
  request: IncomingMessage,
  response: ServerResponse,
): Promise<Readonly<Record<string, unknown>> | null> {
  const wrong = (status: number, error: string) => {
    say(response, status, { error });
    return null;
  };
  if (request.headers['content-type'] !== 'application/json') return wrong(415, 'Only JSON is read here.');
  const pieces: Buffer[] = [];
  let length = 0;
  for await (const piece of request) {
    length += (piece as Buffer).length;
    if (length > longestBody) return wrong(413, 'That is too long.');
    pieces.push(piece as Buffer);
  }
  try {
    const body: unknown = JSON.parse(Buffer.concat(pieces).toString('utf8'));
    if (typeof body === 'object' && body !== null && !Array.isArray(body))
      return body as Readonly<Record<string, unknown>>;
  } catch {
    // Said below.
  }
  return wrong(400, 'That is no JSON object.');
}

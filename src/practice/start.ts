import { createServer } from 'node:http';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { HealthRoute } from '../slack/health.ts';
import { faultOf } from '../slack/log.ts';
import { safety, servePageFile } from './page-files.ts';
import { isOurs, readFields } from './requests.ts';
import { createRoom } from './room.ts';
import type { Room, RoomParts, Taken } from './room.ts';
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

/** Opens the practice room: a page on this machine in front of the same bot. Throws where the port is taken. */
export async function startPracticeRoom(options: PracticeOptions): Promise<PracticeRoom> {
  const { host, log } = options;
  const room = await createRoom(options);
  const routes = options.routes(() => room.bot.ready());
  const listeners = new Set<ServerResponse>();
  room.store.onChange(() => {
    for (const listener of listeners) listener.write('data: changed\n\n');
  });
  const server = createServer((request, response) => {
    handle(request, response, { room, routes, listeners, host }).catch((error: unknown) => {
      log.write('error', 'practice-fault', faultOf(error));
      if (response.headersSent) response.end();
      else say(response, 500, { error: 'Something went wrong here. The log says what.' });
    });
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port, host, resolve);
  });
  await room.bot.start();
  const { port } = server.address() as AddressInfo;
  return {
    address: `http://${host.includes(':') ? `[${host}]` : host}:${port}`,
    async stop() {
      const closed = new Promise((resolve) => server.close(resolve));
      for (const listener of listeners) listener.end();
      server.closeAllConnections();
      await closed;
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

async function handle(request: IncomingMessage, response: ServerResponse, around: Around): Promise<void> {
  const { room, routes, listeners, host } = around;
  if (!isOurs(request, host))
    return say(response, 403, { error: 'This page answers only under its own address.' });
  const [path = '', query = ''] = (request.url ?? '').split('?');
  if (request.method === 'GET') {
    if (await servePageFile(path, response)) return;
    const route = routes.find((each) => each.path === path);
    if (route !== undefined) return route.handler(request, response);
  }
  switch (`${request.method ?? ''} ${path}`) {
    case 'GET /state': {
      const asked = new URLSearchParams(query);
      const [person, channel] = [
        asked.get('person') ?? people[0]?.id,
        asked.get('channel') ?? channels[0]?.id,
      ];
      if (!isPerson(person) || !isChannel(channel))
        return say(response, 400, { error: 'Who looks, and where?' });
      const messages = room.seenBy(person, channel);
      return say(response, 200, { people, channels, bot: botPerson, linesToTry, person, channel, messages });
    }
    case 'GET /changes':
      response.writeHead(200, { ...safety, 'content-type': 'text/event-stream' });
      response.write('data: changed\n\n');
      listeners.add(response);
      response.on('close', () => listeners.delete(response));
      return;
    case 'POST /type':
    case 'POST /press': {
      const body = await readFields(request);
      if (body.kind === 'wrong') return say(response, body.status, { error: body.error });
      const taken = await (path === '/type' ? typed : pressed)(body.fields, room);
      if (taken === null) return say(response, 400, { error: 'Who does what, and where?' });
      await room.bot.idle();
      const [status, said] = answers[taken];
      return say(response, status, said);
    }
    default:
      return say(response, 404, { error: 'Nothing here.' });
  }
}

const answers = {
  taken: [200, { ok: true }],
  'not-there': [404, { error: 'This is no longer on the sheet.' }],
  'not-acknowledged': [502, { error: 'The bot did not answer that it got this.' }],
} as const satisfies Record<Taken, readonly [number, object]>;

type Fields = Readonly<Record<string, unknown>>;

async function typed({ person, channel, threadTs, line }: Fields, room: Room): Promise<Taken | null> {
  if (!isPerson(person) || !isChannel(channel) || typeof line !== 'string') return null;
  if (threadTs !== null && typeof threadTs !== 'string') return null;
  return room.type({ person, channel, threadTs, line });
}

async function pressed({ person, messageTs, action }: Fields, room: Room): Promise<Taken | null> {
  if (!isPerson(person) || typeof messageTs !== 'string' || typeof action !== 'string') return null;
  return room.press({ person, messageTs, action });
}

const isPerson = (id: unknown): id is string => people.some((person) => person.id === id);
const isChannel = (id: unknown): id is string => channels.some((channel) => channel.id === id);

function say(response: ServerResponse, status: number, body: object): void {
  response.writeHead(status, { ...safety, 'content-type': 'application/json; charset=utf-8' });
  response.end(JSON.stringify(body));
}

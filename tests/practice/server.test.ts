import { readFile, readdir } from 'node:fs/promises';
import { request } from 'node:http';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openRoom } from './open-room.ts';
import type { OpenRoom } from './open-room.ts';

const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';

let room: OpenRoom;
beforeEach(async () => {
  room = await openRoom();
});
afterEach(() => room.close());

interface Answer {
  readonly status: number;
  readonly headers: Readonly<Record<string, unknown>>;
  readonly body: string;
}

/** A request with exactly these headers, `Host` included, which the built-in fetch does not let anybody choose. */
function call(
  method: string,
  path: string,
  headers: Readonly<Record<string, string>> = {},
  body = '',
): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const asked = request(new URL(path, room.address), { method, headers }, (answer) => {
      const pieces: Buffer[] = [];
      answer.on('data', (piece: Buffer) => pieces.push(piece));
      answer.on('end', () =>
        resolve({
          status: answer.statusCode ?? 0,
          headers: answer.headers,
          body: Buffer.concat(pieces).toString('utf8'),
        }),
      );
    });
    asked.on('error', reject);
    asked.end(body);
  });
}

const json = { 'content-type': 'application/json' };
const type = (fields: object, headers: Readonly<Record<string, string>> = json) =>
  call(
    'POST',
    '/type',
    headers,
    JSON.stringify({ person: 'UADA', channel: 'CFERRY', threadTs: null, ...fields }),
  );

interface State {
  readonly messages: readonly {
    readonly ts: string;
    readonly text: string;
    readonly onlyFor: string | null;
  }[];
}
async function state(query = ''): Promise<State> {
  return JSON.parse((await call('GET', `/state${query}`)).body) as State;
}

describe('who may come in', () => {
  it.each([
    ['another name that leads to this machine', { host: 'figures.harrowmere.example' }],
    ['another port', { host: '127.0.0.1:1' }],
  ])('nobody under %s', async (_, headers) => {
    for (const path of ['/', '/state', '/changes', '/healthz', '/page.js']) {
      const { status, body } = await call('GET', path, headers);
      expect(status).toBe(403);
      expect(body).not.toContain('Ada');
    }
  });

  it.each([
    ['another site', { origin: 'https://harrowmere.example' }],
    ['a page without a site', { origin: 'null' }],
    ['another port of this machine', { origin: 'http://127.0.0.1:1' }],
    ['a site that a browser calls another one', { 'sec-fetch-site': 'cross-site' }],
  ])('nothing typed from %s', async (_, headers) => {
    expect((await type({ line: shifts }, { ...json, ...headers })).status).toBe(403);
    expect((await state()).messages).toEqual([]);
  });

  it('its own page, under either name of this machine', async () => {
    const { port } = new URL(room.address);
    for (const host of [`127.0.0.1:${port}`, `localhost:${port}`]) {
      expect((await type({ line: shifts }, { ...json, host, origin: `http://${host}` })).status).toBe(200);
    }
    expect((await state()).messages).toHaveLength(4);
  });
});

describe('what is wrong with a request is said, and nothing comes of it', () => {
  afterEach(async () => {
    expect((await state()).messages).toEqual([]);
    expect(room.faults).toEqual([]);
  });

  it.each(['', '{', '[]', '"x"', 'null', '{"person":"UADA"'])('%j is no JSON object', async (body) => {
    const answer = await call('POST', '/type', json, body);
    expect(answer.status).toBe(400);
    expect(answer.body).toContain('no JSON object');
  });

  it.each([
    { person: 'UDORA' },
    { person: undefined },
    { person: 1 },
    { person: 'UDIVISOR' },
    { channel: 'CMARKET' },
    { channel: null },
    { line: 18 },
    { line: undefined },
    { threadTs: 5 },
    { threadTs: undefined },
    { person: '__proto__' },
  ])('%j is nobody and nothing', async (fields) => {
    expect((await type({ line: shifts, ...fields })).status).toBe(400);
  });

  it.each([
    [{ person: 'UDORA', messageTs: '1.0', action: 'show_working' }, 400],
    [{ person: 'UADA', messageTs: 1, action: 'show_working' }, 400],
    [{ person: 'UADA', messageTs: '1.0' }, 400],
    [{ person: 'UADA', messageTs: '1.0', action: 'show_working' }, 404],
  ])('a press %j', async (fields, status) => {
    expect((await call('POST', '/press', json, JSON.stringify(fields))).status).toBe(status);
  });

  it('a thread that there is not', async () => {
    const { status, body } = await type({ line: shifts, threadTs: '1.000000' });
    expect(status).toBe(404);
    expect(JSON.parse(body)).toEqual({ error: 'This is no longer on the sheet.' });
  });

  it('a form instead of JSON', async () => {
    const form = { 'content-type': 'application/x-www-form-urlencoded' };
    expect((await call('POST', '/type', form, 'person=UADA&line=x')).status).toBe(415);
  });

  it('a body of 65,537 bytes, and one of a megabyte, with an answer that arrives', async () => {
    const empty = JSON.stringify({ line: '' }).length;
    expect(
      (await call('POST', '/type', json, JSON.stringify({ line: 'x'.repeat(65_537 - empty) }))).status,
    ).toBe(413);
    expect((await call('POST', '/type', json, 'x'.repeat(1_000_000))).status).toBe(413);
  });

  it.each(['/nothing', '/../package.json', '/..%2f..%2fpackage.json', '//', '/page/page.js', '/constructor'])(
    'the path %s leads nowhere',
    async (path) => {
      const { hostname, port } = new URL(room.address);
      const status = await new Promise((resolve, reject) => {
        request({ hostname, port, path }, (answer) => resolve(answer.resume().statusCode))
          .on('error', reject)
          .end();
      });
      expect(status).toBe(404);
    },
  );

  it('somebody unknown who wants to look on', async () => {
    expect((await call('GET', '/state?person=UDORA&channel=CFERRY')).status).toBe(400);
    expect((await call('GET', '/state?person=UADA&channel=CMARKET')).status).toBe(400);
  });
});

describe('what is typed and pressed', () => {
  it('is answered by the time that the request is, even where the bot takes its time', async () => {
    await room.close();
    room = await openRoom(0, 100);
    expect((await type({ line: shifts })).status).toBe(200);
    const { messages } = await state();
    expect(messages).toHaveLength(2);
    expect(messages[0]?.text).toContain(shifts);
  });

  it('in private goes to the one person alone', async () => {
    await type({ line: '18 of 12' });
    expect((await state('?person=UADA&channel=CFERRY')).messages.map(({ onlyFor }) => onlyFor)).toEqual([
      'UADA',
    ]);
    expect((await state('?person=UBEN&channel=CFERRY')).messages).toEqual([]);
    const pressed = { person: 'UBEN', messageTs: (await state()).messages[0]?.ts, action: 'ask_0' };
    expect((await call('POST', '/press', json, JSON.stringify(pressed))).status).toBe(404);
  });

  it('is told to whoever looks on, at once', async () => {
    const leave = new AbortController();
    const changes = await fetch(new URL('/changes', room.address), { signal: leave.signal });
    const reader = (changes.body as ReadableStream<Uint8Array> | null)?.getReader();
    const heard = async () => new TextDecoder().decode((await reader?.read())?.value);
    expect(changes.headers.get('content-type')).toBe('text/event-stream');
    expect(await heard()).toBe('data: changed\n\n');
    const next = heard();
    await type({ line: shifts });
    expect(await next).toContain('data: changed\n\n');
    leave.abort();
  });

  it('may be 4,000 characters that are each escaped, and is refused in private', async () => {
    expect((await type({ line: '&'.repeat(4_000) })).status).toBe(200);
    expect((await state()).messages.map(({ onlyFor }) => onlyFor)).toEqual(['UADA']);
  });
});

describe('the page', () => {
  it('and every file that it asks for is served with its type, under a policy without inline scripts and other hosts', async () => {
    const folder = new URL('../../src/practice/page/', import.meta.url);
    const names = await readdir(folder);
    for (const name of names) {
      const { status, headers, body } = await call('GET', name === 'index.html' ? '/' : `/${name}`);
      expect([name, status]).toEqual([name, 200]);
      expect(body).toBe(await readFile(new URL(name, folder), 'utf8'));
      const policy = String(headers['content-security-policy']);
      expect(policy).toMatch(/^default-src 'none'; script-src 'self'; /);
      expect(policy).not.toContain('unsafe');
      expect(headers['x-content-type-options']).toBe('nosniff');
    }
    expect(names.length).toBeGreaterThan(5);
  });

  it('names no other host', async () => {
    const folder = new URL('../../src/practice/page/', import.meta.url);
    for (const name of await readdir(folder)) {
      const text = await readFile(new URL(name, folder), 'utf8');
      // The name of the drawing language is no address that anything is fetched from.
      expect([name, text.replace('http://www.w3.org/2000/svg', '').match(/https?:\/\/[a-z0-9]/i)]).toEqual([
        name,
        null,
      ]);
    }
  });

  it('stands beside the health routes', async () => {
    expect((await call('GET', '/healthz')).body).toBe('alive\n');
    expect((await call('GET', '/readyz')).body).toBe('ready\n');
  });
});

describe('opening and closing', () => {
  it('fails where the port is taken, and says so', async () => {
    await expect(openRoom(Number(new URL(room.address).port))).rejects.toMatchObject({ code: 'EADDRINUSE' });
  });

  it('ends what is still open, and leaves nothing listening', async () => {
    const other = await openRoom();
    const changes = await fetch(new URL('/changes', other.address));
    await other.close();
    expect(await changes.text()).toBe('data: changed\n\n');
    await expect(fetch(other.address)).rejects.toMatchObject({ cause: { code: 'ECONNREFUSED' } });
  });
});

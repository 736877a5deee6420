import { createHmac, randomUUID } from 'node:crypto';
import { createServer } from 'node:http';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { WebSocketServer } from 'ws';
import type { WebSocket } from 'ws';
import { MessageStore } from '../../src/practice/message-store.ts';
import { createStandIn } from '../../src/practice/stand-in.ts';

/** A call that the bot made, as it stood on the wire. */
export interface Call {
  readonly method: string;
  readonly fields: Readonly<Record<string, string>>;
}

/** What happens to the next call of a method instead of the usual answer. */
export type Fault =
  | { readonly kind: 'rate-limit'; readonly seconds: number }
  | { readonly kind: 'status'; readonly status: number }
  | { readonly kind: 'refuse'; readonly code: string }
  /** The message is accepted, and the answer is lost. */
  | { readonly kind: 'lose-answer' }
  /** The call is taken and nothing happens until the server is closed. */
  | { readonly kind: 'hold' }
  /** The message is accepted, and no answer comes until the server is closed. */
  | { readonly kind: 'take-and-hold' };

/**
 * The practice room's stand-in for Slack behind a real HTTP and WebSocket server on loopback, with faults to order. It keeps to
 * what the bot's client needs of Slack: Web API, Socket Mode links, response addresses.
 */
export class StandInServer {
  readonly store = new MessageStore(() => Date.now());
  readonly calls: Call[] = [];
  readonly members = new Set(['C1', 'C2']);
  readonly links: WebSocket[] = [];
  readonly #faults: { method: string; fault: Fault }[] = [];
  readonly #acks = new Map<string, (ack: unknown) => void>();
  readonly #server = createServer((request, response) => void this.#answer(request, response));
  readonly #sockets = new WebSocketServer({ noServer: true });
  #standIn: ReturnType<typeof createStandIn> | null = null;
  #origin = '';

  static async start(): Promise<StandInServer> {
    const server = new StandInServer();
    await server.#listen();
    return server;
  }

  get apiUrl(): string {
    return `${this.#origin}/api/`;
  }

  fault(method: string, ...faults: readonly Fault[]): void {
    this.#faults.push(...faults.map((fault) => ({ method, fault })));
  }

  callsOf(method: string): readonly Call[] {
    return this.calls.filter((call) => call.method === method);
  }

  responseUrl(channel: string, user: string, messageTs: string | null = null): string {
    if (this.#standIn === null) throw new Error('the server has not started');
    return this.#standIn.responseUrl({ channel, user, messageTs });
  }

  /** The fields of a slash command as Slack sends them. */
  commandFields(text: string, more: Readonly<Record<string, string>> = {}): Record<string, string> {
    const [channel_id, user_id] = [more['channel_id'] ?? 'C1', more['user_id'] ?? 'U1'];
    return {
      token: 'legacy-token',
      command: '/divisor',
      text,
      team_id: 'THARROWMERE',
      channel_id,
      user_id,
      trigger_id: randomUUID(),
      response_url: this.responseUrl(channel_id, user_id),
      api_app_id: 'A1',
      is_enterprise_install: 'false',
      ...more,
    };
  }

  /** Delivers over the newest link and resolves with the acknowledgement. */
  deliver(
    type: 'slash_commands' | 'events_api' | 'interactive',
    payload: object,
    envelopeId: string = randomUUID(),
  ): Promise<unknown> {
    const link = this.links.at(-1);
    if (link === undefined) throw new Error('no link is open');
    return new Promise((resolve) => {
      this.#acks.set(envelopeId, resolve);
      link.send(
        JSON.stringify({
          envelope_id: envelopeId,
          type,
          payload,
          accepts_response_payload: type !== 'events_api',
        }),
      );
    });
  }

  async close(): Promise<void> {
    for (const link of this.links) link.terminate();
    this.#server.closeAllConnections();
    await new Promise((resolve) => this.#server.close(resolve));
  }

  async #listen(): Promise<void> {
    this.#server.on('upgrade', (request, socket, head) => {
      this.#sockets.handleUpgrade(request, socket, head, (link) => {
        this.links.push(link);
        link.on('message', (data: Buffer) => {
          const ack = JSON.parse(data.toString('utf8')) as { envelope_id?: string };
          this.#acks.get(ack.envelope_id ?? '')?.(ack);
        });
        link.on('close', () => this.links.splice(this.links.indexOf(link), 1));
        link.send(
          JSON.stringify({
            type: 'hello',
            num_connections: this.links.length,
            connection_info: { app_id: 'A1' },
          }),
        );
      });
    });
    await new Promise<void>((resolve) => this.#server.listen(0, '127.0.0.1', resolve));
    this.#origin = `http://127.0.0.1:${(this.#server.address() as AddressInfo).port}`;
    this.#standIn = createStandIn({
      store: this.store,
      isMember: (channel) => this.members.has(channel),
      origin: this.#origin,
    });
  }

  async #answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const pieces: Buffer[] = [];
    for await (const piece of request) pieces.push(piece as Buffer);
    const body = Buffer.concat(pieces).toString('utf8');
    const path = (request.url ?? '').split('?')[0] ?? '';
    const method = path.startsWith('/api/') ? path.slice('/api/'.length) : 'response_url';
    const json = request.headers['content-type']?.includes('json') === true;
    this.calls.push({ method, fields: json ? { body } : Object.fromEntries(new URLSearchParams(body)) });
    if (method === 'apps.connections.open') {
      return json200(response, { ok: true, url: `${this.#origin.replace('http', 'ws')}/link/?ticket=1` });
    }
    const at = this.#faults.findIndex((each) => each.method === method);
    const fault = at === -1 ? undefined : this.#faults.splice(at, 1)[0]?.fault;
    switch (fault?.kind) {
      case 'rate-limit':
        response.writeHead(429, { 'retry-after': String(fault.seconds) });
        response.end();
        return;
      case 'status':
        response.writeHead(fault.status);
        response.end();
        return;
      case 'refuse':
        return json200(response, { ok: false, error: fault.code });
      case 'hold':
        return;
      case 'take-and-hold':
        await this.#usual(request, body);
        return;
      case 'lose-answer':
        await this.#usual(request, body);
        request.socket.destroy();
        return;
      case undefined: {
        const usual = await this.#usual(request, body);
        response.writeHead(usual.status, {
          'content-type': usual.headers.get('content-type') ?? 'text/plain',
        });
        response.end(await usual.text());
      }
    }
  }

  #usual(request: IncomingMessage, body: string): Promise<Response> {
    if (this.#standIn === null) throw new Error('the server has not started');
    return this.#standIn.fetch(`${this.#origin}${request.url ?? ''}`, {
      method: 'POST',
      headers: { 'content-type': request.headers['content-type'] ?? 'application/x-www-form-urlencoded' },
      body,
    });
  }
}

function json200(response: ServerResponse, body: object): void {
  response.writeHead(200, { 'content-type': 'application/json' });
  response.end(JSON.stringify(body));
}

/** Posts a signed form as Slack does; resolves with the status. */
export const postSigned = (
  url: string,
  fields: Readonly<Record<string, string>>,
  secret: string,
  at?: number,
): Promise<number> =>
  post(url, new URLSearchParams(fields).toString(), 'application/x-www-form-urlencoded', secret, at);

/** Posts a signed JSON body (an event). */
export const postSignedJson = (url: string, payload: object, secret: string): Promise<number> =>
  post(url, JSON.stringify(payload), 'application/json', secret);

async function post(
  url: string,
  body: string,
  type: string,
  secret: string,
  at = Math.floor(Date.now() / 1000),
): Promise<number> {
  const signature = `v0=${createHmac('sha256', secret).update(`v0:${at}:${body}`).digest('hex')}`;
  const answer = await fetch(url, {
    method: 'POST',
    headers: {
      'content-type': type,
      'x-slack-request-timestamp': String(at),
      'x-slack-signature': signature,
    },
    body,
  });
  await answer.arrayBuffer();
  return answer.status;
}

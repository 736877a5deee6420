import { createServer } from 'node:http';
import type { IncomingMessage, Server, ServerResponse } from 'node:http';
import type { Ledger } from '../answer/ports.ts';

export interface HealthRoute {
  readonly path: string;
  readonly handler: (request: IncomingMessage, response: ServerResponse) => void;
}

/** What the health routes look at. */
export interface Watched {
  readonly ledger: Ledger;
  readonly ready: () => boolean;
}

/** /healthz: the process answers. /readyz: the database and the link to Slack do too. /metrics: counts, as Prometheus text. */
export function healthRoutes({ ledger, ready }: Watched): readonly HealthRoute[] {
  const say = (response: ServerResponse, status: number, text: string) => {
    response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'no-store' });
    response.end(text);
  };
  return [
    { path: '/healthz', handler: (_, response) => say(response, 200, 'alive\n') },
    {
      path: '/readyz',
      handler: (_, response) => {
        ledger.counts().then(
          () => (ready() ? say(response, 200, 'ready\n') : say(response, 503, 'no link to Slack\n')),
          () => say(response, 503, 'no database\n'),
        );
      },
    },
    {
      path: '/metrics',
      handler: (_, response) => {
        ledger.counts().then(
          (counts) => say(response, 200, metricsText({ ...counts, ready: ready() ? 1 : 0 })),
          () => say(response, 503, 'no database\n'),
        );
      },
    },
  ];
}

function metricsText(counts: Readonly<Record<string, number>>): string {
  return Object.entries(counts)
    .map(([name, value]) => `# TYPE divisor_${name} gauge\ndivisor_${name} ${value}\n`)
    .join('');
}

/** A server for the health routes alone, for Socket Mode, where nothing else listens. */
export function startHealthServer(
  routes: readonly HealthRoute[],
  host: string,
  port: number,
): Promise<Server> {
  const server = createServer((request, response) => {
    const path = (request.url ?? '').split('?')[0];
    const route = request.method === 'GET' ? routes.find((each) => each.path === path) : undefined;
    if (route !== undefined) return route.handler(request, response);
    response.writeHead(404);
    response.end();
  });
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => resolve(server));
  });
}

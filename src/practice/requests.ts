import type { IncomingMessage } from 'node:http';

/** Longest body that is read, in bytes: a line of 4,000 characters, each of them escaped, with room to spare. */
const longestBody = 64 * 1024;

/**
 * Whether a request comes to this page under its own name and, if it comes from a page at all, from this one. Another site
 * that a person has open can neither type here nor, under a name of its own that leads to this machine, read here.
 */
export function isOurs(request: IncomingMessage, host: string): boolean {
  const port = request.socket.localPort;
  const own = host.includes(':') ? `[${host}]` : host;
  const names = [own, 'localhost', '127.0.0.1', '[::1]'].map((name) => `${name}:${port}`);
  const { host: named, origin } = request.headers;
  return (
    names.includes(named ?? '') &&
    (origin === undefined || names.some((name) => origin === `http://${name}`)) &&
    request.headers['sec-fetch-site'] !== 'cross-site'
  );
}

/** A body that was read, or what is wrong with it. */
export type ReadBody =
  | { readonly kind: 'fields'; readonly fields: Readonly<Record<string, unknown>> }
  | { readonly kind: 'wrong'; readonly status: 400 | 413 | 415; readonly error: string };

/** Reads the JSON object in a request. What is too long is read to its end all the same, so that the answer arrives, and not kept. */
export async function readFields(request: IncomingMessage): Promise<ReadBody> {
  const pieces: Buffer[] = [];
  let length = 0;
  for await (const piece of request as AsyncIterable<Buffer>) {
    length += piece.length;
    if (length <= longestBody) pieces.push(piece);
    if (length > 100 * longestBody) break;
  }
  if (!/^application\/json(?:;|$)/i.test(request.headers['content-type'] ?? ''))
    return { kind: 'wrong', status: 415, error: 'Only JSON is read here.' };
  if (length > longestBody) return { kind: 'wrong', status: 413, error: 'That is too long.' };
  try {
    const body: unknown = JSON.parse(Buffer.concat(pieces).toString('utf8'));
    if (typeof body === 'object' && body !== null && !Array.isArray(body))
      return { kind: 'fields', fields: body as Readonly<Record<string, unknown>> };
  } catch {
    // Said below.
  }
  return { kind: 'wrong', status: 400, error: 'That is no JSON object.' };
}

import { readFile } from 'node:fs/promises';
import type { ServerResponse } from 'node:http';

/** The page's files, in the folder beside this file; the build puts a copy beside the bundle. */
const files: Readonly<Record<string, readonly [file: string, type: string]>> = {
  '/': ['index.html', 'text/html; charset=utf-8'],
  '/page.css': ['page.css', 'text/css; charset=utf-8'],
  '/page.js': ['page.js', 'text/javascript; charset=utf-8'],
  '/sheet.js': ['sheet.js', 'text/javascript; charset=utf-8'],
  '/blocks.js': ['blocks.js', 'text/javascript; charset=utf-8'],
  '/elements.js': ['elements.js', 'text/javascript; charset=utf-8'],
  '/mrkdwn.js': ['mrkdwn.js', 'text/javascript; charset=utf-8'],
  '/icon.svg': ['icon.svg', 'image/svg+xml'],
};

/** Headers of every answer: nothing but the page's own files and connections, in no frame, kept nowhere. */
export const safety = {
  'content-security-policy':
    "default-src 'none'; script-src 'self'; style-src 'self'; connect-src 'self'; img-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'",
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'no-referrer',
  'cache-control': 'no-store',
} as const;

/** Serves a file of the page; `false` where the path is none. */
export async function servePageFile(path: string, response: ServerResponse): Promise<boolean> {
  const file = files[path];
  if (file === undefined) return false;
  const [name, type] = file;
  const content = await readFile(new URL(`./page/${name}`, import.meta.url));
  response.writeHead(200, { ...safety, 'content-type': type });
  response.end(content);
  return true;
}

import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { healthRoutes } from '../../src/slack/health.ts';
import type { Ledger } from '../../src/answer/ports.ts';

const top = new URL('../../', import.meta.url);
const read = (path: string) => readFileSync(new URL(path, top), 'utf8');
const runbook = read('deploy/RUNBOOK.md');

/** The first cells of the table under a heading of the runbook. */
function firstCells(heading: string): readonly string[] {
  const section = runbook.split(/^## /m).find((each) => each.startsWith(heading)) ?? '';
  return [...section.matchAll(/^\| (`[^|]*) \|/gm)].flatMap(([, cell]) =>
    [...(cell ?? '').matchAll(/`([^`]+)`/g)].map(([, name]) => name ?? ''),
  );
}

/** The names of events that the program writes to its log. */
function eventsInCode(): readonly string[] {
  const names = ['src/slack/', 'src/cli/', 'src/practice/'].flatMap((folder) =>
    readdirSync(new URL(folder, top))
      .filter((name) => name.endsWith('.ts'))
      .flatMap((name) => [
        ...read(`${folder}${name}`).matchAll(/(?:\.write\(\s*'[a-z]+',\s*|\bend\()'([a-z-]+)'/g),
      ])
      .map(([, event]) => event ?? ''),
  );
  return [...new Set(names)].sort();
}

describe('deploy/RUNBOOK.md', () => {
  it('explains every event of the log, and no other', () => {
    expect(eventsInCode()).toContain('message-in-doubt');
    expect([...firstCells('The log')].sort()).toEqual(eventsInCode());
  });

  it('lists the health routes that there are', () => {
    // Only the paths are looked at; no handler runs, so no ledger is needed.
    const routes = healthRoutes({ ledger: {} as Ledger, ready: () => false });
    expect([...firstCells('Health')].sort()).toEqual(routes.map(({ path }) => path).sort());
  });

  it('names only files of the project that exist', () => {
    const named = [...runbook.matchAll(/`(deploy\/[^`]+)`/g)].map(([, path]) => path ?? '');
    expect(named.length).toBeGreaterThanOrEqual(3);
    for (const path of named) expect(existsSync(new URL(path, top)), path).toBe(true);
  });

  it('says how often the address stands in the HTTP manifest', () => {
    expect(runbook).toContain('replace `bot.example.com` three times');
    const addresses = read('deploy/manifest-http.yaml').match(/https:\/\/bot\.example\.com/g) ?? [];
    expect(addresses).toHaveLength(3);
  });
});

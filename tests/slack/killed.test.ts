import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { freePort, signingSecret } from '../support/running-bot.ts';
import { StandInServer, postSigned } from '../support/stand-in-server.ts';

const top = fileURLToPath(new URL('../../', import.meta.url));
const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';
let program = '';
let folder = '';
let slack: StandInServer;
let children: ChildProcess[] = [];

beforeAll(async () => {
  // The program as it is shipped, in a folder beside node_modules so that it finds its packages.
  program = join(top, 'node_modules', '.divisor-test', 'start.js');
  await build({
    entryPoints: [join(top, 'src/cli/start.ts')],
    outfile: program,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    external: ['@slack/*', 'better-sqlite3', 'kysely', 'dotenv', 'undici'],
    logLevel: 'error',
  });
});
afterAll(() => rm(join(top, 'node_modules', '.divisor-test'), { recursive: true, force: true }));

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'divisor-killed-'));
  slack = await StandInServer.start();
});
afterEach(async () => {
  for (const child of children) child.kill('SIGKILL');
  children = [];
  await slack.close();
  await rm(folder, { recursive: true, force: true });
});

/** Starts the real program against the stand-in and waits until it says that it is ready. */
async function start(settings: Readonly<Record<string, string>>): Promise<ChildProcess> {
  const child = spawn(process.execPath, [program], {
    cwd: folder,
    env: {
      PATH: process.env['PATH'] ?? '',
      SLACK_BOT_TOKEN: 'xoxb-1',
      SLACK_API_URL: slack.apiUrl,
      LOG_LEVEL: 'info',
      ...settings,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  children.push(child);
  let said = '';
  child.stderr?.on('data', (piece: Buffer) => (said += piece.toString()));
  await new Promise<void>((resolve, reject) => {
    child.stdout?.once('data', () => resolve());
    child.once('exit', (code) => reject(new Error(`the program ended with ${code}: ${said}`)));
  });
  return child;
}

async function kill(child: ChildProcess): Promise<void> {
  const gone = new Promise((resolve) => child.once('exit', resolve));
  child.kill('SIGKILL');
  await gone;
}

async function until(what: () => boolean): Promise<void> {
  for (let round = 0; round < 600; round += 1) {
    if (what()) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error('waited 30 seconds in vain');
}

const posts = () => slack.store.messages.filter(({ onlyFor }) => onlyFor === null);

describe.each(['socket', 'http'] as const)('a bot over %s that is killed without warning', (transport) => {
  const settings = async () => ({
    PORT: String(await freePort()),
    ...(transport === 'socket' ? { SLACK_APP_TOKEN: 'xapp-1' } : { SLACK_SIGNING_SECRET: signingSecret }),
  });

  async function send(fields: Readonly<Record<string, string>>, port: string): Promise<void> {
    if (transport === 'http')
      expect(await postSigned(`http://127.0.0.1:${port}/slack/events`, fields, signingSecret)).toBe(200);
    else await slack.deliver('slash_commands', fields, '00000000-0000-4000-8000-000000000001');
  }

  it('between storing and posting loses nothing and says nothing twice', async () => {
    const first = await settings();
    slack.fault('chat.postMessage', { kind: 'hold' });
    const before = await start(first);
    const fields = slack.commandFields(shifts);
    await send(fields, first.PORT);
    await until(() => slack.callsOf('chat.postMessage').length === 1);
    expect(posts()).toEqual([]);
    await kill(before);

    const second = await settings();
    await start(second);
    // Slack may deliver the same command again after the restart.
    await send(fields, second.PORT);
    await until(() => posts().length === 2);
    await new Promise((resolve) => setTimeout(resolve, 1_500));
    const [root, reply, ...more] = posts();
    expect(more).toEqual([]);
    expect(reply?.threadTs).toBe(root?.ts);
  });

  it('after Slack took the post and before that was written down finds it again and posts only the rest', async () => {
    const first = await settings();
    // The root is taken and its answer never comes: the row still says that it is being sent.
    slack.fault('chat.postMessage', { kind: 'take-and-hold' });
    const before = await start(first);
    const fields = slack.commandFields(shifts);
    await send(fields, first.PORT);
    await until(() => posts().length === 1);
    await kill(before);

    await start(await settings());
    await until(() => posts().length === 2);
    await new Promise((resolve) => setTimeout(resolve, 1_500));
    expect(posts()).toHaveLength(2);
    expect(posts()[1]?.threadTs).toBe(posts()[0]?.ts);
  });

  it('keeps no token and no trigger id in its database', async () => {
    const given = await settings();
    const child = await start(given);
    const fields = slack.commandFields(shifts);
    await send(fields, given.PORT);
    await until(() => posts().length === 2);
    await kill(child);
    const files = await Promise.all(
      ['divisor.db', 'divisor.db-wal'].map((name) =>
        readFile(join(folder, 'data', name)).catch(() => Buffer.alloc(0)),
      ),
    );
    const bytes = Buffer.concat(files).toString('latin1');
    expect(bytes).toContain('night shift');
    expect(bytes).not.toContain(fields['trigger_id']);
    expect(bytes).not.toContain('legacy-token');
    expect(bytes).not.toContain('xoxb-1');
  });
});

import { execFile } from 'node:child_process';
import { cp, mkdtemp, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const run = promisify(execFile);
const top = new URL('../../', import.meta.url).pathname;
let copy = '';

beforeAll(async () => {
  copy = await mkdtemp(join(tmpdir(), 'divisor-layers-'));
  for (const part of ['grammar', 'src', 'package.json', 'tsconfig.json', '.dependency-cruiser.cjs']) {
    await cp(join(top, part), join(copy, part), { recursive: true });
  }
  await symlink(join(top, 'node_modules'), join(copy, 'node_modules'));
});

afterAll(() => rm(copy, { recursive: true, force: true }));

/** Runs the project's own layer check on the copy. */
async function checkLayers(): Promise<{ status: number; output: string }> {
  try {
    const { stdout } = await run('npm', ['run', '--silent', 'layers'], { cwd: copy });
    return { status: 0, output: stdout };
  } catch (error) {
    const { code, stdout } = error as { code: number; stdout: string };
    return { status: code, output: stdout };
  }
}

describe('the layers of the house', () => {
  it('hold as the code stands', async () => {
    const { status, output } = await checkLayers();
    expect(output).toContain('no dependency violations');
    expect(status).toBe(0);
  });

  const planted = [
    ['src/stats/planted.ts', "import '../render/words/numbers.ts';", 'stats-imports-only-its-neighbours'],
    ['grammar/planted.ts', "import '../src/stats/interval.ts';", 'grammar-imports-only-its-neighbours'],
    ['src/report/planted.ts', "import '../render/words/numbers.ts';", 'report-imports-only-its-neighbours'],
    ['src/render/planted.ts', "import 'better-sqlite3';", 'render-uses-only-its-packages'],
    ['src/answer/planted.ts', "import 'node:fs';", 'answer-uses-only-its-packages'],
    ['src/stats/planted.ts', "import 'chevrotain';", 'stats-uses-only-its-packages'],
  ] as const;

  it.each(planted)('refuse %s that says %s', async (file, text, rule) => {
    const path = join(copy, file);
    await writeFile(path, `${text}\n`);
    try {
      const { status, output } = await checkLayers();
      expect(output).toContain(rule);
      expect(status).not.toBe(0);
    } finally {
      await rm(path);
    }
  });

  it('are checked by the build itself, so that a wrong import fails it', async () => {
    const { default: packageFile } = await import('../../package.json', { with: { type: 'json' } });
    expect(packageFile.scripts.build).toMatch(/^npm run layers && /);
    await writeFile(join(copy, 'src/stats/planted.ts'), "import '../render/words/numbers.ts';\n");
    await expect(run('npm', ['run', '--silent', 'build'], { cwd: copy })).rejects.toMatchObject({ code: 1 });
    await rm(join(copy, 'src/stats/planted.ts'));
  });
});

// Bundles the two programs into dist/: `divisor.js`, the command line, with everything it needs inside, and
// `start.js`, the bot and the practice room, which loads its packages from node_modules.
import { chmod, cp, rm } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const at = (path) => fileURLToPath(new URL(`../${path}`, import.meta.url));
// These find parts of their own at run time and stay as they are installed.
const slackAndDatabase = ['@slack/*', 'better-sqlite3', 'kysely', 'dotenv', 'undici'];
const common = { bundle: true, platform: 'node', target: 'node20', format: 'esm', logLevel: 'warning' };

await rm(at('dist'), { recursive: true, force: true });
await Promise.all([
  build({
    ...common,
    entryPoints: [at('src/cli/divisor.ts')],
    outfile: at('dist/divisor.js'),
    minify: true,
    banner: { js: '#!/usr/bin/env node' },
  }),
  build({
    ...common,
    entryPoints: [at('src/cli/start.ts')],
    outfile: at('dist/start.js'),
    external: slackAndDatabase,
    sourcemap: true,
  }),
  build({
    ...common,
    entryPoints: [at('tests/bench/bench.ts')],
    outfile: at('dist/bench.js'),
    packages: 'external',
  }),
  build({
    ...common,
    entryPoints: [at('tests/bench/calibration.ts')],
    outfile: at('dist/calibration.js'),
    packages: 'external',
  }),
]);
await cp(at('src/practice/page'), at('dist/page'), { recursive: true });
await chmod(at('dist/divisor.js'), 0o755);

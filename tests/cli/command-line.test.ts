import { spawn } from 'node:child_process';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const top = fileURLToPath(new URL('../../', import.meta.url));
const program = join(top, 'node_modules', '.divisor-test-cli', 'divisor.js');

beforeAll(() =>
  build({
    entryPoints: [join(top, 'src/cli/divisor.ts')],
    outfile: program,
    bundle: true,
    minify: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    logLevel: 'error',
  }),
);
afterAll(() => rm(join(top, 'node_modules', '.divisor-test-cli'), { recursive: true, force: true }));

interface Ended {
  readonly status: number | null;
  readonly output: string;
  readonly error: string;
}

function divisor(words: readonly string[], input: string | Buffer = ''): Promise<Ended> {
  const child = spawn(process.execPath, [program, ...words]);
  const output: Buffer[] = [];
  const error: Buffer[] = [];
  child.stdout.on('data', (piece: Buffer) => output.push(piece));
  child.stderr.on('data', (piece: Buffer) => error.push(piece));
  child.stdin.on('error', () => undefined);
  child.stdin.end(input);
  return new Promise((resolve) =>
    child.on('close', (status) =>
      resolve({
        status,
        output: Buffer.concat(output).toString('utf8'),
        error: Buffer.concat(error).toString('utf8'),
      }),
    ),
  );
}

const shifts = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';

describe('divisor LINE', () => {
  it('prints the answer with its working and ends with 0', async () => {
    const { status, output, error } = await divisor([shifts]);
    expect({ status, error }).toEqual({ status: 0, error: '' });
    expect(output).toContain('3.9485 (1.8145 to 8.5923)');
    expect(output).toContain('0.0111639 (0.0048686 to 0.0199591)');
    expect(output).toContain('3.9933 (1.8240 to 8.7409)');
    expect(output).not.toContain('\u001b[');
  });

  it('gives 2.3158 (1.4683 to 3.6524) and the base-rate caution for cases and coverage', async () => {
    const { output } = await divisor(['cases: no helmet 44, helmet 31; coverage: no helmet 38%']);
    expect(output).toContain('2.3158 (1.4683 to 3.6524)');
    expect(output).toContain('59% is a share of the cases, not a risk');
  });

  it('with --json prints one line that keeps to the contract', async () => {
    const { status, output } = await divisor(['--json', shifts]);
    expect(status).toBe(0);
    expect(output.trim().split('\n')).toHaveLength(1);
    const report = JSON.parse(output) as {
      readings: {
        id: string;
        estimate: number;
        interval: { low: number; high: number; level: number; method: string };
      }[];
    } & Record<string, unknown>;
    expect(report).toMatchObject({
      schema: 1,
      line: shifts,
      question: { kind: 'counts', canonical: shifts },
      headline: 'risk-ratio',
      says: null,
      stated: [],
    });
    expect(report['groups']).toEqual([
      { label: 'night shift', cases: 18, total: 1204 },
      { label: 'day shift', cases: 9, total: 2377 },
    ]);
    // Values of the contract, themselves from 40-digit arithmetic.
    const ratio = report.readings.find(({ id }) => id === 'risk-ratio');
    expect(ratio).toMatchObject({
      of: 'night shift',
      against: 'day shift',
      whyNoInterval: null,
      roundingRange: null,
      working: '18/1,204 / (9/2,377)',
    });
    expect(ratio?.estimate).toBeCloseTo(3.94850498339, 10);
    expect(ratio?.interval).toMatchObject({ level: 0.95, method: 'miettinen-nurminen' });
    expect(ratio?.interval.low).toBeCloseTo(1.81452906747, 10);
    expect(ratio?.interval.high).toBeCloseTo(8.59232546177, 10);
  });

  it('tells a bad line on standard error with its place, and ends with 2', async () => {
    const { status, output, error } = await divisor(['night: 18 of 12']);
    expect({ status, output }).toEqual({ status: 2, output: '' });
    expect(error).toContain('more cases than people');
    expect(error).toContain('  night: 18 of 12\n         ^^^^^^^^');
    expect(error).toContain('Try: night: 12 of 18');
  });

  it('with --json tells it as JSON with positions', async () => {
    const { status, output } = await divisor(['--json', 'night: 18 of 12']);
    expect(status).toBe(2);
    expect(JSON.parse(output)).toEqual({
      schema: 1,
      line: 'night: 18 of 12',
      error: {
        id: 'more-cases-than-people',
        message: '18 of 12: more cases than people. The other way round?',
        from: 7,
        to: 15,
        try: ['night: 12 of 18'],
      },
    });
  });

  it.each([
    [''],
    ['1.204 of 5,000'],
    ['cases: a 10, b 5'],
    ['x'.repeat(4_001)],
    ['\u0001\u0002 \ufffd \u{1F6B2}'],
  ])('ends with 2 for %j', async (line) => {
    const { status, error } = await divisor([line]);
    expect(status).toBe(2);
    expect(error.length).toBeGreaterThan(10);
  });

  it('knows --help, --version and no other option, and takes a line behind --', async () => {
    expect((await divisor(['--help'])).output).toContain('divisor -');
    expect((await divisor(['--version'])).output).toMatch(/^\d+\.\d+\.\d+\n$/);
    expect(await divisor(['--frobnicate'])).toMatchObject({ status: 2, output: '' });
    expect((await divisor(['read', '18 of 1,204 sailings were late'])).output).toContain(
      'sailings: 18 of 1,204',
    );
    expect((await divisor(['--', '18 of 1,204 vs 9 of 2,377'])).status).toBe(0);
  });
});

describe('divisor -', () => {
  it('answers every line in its order, a bad one in its place, and ends with 2', async () => {
    const { status, output } = await divisor(['-'], `${shifts}\n18 of 12\r\n4.2% vs 2.6%`);
    const lines = output.trimEnd().split('\n');
    expect(lines).toHaveLength(3);
    expect(lines[0]).toMatch(/^Night shift had cases 3\.9 times as often/);
    expect(lines[1]).toMatch(/^Not read, at 0: 18 of 12: more cases than people/);
    expect(lines[2]).toMatch(/1\.6 times as often/);
    expect(status).toBe(2);
  });

  it('ends with 0 where every line was answered, and answers nothing to nothing', async () => {
    expect(await divisor(['-'], `${shifts}\n`)).toMatchObject({ status: 0 });
    expect(await divisor(['-'], '')).toEqual({ status: 0, output: '', error: '' });
  });

  it('with --json writes one object a line, also for a line of a million characters and for bytes that are no text', async () => {
    const { status, output } = await divisor(
      ['--json', '-'],
      Buffer.concat([
        Buffer.from(`${'1 '.repeat(500_000)}\n`),
        Buffer.from([0xff, 0xfe, 0x00, 0x0a]),
        Buffer.from(shifts),
      ]),
    );
    const lines = output
      .trimEnd()
      .split('\n')
      .map((line) => JSON.parse(line) as { error?: { id: string } });
    expect(lines.map(({ error }) => error?.id ?? 'answered')).toEqual(['too-long', 'no-figure', 'answered']);
    expect(status).toBe(2);
  });
});

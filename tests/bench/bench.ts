import { spawn, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { readLine } from '../../grammar/read-line.ts';
import { answerLine, commandLineLimits } from '../../src/answer/answer-line.ts';
import { renderJson } from '../../src/render/render-json.ts';
import { renderText } from '../../src/render/render-text.ts';
import { renderReply } from '../../src/render/slack/render-reply.ts';
import { reportOf } from '../../src/report/report-of.ts';

/**
 * Speed, as ratios and times within one run: cold start of the command line over an empty Node program, lines per second
 * through `divisor -`, and microseconds per answer by step. Run by `npm run bench`; the goals are printed beside the figures.
 */

const program = fileURLToPath(new URL('./divisor.js', import.meta.url));
const line = 'night shift: 18 of 1,204 vs day shift: 9 of 2,377';
const lines = [
  line,
  'cases: no helmet 44, helmet 31; coverage: no helmet 38%',
  'harbour ferry 31 of 9,240, market ferry 12 of 8,100, depot ferry 9 of 7,300',
  '1 in 250 vs 1 in 400',
  'no helmet: 44 of 75 injured, 38% of riders',
];

const print = (text: string) => process.stdout.write(`${text}\n`);

function sorted(values: readonly number[]): number[] {
  return [...values].sort((a, b) => a - b);
}
const median = (values: readonly number[]) => sorted(values)[Math.floor(values.length / 2)] ?? NaN;

function milliseconds(args: readonly string[]): number {
  const start = performance.now();
  const { status } = spawnSync(process.execPath, args, { stdio: 'ignore' });
  if (status !== 0) throw new Error(`${args.join(' ')} ended with status ${status}`);
  return performance.now() - start;
}

function coldStart(): void {
  const rounds = 25;
  const bare: number[] = [];
  const answered: number[] = [];
  for (let round = 0; round < rounds; round += 1) {
    bare.push(milliseconds(['-e', '0']));
    answered.push(milliseconds([program, line]));
  }
  const ratio = (pick: (values: readonly number[]) => number) => (pick(answered) / pick(bare)).toFixed(2);
  const least = (values: readonly number[]) => Math.min(...values);
  print(
    `cold start, divisor LINE over node -e 0: ${ratio(median)} (medians ${median(answered).toFixed(0)} and ${median(bare).toFixed(0)} ms), ${ratio(least)} (least of ${rounds}). Goal: at most 2`,
  );
}

async function stream(): Promise<void> {
  const count = 20_000;
  const start = performance.now();
  const child = spawn(process.execPath, [program, '-'], { stdio: ['pipe', 'pipe', 'inherit'] });
  let answers = 0;
  child.stdout.on('data', (piece: Buffer) => {
    for (const byte of piece) if (byte === 10) answers += 1;
  });
  for (let sent = 0; sent < count; sent += 1) {
    const ready = child.stdin.write(`${lines[sent % lines.length] ?? line}\n`);
    if (!ready) await new Promise((resolve) => child.stdin.once('drain', resolve));
  }
  child.stdin.end();
  await new Promise((resolve) => child.once('close', resolve));
  if (answers !== count) throw new Error(`${count} lines gave ${answers} answers`);
  print(
    `divisor -: ${Math.round((count / (performance.now() - start)) * 1000)} lines per second, start included`,
  );
}

function microseconds(work: (line: string) => unknown): number {
  for (let round = 0; round < 400; round += 1) work(lines[round % lines.length] ?? line);
  const times: number[] = [];
  for (let batch = 0; batch < 15; batch += 1) {
    const start = performance.now();
    for (let round = 0; round < 200; round += 1) work(lines[round % lines.length] ?? line);
    times.push(((performance.now() - start) * 1000) / 200);
  }
  return median(times);
}

function steps(): void {
  const questions = new Map(
    lines.map((each) => {
      const reading = readLine(each, commandLineLimits);
      if (reading.kind !== 'question') throw new Error(`not read as a question: ${each}`);
      return [each, { question: reading.question, report: reportOf(reading.question) }] as const;
    }),
  );
  const of = (each: string) => {
    const found = questions.get(each);
    if (found === undefined) throw new Error(`no question for ${each}`);
    return found;
  };
  const context = { number: 1, askedBy: 'U1', checkId: 'c1' };
  const parts = [
    ['read', (each: string) => readLine(each, commandLineLimits)],
    ['report', (each: string) => reportOf(of(each).question)],
    ['text', (each: string) => renderText(of(each).report, (text) => text)],
    ['JSON', (each: string) => renderJson(each, of(each).report)],
    ['Slack reply', (each: string) => renderReply(of(each).report, context)],
  ] as const;
  const figures = parts.map(([name, work]) => `${name} ${microseconds(work).toFixed(0)}`);
  const whole = microseconds((each) => {
    const answer = answerLine(each, commandLineLimits);
    if (answer.kind === 'report') renderText(answer.report, (text) => text);
  });
  print(
    `microseconds per answer: ${figures.join(', ')}; the whole, line to text, ${whole.toFixed(0)}. Goal: at most 300`,
  );
}

/** Reading is linear: per character the longest line costs at most three times a line of 400 characters. */
function lengths(): void {
  const cost = (length: number, unit: string) => {
    const long = unit.repeat(Math.ceil(length / unit.length)).slice(0, length);
    return microseconds(() => readLine(long, commandLineLimits)) / length;
  };
  const worst = ['1 ', 'a: 1 of 2, ', 'word ', '((((', '1 of '].map(
    (unit) => cost(4_000, unit) / cost(400, unit),
  );
  print(
    `cost per character, 4,000 characters over 400: at most ${Math.max(...worst).toFixed(2)}. Goal: at most 3`,
  );
}

coldStart();
await stream();
steps();
lengths();

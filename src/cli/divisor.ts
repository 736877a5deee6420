import { once } from 'node:events';
import packageFile from '../../package.json' with { type: 'json' };
import { commandLineLimits } from '../answer/answer-line.ts';
import { readMessage } from '../answer/read-message.ts';
import { answerOrOffer, speakOfMessage } from './message-text.ts';
import { speak, speakOnOneLine } from './answer-text.ts';
import { readArguments, usage } from './arguments.ts';
import { LineSplitter } from './line-splitter.ts';

const { stdin, stdout, stderr, env } = process;

// A reader that went away (`divisor - | head`) is no failure of ours.
stdout.on('error', (error: NodeJS.ErrnoException) => process.exit(error.code === 'EPIPE' ? 0 : 1));

process.exitCode = await run(process.argv.slice(2));

async function run(words: readonly string[]): Promise<number> {
  const request = readArguments(words);
  switch (request.kind) {
    case 'usage':
      stdout.write(`${usage}\n`);
      return 0;
    case 'version':
      stdout.write(`${packageFile.version}\n`);
      return 0;
    case 'unknown-option':
      stderr.write(`There is no option ${request.option}.\n\n${usage}\n`);
      return 2;
    case 'stream':
      return answerStream(request.json, request.yes);
    case 'line':
    case 'read': {
      const colour = stdout.isTTY && (env['NO_COLOR'] ?? '') === '';
      const strong = colour ? (text: string) => `\u001b[1m${text}\u001b[22m` : (text: string) => text;
      const { output, error, status } =
        request.kind === 'read'
          ? speakOfMessage(readMessage(request.message, commandLineLimits), request, strong)
          : speak(answerOrOffer(request.line, request.yes), request.json, strong);
      if (output !== null) stdout.write(`${output}\n`);
      if (error !== null) stderr.write(`${error}\n`);
      return status;
    }
  }
}

async function answerStream(json: boolean, yes: boolean): Promise<number> {
  const splitter = new LineSplitter(commandLineLimits.characters);
  let worst = 0;
  const answer = async (lines: Iterable<string>) => {
    let text = '';
    for (const line of lines) {
      const { output, status } = speakOnOneLine(answerOrOffer(line, yes), json);
      text += `${output ?? ''}\n`;
      worst = Math.max(worst, status);
    }
    if (text !== '' && !stdout.write(text)) await once(stdout, 'drain');
  };
  stdin.setEncoding('utf8');
  for await (const piece of stdin) await answer(splitter.push(piece as string));
  await answer(splitter.end());
  return worst;
}

import { answerLine, commandLineLimits } from '../answer/answer-line.ts';

process.stdout.write(`${JSON.stringify(answerLine(process.argv[2] ?? '', commandLineLimits))}\n`);

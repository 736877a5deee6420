import { answerLine, commandLineLimits } from '../answer/answer-line.ts';
import type { Answer } from '../answer/answer-line.ts';
import type { MessageAnswer } from '../answer/read-message.ts';
import { renderFoundJson, renderFoundText } from '../render/render-found.ts';
import type { Emphasis } from '../render/render-text.ts';
import { speak } from './answer-text.ts';
import type { Spoken } from './answer-text.ts';

/** The answer to a line; with `--yes` the answer to what a plain sentence was found to ask. */
export function answerOrOffer(line: string, yes: boolean): Answer {
  const answer = answerLine(line, commandLineLimits);
  if (!yes || answer.kind !== 'refusal' || answer.diagnosis.id !== 'confirm') return answer;
  const [first] = answer.diagnosis.suggestions;
  if (first === undefined) return answer;
  const taken = answerLine(first.line, commandLineLimits);
  return taken.kind === 'help' ? answer : { ...taken, line };
}

/** What was found in a message: its pieces, the question, and what is missing; with `--yes` the answer to the question. */
export function speakOfMessage(
  answer: MessageAnswer,
  { json, yes }: { readonly json: boolean; readonly yes: boolean },
  strong: Emphasis,
): Spoken {
  const { message } = answer;
  if (answer.kind === 'too-long')
    return speak({ kind: 'refusal', line: message, diagnosis: answer.diagnosis }, json, strong);
  const { reading, told } = answer;
  const [first] = reading.figures;
  if (yes && first?.question != null) {
    const taken = answerLine(first.question.canonical, commandLineLimits);
    return speak(taken.kind === 'help' ? taken : { ...taken, line: message }, json, strong);
  }
  if (json)
    return { output: renderFoundJson(message, reading), error: null, status: first === undefined ? 2 : 0 };
  if (first === undefined) return { output: null, error: renderFoundText(reading, told), status: 2 };
  return { output: renderFoundText(reading, told), error: null, status: 0 };
}

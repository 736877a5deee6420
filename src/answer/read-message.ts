import type { Diagnosis, LineLimits } from '../../grammar/question.ts';
import { readStrictly } from '../../grammar/read-line.ts';
import { diagnosisOf } from '../../grammar/sentence-offer.ts';
import { readSentence } from '../../grammar/sentence.ts';
import type { SentenceReading } from '../../grammar/sentence.ts';

/** What was found in a message, with what the asker is told of it. */
export type MessageAnswer =
  | {
      readonly kind: 'read';
      readonly message: string;
      readonly reading: SentenceReading;
      readonly told: Diagnosis;
    }
  | { readonly kind: 'too-long'; readonly message: string; readonly diagnosis: Diagnosis };

/** Finds the figures in a message as it stands. Pure, and never throws whatever the message holds. */
export function readMessage(message: string, limits: LineLimits): MessageAnswer {
  if (message.length > limits.characters) {
    // The strict reader looks at the length before anything else.
    const refusal = readStrictly(message, limits);
    if (refusal.kind === 'diagnosis') return { kind: 'too-long', message, diagnosis: refusal.diagnosis };
  }
  const reading = readSentence(message, (line) => readStrictly(line, limits));
  return { kind: 'read', message, reading, told: diagnosisOf(message, reading) };
}

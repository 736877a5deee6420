import { describe, expect, it } from 'vitest';
import { commandLineLimits } from '../../src/answer/answer-line.ts';
import { readMessage } from '../../src/answer/read-message.ts';
import { readArguments } from '../../src/cli/arguments.ts';
import type { Request } from '../../src/cli/arguments.ts';
import { speak } from '../../src/cli/answer-text.ts';
import type { Spoken } from '../../src/cli/answer-text.ts';
import { answerOrOffer, speakOfMessage } from '../../src/cli/message-text.ts';

const sentence = 'Most of the injured, 44 of 75, wore no helmet, though only 38% of riders go without';
const canonical = 'no helmet: 44 of 75 injured, 38% of riders';
const plain = (text: string) => text;

/** What the command line says to these words. */
function divisor(...words: string[]): Spoken {
  const request: Request = readArguments(words);
  switch (request.kind) {
    case 'read':
      return speakOfMessage(readMessage(request.message, commandLineLimits), request, plain);
    case 'line':
      return speak(answerOrOffer(request.line, request.yes), request.json, plain);
    default:
      throw new Error(`not a line: ${request.kind}`);
  }
}
const parsed = ({ output }: Spoken): unknown => JSON.parse(output ?? '');

describe('divisor read MESSAGE', () => {
  it('prints the pieces, the question, and that nothing is missing', () => {
    const { output, error, status } = divisor('read', sentence);
    expect({ error, status }).toEqual({ error: null, status: 0 });
    expect(output).toBe(
      [
        'I found: 44 of 75 (injured), 38% (of riders). Missing: nothing. Is this what you ask?',
        '',
        'Found',
        '  cases     44',
        '  total     75',
        '  coverage  38% of riders',
        '',
        'Question',
        `  ${canonical}`,
      ].join('\n'),
    );
  });

  it('with --json gives exactly what the contract says', () => {
    expect(parsed(divisor('--json', 'read', sentence))).toEqual({
      schema: 1,
      line: sentence,
      found: [
        { text: '44', from: 21, to: 23, role: 'cases' },
        { text: '75', from: 27, to: 29, role: 'total' },
        { text: '38% of riders', from: 59, to: 72, role: 'coverage' },
      ],
      question: { kind: 'shares', canonical },
      draft: canonical,
      missing: [],
    });
  });

  it('says what is missing, with the line to complete', () => {
    const message = 'Most of the injured (44 of 75) wore no helmet';
    expect(divisor('read', message).output).toContain('Missing\n  what share of everybody is "no helmet"');
    expect(parsed(divisor('read', '--json', message))).toMatchObject({
      question: null,
      draft: 'no helmet: 44 of 75 injured, ...% of ...',
      missing: [{ id: 'coverage', text: 'what share of everybody is "no helmet"' }],
    });
  });

  it('numbers several figures', () => {
    const message =
      '44 of 75 injured riders wore no helmet, 38% of riders go without. Delays rose from 412 to 530.';
    expect(divisor('read', message).output).toContain(
      'Questions\n  1: no helmet: 44 of 75 injured riders, 38% of riders\n  2: Delays from 412 to 530\n',
    );
    expect(parsed(divisor('read', '--json', message))).toMatchObject({ missing: [{ id: 'which-figure' }] });
  });

  it('says that there is no figure, and ends with 2', () => {
    expect(divisor('read', 'who rode the ferry')).toMatchObject({ status: 2, output: null });
    expect(divisor('read', 'who rode the ferry').error).toContain('I found no figure in this.');
    const json = divisor('--json', 'read', 'who rode the ferry');
    expect(json.status).toBe(2);
    expect(parsed(json)).toMatchObject({
      found: [],
      question: null,
      draft: '',
      missing: [{ id: 'no-figure' }],
    });
  });

  it('with --yes answers the question', () => {
    const { output, status } = divisor('read', '--yes', sentence);
    expect(status).toBe(0);
    expect(output).toContain('2.3158 (1.4683 to 3.6524)');
  });

  it('refuses a message that is too long', () => {
    const { status, error } = divisor('read', 'x'.repeat(4_001));
    expect(status).toBe(2);
    expect(error).toContain('longer than 4,000 characters');
  });
});

describe('divisor SENTENCE', () => {
  it('answers nothing unconfirmed: the offer is a refusal with the id confirm and the line', () => {
    const { output, error, status } = divisor(sentence);
    expect({ output, status }).toEqual({ output: null, status: 2 });
    expect(error).toContain(`Try: ${canonical}   (Yes)`);
    expect(parsed(divisor('--json', sentence))).toEqual({
      schema: 1,
      line: sentence,
      error: {
        id: 'confirm',
        message: 'I found: 44 of 75 (injured), 38% (of riders). Missing: nothing. Is this what you ask?',
        from: 21,
        to: 72,
        try: [canonical],
      },
    });
  });

  it('with --yes takes the offer, and the report keeps the line as typed', () => {
    const spoken = divisor('--json', '--yes', sentence);
    expect(spoken.status).toBe(0);
    expect(parsed(spoken)).toMatchObject({ line: sentence, question: { kind: 'shares', canonical } });
  });

  it('with --yes still refuses what is no offer', () => {
    expect(divisor('--yes', '18 of 12').status).toBe(2);
    expect(divisor('--yes', '71% of the injured vs 38% of riders').status).toBe(2);
  });

  it('takes "read" as a name where a line goes on as a line', () => {
    expect(divisor('read: 3 of 900 vs unread: 4 of 800').status).toBe(0);
  });
});

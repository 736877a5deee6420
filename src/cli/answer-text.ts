import type { Answer } from '../answer/answer-line.ts';
import { renderJson, renderRefusalJson } from '../render/render-json.ts';
import { renderRefusalText, renderText } from '../render/render-text.ts';
import type { Emphasis } from '../render/render-text.ts';
import { helpText } from '../render/words/help.ts';
import { tell } from '../render/words/tell.ts';

/** One line answered: what goes to standard output, what to standard error, and the exit status it calls for. */
export interface Spoken {
  readonly output: string | null;
  readonly error: string | null;
  readonly status: 0 | 2;
}

/** The answer to a single line. */
export function speak(answer: Answer, json: boolean, strong: Emphasis): Spoken {
  switch (answer.kind) {
    case 'report':
      return {
        output: json ? renderJson(answer.line, answer.report) : renderText(answer.report, strong),
        error: null,
        status: 0,
      };
    case 'help':
      return { output: helpLines(answer.topic), error: null, status: 0 };
    case 'refusal':
      return json
        ? { output: renderRefusalJson(answer.line, answer.diagnosis), error: null, status: 2 }
        : { output: null, error: renderRefusalText(answer.line, answer.diagnosis), status: 2 };
  }
}

/** The answer to one of many lines, always on one line, a bad line's diagnosis in its place. */
export function speakOnOneLine(answer: Answer, json: boolean): Spoken {
  switch (answer.kind) {
    case 'report': {
      if (json) return { output: renderJson(answer.line, answer.report), error: null, status: 0 };
      const { headline, readAs, says } = tell(answer.report);
      return {
        output: [headline, readAs, ...(says === null ? [] : [says.line])].join(' '),
        error: null,
        status: 0,
      };
    }
    case 'help':
      return { output: helpLines(answer.topic).replaceAll('\n', ' '), error: null, status: 0 };
    case 'refusal': {
      const { diagnosis, line } = answer;
      if (json) return { output: renderRefusalJson(line, diagnosis), error: null, status: 2 };
      const [first] = diagnosis.suggestions;
      const message = diagnosis.message.replace(/\s*\n\s*/g, ' ');
      return {
        output: `Not read, at ${diagnosis.span.from}: ${message}${first === undefined ? '' : ` Try: ${first.line.replace(/\s*\n\s*/g, '; ')}`}`,
        error: null,
        status: 2,
      };
    }
  }
}

function helpLines(topic: Parameters<typeof helpText>[0]): string {
  const { title, lines, examples } = helpText(topic);
  return [title, ...lines, '', ...examples.map((example) => `  ${example}`)].join('\n');
}

import { describe, expect, it } from 'vitest';
import { renderText } from '../../src/render/render-text.ts';
import { renderReply } from '../../src/render/slack/render-reply.ts';
import { renderRoot } from '../../src/render/slack/render-root.ts';
import { scenarios } from '../scenarios/scenarios.ts';
import { reportFor } from '../support/report-for.ts';

/**
 * What users see, word for word. A golden file changes only together with a decision to say something differently; the
 * numbers in them are held to outside values elsewhere (tests/stats, tests/report).
 */
describe.each(Object.entries(scenarios))('%s', (name, line) => {
  const report = reportFor(line);
  const context = { number: 214, askedBy: 'U0ADA', checkId: 'check-1' };

  it('reads as it did in a terminal', async () => {
    await expect(`${line}\n\n${renderText(report, (text) => text)}\n`).toMatchFileSnapshot(
      `../golden/${name}.txt`,
    );
  });

  it('reads as it did in Slack', async () => {
    const messages = [renderRoot(line, report, context).text, renderReply(report, context).text];
    await expect(`${messages.join('\n\n')}\n`).toMatchFileSnapshot(`../golden/${name}.slack.txt`);
  });
});

import { answerLine, slackLimits } from '../answer/answer-line.ts';
import type { Answer } from '../answer/answer-line.ts';
import type {
  AskedRequest,
  CheckDraft,
  Ledger,
  MessageRoute,
  PlannedMessage,
  StoredCheck,
  StoredRequest,
  ThreadPlace,
} from '../answer/ports.ts';
import { askPrefix, partsBehind } from '../render/slack/message.ts';
import type { SlackMessage } from '../render/slack/message.ts';
import { renderHelp, renderNotice, renderRefusal } from '../render/slack/render-private.ts';
import { renderPart, renderReply } from '../render/slack/render-reply.ts';
import { renderRoot } from '../render/slack/render-root.ts';
import { typedText, withoutMention } from './typed-text.ts';

/** What a request calls for: the check to keep, if any, and the messages once it has its number. */
export interface AnswerPlan {
  readonly draft: CheckDraft | null;
  readonly compose: (check: StoredCheck | null) => readonly PlannedMessage[];
}

/** Where a line was asked, which decides where its answer goes. */
interface Asked {
  readonly request: AskedRequest;
  readonly line: string;
  /** The thread it was asked in; `null` for a command in the channel itself, which gets a root message of its own. */
  readonly threadTs: string | null;
  readonly requestId: string;
  readonly responseUrl: string | null;
}

/** Plans the answer to a stored request. */
export async function planAnswer(
  stored: StoredRequest,
  ledger: Ledger,
  botUserId: string,
): Promise<AnswerPlan> {
  const { request, id: requestId, responseUrl } = stored;
  switch (request.kind) {
    case 'command':
      return planLine({ request, line: typedText(request.text), threadTs: null, requestId, responseUrl });
    case 'mention':
      return planLine({
        request,
        line: typedText(withoutMention(request.text, botUserId)),
        threadTs: request.threadTs,
        requestId,
        responseUrl,
      });
    case 'button':
      return planButton(stored, request, ledger, botUserId);
  }
}

const planned = (route: MessageRoute, { text, blocks }: SlackMessage): PlannedMessage => ({
  route,
  text,
  blocks: JSON.stringify(blocks),
});

/** To the asker alone: at the address that came with the request, else as an ephemeral message in the thread. */
function privately({
  request,
  threadTs,
  responseUrl,
}: Pick<Asked, 'request' | 'threadTs' | 'responseUrl'>): MessageRoute {
  return responseUrl === null
    ? { kind: 'ephemeral', userId: request.userId, threadTs }
    : { kind: 'response', replaceOriginal: false, threadTs };
}

const only = (message: PlannedMessage): AnswerPlan => ({ draft: null, compose: () => [message] });

function planLine(asked: Asked): AnswerPlan {
  const answer = answerLine(asked.line, slackLimits);
  switch (answer.kind) {
    case 'help':
      return only(planned(privately(asked), renderHelp(answer.topic)));
    case 'refusal':
      return only(planned(privately(asked), renderRefusal(asked.line, answer.diagnosis, asked.requestId)));
    case 'report':
      return planReport(asked, answer);
  }
}

function planReport(
  asked: Asked,
  { report, canonical, line }: Extract<Answer, { kind: 'report' }>,
): AnswerPlan {
  const { request, threadTs } = asked;
  const alone = report.question.clauses.onlyMe;
  const draft: CheckDraft = {
    teamId: request.teamId,
    channelId: request.channelId,
    line,
    canonical,
    kind: report.question.kind,
    askedBy: request.userId,
    numbered: !alone,
  };
  return {
    draft,
    compose: (check) => {
      if (check === null) throw new Error('a report is planned with its check');
      const context = { number: check.number, askedBy: check.askedBy, checkId: check.id };
      const reply = renderReply(report, context);
      if (alone) return [planned(privately(asked), reply)];
      const post = (thread: ThreadPlace): MessageRoute => ({ kind: 'post', thread });
      if (threadTs !== null) return [planned(post({ kind: 'thread', ts: threadTs }), reply)];
      return [
        planned(post({ kind: 'channel' }), renderRoot(line, report, context)),
        planned(post({ kind: 'under-previous' }), reply),
      ];
    },
  };
}

async function planButton(
  stored: StoredRequest,
  request: Extract<AskedRequest, { kind: 'button' }>,
  ledger: Ledger,
  botUserId: string,
): Promise<AnswerPlan> {
  const part = partsBehind.find((each) => request.action === `show_${each}`);
  const route = privately({ request, threadTs: request.threadTs, responseUrl: stored.responseUrl });
  if (part !== undefined) {
    const check = await ledger.checkById(request.value);
    const answer = check === null ? null : answerLine(check.line, slackLimits);
    if (check === null || answer?.kind !== 'report' || check.teamId !== request.teamId)
      return only(planned(route, renderNotice('gone')));
    return only(planned(route, renderPart(check.line, answer.report, part)));
  }
  if (request.action.startsWith(askPrefix)) return planOffer(stored, request, ledger, botUserId);
  return { draft: null, compose: () => [] };
}

/** A line offered under a refusal, taken: as if the person had typed it where the first one was typed. An offer is taken once. */
async function planOffer(
  stored: StoredRequest,
  request: Extract<AskedRequest, { kind: 'button' }>,
  ledger: Ledger,
  botUserId: string,
): Promise<AnswerPlan> {
  const route = privately({ request, threadTs: request.threadTs, responseUrl: stored.responseUrl });
  const line = await offeredLine(request, ledger, botUserId);
  if (line === null || !(await ledger.takeOffer(request.value, stored.id)))
    return only(planned(route, renderNotice('gone')));
  const plan = planLine({
    request,
    line: line.text,
    threadTs: line.threadTs,
    requestId: stored.id,
    responseUrl: stored.responseUrl,
  });
  const asked = renderNotice('asked');
  const replaced: readonly PlannedMessage[] =
    stored.responseUrl === null
      ? []
      : [planned({ kind: 'response', replaceOriginal: true, threadTs: null }, asked)];
  return { draft: plan.draft, compose: (check) => [...plan.compose(check), ...replaced] };
}

/** The line behind `ask_1`, worked out anew from the stored request: a button carries nothing but an id. */
async function offeredLine(
  request: Extract<AskedRequest, { kind: 'button' }>,
  ledger: Ledger,
  botUserId: string,
): Promise<{ readonly text: string; readonly threadTs: string | null } | null> {
  const first = await ledger.requestById(request.value);
  if (first === null || first.request.kind === 'button' || first.request.teamId !== request.teamId)
    return null;
  const mentioned = first.request.kind === 'mention';
  const typed = typedText(mentioned ? withoutMention(first.request.text, botUserId) : first.request.text);
  const answer = answerLine(typed, slackLimits);
  if (answer.kind !== 'refusal') return null;
  const suggestion = answer.diagnosis.suggestions[Number(request.action.slice(askPrefix.length))];
  if (suggestion === undefined) return null;
  return { text: suggestion.line, threadTs: mentioned ? first.request.threadTs : null };
}

import type { Clock, Ids, Ledger } from '../answer/ports.ts';
import { createBot } from '../slack/bot.ts';
import type { Bot } from '../slack/bot.ts';
import type { Log } from '../slack/log.ts';
import { MessageStore } from './message-store.ts';
import { PracticeReceiver } from './receiver.ts';
import { createStandIn } from './stand-in.ts';
import { botPerson, channels, teamId } from './workspace.ts';

export interface RoomParts {
  readonly ledger: Ledger;
  readonly clock: Clock;
  readonly ids: Ids;
  readonly log: Log;
}

/** Something typed: a command in a channel, or a mention of the bot in a thread. */
export interface Typed {
  readonly person: string;
  readonly channel: string;
  readonly threadTs: string | null;
  readonly line: string;
}

export interface Pressed {
  readonly person: string;
  readonly messageTs: string;
  readonly action: string;
}

/** The practice room without its page: three people, two channels, and the very same bot over the stand-in. */
export interface Room {
  readonly store: MessageStore;
  readonly bot: Bot;
  type(typed: Typed): Promise<void>;
  /** False where the person sees no such button. */
  press(pressed: Pressed): Promise<boolean>;
}

export async function createRoom({ ledger, clock, ids, log }: RoomParts): Promise<Room> {
  const store = new MessageStore(() => clock.now());
  const known = new Set(channels.map(({ id }) => id));
  const standIn = createStandIn({
    store,
    isMember: (channel) => known.has(channel),
    origin: 'https://harrowmere.example',
  });
  const receiver = new PracticeReceiver();
  const bot = await createBot({
    ledger,
    receivers: [receiver],
    start: (each) => each.start(),
    stop: (each) => each.stop(),
    token: 'xoxb-practice',
    slackApiUrl: 'https://harrowmere.example/api/',
    fetch: standIn.fetch,
    clock,
    log,
    pace: 0,
    lookUpWaits: [0],
  });
  return {
    store,
    bot,
    async type({ person, channel, threadTs, line }) {
      if (threadTs === null) {
        await receiver.deliver({
          command: '/divisor',
          text: escaped(line),
          team_id: teamId,
          channel_id: channel,
          user_id: person,
          trigger_id: ids.next(),
          response_url: standIn.responseUrl({ channel, user: person, messageTs: null }),
        });
        return;
      }
      const asked = `<@${botPerson.id}> ${escaped(line)}`;
      const { ts } = store.add({
        channel,
        threadTs,
        user: person,
        text: asked,
        blocks: [],
        metadata: null,
        onlyFor: null,
      });
      await receiver.deliver({
        type: 'event_callback',
        team_id: teamId,
        event_id: ids.next(),
        event: {
          type: 'app_mention',
          user: person,
          text: asked,
          ts,
          channel,
          event_ts: ts,
          thread_ts: threadTs,
        },
      });
    },
    async press({ person, messageTs, action }) {
      const message = store.messages.find(
        ({ ts, onlyFor }) => ts === messageTs && (onlyFor === null || onlyFor === person),
      );
      const button = message === undefined ? undefined : buttonIn(message.blocks, action);
      if (message === undefined || button === undefined) return false;
      const { channel, threadTs } = message;
      await receiver.deliver({
        type: 'block_actions',
        team: { id: teamId },
        user: { id: person, team_id: teamId },
        channel: { id: channel },
        container: {
          type: 'message',
          message_ts: messageTs,
          channel_id: channel,
          ...(threadTs === null ? {} : { thread_ts: threadTs }),
        },
        message: { ts: messageTs, text: message.text, ...(threadTs === null ? {} : { thread_ts: threadTs }) },
        trigger_id: ids.next(),
        response_url: standIn.responseUrl({ channel, user: person, messageTs }),
        actions: [
          {
            type: 'button',
            action_id: action,
            block_id: button.blockId,
            value: button.value,
            action_ts: messageTs,
          },
        ],
      });
      return true;
    },
  };
}

/** Slack hands over what was typed with these three characters escaped. */
const escaped = (line: string) =>
  line.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');

interface Button {
  readonly blockId: string;
  readonly value: string;
}

function buttonIn(blocks: readonly unknown[], action: string): Button | undefined {
  for (const block of blocks as readonly {
    readonly type?: string;
    readonly block_id?: string;
    readonly elements?: readonly { readonly action_id?: string; readonly value?: string }[];
  }[]) {
    const found =
      block.type === 'actions' ? block.elements?.find(({ action_id }) => action_id === action) : undefined;
    if (found !== undefined) return { blockId: block.block_id ?? '', value: found.value ?? '' };
  }
  return undefined;
}

import type { Clock, Ids, Ledger } from '../answer/ports.ts';
import { createBot } from '../slack/bot.ts';
import type { Bot } from '../slack/bot.ts';
import type { Log } from '../slack/log.ts';
import { buttonIn, commandBody, isMention, mentionBody, mentionText, pressBody } from './deliveries.ts';
import { MessageStore } from './message-store.ts';
import type { StoredMessage } from './message-store.ts';
import { PracticeReceiver } from './receiver.ts';
import type { Acknowledgement } from './receiver.ts';
import { createStandIn } from './stand-in.ts';
import { botPerson, channels } from './workspace.ts';

export interface RoomParts {
  readonly ledger: Ledger;
  readonly clock: Clock;
  readonly ids: Ids;
  readonly log: Log;
}

/** Something typed: the command or a mention of the bot in a channel, or a mention in a thread. */
export interface Typed {
  readonly person: string;
  readonly channel: string;
  /** The first message of the thread it is typed in; `null` for the channel itself. */
  readonly threadTs: string | null;
  readonly line: string;
}

export interface Pressed {
  readonly person: string;
  readonly messageTs: string;
  readonly action: string;
}

/** What became of something typed or pressed. `not-there`: no such thread, or no such button for this person. */
export type Taken = 'taken' | 'not-acknowledged' | 'not-there';

/** The practice room without its page: three people, two channels, and the very same bot over the stand-in. */
export interface Room {
  readonly store: MessageStore;
  readonly bot: Bot;
  type(typed: Typed): Promise<Taken>;
  press(pressed: Pressed): Promise<Taken>;
  /** What one person sees in one channel, in the order in which it was said. */
  seenBy(person: string, channel: string): readonly StoredMessage[];
}

const origin = 'https://harrowmere.example';

export async function createRoom({ ledger, clock, ids, log }: RoomParts): Promise<Room> {
  const store = new MessageStore(() => clock.now());
  const known = new Set(channels.map(({ id }) => id));
  const standIn = createStandIn({ store, isMember: (channel) => known.has(channel), origin });
  const receiver = new PracticeReceiver();
  const bot = await createBot({
    ledger,
    receivers: [receiver],
    start: (each) => each.start(),
    stop: (each) => each.stop(),
    token: 'xoxb-practice',
    slackApiUrl: `${origin}/api/`,
    fetch: standIn.fetch,
    clock,
    log,
    pace: 0,
    lookUpWaits: [0],
  });
  const seen = (message: StoredMessage, person: string) =>
    message.onlyFor === null || message.onlyFor === person;
  /** Threads hang under what everybody sees. The first message itself may be gone, as after a restart. */
  const isThread = (channel: string, threadTs: string) =>
    store.messages.some(
      (message) =>
        message.channel === channel &&
        message.onlyFor === null &&
        (message.threadTs ?? message.ts) === threadTs,
    );
  return {
    store,
    bot,
    async type({ person, channel, threadTs, line }) {
      if (threadTs === null && !isMention(line)) {
        const acknowledgement = await receiver.deliver(
          commandBody({
            person,
            channel,
            line,
            triggerId: ids.next(),
            responseUrl: standIn.responseUrl({ channel, user: person, messageTs: null }),
          }),
        );
        showAcknowledged(acknowledgement, store, person, channel);
        return taken(acknowledgement);
      }
      if (threadTs !== null && !isThread(channel, threadTs)) return 'not-there';
      const message = store.add({
        channel,
        threadTs,
        user: person,
        text: mentionText(line),
        blocks: [],
        metadata: null,
        onlyFor: null,
      });
      return taken(await receiver.deliver(mentionBody(message, ids.next())));
    },
    async press({ person, messageTs, action }) {
      const message = store.messages.find((each) => each.ts === messageTs && seen(each, person));
      const button = message === undefined ? undefined : buttonIn(message.blocks, action);
      if (message === undefined || button === undefined) return 'not-there';
      return taken(
        await receiver.deliver(
          pressBody({
            person,
            message,
            button,
            triggerId: ids.next(),
            responseUrl: standIn.responseUrl({ channel: message.channel, user: person, messageTs }),
          }),
        ),
      );
    },
    seenBy: (person, channel) =>
      store.messages.filter((message) => message.channel === channel && seen(message, person)),
  };
}

const taken = ({ acknowledged }: Acknowledgement): Taken => (acknowledged ? 'taken' : 'not-acknowledged');

/** A command's acknowledgement may carry a text, which Slack shows to the asker alone. */
function showAcknowledged(
  { body }: Acknowledgement,
  store: MessageStore,
  person: string,
  channel: string,
): void {
  const said = typeof body === 'object' && body !== null && 'text' in body ? body.text : body;
  if (typeof said !== 'string' || said === '') return;
  store.add({
    channel,
    threadTs: null,
    user: botPerson.id,
    text: said,
    blocks: [],
    metadata: null,
    onlyFor: person,
  });
}

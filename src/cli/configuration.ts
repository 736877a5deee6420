import { logLevels } from '../slack/log.ts';
import type { LogLevel } from '../slack/log.ts';

/** How the service runs, out of the environment. */
export interface Configuration {
  readonly mode:
    | { readonly kind: 'practice' }
    | { readonly kind: 'socket'; readonly token: string; readonly appToken: string }
    | { readonly kind: 'http'; readonly token: string; readonly signingSecret: string };
  readonly slackApiUrl: string | null;
  readonly databasePath: string;
  readonly host: string;
  readonly port: number;
  readonly logLevel: LogLevel;
}

export type ConfigurationResult =
  | { readonly ok: true; readonly configuration: Configuration }
  /** Every fault at once, each in a sentence that names its variable. */
  | { readonly ok: false; readonly faults: readonly string[] };

/** The variables that are read; `deploy/.env.example` lists the same. */
export const variables = [
  'SLACK_BOT_TOKEN',
  'SLACK_APP_TOKEN',
  'SLACK_SIGNING_SECRET',
  'SLACK_API_URL',
  'DATABASE_URL',
  'HOST',
  'PORT',
  'LOG_LEVEL',
] as const;
type Variable = (typeof variables)[number];

export const usualPort = 8146;
const usualDatabase = 'sqlite:data/divisor.db';

/** Reads the environment. A variable that is set to nothing counts as not set. */
export function readConfiguration(
  environment: Readonly<Record<string, string | undefined>>,
): ConfigurationResult {
  const faults: string[] = [];
  const read = (name: Variable) => environment[name]?.trim() || null;
  const mode = modeOf(read, faults);
  const slackApiUrl = read('SLACK_API_URL');
  if (slackApiUrl !== null && !allowedAddress(slackApiUrl)) {
    faults.push(
      'SLACK_API_URL must be an https address; plain http is taken on this machine (127.0.0.1) only.',
    );
  }
  const databasePath = databaseOf(read('DATABASE_URL') ?? usualDatabase, faults);
  const port = Number(read('PORT') ?? usualPort);
  if (!Number.isInteger(port) || port < 0 || port > 65_535)
    faults.push('PORT must be a whole number from 0 to 65535.');
  const level = read('LOG_LEVEL') ?? 'info';
  const logLevel = logLevels.find((each) => each === level);
  if (logLevel === undefined) faults.push(`LOG_LEVEL must be one of ${logLevels.join(', ')}.`);
  if (faults.length > 0 || mode === null || databasePath === null || logLevel === undefined)
    return { ok: false, faults };
  return {
    ok: true,
    configuration: { mode, slackApiUrl, databasePath, host: read('HOST') ?? '127.0.0.1', port, logLevel },
  };
}

function modeOf(read: (name: Variable) => string | null, faults: string[]): Configuration['mode'] | null {
  const [token, appToken, signingSecret] = [
    read('SLACK_BOT_TOKEN'),
    read('SLACK_APP_TOKEN'),
    read('SLACK_SIGNING_SECRET'),
  ];
  if (token === null && appToken === null && signingSecret === null) return { kind: 'practice' };
  if (token === null) faults.push('SLACK_BOT_TOKEN is missing: the bot token that begins with xoxb-.');
  else if (!token.startsWith('xoxb-'))
    faults.push('SLACK_BOT_TOKEN must be a bot token: it begins with xoxb-.');
  if (appToken !== null && !appToken.startsWith('xapp-'))
    faults.push('SLACK_APP_TOKEN must be an app-level token: it begins with xapp-.');
  if (appToken === null && signingSecret === null) {
    faults.push(
      'Either SLACK_APP_TOKEN (Socket Mode) or SLACK_SIGNING_SECRET (HTTP) is needed beside SLACK_BOT_TOKEN.',
    );
    return null;
  }
  if (token === null) return null;
  // With both, Socket Mode: its link needs no public address.
  if (appToken !== null) return { kind: 'socket', token, appToken };
  return signingSecret === null ? null : { kind: 'http', token, signingSecret };
}

function databaseOf(url: string, faults: string[]): string | null {
  if (url.startsWith('sqlite:') && url.length > 'sqlite:'.length) return url.slice('sqlite:'.length);
  faults.push(
    'DATABASE_URL must be sqlite: and a path, as in sqlite:data/divisor.db; other databases are not supported yet.',
  );
  return null;
}

/** https anywhere; plain http only to this machine, for a stand-in. */
function allowedAddress(text: string): boolean {
  let url: URL;
  try {
    url = new URL(text);
  } catch {
    return false;
  }
  return (
    url.protocol === 'https:' ||
    (url.protocol === 'http:' && ['127.0.0.1', 'localhost', '[::1]'].includes(url.hostname))
  );
}

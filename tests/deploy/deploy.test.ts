import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { readConfiguration, variables } from '../../src/cli/configuration.ts';

const read = (path: string) => readFileSync(new URL(`../../${path}`, import.meta.url), 'utf8');

interface Manifest {
  readonly display_information: { readonly name: string; readonly description: string };
  readonly features: {
    readonly bot_user: { readonly display_name: string };
    readonly slash_commands: readonly {
      readonly command: string;
      readonly url?: string;
      readonly description: string;
      readonly usage_hint: string;
      readonly should_escape: boolean;
    }[];
  };
  readonly oauth_config: { readonly scopes: { readonly bot: readonly string[] } };
  readonly settings: {
    readonly event_subscriptions: { readonly request_url?: string; readonly bot_events: readonly string[] };
    readonly interactivity: { readonly is_enabled: boolean; readonly request_url?: string };
    readonly socket_mode_enabled: boolean;
    readonly token_rotation_enabled: boolean;
  };
}

describe.each([
  ['deploy/manifest-socket-mode.yaml', true],
  ['deploy/manifest-http.yaml', false],
] as const)('%s', (path, socket) => {
  const manifest = parse(read(path)) as Manifest;

  it('asks for the scopes that the bot uses and no more', () => {
    expect([...manifest.oauth_config.scopes.bot].sort()).toEqual([
      'app_mentions:read',
      'channels:history',
      'chat:write',
      'commands',
      'groups:history',
    ]);
    expect(manifest.settings.event_subscriptions.bot_events).toEqual(['app_mention']);
    expect(manifest.settings.interactivity.is_enabled).toBe(true);
    expect(manifest.settings.token_rotation_enabled).toBe(false);
  });

  it('has the command that the bot listens to, with mentions and links escaped', () => {
    expect(manifest.features.slash_commands).toHaveLength(1);
    expect(manifest.features.slash_commands[0]).toMatchObject({ command: '/divisor', should_escape: true });
    expect(read('src/slack/listeners.ts')).toContain("app.command('/divisor'");
  });

  it('keeps the limits of the manifest: 35, 140, 80, 32, 2,000 and 1,000 characters', () => {
    const [command] = manifest.features.slash_commands;
    expect(manifest.display_information.name.length).toBeLessThanOrEqual(35);
    expect(manifest.display_information.description.length).toBeLessThanOrEqual(140);
    expect(manifest.features.bot_user.display_name.length).toBeLessThanOrEqual(80);
    expect(command?.command.length).toBeLessThanOrEqual(32);
    expect(command?.description.length).toBeLessThanOrEqual(2_000);
    expect(command?.usage_hint.length).toBeLessThanOrEqual(1_000);
  });

  it('has addresses exactly where requests come over HTTP, one for all three', () => {
    expect(manifest.settings.socket_mode_enabled).toBe(socket);
    const addresses = [
      manifest.features.slash_commands[0]?.url,
      manifest.settings.event_subscriptions.request_url,
      manifest.settings.interactivity.request_url,
    ];
    const expected = socket ? undefined : 'https://bot.example.com/slack/events';
    expect(addresses).toEqual([expected, expected, expected]);
  });
});

describe('deploy/.env.example', () => {
  it('lists every variable that is read, and no other', () => {
    const listed = [...read('deploy/.env.example').matchAll(/^([A-Z_]+)=/gm)].map((match) => match[1]);
    expect([...listed].sort()).toEqual([...variables].sort());
  });
});

describe('the configuration', () => {
  const configured = (environment: Record<string, string>) => {
    const result = readConfiguration(environment);
    if (!result.ok) throw new Error(result.faults.join(' '));
    return result.configuration;
  };

  it('without tokens is the practice room on 127.0.0.1:8146 with data/divisor.db', () => {
    expect(configured({})).toEqual({
      mode: { kind: 'practice' },
      slackApiUrl: null,
      databasePath: 'data/divisor.db',
      host: '127.0.0.1',
      port: 8146,
      logLevel: 'info',
    });
  });

  it('knows Socket Mode by its app token and HTTP by its signing secret', () => {
    expect(configured({ SLACK_BOT_TOKEN: 'xoxb-1', SLACK_APP_TOKEN: 'xapp-1' }).mode.kind).toBe('socket');
    expect(configured({ SLACK_BOT_TOKEN: 'xoxb-1', SLACK_SIGNING_SECRET: 's' }).mode.kind).toBe('http');
  });

  it('names every fault at once', () => {
    const result = readConfiguration({
      SLACK_APP_TOKEN: 'wrong',
      PORT: 'x',
      LOG_LEVEL: 'loud',
      DATABASE_URL: 'postgres://x',
      SLACK_API_URL: 'http://slack.example/',
    });
    if (result.ok) throw new Error('it was accepted');
    for (const variable of [
      'SLACK_BOT_TOKEN',
      'SLACK_APP_TOKEN',
      'PORT',
      'LOG_LEVEL',
      'DATABASE_URL',
      'SLACK_API_URL',
    ]) {
      expect(
        result.faults.some((fault) => fault.startsWith(variable)),
        variable,
      ).toBe(true);
    }
  });

  it('takes plain http for the API on this machine only', () => {
    expect(configured({ SLACK_API_URL: 'http://127.0.0.1:9/api/' }).slackApiUrl).toBe(
      'http://127.0.0.1:9/api/',
    );
    expect(readConfiguration({ SLACK_API_URL: 'http://10.0.0.1/api/' }).ok).toBe(false);
    expect(readConfiguration({ SLACK_API_URL: 'https://slack.example/api/' }).ok).toBe(true);
  });
});

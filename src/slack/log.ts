/** Levels of the log, least important first. */
export const logLevels = ['debug', 'info', 'warn', 'error'] as const;
export type LogLevel = (typeof logLevels)[number];

/** A log of one JSON object a line. Fields are facts and ids, never what somebody typed, a token or a bearer address. */
export interface Log {
  write(
    level: LogLevel,
    event: string,
    facts?: Readonly<Record<string, string | number | boolean | null>>,
  ): void;
}

const secrets = /xox[a-z]-[\w-]+|xapp-[\w-]+|https?:\/\/\S+/g;

/** Writes to a stream what is at least as important as `least`; tokens and addresses are struck out wherever they stand. */
export function lineLog(out: { write(text: string): unknown }, least: LogLevel, now: () => number): Log {
  return {
    write(level, event, facts = {}) {
      if (logLevels.indexOf(level) < logLevels.indexOf(least)) return;
      const line = JSON.stringify({ at: new Date(now()).toISOString(), level, event, ...facts });
      out.write(`${line.replace(secrets, '[left out]')}\n`);
    },
  };
}

/** What an error may say in the log: its name, code and message, without its data. */
export function faultOf(error: unknown): { readonly fault: string } {
  if (!(error instanceof Error)) return { fault: String(error) };
  const code = 'code' in error && typeof error.code === 'string' ? ` ${error.code}` : '';
  return { fault: `${error.name}${code}: ${error.message}` };
}

/** A number that no caller may pass: our own mistake, never the user's. `code` names the rule that was broken. */
export class ArgumentError extends RangeError {
  readonly code: string;

  constructor(code: string, message: string) {
    super(message);
    this.name = 'ArgumentError';
    this.code = code;
  }
}

/** Refuses a confidence level outside [0.5, 0.9999], NaN included. */
export function checkLevel(level: number): void {
  if (!(level >= 0.5 && level <= 0.9999)) {
    throw new ArgumentError(
      'level-out-of-range',
      `a confidence level must be within 0.5 and 0.9999, not ${level}`,
    );
  }
}

/** Refuses cases outside [0, total] and totals outside (0, 1e15], NaN included. */
export function checkCases(cases: number, total: number): void {
  if (!(total > 0 && total <= 1e15)) {
    throw new ArgumentError('total-out-of-range', `a total must be above 0 and at most 1e15, not ${total}`);
  }
  if (!(cases >= 0 && cases <= total)) {
    throw new ArgumentError(
      'cases-out-of-range',
      `cases must be within 0 and the total ${total}, not ${cases}`,
    );
  }
}

/** Refuses numbers that are not whole: the exact methods count outcomes one by one. */
export function checkWhole(...values: readonly number[]): void {
  for (const value of values) {
    if (!Number.isSafeInteger(value)) {
      throw new ArgumentError('not-whole', `an exact method needs whole numbers, not ${value}`);
    }
  }
}

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

/** Refuses events below 0 and exposures of 0 or below, NaN and infinities included. */
export function checkExposure(events: number, exposure: number): void {
  if (!(exposure > 0 && exposure < Infinity)) {
    throw new ArgumentError('exposure-out-of-range', `an exposure must be above 0, not ${exposure}`);
  }
  if (!(events >= 0 && events <= 1e15)) {
    throw new ArgumentError('cases-out-of-range', `events must be within 0 and 1e15, not ${events}`);
  }
}

/** Refuses coverages outside (0, 1), NaN included. */
export function checkCoverage(...coverages: readonly number[]): void {
  for (const coverage of coverages) {
    if (!(coverage > 0 && coverage < 1)) {
      throw new ArgumentError(
        'coverage-out-of-range',
        `a coverage must be above 0 and below 1, not ${coverage}`,
      );
    }
  }
}

/** Refuses counts of cases below 0 or above 1e15, NaN included. */
export function checkCaseCounts(...counts: readonly number[]): void {
  for (const cases of counts) {
    if (!(cases >= 0 && cases <= 1e15)) {
      throw new ArgumentError('cases-out-of-range', `cases must be within 0 and 1e15, not ${cases}`);
    }
  }
}

/** What became of one attempt to send a message. */
export type Outcome =
  | { readonly kind: 'sent'; readonly ts: string | null }
  | { readonly kind: 'wait'; readonly milliseconds: number }
  | { readonly kind: 'refused'; readonly code: string }
  /** It may or may not have arrived: look before sending again. */
  | { readonly kind: 'ambiguous'; readonly code: string };

/** Where Slack asks to wait and does not say how long. */
const usualWait = 30_000;

const ambiguousCodes: ReadonlySet<string> = new Set([
  'fatal_error',
  'internal_error',
  'request_timeout',
  'service_unavailable',
]);
const beforeSending: ReadonlySet<string> = new Set(['ECONNREFUSED', 'ENOTFOUND', 'EAI_AGAIN']);

interface SlackFault {
  readonly code?: string;
  readonly retryAfter?: number;
  readonly data?: { readonly error?: string };
  readonly original?: unknown;
  readonly cause?: unknown;
  readonly message?: string;
}

/** Sorts what a single-attempt client threw. Whatever is not known to be a refusal counts as ambiguous. */
export function outcomeOfFault(fault: unknown): Outcome {
  const { code, retryAfter, data, message } = (
    typeof fault === 'object' && fault !== null ? fault : {}
  ) as SlackFault;
  switch (code) {
    case 'slack_webapi_rate_limited_error':
      return { kind: 'wait', milliseconds: (retryAfter ?? usualWait / 1000) * 1000 };
    case 'slack_webapi_platform_error': {
      const reason = data?.error ?? 'unknown';
      if (reason === 'ratelimited') return { kind: 'wait', milliseconds: usualWait };
      return ambiguousCodes.has(reason)
        ? { kind: 'ambiguous', code: reason }
        : { kind: 'refused', code: reason };
    }
    default:
      if (/retry.?after/i.test(message ?? '')) return { kind: 'wait', milliseconds: usualWait };
      return causes(fault).some((each) => beforeSending.has(each))
        ? { kind: 'wait', milliseconds: 2_000 }
        : { kind: 'ambiguous', code: code ?? 'unknown' };
  }
}

/** The system's error codes behind an error, at most a few deep. */
function causes(fault: unknown): readonly string[] {
  const codes: string[] = [];
  let at: unknown = fault;
  for (let depth = 0; depth < 5 && typeof at === 'object' && at !== null; depth += 1) {
    const { code, original, cause } = at as SlackFault;
    if (code !== undefined) codes.push(code);
    at = original ?? cause;
  }
  return codes;
}

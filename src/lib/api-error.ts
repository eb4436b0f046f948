import type { ErrorCode, Problem } from '../contract/errors.ts';

/** `network`: no answer came. `unexpected_answer`: an answer came that this program does not know. */
export type ApiErrorCode = ErrorCode | 'network' | 'unexpected_answer';

interface Details {
  readonly code: ApiErrorCode;
  readonly message: string;
  readonly problems?: readonly Problem[];
  readonly requestId?: string | null;
  readonly retryAfterS?: number | null;
}

/**
 * Thrown by every call of the API client that does not end in its declared answer. A call that its caller aborted
 * throws the browser's AbortError instead.
 */
export class ApiError extends Error {
  override readonly name = 'ApiError';
  readonly code: ApiErrorCode;
  /** Each located fault of the request; empty when the fault is not in it. */
  readonly problems: readonly Problem[];
  /** Names the request in the server's log; null when no answer came. */
  readonly requestId: string | null;
  /** Seconds after which the server asks to be called again; null when it does not say. */
  readonly retryAfterS: number | null;

  constructor(details: Details) {
    super(details.message);
    this.code = details.code;
    this.problems = details.problems ?? [];
    this.requestId = details.requestId ?? null;
    this.retryAfterS = details.retryAfterS ?? null;
  }
}

export function isApiError(error: unknown, code?: ApiErrorCode): error is ApiError {
  return error instanceof ApiError && (code === undefined || error.code === code);
}

/** What to tell a person about anything that was thrown. */
export function errorSentence(error: unknown): string {
  if (!isApiError(error)) return 'Something failed in this page. Load it again; nothing on the server was changed.';
  if (error.code === 'internal' && error.requestId !== null) {
    return `${error.message} If it happens again, tell whoever runs this server the request ${error.requestId}.`;
  }
  return error.message;
}

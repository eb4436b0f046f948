import type { ErrorCode, Problem } from '#contract/errors.ts';

/**
 * An expected failure that the caller is told about, word for word.
 * Anything else that is thrown becomes `internal`, is logged, and tells the caller nothing.
 */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly code: ErrorCode;
  readonly problems: readonly Problem[];
  /** Seconds after which asking again makes sense; sent as Retry-After. */
  readonly retryAfterS: number | null;

  constructor(
    code: ErrorCode,
    message: string,
    problems: readonly Problem[] = [],
    options: { retryAfterS?: number; cause?: unknown } = {},
  ) {
    super(message, options.cause === undefined ? undefined : { cause: options.cause });
    this.code = code;
    this.problems = problems;
    this.retryAfterS = options.retryAfterS ?? null;
  }
}

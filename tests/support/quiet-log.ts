import type { Log } from '../../server/log.ts';

export interface KeptLog extends Log {
  readonly errors: readonly { readonly message: string; readonly fields: Readonly<Record<string, unknown>> }[];
}

/** Keeps what is logged instead of writing it, so that a test can look at it. */
export function keepLog(): KeptLog {
  const errors: { message: string; fields: Readonly<Record<string, unknown>> }[] = [];
  return {
    errors,
    info: () => undefined,
    error: (fields, message) => void errors.push({ message, fields }),
  };
}

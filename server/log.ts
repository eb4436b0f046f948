/** What the server writes about itself: one JSON object a line on standard error, so that standard output stays for people. */
export type LogFields = Readonly<Record<string, unknown>>;

export interface Log {
  info(fields: LogFields, message: string): void;
  error(fields: LogFields, message: string): void;
}

export function jsonLinesLog(write: (line: string) => void, now: () => Date): Log {
  const line = (level: 'info' | 'error') => (fields: LogFields, message: string) =>
    write(`${JSON.stringify({ at: now().toISOString(), level, message, ...fields }, plainErrors)}\n`);
  return { info: line('info'), error: line('error') };
}

/** JSON writes an Error as {}; name, message and stack are what a reader of the log needs. */
function plainErrors(_key: string, value: unknown): unknown {
  if (!(value instanceof Error)) return value;
  const { name, message, stack, cause, ...rest } = value;
  return { name, message, stack, ...(cause === undefined ? {} : { cause }), ...rest };
}

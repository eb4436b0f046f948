/** What the server writes about itself: one JSON object a line on standard error, so that standard output stays for people. */
export type LogFields = Readonly<Record<string, unknown>>;

export interface Log {
  info(fields: LogFields, message: string): void;
  error(fields: LogFields, message: string): void;
}

export function jsonLinesLog(write: (line: string) => void, now: () => Date): Log {
  const line = (level: 'info' | 'error') => (fields: LogFields, message: string) =>
    write(`${JSON.stringify({ at: now().toISOString(), level, message, ...fields }, withoutSecrets)}\n`);
  return { info: line('info'), error: line('error') };
}

/** Fields that hold what opens an account or a store, whatever their case and whatever stands before: sessionSecret, apiToken. */
const SECRET = /(password|secret|token|cookie|authorization|credential|sess|sid|key)$/i;

/** In these a database repeats the row or the values that it refused: passwords' hashes, mails with the keys in them. */
const OF_DATABASE = new Set(['detail', 'where', 'internalQuery', 'parameters', 'bindings', 'dataRow']);

/** JSON writes an Error as {}; name, message and stack are what a reader of the log needs, and nobody's secrets are. */
function withoutSecrets(field: string, value: unknown): unknown {
  if (SECRET.test(field) && value !== null && value !== undefined) return 'withheld';
  if (!(value instanceof Error)) return value;
  const { name, message, stack, cause, ...rest } = value;
  const kept = Object.entries(rest).filter(([key]) => !OF_DATABASE.has(key));
  return { name, message, stack, ...(cause === undefined ? {} : { cause }), ...Object.fromEntries(kept) };
}

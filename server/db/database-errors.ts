/** What PostgreSQL and the way to it may answer, told apart by code and never by wording where there is a code. */

/** SQLSTATE codes: PostgreSQL documentation, appendix A. */
const AWAY_STATES = new Set([
  '53300', // too_many_connections
  '57P01', // admin_shutdown
  '57P02', // crash_shutdown
  '57P03', // cannot_connect_now
]);
const AWAY_SYSTEM_CODES = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  'ENOTFOUND',
  'EHOSTUNREACH',
  'EAI_AGAIN',
]);

/** The driver gives a lost connection no code, only these words. */
const AWAY_WORDS =
  /^(Connection terminated|Client has encountered a connection error|timeout expired|Connection ended unexpectedly)/;

/** True when the statement failed because the database cannot be reached, which may pass by itself. */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if (error.name === 'KnexTimeoutError') return true;
  const code = codeOf(error);
  if (code !== null) return code.startsWith('08') || AWAY_STATES.has(code) || isSystemAway(error, code);
  if (error instanceof AggregateError) return error.errors.some(isDatabaseAway);
  return AWAY_WORDS.test(error.message);
}

/** A broken connection of the driver, not of something else that also talks through a socket. */
function isSystemAway(error: Error, code: string): boolean {
  return AWAY_SYSTEM_CODES.has(code) && 'syscall' in error;
}

export interface BrokenConstraint {
  readonly kind: 'unique' | 'reference' | 'check' | 'missing';
  /** Its name in the migration. */
  readonly constraint: string;
}

const CONSTRAINT_STATES: Readonly<Record<string, BrokenConstraint['kind']>> = {
  '23505': 'unique',
  '23503': 'reference',
  '23514': 'check',
  '23502': 'missing',
};

/** Which constraint a statement broke; null when it failed for another reason. */
export function brokenConstraint(error: unknown): BrokenConstraint | null {
  const code = codeOf(error);
  const kind = code === null ? undefined : CONSTRAINT_STATES[code];
  if (kind === undefined) return null;
  const constraint = error instanceof Error && 'constraint' in error ? error.constraint : undefined;
  return { kind, constraint: typeof constraint === 'string' ? constraint : '' };
}

function codeOf(error: unknown): string | null {
  return error instanceof Error && 'code' in error && typeof error.code === 'string' ? error.code : null;
}

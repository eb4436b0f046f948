import { createHash, randomBytes } from 'node:crypto';

/** How a token begins, so that scanners for secrets and people know one when they see it. */
const PREFIX = 'muslin_';
const RANDOM_BYTES = 32;
const TOKEN = /^muslin_[A-Za-z0-9_-]{43}$/;

/** A new token: 256 random bits, which nobody guesses, so a plain hash is enough to keep. */
export function newToken(): string {
  return `${PREFIX}${randomBytes(RANDOM_BYTES).toString('base64url')}`;
}

/** What is kept of a token; null for a text that is none. */
export function hashOfToken(token: string): string | null {
  return TOKEN.test(token) ? createHash('sha256').update(token).digest('hex') : null;
}

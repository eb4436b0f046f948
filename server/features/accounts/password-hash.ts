import { randomBytes } from 'node:crypto';
import { hash, verify } from '@node-rs/argon2';

/**
 * 19 MiB, two passes, one lane: the first choice of OWASP's password storage cheat sheet (from memory). The package's own
 * algorithm is argon2id; its name stands at the head of every hash, and a test reads it there.
 */
const OPTIONS = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, OPTIONS);
}

export function passwordMatches(passwordHash: string, password: string): Promise<boolean> {
  return verify(passwordHash, password);
}

/** A hash of a password that nobody knows, to spend the time of a comparison on where there is nothing to compare with. */
export function makeDummyHash(): Promise<string> {
  return hashPassword(randomBytes(24).toString('base64url'));
}

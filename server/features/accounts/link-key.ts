import { createHash, randomBytes } from 'node:crypto';

/** A key for a link in a mail: 256 random bits; kept as its hash alone. */
export function newLinkKey(): { key: string; keyHash: string } {
  const key = randomBytes(32).toString('base64url');
  return { key, keyHash: hashOfLinkKey(key) };
}

export function hashOfLinkKey(key: string): string {
  return createHash('sha256').update(key).digest('hex');
}

import { createHash, randomBytes } from 'node:crypto';

/** A key for the link of an invitation: 256 random bits; kept as its hash alone. */
export function newInvitationKey(): { key: string; keyHash: string } {
  const key = randomBytes(32).toString('base64url');
  return { key, keyHash: hashOfInvitationKey(key) };
}

export function hashOfInvitationKey(key: string): string {
  return createHash('sha256').update(key).digest('hex');
}

/**
 * Secrets that the server has to read again stand in the database sealed (AES-256-GCM), under a key that is derived from the secrets of
 * the home: a copy of the database alone opens nobody's second factor.
 */
import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';

const NONCE_BYTES = 12;
const TAG_BYTES = 16;

export function sealSecret(secret: string, [newest]: readonly [string, ...string[]]): string {
  const nonce = randomBytes(NONCE_BYTES);
  const cipher = createCipheriv('aes-256-gcm', keyOf(newest), nonce);
  const sealed = Buffer.concat([cipher.update(secret, 'utf8'), cipher.final()]);
  return Buffer.concat([nonce, cipher.getAuthTag(), sealed]).toString('base64url');
}

/** @returns null when none of the home's secrets opens it */
export function openSecret(sealed: string, secrets: readonly string[]): string | null {
  const bytes = Buffer.from(sealed, 'base64url');
  for (const secret of secrets) {
    const decipher = createDecipheriv('aes-256-gcm', keyOf(secret), bytes.subarray(0, NONCE_BYTES), {
      authTagLength: TAG_BYTES,
    });
    decipher.setAuthTag(bytes.subarray(NONCE_BYTES, NONCE_BYTES + TAG_BYTES));
    try {
      const opened = [decipher.update(bytes.subarray(NONCE_BYTES + TAG_BYTES)), decipher.final()];
      return Buffer.concat(opened).toString('utf8');
    } catch {
      // Sealed under another one of them.
    }
  }
  return null;
}

function keyOf(secret: string): Buffer {
  return Buffer.from(hkdfSync('sha256', secret, '', 'muslin two-factor secrets', 32));
}

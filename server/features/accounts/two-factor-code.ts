/** Codes of an authenticator: TOTP of RFC 6238, six figures, 30 s, SHA-1, as every authenticator reads them. */
import { createHash, randomBytes } from 'node:crypto';
import { generateSecret, generateURI, verifySync } from 'otplib';

const STEP_S = 30;
const RECOVERY_CODES = 10;
/** 32 that are not taken for one another (no i, l, o, u); 16 of them are 80 bits, so a plain hash is enough to keep. */
const RECOVERY_LETTERS = '0123456789abcdefghjkmnpqrstvwxyz';
const RECOVERY_LENGTH = 16;

export function newTwoFactorSecret(): string {
  return generateSecret();
}

/** What an authenticator takes in, as a link or a picture of it. */
export function twoFactorUri({ secret, email }: { secret: string; email: string }): string {
  return generateURI({ issuer: 'Muslin', label: email, secret });
}

/**
 * The time step that a code is of, one before and after now allowed for clocks that differ; null for a code of none.
 * Whoever asks keeps the step, since a code holds once (RFC 6238, section 5.2).
 */
export function stepOfCode(code: string, { secret, at }: { secret: string; at: Date }): number | null {
  const token = withoutBlanks(code);
  if (!/^\d{6}$/.test(token)) return null;
  const answer = verifySync({ secret, token, epoch: Math.floor(at.getTime() / 1000), epochTolerance: STEP_S });
  return answer.valid && 'timeStep' in answer ? answer.timeStep : null;
}

/** Ten codes for the day when the authenticator is lost, each of which opens once. */
export function newRecoveryCodes(): readonly string[] {
  return Array.from({ length: RECOVERY_CODES }, () => {
    const letters = [...randomBytes(RECOVERY_LENGTH)].map((byte) => RECOVERY_LETTERS[byte % 32]);
    return (letters.join('').match(/.{4}/g) ?? []).join('-');
  });
}

export function hashOfRecoveryCode(code: string): string {
  return createHash('sha256').update(withoutBlanks(code).toLowerCase()).digest('hex');
}

function withoutBlanks(code: string): string {
  return code.replace(/[\s-]+/g, '');
}

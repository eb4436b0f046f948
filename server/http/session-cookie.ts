import { createHmac, timingSafeEqual } from 'node:crypto';

export const SESSION_COOKIE = 'muslin_session';

/**
 * The id of the session that a request's cookie names: null without one, or when none of our secrets has signed it. As express-session
 * writes it: `s:`, the id, a point, HMAC-SHA256 of the id in base64 without padding.
 */
export function sessionIdOf(cookies: string | undefined, secrets: readonly string[]): string | null {
  const value = cookieOf(cookies ?? '');
  if (value === null || !value.startsWith('s:')) return null;
  const point = value.lastIndexOf('.');
  const id = value.slice(2, point);
  if (point < 3) return null;
  const signature = Buffer.from(value.slice(point + 1));
  const isOurs = secrets.some((secret) => {
    const wanted = Buffer.from(createHmac('sha256', secret).update(id).digest('base64').replace(/=+$/, ''));
    return wanted.length === signature.length && timingSafeEqual(wanted, signature);
  });
  return isOurs ? id : null;
}

function cookieOf(cookies: string): string | null {
  for (const each of cookies.split(';')) {
    const [name = '', ...value] = each.split('=');
    if (name.trim() !== SESSION_COOKIE) continue;
    try {
      return decodeURIComponent(value.join('=').trim().replace(/^"|"$/g, ''));
    } catch {
      return null;
    }
  }
  return null;
}

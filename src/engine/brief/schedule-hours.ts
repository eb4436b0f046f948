/** Opening and closing in hours of the day, 0 <= opening < closing <= 24. */
export interface OpeningHours {
  readonly opening: number;
  readonly closing: number;
}

/** Reads `8-18`, `0-24` or `daylight`; null when it is none of them. */
export function parseHours(text: string): OpeningHours | 'daylight' | null {
  if (text === 'daylight') return 'daylight';
  const match = /^(\d{1,2})-(\d{1,2})$/.exec(text);
  if (match === null) return null;
  const opening = Number(match[1]);
  const closing = Number(match[2]);
  return opening < closing && closing <= 24 ? { opening, closing } : null;
}

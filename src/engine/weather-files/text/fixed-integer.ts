const SPACE = 0x20;
const PLUS = 0x2b;
const MINUS = 0x2d;
const ZERO = 0x30;
const NINE = 0x39;

/**
 * The whole number in a field of fixed width, blanks before and after ignored, sign optional; NaN for anything else, a blank
 * field too.
 */
export function fixedInteger(bytes: Uint8Array, start: number, end: number): number {
  let from = start;
  let to = Math.min(end, bytes.length);
  while (from < to && bytes[from] === SPACE) from++;
  while (to > from && bytes[to - 1] === SPACE) to--;
  const negative = bytes[from] === MINUS;
  if (from < to && (negative || bytes[from] === PLUS)) from++;
  if (from >= to) return Number.NaN;
  let value = 0;
  for (let at = from; at < to; at++) {
    const byte = bytes[at] ?? 0;
    if (byte < ZERO || byte > NINE) return Number.NaN;
    value = value * 10 + (byte - ZERO);
  }
  return negative ? -value : value;
}

import { type DecodedText, textBetween } from './decode-text.ts';

const SPACE = 0x20;
const TAB = 0x09;
const PLUS = 0x2b;
const MINUS = 0x2d;
const POINT = 0x2e;
const ZERO = 0x30;
const NINE = 0x39;

/** As many digits as a double holds exactly, so that one division gives the nearest number. */
const EXACT_DIGITS = 15;
/** Powers of ten that a double holds exactly; several times faster than raising ten to a power. */
const POWERS_OF_TEN = [1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15];
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const LONGEST = 40;

/** What a field holds when it is not a number. */
export const BLANK = 'blank';
export const NOT_A_NUMBER = 'not a number';

/**
 * The number in a field, blanks around it ignored; `BLANK` when nothing stands there.
 * Decimal point, optional sign and exponent; nothing else.
 */
export function numberField(
  text: DecodedText,
  start: number,
  end: number,
): number | typeof BLANK | typeof NOT_A_NUMBER {
  const { bytes } = text;
  let from = start;
  let to = end;
  while (from < to && (bytes[from] === SPACE || bytes[from] === TAB)) from++;
  while (to > from && (bytes[to - 1] === SPACE || bytes[to - 1] === TAB)) to--;
  if (from === to) return BLANK;
  const negative = bytes[from] === MINUS;
  let at = negative || bytes[from] === PLUS ? from + 1 : from;
  let digits = 0;
  let decimals = -1;
  let mantissa = 0;
  for (; at < to; at++) {
    const byte = bytes[at] ?? 0;
    if (byte >= ZERO && byte <= NINE) {
      mantissa = mantissa * 10 + (byte - ZERO);
      digits++;
      if (decimals >= 0) decimals++;
    } else if (byte === POINT && decimals < 0) decimals = 0;
    else break;
  }
  if (at < to || digits === 0 || digits > EXACT_DIGITS) return uncommonNumber(text, from, to);
  const value = decimals > 0 ? mantissa / (POWERS_OF_TEN[decimals] ?? 1) : mantissa;
  return negative ? -value : value;
}

function uncommonNumber(text: DecodedText, from: number, to: number): number | typeof NOT_A_NUMBER {
  const first = text.bytes[from] ?? 0;
  if (to - from > LONGEST || first > NINE || first < PLUS) return NOT_A_NUMBER;
  const word = textBetween(text, from, to);
  const value = NUMBER.test(word) ? Number(word) : Number.NaN;
  return Number.isFinite(value) ? value : NOT_A_NUMBER;
}

/** A field as a message shows it: printable, short, in quotation marks. */
export function quoted(field: string): string {
  const shown = field.trim().replace(/\p{C}/gu, '?');
  return shown.length > 24 ? `“${shown.slice(0, 24)}…”` : `“${shown}”`;
}

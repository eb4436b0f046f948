/** A latitude or longitude as people write it: decimal or in degrees, minutes and seconds, signed or with a letter. */

export type Axis = 'latitude' | 'longitude';

export interface Angle {
  /** Degrees, north and east positive. */
  readonly degrees: number;
  /** What its letter says; null without one. */
  readonly axis: Axis | null;
}

export type AngleReading = { readonly angle: Angle } | { readonly fault: string };

/** Degrees of the pole and of the date line. */
export const MOST_DEGREES: Readonly<Record<Axis, number>> = { latitude: 90, longitude: 180 };

const LETTERS: Readonly<Record<string, { axis: Axis; sign: 1 | -1 }>> = {
  N: { axis: 'latitude', sign: 1 },
  S: { axis: 'latitude', sign: -1 },
  E: { axis: 'longitude', sign: 1 },
  W: { axis: 'longitude', sign: -1 },
};

const NUMBER = '\\d+(?:\\.\\d*)?|\\.\\d+';
const PARTS = new RegExp(`^(${NUMBER})\\s*[°:]?\\s*(?:(${NUMBER})\\s*[':]?\\s*(?:(${NUMBER})\\s*"?)?)?$`);

/**
 * Signs that look alike made one: every dash a minus, every prime an apostrophe, words and letters of the units as signs,
 * names of the compass points as letters.
 */
export function plainAngles(text: string): string {
  return (
    text
      .replace(/[\u2212\u2010-\u2015]/g, '-')
      .replace(/[\u2019\u2018\u2032\u00b4`]/g, "'")
      .replace(/[\u2033\u201c\u201d]|''/g, '"')
      .replace(/[\u00ba\u02da]/g, '°')
      .replace(/\s+/g, ' ')
      .trim()
      .toUpperCase()
      .replace(/\b(NORTH|SOUTH|EAST|WEST)\b/g, (word) => word.charAt(0))
      .replace(/(\d)\s*D(?:EG(?:REES?)?)?\b\.?|(\d)\s*D(?=[\d\s])/g, (_all, one, other) => `${one ?? other}°`)
      .replace(/(\d)\s*M(?:IN(?:UTES?)?)?\b\.?|(\d)\s*M(?=[\d\s])/g, (_all, one, other) => `${one ?? other}'`)
      .replace(/(\d)\s*SEC(?:ONDS?)?\b\.?/g, '$1"')
      // An S behind minutes and before another letter is of seconds.
      .replace(/('\s*[\d.,]+)\s*S(?=\s*[NSEW])/g, '$1"')
  );
}

/**
 * Reads one angle: `33.45`, `-33,45`, `33.45 S`, `S 33°27'12"`, `33 27 12 S`, `33:27.2`.
 * @param text a comma in it is a decimal comma
 * @param expected which of the two it has to be, where that is known: a letter of the other is a fault, and so is a value
 * beyond the pole or the date line
 * @returns the angle in degrees, or in a sentence why it is none
 */
export function readAngle(text: string, expected: Axis | null = null): AngleReading {
  const written = text.trim();
  const { letters, rest } = splitLetters(plainAngles(text).replaceAll(',', '.'));
  if (letters.length > 1) return { fault: `“${written}” names more than one point of the compass.` };
  const letter = letters[0] === undefined ? null : (LETTERS[letters[0]] ?? null);
  const signed = /^([+-]?)\s*(.*)$/.exec(rest);
  const sign = signed?.[1] ?? '';
  const size = sizeOf(signed?.[2] ?? '', written);
  if (typeof size !== 'number') return size;
  if (letter !== null && sign !== '') return { fault: `“${written}” has both a sign and a letter; write one of them.` };
  const axis = letter?.axis ?? null;
  if (expected !== null && axis !== null && axis !== expected) {
    return { fault: `“${written}” is a ${axis}; a ${expected} is asked for here.` };
  }
  const degrees = size === 0 ? 0 : size * (letter?.sign ?? (sign === '-' ? -1 : 1));
  const known = axis ?? expected;
  return (known === null ? null : beyond(degrees, known)) ?? { angle: { degrees, axis } };
}

/** The fault of an angle beyond its end; null within. */
export function beyond(degrees: number, axis: Axis): { readonly fault: string } | null {
  const most = MOST_DEGREES[axis];
  if (Math.abs(degrees) <= most) return null;
  return { fault: `A ${axis} lies between -${most} and ${most} degrees, and this is ${degrees}.` };
}

function splitLetters(text: string): { letters: string[]; rest: string } {
  const letters = text.match(/[NSEW]/g) ?? [];
  const rest = text.replace(/^[NSEW]\s*|\s*[NSEW]$/g, '').trim();
  return { letters, rest };
}

/** Degrees without sign. */
function sizeOf(text: string, written: string): number | { readonly fault: string } {
  const parts = PARTS.exec(text);
  if (parts === null) return { fault: `“${written}” is not an angle; write 33.45 or 33°27'12" S.` };
  const given = parts.slice(1).flatMap((part) => (part === undefined ? [] : [part]));
  if (given.slice(0, -1).some((part) => part.includes('.'))) {
    return { fault: `“${written}”: only the last of degrees, minutes and seconds may have decimals.` };
  }
  const [degrees = 0, minutes = 0, seconds = 0] = given.map(Number);
  if (minutes >= 60 || seconds >= 60) return { fault: `“${written}”: minutes and seconds are less than 60.` };
  return degrees + minutes / 60 + seconds / 3600;
}

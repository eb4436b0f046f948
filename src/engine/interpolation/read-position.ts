/** A position in any usual form, out of the one box that also takes names of places. */
import type { Position } from './great-circle-km.ts';
import { type Angle, beyond, MOST_DEGREES, plainAngles, readAngle } from './read-angle.ts';

export type PositionReading =
  | { readonly kind: 'position'; readonly position: Position }
  /** Meant as a position and none. `swapped`: what it is with its two angles the other way round, where that would do. */
  | { readonly kind: 'fault'; readonly problem: string; readonly swapped: Position | null }
  /** Words, such as the name of a place. */
  | { readonly kind: 'words' };

/** Point of well-known text: longitude comes first in it (OGC 06-103r4). */
const WELL_KNOWN_TEXT = /^POINT\s*(?:Z\s*)?\(\s*([+-]?[\d.]+)\s+([+-]?[\d.]+)(?:\s+[+-]?[\d.]+)?\s*\)$/;
/** ISO 6709 annex H, without separators: degrees, degrees and minutes, or with seconds, by the count of digits. */
const ISO_6709 =
  /^([+-])(\d{2}|\d{4}|\d{6})(\.\d+)?([+-])(\d{3}|\d{5}|\d{7})(\.\d+)?(?:[+-]\d+(?:\.\d+)?)?(?:CRS[\w-]*)?\/?$/;

/**
 * Reads a position: decimal degrees, degrees with minutes and seconds, letters of the compass before or behind or a sign,
 * point or comma as decimal mark, latitude first unless letters or labels say otherwise; `geo:` (RFC 5870), ISO 6709 and a
 * point of well-known text too.
 * @returns a fault, never a guess, where latitude and longitude seem swapped; `words` for what was not meant as a position
 */
export function readPosition(text: string): PositionReading {
  const plain = plainAngles(text);
  const wellKnown = WELL_KNOWN_TEXT.exec(plain);
  if (wellKnown !== null) return ofParts(wellKnown[2] ?? '', wellKnown[1] ?? '');
  const iso = ISO_6709.exec(plain.replaceAll(' ', ''));
  if (iso !== null) return ofParts(isoAngle(iso.slice(1, 4)), isoAngle(iso.slice(4, 7)));
  const labelled = withoutLabels(plain);
  if (/[^NSEWO\d\s.,;:/|°'"+-]/.test(labelled)) return { kind: 'words' };
  if ((labelled.match(/\d+/g)?.length ?? 0) < 2) return { kind: 'words' };
  if (labelled.includes('O')) {
    return fault('The letter O stands for east in some languages and for west in others; write E or W.');
  }
  const parts = splitInTwo(decimalPoints(labelled));
  if (parts === null) return fault('Write latitude and longitude with a comma between, as in -24.65, 25.91.');
  return ofParts(parts[0], parts[1]);
}

function fault(problem: string, swapped: Position | null = null): PositionReading {
  return { kind: 'fault', problem, swapped };
}

/** Labels are written as letters behind a value are: `LAT 5` says which of the two it is, so do `geo:` and brackets not. */
function withoutLabels(text: string): string {
  const bare = text
    .replace(/^GEO:/, '')
    .replace(/;(?:CRS|U)=.*$/, '')
    .replace(/[()[\]]/g, ' ');
  const latitude = /\bLAT(?:ITUDE)?\b\.?\s*[:=]?/;
  const longitude = /\bLO?NG?(?:ITUDE)?\b\.?\s*[:=]?/;
  const [latitudeAt, longitudeAt] = [bare.search(latitude), bare.search(longitude)];
  if (latitudeAt < 0 || longitudeAt < 0) return bare.trim();
  const [first, second] = latitudeAt < longitudeAt ? [latitude, longitude] : [longitude, latitude];
  const start = bare.replace(first, ' ');
  const cut = start.search(second);
  const [one, other] = [start.slice(0, cut), start.slice(cut).replace(second, ' ')].map((each) =>
    each.replace(/^[\s,;]+|[\s,;]+$/g, ''),
  );
  return latitudeAt < longitudeAt ? `${one}; ${other}` : `${other}; ${one}`;
}

/**
 * Commas between digits are decimal marks where nothing has a point and there are more of them than one separator, and a
 * separator remains beside them.
 */
function decimalPoints(text: string): string {
  if (text.includes('.')) return text;
  const tight = text.match(/\d,(?=\d)/g)?.length ?? 0;
  const groups = text.match(/\d+/g)?.length ?? 0;
  if (tight === 0 || groups === 2) return text;
  // 33,45,18,2: the middle one is the separator.
  if (tight === 3 && groups === 4) return text.replace(/^(\D*\d+),(\d+),(\D*\d+),(\d+)/, '$1.$2;$3.$4');
  return text.replace(/(\d),(?=\d)/g, '$1.');
}

/** Where the first angle ends: at a separator, beside a letter, before the second degree sign or sign, else in the middle. */
function splitInTwo(text: string): readonly [string, string] | null {
  const bySeparator = text.split(/[,;/|]/).map((part) => part.trim());
  if (bySeparator.length === 2) return pair(bySeparator);
  if (bySeparator.length > 2) return null;
  const letterBehind = /^([^NSEW]*\d[^NSEW]*[NSEW])\s*([^NSEW]+[NSEW])$/.exec(text);
  if (letterBehind !== null) return pair(letterBehind.slice(1));
  const letterBefore = /^([NSEW][^NSEW]+)([NSEW][^NSEW]+)$/.exec(text);
  if (letterBefore !== null) return pair(letterBefore.slice(1));
  const degreeSigns = /^([^°]+°[^°]*?)\s+([+-]?\s*[\d.]+\s*°[^°]*)$/.exec(text);
  if (degreeSigns !== null) return pair(degreeSigns.slice(1));
  const signs = /^(.*\d[^+-]*)([+-].*)$/.exec(text);
  if (signs !== null) return pair(signs.slice(1));
  const words = text.split(' ');
  if (words.length % 2 === 1 || words.length > 6) return null;
  return pair([words.slice(0, words.length / 2).join(' '), words.slice(words.length / 2).join(' ')]);
}

function pair(parts: readonly string[]): readonly [string, string] | null {
  const [one, other] = parts.map((part) => part.trim());
  return one && other ? [one, other] : null;
}

function ofParts(first: string, second: string): PositionReading {
  const [one, other] = [readAngle(first), readAngle(second)];
  if ('fault' in one) return fault(one.fault);
  if ('fault' in other) return fault(other.fault);
  return ofAngles(one.angle, other.angle);
}

function ofAngles(one: Angle, other: Angle): PositionReading {
  if (one.axis !== null && one.axis === other.axis) return fault(`Both angles are of ${one.axis}.`);
  // A letter on one of them settles both; without any, latitude comes first.
  const turned = one.axis === 'longitude' || other.axis === 'latitude';
  const [latitude, longitude] = turned ? [other.degrees, one.degrees] : [one.degrees, other.degrees];
  const wrong = beyond(latitude, 'latitude') ?? beyond(longitude, 'longitude');
  if (wrong === null) return { kind: 'position', position: { latitude, longitude } };
  const unlettered = one.axis === null && other.axis === null;
  const mayBeSwapped = unlettered && Math.abs(longitude) <= MOST_DEGREES.latitude;
  if (!mayBeSwapped) return fault(wrong.fault);
  return fault(`${wrong.fault} Latitude comes first; are the two swapped?`, {
    latitude: longitude,
    longitude: latitude,
  });
}

/** `+3327.5`: sign, digits and decimals to degrees, since its digits run together. */
function isoAngle([sign = '', digits = '', decimals = '']: readonly string[]): string {
  const degreeDigits = digits.length % 2 === 0 ? 2 : 3;
  const parts = [digits.slice(0, degreeDigits), ...(digits.slice(degreeDigits).match(/\d{2}/g) ?? [])];
  return `${sign}${parts.join(' ')}${decimals}`;
}

/** One row of a table of sites: the same reading in the browser, for the preview, and on the server, before anything is stored. */

import { withoutGuard } from '../csv-cell.ts';
import { readAngle } from '../interpolation/read-angle.ts';
import { readPosition } from '../interpolation/read-position.ts';
import type { SiteCells, SiteColumn } from './site-columns.ts';

export interface SiteOfRow {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  /** null takes the height of the relief. */
  readonly elevationM: number | null;
  readonly designLoadKw: number | null;
  /** Name of the station that was chosen, with the reason; null for the default. */
  readonly stationName: string | null;
  readonly stationReason: string | null;
  readonly notes: string;
}

export interface RowFault {
  readonly column: SiteColumn;
  readonly message: string;
}

const MOST_CHARACTERS = [
  ['name', 200],
  ['reason', 500],
  ['notes', 5000],
] as const;
/** Decimal degrees with a point, in which most tables are written: no need to look for letters and minutes in them. */
const PLAIN_DEGREES = /^-?\d{1,2}(?:\.\d+)?$/;
const UNITS = { m: /\s*m\.?$/i, kW: /\s*kW\.?$/i } as const;

/**
 * Reads a row with every fault that it has.
 * @returns no site when there is a fault
 */
export function readSiteRow(cells: SiteCells): { site: SiteOfRow | null; faults: readonly RowFault[] } {
  const faults: RowFault[] = [];
  const tell = (column: SiteColumn, message: string): null => {
    faults.push({ column, message });
    return null;
  };
  const text = (column: SiteColumn): string => textOf(cells[column] ?? '');
  for (const [column, most] of MOST_CHARACTERS) {
    const { length } = text(column);
    if (length > most) tell(column, `This has ${length} characters; use ${most} or fewer.`);
  }
  if (text('name') === '') tell('name', 'The site has no name.');
  const position = positionOf(text, tell);
  const isRelief = /^(about|relief|approx)/i.test(text('elevation source'));
  const elevationM = isRelief
    ? null
    : figureOf(text('elevation'), { column: 'elevation', unit: 'm', from: -500, to: 9000 }, tell);
  const designLoadKw = figureOf(text('load'), { column: 'load', unit: 'kW', from: 0, to: 1_000_000 }, tell);
  if (designLoadKw === 0) tell('load', 'Give more than 0 kW, or leave it empty.');
  if (faults.length > 0 || position === null) return { site: null, faults };
  const site = {
    ...{ name: text('name'), ...position, elevationM, designLoadKw, notes: text('notes') },
    stationName: text('station') || null,
    stationReason: (text('station') && text('reason')) || null,
  };
  return { site, faults };
}

type Tell = (column: SiteColumn, message: string) => null;

function positionOf(text: (column: SiteColumn) => string, tell: Tell): { latitude: number; longitude: number } | null {
  const [latitude, longitude, whole] = [text('latitude'), text('longitude'), text('position')];
  if (latitude === '' && longitude === '' && whole !== '') {
    const read = readPosition(whole);
    if (read.kind === 'position') return read.position;
    return tell('position', read.kind === 'fault' ? read.problem : `“${shortened(whole)}” is not a position.`);
  }
  const north = angleOf(latitude, { axis: 'latitude', other: longitude }, tell);
  const east = angleOf(longitude, { axis: 'longitude' }, tell);
  return north === null || east === null ? null : { latitude: north, longitude: east };
}

function angleOf(
  written: string,
  { axis, other = '' }: { axis: 'latitude' | 'longitude'; other?: string },
  tell: Tell,
): number | null {
  if (written === '') return tell(axis, `The ${axis} is missing.`);
  // "-0" is the equator as much as "0".
  const plain = PLAIN_DEGREES.test(written) ? Number(written) + 0 : Number.NaN;
  if (Math.abs(plain) <= 90) return plain;
  const read = readAngle(written, axis);
  if (!('fault' in read)) return read.angle.degrees;
  const mayBeSwapped = isAngle(written, 'longitude') && isAngle(other, 'latitude');
  return tell(axis, `${read.fault}${mayBeSwapped ? ' Are latitude and longitude swapped?' : ''}`);
}

function isAngle(written: string, axis: 'latitude' | 'longitude'): boolean {
  return written !== '' && !('fault' in readAngle(written, axis));
}

/** A number with at most its unit behind it; null when the cell is empty, or when what it says has been told as a fault. */
function figureOf(
  written: string,
  asked: { column: SiteColumn; unit: keyof typeof UNITS; from: number; to: number },
  tell: Tell,
): number | null {
  if (written === '') return null;
  const { column, unit, from, to } = asked;
  const plain = written
    .replace('−', '-')
    .replace(UNITS[unit], '')
    .replace(/(\d)\s(?=\d{3}\b)/g, '$1');
  if (/^[+-]?\d{1,3}(,\d{3})+$/.test(plain))
    return tell(
      column,
      `“${shortened(written)}” can be read in two ways: write it without the comma, or with a point.`,
    );
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(plain)) return tell(column, `“${shortened(written)}” is not a number.`);
  const value = Number(plain.replace(',', '.'));
  if (value >= from && value <= to) return value;
  return tell(column, `${value} ${unit} does not lie between ${from} and ${to} ${unit}.`);
}

/** Without the guard of an exported cell, control characters and spaces at the ends. */
function textOf(cell: string): string {
  if (cell === '') return '';
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out; new lines and tabs become spaces below.
  const plain = cell.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/g, '').trim();
  return withoutGuard(plain);
}

function shortened(written: string): string {
  return written.length > 40 ? `${written.slice(0, 39)}…` : written;
}

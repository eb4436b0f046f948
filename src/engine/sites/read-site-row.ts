/** One row of a table of sites: the same reading in the browser, for the preview, and on the server, before anything is stored. */
import { readAngle } from '../interpolation/read-angle.ts';
import { readPosition } from '../interpolation/read-position.ts';
import type { SiteCells, SiteColumn } from './site-columns.ts';
import { withoutGuard } from './spreadsheet-guard.ts';

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

const MOST_CHARACTERS: Readonly<Partial<Record<SiteColumn, number>>> = { name: 200, reason: 500, notes: 5000 };

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
  for (const [column, most] of [
    ['name', MOST_CHARACTERS.name ?? 0],
    ['reason', 500],
    ['notes', 5000],
  ] as const)
    if (text(column).length > most) tell(column, `This has ${text(column).length} characters; use ${most} or fewer.`);
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
  const mayBeSwapped = isAngle(latitude, 'longitude') && isAngle(longitude, 'latitude');
  const hint = mayBeSwapped ? ' Are latitude and longitude swapped?' : '';
  const north = angleOf(latitude, { axis: 'latitude', hint }, tell);
  const east = angleOf(longitude, { axis: 'longitude' }, tell);
  return north === null || east === null ? null : { latitude: north, longitude: east };
}

function angleOf(
  written: string,
  { axis, hint = '' }: { axis: 'latitude' | 'longitude'; hint?: string },
  tell: Tell,
): number | null {
  if (written === '') return tell(axis, `The ${axis} is missing.`);
  const read = readAngle(written, axis);
  return 'fault' in read ? tell(axis, `${read.fault}${hint}`) : read.angle.degrees;
}

function isAngle(written: string, axis: 'latitude' | 'longitude'): boolean {
  return written !== '' && !('fault' in readAngle(written, axis));
}

/** A number with at most its unit behind it; null when the cell is empty, or when what it says has been told as a fault. */
function figureOf(
  written: string,
  asked: { column: SiteColumn; unit: string; from: number; to: number },
  tell: Tell,
): number | null {
  if (written === '') return null;
  const { column, unit, from, to } = asked;
  const plain = written
    .replace('−', '-')
    .replace(new RegExp(`\\s*${unit}\\.?$`, 'i'), '')
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
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out; new lines and tabs become spaces below.
  const plain = cell.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/g, '').trim();
  return withoutGuard(plain);
}

function shortened(written: string): string {
  return written.length > 40 ? `${written.slice(0, 39)}…` : written;
}

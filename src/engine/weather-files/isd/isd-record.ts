/**
 * One record of the integrated surface data: a control section of 60 bytes, mandatory values to byte 105, then groups of any
 * number (Federal Climate Complex Data Documentation). Positions here are counted from 0.
 */
import { fixedInteger } from '../text/fixed-integer.ts';
import type { LineCursor } from '../text/line-cursor.ts';

export const SHORTEST_RECORD = 105;
const MISSING_TEMPERATURE = 9999;
const MISSING_PRESSURE = 99_999;
const MISSING_LATITUDE = 99_999;
const MISSING_LONGITUDE = 999_999;
const MISSING_ELEVATION = 9999;
const GROUPS_AT = 105;
const GROUP_ID = 3;
/** Altimeter setting, its code, station pressure, its code. */
const PRESSURE_GROUP = /^(\d{5})(\w)(\d{5})(\w)$/;
const PRESSURE_GROUP_LENGTH = 12;

/** Whether a line looks like a record: digits to byte 27, signs before latitude and longitude. */
export const ISD_RECORD = /^\d{4}[\dA-Z]{6}\d{17}.[+-]\d{5}[+-]\d{6}/;

export interface IsdRecord {
  readonly usaf: string;
  readonly wban: string;
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  /** null where the record does not know it. */
  readonly latitude: number | null;
  readonly longitude: number | null;
  readonly elevationM: number | null;
  readonly type: string;
  /** NaN where missing. */
  readonly dryBulbC: number;
  readonly dryBulbCode: string;
  readonly dewPointC: number;
  readonly dewPointCode: string;
  readonly seaLevelPressurePa: number;
  readonly seaLevelCode: string;
  readonly stationPressurePa: number;
  readonly stationCode: string;
}

/** The record on the present line, which has at least `SHORTEST_RECORD` bytes; NaN where a field is no whole number. */
export function isdRecord(cursor: LineCursor): IsdRecord {
  const { bytes } = cursor.text;
  const { start } = cursor;
  const number = (from: number, to: number) => fixedInteger(bytes, start + from, start + to);
  const letters = (from: number, to: number) => String.fromCharCode(...bytes.subarray(start + from, start + to));
  const station = stationPressure(cursor);
  return {
    usaf: letters(4, 10),
    wban: letters(10, 15),
    year: number(15, 19),
    month: number(19, 21),
    day: number(21, 23),
    hour: number(23, 25),
    minute: number(25, 27),
    latitude: scaled(number(28, 34), MISSING_LATITUDE, 1000),
    longitude: scaled(number(34, 41), MISSING_LONGITUDE, 1000),
    elevationM: scaled(number(46, 51), MISSING_ELEVATION, 1),
    type: letters(41, 46).trim(),
    dryBulbC: value(number(87, 92), MISSING_TEMPERATURE, 0.1),
    dryBulbCode: letters(92, 93),
    dewPointC: value(number(93, 98), MISSING_TEMPERATURE, 0.1),
    dewPointCode: letters(98, 99),
    seaLevelPressurePa: value(number(99, 104), MISSING_PRESSURE, 10),
    seaLevelCode: letters(104, 105),
    stationPressurePa: station.pressurePa,
    stationCode: station.code,
  };
}

function scaled(number: number, missing: number, by: number): number | null {
  return Number.isNaN(number) || number === missing ? null : number / by;
}

function value(number: number, missing: number, unit: number): number {
  if (number === missing) return Number.NaN;
  return unit < 1 ? number / 10 : number * unit;
}

/** Station pressure of the group MA1, which stands before the remarks; remarks may hold any text. */
function stationPressure(cursor: LineCursor): { pressurePa: number; code: string } {
  const { bytes } = cursor.text;
  const last = cursor.end - GROUP_ID - PRESSURE_GROUP_LENGTH;
  for (let at = cursor.start + GROUPS_AT; at <= last; at++) {
    if (isWord(bytes, at, 'REM')) break;
    if (!isWord(bytes, at, 'MA1')) continue;
    const from = at + GROUP_ID;
    const group = PRESSURE_GROUP.exec(String.fromCharCode(...bytes.subarray(from, from + PRESSURE_GROUP_LENGTH)));
    if (group === null) continue;
    return { pressurePa: value(Number(group[3]), MISSING_PRESSURE, 10), code: group[4] ?? '' };
  }
  return { pressurePa: Number.NaN, code: '' };
}

function isWord(bytes: Uint8Array, at: number, word: string): boolean {
  for (let index = 0; index < word.length; index++) if (bytes[at + index] !== word.charCodeAt(index)) return false;
  return true;
}

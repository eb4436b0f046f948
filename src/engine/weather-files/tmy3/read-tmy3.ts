/**
 * TMY3: a line of the station, a line of column names, then an hour a line, local standard time, end of the hour. (Facts from
 * files of the series and of its look-alikes; the manual is NREL/TP-581-43156.)
 */
import { assembleYear } from '../assembly/assemble-year.ts';
import type { FindingList } from '../finding-list.ts';
import { withStatedPlace } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { findSeparatedFields, type SeparatedFields, separatedFields, separatedText } from '../text/separated-fields.ts';
import type { DeclaredStation, WeatherFileReading } from '../weather-file-reading.ts';
import { readTmy3Columns } from './tmy3-columns.ts';
import { readTmy3Rows } from './tmy3-rows.ts';

const COMMA = 0x2c;
const MOST_COLUMNS = 120;
const NO_NUMBER = /^(-*|unknown|n\/?a|0+|9{5,6})$/i;
const LIMITS = { latitude: 180, longitude: 360, lowestM: -500, highestM: 9_000, westH: -12, eastH: 14 } as const;

export function readTmy3(
  text: DecodedText,
  options: ReadOptions,
  findings: FindingList,
): readonly WeatherFileReading[] {
  const cursor = new LineCursor(text);
  const fields = separatedFields(MOST_COLUMNS);
  cursor.next();
  findSeparatedFields(cursor, COMMA, fields);
  const station = withStatedPlace(readStation(cursor, fields), options.place);
  const stationLine = cursor.line;
  cursor.next();
  findSeparatedFields(cursor, COMMA, fields);
  const columns = readTmy3Columns(cursor, fields, findings);
  if (findings.refused) {
    return [{ status: 'refused', part: '', format: 'TMY3', station, findings: findings.inOrder() }];
  }
  const { flagsInformative, rows } = readTmy3Rows(cursor, { columns, fields }, findings);
  const reading = assembleYear(
    {
      format: 'TMY3',
      part: '',
      station,
      stationLine,
      rows,
      stepsPerHour: 1,
      yearFrom: 'typical',
      cutByUtc: false,
      periods: [],
      leapYearObserved: null,
      sourceFlagsInformative: flagsInformative,
      published: null,
      comments: null,
    },
    findings,
    options,
  );
  return [reading];
}

/** Station number, name, state, time zone (h), latitude, longitude, elevation (m); look-alikes have more fields. */
function readStation(cursor: LineCursor, fields: SeparatedFields): DeclaredStation {
  const word = (index: number) => separatedText(cursor, fields, index).replace(/\p{C}/gu, '').trim();
  const number = (index: number, low: number, high: number) => {
    const text = word(index);
    const value = text === '' ? Number.NaN : Number(text);
    return value >= low && value <= high ? value : null;
  };
  const wmo = word(0);
  return {
    name: word(1) || 'Unnamed station',
    latitude: number(4, -LIMITS.latitude, LIMITS.latitude),
    longitude: number(5, -LIMITS.longitude, LIMITS.longitude),
    elevationM: number(6, LIMITS.lowestM, LIMITS.highestM),
    utcOffsetH: number(3, LIMITS.westH, LIMITS.eastH),
    wmoNumber: NO_NUMBER.test(wmo) ? null : wmo,
  };
}

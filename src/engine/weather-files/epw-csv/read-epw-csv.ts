/**
 * The spreadsheet form of an EPW: a line of titles over each header record, then rows of `Date,HH:MM` with their units in the
 * titles, dates in the style of the machine that wrote them, hours 01:00 to 24:00.
 */
import type { FindingList } from '../finding-list.ts';
import type { ReadOptions } from '../read-options.ts';
import { guessTable } from '../table/guess-table.ts';
import { readTable } from '../table/read-table.ts';
import type { TableLayout } from '../table/table-layout.ts';
import type { TableMapping } from '../table/table-mapping.ts';
import type { DecodedText } from '../text/decode-text.ts';
import type { WeatherFileReading } from '../weather-file-reading.ts';

const FIRST_LINE = /^\s*"?Location Title\b/i;
const WMO_NUMBER = /WMO#?(\d{5,6})/i;

/** Whether a file begins as this form does, and its table with the columns of this form. */
export function isEpwCsv(firstLine: string, { names }: TableLayout): boolean {
  return FIRST_LINE.test(firstLine) && names[0]?.toLowerCase() === 'date' && names[1]?.toUpperCase() === 'HH:MM';
}

/** Its titles say what a table must be asked for; months of a typical year come from several. */
export function readEpwCsv(
  text: DecodedText,
  file: { readonly layout: TableLayout; readonly options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const { layout, options } = file;
  const { mapping } = guessTable(text, layout);
  const known = mapping === null ? {} : { mapping: asFormatSays(mapping) };
  return readTable(text, { layout, options: { ...known, ...options } }, findings).map(asEpw);
}

function asFormatSays(mapping: TableMapping): TableMapping {
  return { ...mapping, years: 'typical', time: { ...mapping.time, scale: 'standard', mark: 'ending' } };
}

function asEpw(reading: WeatherFileReading): WeatherFileReading {
  if (reading.station === null || (reading.status !== 'refused' && reading.hours === null)) return reading;
  const { name } = reading.station;
  // The place is joined with underscores: country, state, city, number.
  const station = {
    ...reading.station,
    name: name.replaceAll('_', ' '),
    wmoNumber: WMO_NUMBER.exec(name)?.[1] ?? reading.station.wmoNumber,
  };
  return { ...reading, format: 'EPW', station };
}

import { namesGlobalHourly } from './global-hourly/read-global-hourly.ts';
import { ISD_RECORD, SHORTEST_RECORD } from './isd/isd-record.ts';
import { ISD_LITE_RECORD } from './isd-lite/read-isd-lite.ts';
import type { DecodedText } from './text/decode-text.ts';
import { LineCursor } from './text/line-cursor.ts';
import { TMY2_HEADER } from './tmy2/read-tmy2.ts';
import { TMY3_NAMES } from './tmy3/tmy3-columns.ts';
import type { WeatherFormat } from './weather-file-reading.ts';

/** So many lines that are not blank show what a file is; of records without a header most must be alike. */
const LOOKED_AT = 40;
const LONGEST = 2_000;
const MOST = 0.8;
const EPW_HEADER_LINES = 12;
const TMY2_RECORD = /^\s\d{8}.{133}/;

/** The first lines of a text, without blank ones. */
export function firstLines(text: DecodedText): readonly { readonly line: number; readonly text: string }[] {
  const cursor = new LineCursor(text);
  const lines: { line: number; text: string }[] = [];
  while (lines.length < LOOKED_AT && cursor.next()) lines.push({ line: cursor.line, text: cursor.string(LONGEST) });
  return lines;
}

/** The format by content; names and suffixes decide nothing. Tested in order, first match wins; null for none of them. */
export function recogniseFormat(lines: readonly { readonly text: string }[]): Exclude<WeatherFormat, 'table'> | null {
  const [first = '', second = ''] = lines.map(({ text }) => text);
  const mostAre = (holds: (text: string) => boolean) =>
    lines.length > 0 && lines.filter(({ text }) => holds(text)).length >= MOST * lines.length;
  if (/^\s*"?LOCATION"?\s*,/i.test(first)) return 'EPW';
  // Its header records may stand in another order, or lack the first, which the reader tells.
  if (lines.slice(0, EPW_HEADER_LINES).some(({ text }) => /^\s*"?DATA PERIODS"?\s*,/i.test(text))) return 'EPW';
  if (TMY3_NAMES.test(second)) return 'TMY3';
  if (TMY2_HEADER.test(first) && TMY2_RECORD.test(second)) return 'TMY2';
  if (namesGlobalHourly(first)) return 'Global Hourly';
  if (mostAre((text) => ISD_LITE_RECORD.test(text.trimEnd()))) return 'ISD-Lite';
  return mostAre((text) => text.length >= SHORTEST_RECORD && ISD_RECORD.test(text)) ? 'ISD' : null;
}

import { readEpw } from './epw/read-epw.ts';
import { isEpwCsv, readEpwCsv } from './epw-csv/read-epw-csv.ts';
import { FindingList } from './finding-list.ts';
import { readGlobalHourly } from './global-hourly/read-global-hourly.ts';
import { readIsd } from './isd/read-isd.ts';
import { readIsdLite } from './isd-lite/read-isd-lite.ts';
import type { ReadOptions } from './read-options.ts';
import { firstLines, recogniseFormat } from './recognise-format.ts';
import { refuseUnknown } from './refuse-unknown.ts';
import { readTable } from './table/read-table.ts';
import { findLayout } from './table/table-layout.ts';
import { type DecodedText, decodeText, type NotText, textBetween } from './text/decode-text.ts';
import { readTmy2 } from './tmy2/read-tmy2.ts';
import { readTmy3 } from './tmy3/read-tmy3.ts';
import type { RefusedReading, WeatherFileReading, WeatherFormat } from './weather-file-reading.ts';

/** Of a format with a header, so many faulty rows among the first ones mean that it is a table of another kind. */
const MOST_FAULTS = 2;
const FIRST_LINES = 202;

/**
 * Reads an hourly weather file: bytes to text, format by content, rows to the hours of each station and year in it, with every
 * finding. Never throws on any content: what cannot be read comes back as `refused` with findings that say what would mend it.
 * @param bytes the file as it was uploaded
 * @param name its name: a hint for messages, and the station of formats that name it nowhere else
 * @returns a reading for each station-year, one at least
 */
export function readWeatherFileParts(
  bytes: Uint8Array,
  name: string,
  options: ReadOptions = {},
): readonly WeatherFileReading[] {
  const findings = new FindingList(options.answers);
  const text = decodeText(bytes);
  if ('notText' in text) return [refuseNotText(text, findings)];
  const lines = firstLines(text);
  const format = recogniseFormat(lines);
  tellEncoding(text, findings);
  if (format !== null) {
    const readings = readFormat(format, { text, name, options }, findings.copy());
    if (!isTableOfAnotherKind(readings, format)) return readings;
  }
  const layout = findLayout(text);
  if ('reason' in layout) return [refuseUnknown({ lines, name, layout }, findings)];
  return isEpwCsv(lines[0]?.text ?? '', layout)
    ? readEpwCsv(text, { layout, options }, findings)
    : readTable(text, { layout, options }, findings);
}

function readFormat(
  format: Exclude<WeatherFormat, 'table'>,
  file: { readonly text: DecodedText; readonly name: string; readonly options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const { options, text } = file;
  switch (format) {
    case 'EPW':
      return [readEpw(text, findings, options)];
    case 'TMY3':
      return readTmy3(text, options, findings);
    case 'TMY2':
      return readTmy2(text, options, findings);
    case 'ISD-Lite':
      return readIsdLite(text, file, findings);
    case 'ISD':
      return readIsd(text, options, findings);
    default:
      return readGlobalHourly(text, options, findings);
  }
}

/** A file that only begins like TMY3 or Global Hourly: its first rows cannot be read so. */
function isTableOfAnotherKind(readings: readonly WeatherFileReading[], format: WeatherFormat): boolean {
  if (format !== 'TMY3' && format !== 'Global Hourly') return false;
  const [reading] = readings;
  if (reading?.status !== 'refused') return false;
  const faults = reading.findings.filter(
    ({ code, line, severity }) =>
      severity === 'refuse' &&
      ['field-count', 'not-a-number', 'time-order'].includes(code) &&
      (line ?? 0) <= FIRST_LINES,
  );
  return faults.length > MOST_FAULTS;
}

function refuseNotText(text: NotText, findings: FindingList): RefusedReading {
  findings.add({ code: 'binary', severity: 'refuse', line: text.line, message: () => notTextSentence(text) });
  return { status: 'refused', part: '', format: null, station: null, findings: findings.inOrder() };
}

function notTextSentence(text: NotText): string {
  if (text.notText === 'gzip' || text.notText === 'zip') {
    return `This is a ${text.notText} archive, not a weather file. Unpack it and bring what is inside.`;
  }
  const what =
    text.notText === 'nul'
      ? `a zero byte stands on line ${text.line}`
      : `${text.controlPct.toFixed(0)} % of it are control characters`;
  return `This is not a text file: ${what}. Weather files are plain text; bring the file as its source wrote it.`;
}

function tellEncoding(text: DecodedText, findings: FindingList): void {
  if (text.utf16) {
    findings.add({
      code: 'encoding',
      severity: 'note',
      message: () => 'The file is written in UTF-16 and has been read so.',
    });
  }
  if (!text.windows1252) return;
  const { at, line } = firstBeyondAscii(text);
  findings.add({
    code: 'encoding',
    severity: 'note',
    line,
    message: () =>
      `The file is not UTF-8 (first on line ${line}: “${textBetween(text, Math.max(0, at - 8), at + 1).trim()}”) and has been read as Windows-1252.`,
  });
}

function firstBeyondAscii(text: DecodedText): { at: number; line: number } {
  const at = text.bytes.findIndex((byte) => byte >= 0x80);
  const before = textBetween(text, 0, at);
  return { at, line: before.split(/\r\n|\r|\n/).length };
}

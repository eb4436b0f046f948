import type { FindingList } from './finding-list.ts';
import type { NoLayout } from './table/table-layout.ts';
import { quoted } from './text/number-field.ts';
import type { RefusedReading } from './weather-file-reading.ts';

const COMPANION = /\.(ddy|stat|rain|wea|clm)$/i;
const FEW_LINES = 10;
/** Words of a line that are numbers, where nearly all are so: a row of data without a table around it. */
const NUMBER_WORD = /^[+-]?\d[\d.:/-]*$/;

/** Refuses a text of no known format with what would mend it. */
export function refuseUnknown(
  unknown: {
    readonly lines: readonly { readonly line: number; readonly text: string }[];
    readonly name: string;
    readonly layout: NoLayout;
  },
  findings: FindingList,
): RefusedReading {
  const { layout, lines, name } = unknown;
  const [first] = lines;
  const rows = lines.filter(({ text }) => isDataRow(text)).length;
  if (first === undefined) {
    const message = () => 'The file is empty: it has 0 rows. Bring the file anew from its source.';
    findings.add({ code: 'too-few-rows', severity: 'refuse', count: 0, message });
  } else if (rows === lines.length && lines.length < FEW_LINES) {
    findings.add({
      code: 'too-few-rows',
      severity: 'refuse',
      line: first.line,
      count: rows,
      message: () =>
        `The file has ${rows} ${rows === 1 ? 'row' : 'rows'}, which is no year and no month. Bring a file with whole months.`,
    });
  } else if (layout.reason === 'decimal commas') {
    findings.add({
      code: 'header',
      severity: 'refuse',
      line: layout.line,
      message: () =>
        `From line ${layout.line} on the rows have more fields than the header names: commas seem to part the fields and to mark decimals as well, so no value can be told. Save the table with semicolons or tabs between the fields.`,
    });
  } else {
    const { line, text } = first;
    findings.add({ code: 'header', severity: 'refuse', line, message: () => unknownSentence(text, line, name) });
  }
  return { status: 'refused', part: '', format: null, station: null, findings: findings.inOrder() };
}

function isDataRow(text: string): boolean {
  const words = text.split(/[\s,;|]+/).filter((word) => word !== '');
  return words.length >= 5 && words.filter((word) => NUMBER_WORD.test(word)).length >= 0.8 * words.length;
}

function unknownSentence(first: string, line: number, name: string): string {
  if (COMPANION.test(name)) {
    return 'This is a companion of a weather file and holds no hours. Bring the .epw that stands beside it.';
  }
  if (/^\s*"?Location Title/i.test(first)) {
    return 'This is the spreadsheet form of an EPW, with a line of titles over each record. Bring the .epw itself.';
  }
  if (/^\s*LOCATION[\s;|\t]/i.test(first)) {
    return `Line ${line} begins with LOCATION, but a comma must follow: the file seems to be saved with other separators. Save it with commas, or bring it anew from its source.`;
  }
  return `No known format: line ${line} begins with ${quoted(first)}. Read are EPW, TMY3, TMY2, ISD-Lite, full ISD, Global Hourly, and tables of three columns or more with a column of times.`;
}

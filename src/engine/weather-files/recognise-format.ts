import type { FindingCode } from './finding.ts';
import type { DecodedText } from './text/decode-text.ts';
import { LineCursor } from './text/line-cursor.ts';
import { quoted } from './text/number-field.ts';
import type { WeatherFormat } from './weather-file-reading.ts';

export interface NotRecognised {
  readonly code: Extract<FindingCode, 'header' | 'too-few-rows'>;
  readonly line: number | null;
  readonly sentence: (name: string) => string;
}

const SHOWN = 200;
const COMPANION = /\.(ddy|stat|rain|wea|clm)$/i;

/** The format by content; names and suffixes only help to word a refusal. Tested in order, first match wins. */
export function recogniseFormat(text: DecodedText): WeatherFormat | NotRecognised {
  const cursor = new LineCursor(text);
  if (!cursor.next()) {
    return {
      code: 'too-few-rows',
      line: null,
      sentence: () => 'The file is empty: it has 0 rows. Bring the file anew from its source.',
    };
  }
  const first = cursor.string(SHOWN);
  if (/^\s*"?LOCATION"?\s*,/i.test(first)) return 'EPW';
  const { line } = cursor;
  return { code: 'header', line, sentence: (name) => notEpwSentence(first, line, name) };
}

function notEpwSentence(first: string, line: number, name: string): string {
  if (COMPANION.test(name)) {
    return 'This is a companion of a weather file and holds no hours. Bring the .epw that stands beside it.';
  }
  if (/^\s*"?Location Title/i.test(first)) {
    return 'This is the spreadsheet form of an EPW, with a line of titles over each record. Bring the .epw itself.';
  }
  if (/^\s*LOCATION[\s;|\t]/i.test(first)) {
    return `Line ${line} begins with LOCATION, but a comma must follow: the file seems to be saved with other separators. Save it with commas, or bring it anew from its source.`;
  }
  return `No known format: line ${line} begins with ${quoted(first)}, where an EPW begins with “LOCATION,”. Only EPW files are read so far; bring the .epw of this place.`;
}

import { readEpw } from './epw/read-epw.ts';
import { FindingList } from './finding-list.ts';
import { recogniseFormat } from './recognise-format.ts';
import { type DecodedText, decodeText, type NotText, textBetween } from './text/decode-text.ts';
import type { WeatherFileReading } from './weather-file-reading.ts';

/**
 * Reads one hourly weather file: bytes to text, format by content, rows to the hours of one year, with every finding.
 * Never throws on any content: what cannot be read comes back as `refused` with findings that say what would mend it.
 * @param bytes the file as it was uploaded
 * @param name its name, a hint for messages only
 */
export function readWeatherFile(bytes: Uint8Array, name: string): WeatherFileReading {
  const findings = new FindingList();
  const text = decodeText(bytes);
  if ('notText' in text) return refuseNotText(text, findings);
  const format = recogniseFormat(text);
  if (format === 'EPW') {
    tellEncoding(text, findings);
    return readEpw(text, findings);
  }
  findings.add({ severity: 'refuse', line: format.line, code: format.code, message: () => format.sentence(name) });
  return { status: 'refused', format: null, station: null, findings: findings.inOrder() };
}

function refuseNotText(text: NotText, findings: FindingList): WeatherFileReading {
  findings.add({ code: 'binary', severity: 'refuse', line: text.line, message: () => notTextSentence(text) });
  return { status: 'refused', format: null, station: null, findings: findings.inOrder() };
}

function notTextSentence(text: NotText): string {
  if (text.notText === 'gzip' || text.notText === 'zip') {
    return `This is a ${text.notText} archive. Archives are read from the weather room on; until then unpack it and bring the weather file inside.`;
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

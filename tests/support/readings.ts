import { type Finding, type FindingCode, severities } from '#engine/weather-files/finding.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { RefusedReading, UsableReading, WeatherFileReading } from '#engine/weather-files/weather-file-reading.ts';
import { bytesOfLines, type EpwOptions, epwBytes } from './epw-text.ts';

/** Reads a made-up EPW, given as options of the builder, as lines or as bytes. */
export function readMadeUp(
  file: EpwOptions | readonly string[] | Uint8Array,
  options: ReadOptions = {},
): WeatherFileReading {
  if (file instanceof Uint8Array) return readWeatherFile(file, 'made-up.epw', options);
  return readWeatherFile('length' in file ? bytesOfLines(file) : epwBytes(file), 'made-up.epw', options);
}

/** The reading of a file that must not be refused. */
export function readUsable(
  file: EpwOptions | readonly string[] | Uint8Array,
  options: ReadOptions = {},
): UsableReading {
  const reading = readMadeUp(file, options);
  if (reading.status !== 'refused' && reading.hours !== null) return reading;
  throw new Error(`refused or not mapped: ${reading.findings.map(({ message }) => message).join(' ')}`);
}

/** The reading of a file that must be refused. */
export function readRefused(file: EpwOptions | readonly string[] | Uint8Array): RefusedReading {
  const reading = readMadeUp(file);
  if (reading.status === 'refused') return reading;
  throw new Error(`not refused, but ${reading.status}`);
}

/** Findings of one code, in order. */
export function findingsOf(reading: WeatherFileReading, code: FindingCode): readonly Finding[] {
  return reading.findings.filter((finding) => finding.code === code);
}

/** Codes with their severities, but the two notes that every made-up file of the builder carries. */
export function remarkable(reading: WeatherFileReading): readonly string[] {
  const usual = ['source-flags-uniform note', 'below-zero-phase note'];
  return reading.findings.map(({ code, severity }) => `${code} ${severity}`).filter((text) => !usual.includes(text));
}

/** What must hold of every finding: located or not, it is a whole sentence with a known severity. */
export function faultyFindings(reading: WeatherFileReading): readonly Finding[] {
  return reading.findings.filter(({ column, count, lastLine, line, message, severity }) => {
    const sentence = /^[\p{Lu}\d“].*[.”]$/su.test(message) && !/\b(NaN|undefined|null|Infinity)\b/.test(message);
    const placed = (line === null || line >= 1) && (column === null || column >= 1) && (lastLine ?? 0) >= (line ?? 0);
    return !sentence || !placed || count < 0 || !severities.includes(severity);
  });
}

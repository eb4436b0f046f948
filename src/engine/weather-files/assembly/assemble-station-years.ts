/**
 * A file may hold several years, and several stations: each station-year is read as a weather year of its own, with its own
 * findings and status, so that a poor year costs none of the others.
 */
import { type FindingList, whole } from '../finding-list.ts';
import type { ReadOptions } from '../read-options.ts';
import type { WeatherFileReading } from '../weather-file-reading.ts';
import { assembleYear, type FileContents } from './assemble-year.ts';
import { splitYears } from './split-years.ts';

/** The rows of one station, real dates, and what is known of it. */
export type StationContents = Omit<FileContents, 'part' | 'periods' | 'yearFrom'> & {
  /** How the file names the station; empty when it holds one alone. */
  readonly key: string;
};

/** Fewer rows than a month of readings every three hours make no year. */
export const FEWEST_ROWS = 200;
/** Local time takes so many hours of a year in UTC to its neighbour. */
const EDGE_HOURS = 14;
/** More than the hours of any file of 64 MB. */
const MOST_PARTS = 150;
/** Stations of one file that are looked at; more of them have too few rows each. */
export const MOST_STATIONS = 1_000;

/**
 * Assembles every station-year, or the wanted one alone.
 * @param findings what concerns the whole file; each reading holds it too
 */
export function assembleStationYears(
  stations: readonly StationContents[],
  findings: FindingList,
  options: ReadOptions,
): readonly WeatherFileReading[] {
  const years = stations.flatMap((station) =>
    splitYears(station.rows, EDGE_HOURS * station.stepsPerHour).map(({ rows, year }) => ({ station, rows, year })),
  );
  const parts = nameParts(years.filter(({ rows }) => rows.lines.length >= FEWEST_ROWS));
  const refused = () => [{ status: 'refused', part: '', ...declared(stations), findings: findings.inOrder() } as const];
  if (findings.refused) return refused();
  if (parts.length === 0 || parts.length > MOST_PARTS) {
    if (parts.length === 0)
      tellTooFew(
        years.reduce((sum, { rows }) => sum + rows.lines.length, 0),
        findings,
      );
    else tellTooMany(parts.length, findings);
    return refused();
  }
  tellShortYears(years, findings);
  if (parts.length > 1)
    tellParts(
      parts.map(({ part }) => part),
      findings,
    );
  const wanted = parts.filter(({ part }) => options.part === undefined || part === options.part);
  return (wanted.length === 0 ? parts : wanted).map(({ part, rows, station }) =>
    assembleYear({ ...station, part, rows, periods: [], yearFrom: 'dates' }, findings.copy(), options),
  );
}

interface StationYearRows {
  readonly station: StationContents;
  readonly rows: StationContents['rows'];
  readonly year: number;
}

/** A part is named after what tells it from the others: its station, its year, or both. */
function nameParts(years: readonly StationYearRows[]): readonly (StationYearRows & { part: string })[] {
  const yearsOf = new Map<string, number>();
  for (const { station } of years) yearsOf.set(station.key, (yearsOf.get(station.key) ?? 0) + 1);
  return years.map((year) => {
    const several = (yearsOf.get(year.station.key) ?? 0) > 1;
    const words = [yearsOf.size > 1 ? year.station.key : '', several ? String(year.year) : ''];
    return { ...year, part: words.filter((word) => word !== '').join(' ') };
  });
}

function declared(stations: readonly StationContents[]) {
  const [first] = stations;
  return { format: first?.format ?? null, station: first?.station ?? null };
}

function tellTooFew(rows: number, findings: FindingList): void {
  findings.add({
    code: 'too-few-rows',
    severity: 'refuse',
    count: rows,
    message: () =>
      `The file has ${whole(rows)} ${rows === 1 ? 'row' : 'rows'} with a time; ${whole(FEWEST_ROWS)} are the least that a month can be counted from. Bring a file with whole months.`,
  });
}

/** Refuses a file of more stations than are looked at. */
export function tellTooManyStations(findings: FindingList): void {
  findings.add({
    code: 'several-stations',
    severity: 'refuse',
    count: MOST_STATIONS,
    message: () => `The file holds more than ${whole(MOST_STATIONS)} stations. Bring it in several files.`,
  });
}

function tellTooMany(parts: number, findings: FindingList): void {
  findings.add({
    code: 'several-stations',
    severity: 'refuse',
    count: parts,
    message: () => `The file holds ${whole(parts)} station-years, more than ${MOST_PARTS}. Bring it in several files.`,
  });
}

function tellShortYears(years: readonly StationYearRows[], findings: FindingList): void {
  for (const { rows, station, year } of years) {
    const count = rows.lines.length;
    if (count >= FEWEST_ROWS) continue;
    const of = station.key === '' ? '' : ` of ${station.key}`;
    findings.add({
      code: 'too-few-rows',
      severity: 'doubt',
      line: rows.lines[0] ?? null,
      lastLine: rows.lines.at(-1) ?? null,
      count,
      message: () => `The year ${year}${of} has ${whole(count)} ${count === 1 ? 'row' : 'rows'} and is left out.`,
    });
  }
}

function tellParts(parts: readonly string[], findings: FindingList): void {
  findings.add({
    code: 'several-stations',
    severity: 'note',
    count: parts.length,
    message: () =>
      `The file holds ${parts.length} station-years, each read as a weather year of its own: ${parts.slice(0, 20).join(', ')}${parts.length > 20 ? ' and more' : ''}.`,
  });
}

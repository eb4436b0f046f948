/** The reports of a file by station, with the place that most of a station's reports give. */
import { MOST_STATIONS, tellTooManyStations } from '../assembly/assemble-station-years.ts';
import type { FindingList } from '../finding-list.ts';
import { unknownStation } from '../place/settle-place.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { type Report, ReportColumns } from './report-columns.ts';

const MOST_SPREAD_DEG = 0.05;
const MOST_SPREAD_M = 30;
/** More places than these are not kept apart; the first ones are the ones that count. */
const MOST_PLACES = 50;

export interface ReportedPlace {
  readonly latitude: number | null;
  readonly longitude: number | null;
  readonly elevationM: number | null;
}

interface StationReports {
  readonly key: string;
  readonly name: string;
  readonly wmoNumber: string | null;
  readonly reports: ReportColumns;
  readonly places: Map<string, { readonly place: ReportedPlace; readonly line: number; count: number }>;
}

export class ReportsByStation {
  readonly #stations = new Map<string, StationReports>();
  #beyond = false;

  /** @param station.key how the file names the station */
  add(
    station: { readonly key: string; readonly name: string; readonly wmoNumber: string | null },
    place: ReportedPlace,
    report: Report,
  ): void {
    const known = this.#stations.get(station.key);
    if (known === undefined && this.#stations.size >= MOST_STATIONS) {
      this.#beyond = true;
      return;
    }
    const of = known ?? { ...station, reports: new ReportColumns(), places: new Map() };
    if (known === undefined) this.#stations.set(station.key, of);
    of.reports.add(report);
    const { elevationM, latitude, longitude } = place;
    const key = `${latitude} ${longitude} ${elevationM}`;
    const seen = of.places.get(key);
    if (seen !== undefined) seen.count++;
    else if (of.places.size < MOST_PLACES) {
      of.places.set(key, { place: { latitude, longitude, elevationM }, line: report.line, count: 1 });
    }
  }

  /** Every station with its reports and the place that it gives most often; places that differ are told. */
  settle(
    findings: FindingList,
  ): readonly { key: string; station: DeclaredStation; line: number; reports: ReportColumns }[] {
    if (this.#beyond) tellTooManyStations(findings);
    return [...this.#stations.values()].map(({ key, name, places, reports, wmoNumber }) => {
      const all = [...places.values()];
      const usual = all.reduce((most, next) => (next.count > most.count ? next : most), all[0] ?? NOWHERE);
      tellSpread(key, all, findings);
      return { key, station: { ...unknownStation(name), ...usual.place, wmoNumber }, line: usual.line, reports };
    });
  }
}

const NOWHERE = { place: { latitude: null, longitude: null, elevationM: null }, line: 0, count: 0 };

function tellSpread(key: string, places: readonly { place: ReportedPlace; line: number }[], findings: FindingList) {
  const spread = (of: (place: ReportedPlace) => number | null) => {
    const known = places.map(({ place }) => of(place)).filter((value) => value !== null);
    return known.length === 0 ? 0 : Math.max(...known) - Math.min(...known);
  };
  const degrees = Math.max(
    spread(({ latitude }) => latitude),
    spread(({ longitude }) => longitude),
  );
  const metres = spread(({ elevationM }) => elevationM);
  if (degrees <= MOST_SPREAD_DEG && metres <= MOST_SPREAD_M) return;
  findings.add({
    code: 'place-zone',
    severity: 'doubt',
    line: places[1]?.line ?? null,
    message: () =>
      `The reports of ${key} give places up to ${degrees.toFixed(3)}° and ${metres.toFixed(0)} m apart; the most frequent one is taken. Confirm the place before it is drawn.`,
  });
}

import type { Place } from '#contract/place.ts';
import type { BriefBasis, ShownRun } from '#contract/runs.ts';
import type { GateAnswer } from '#engine/run/run-result.ts';
import { withSiteGates } from '#engine/score/site-gates.ts';
import type { ResolvedSite } from '../sites/resolved-sites-read-model.ts';
import type { HeightUsed } from './height-used.ts';
import type { JudgedStation, JudgedYear } from './judge-station.ts';
import { presentDerivedYears } from './present-derived-years.ts';
import { presentResult } from './present-result.ts';

/** What makes a site of a station's weather. */
export interface SiteOfStation {
  readonly site: ResolvedSite;
  readonly height: HeightUsed;
  /** As the brief asks them and a person answered them. */
  readonly gates: readonly GateAnswer[];
}

export function presentPlace(
  judgedPlace: JudgedStation,
  on: { brief: BriefBasis; invented: boolean; site: SiteOfStation | null },
): Place {
  const place = on.site === null ? judgedPlace : withGatesOf(judgedPlace, on.site.gates);
  const { station, figures, judged, grade } = place;
  // Without a usable year the newest one is still shown, so that one sees why: its hours without weather, no score.
  const newest = judged.filter(({ kind }) => kind !== 'derived').slice(0, 1);
  const shown = figures.shown ?? newest[0] ?? null;
  const restsOn = figures.runs.length > 0 ? figures.runs : newest;
  return {
    site: on.site === null ? null : presentSiteOfPlace(on.site),
    station: {
      id: station.stationId,
      name: station.stationName,
      latitude: station.latitude,
      longitude: station.longitude,
      elevationM: station.elevationM,
      zone: station.zone,
    },
    invented: on.invented,
    brief: on.brief,
    years: restsOn.map(presentYear),
    judgedYears: judged.map((each) => ({
      ...presentYear(each),
      name: each.weather.derivedFrom?.name ?? null,
      usable: each.result.usable,
    })),
    derived: presentDerivedYears(judged),
    shown: shown === null ? null : presentShown(place, shown, on.site?.gates ?? null),
    grade: grade.grade,
    gradeColumns: grade.columns.map((column) => ({ ...column })),
  };
}

function withGatesOf(place: JudgedStation, gates: readonly GateAnswer[]): JudgedStation {
  const { scoreNote, ...figures } = withSiteGates({ ...place.figures, scoreNote: place.scoreNote }, gates);
  return { ...place, figures: { ...figures, scoreNote }, scoreNote };
}

function presentSiteOfPlace({ site, height }: SiteOfStation): NonNullable<Place['site']> {
  const { id, letters, name, latitude, longitude, elevationM, elevationSource, station, designLoadKw } = site;
  return {
    ...{ id, letters, name, latitude, longitude, elevationM, elevationSource },
    distanceKm: station?.distanceKm ?? 0,
    heightDifferenceM: station?.heightDifferenceM ?? null,
    heightAdjusted: height.adjusted,
    heightUsedM: height.heightM,
    loadKw: designLoadKw,
  };
}

function presentYear({ run, weather, kind, year, result }: JudgedYear): Place['years'][number] {
  return { runId: run.id, weatherFileId: weather.weatherFileId, kind, year, hours: weather.hours, score: result.score };
}

/** The ledger and what follows from it are of the shown year; score, parts and verdict are the place's. */
function presentShown(
  { station, figures, notes, scoreNote }: JudgedStation,
  { run, result, kind }: JudgedYear,
  siteGates: readonly GateAnswer[] | null,
): ShownRun {
  const { verdict, ...scored } = figures;
  const shown = { runId: run.id, clock: run.clock, result, zone: station.zone, kind, notes };
  return presentResult(shown, { ...scored, scoreNote, verdict: verdict ?? result.verdict, siteGates });
}

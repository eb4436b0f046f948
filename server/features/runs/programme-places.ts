import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { GateAnswer } from '#engine/run/run-result.ts';
import { type GradeAnswer, gradePlace } from '#engine/score/grade-place.ts';
import { siteGates, withSiteGates } from '#engine/score/site-gates.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import { type ResolvedSite, sitesOfProgramme } from '../sites/resolved-sites-read-model.ts';
import { AT_THE_STATION, type WhereItStands } from './grade-of-years.ts';
import { type HeightUsed, heightUsed } from './height-used.ts';
import { type JudgedPlace, type JudgedPlaces, makeJudgedPlaces } from './judged-places.ts';
import { listAcceptedYears, listRunsInShort, listStationPlaces, type StationPlace } from './places-read-model.ts';
import type { FiguresOfPlace } from './present-figures.ts';

export interface StationUnderBrief {
  readonly station: StationPlace;
  readonly judged: JudgedPlace;
  readonly grade: GradeAnswer;
}

export interface SiteUnderBrief {
  readonly site: ResolvedSite;
  readonly height: HeightUsed | null;
  /** null: no station stands for it. */
  readonly judged: JudgedPlace | null;
  /** With the site's own gates. */
  readonly wire: FiguresOfPlace;
  readonly gates: readonly GateAnswer[];
  readonly grade: GradeAnswer['grade'];
}

export interface PlacesUnderBrief {
  readonly stations: readonly StationUnderBrief[];
  readonly sites: readonly SiteUnderBrief[];
  /** Years at heights that are still to be judged. */
  readonly pending: number;
}

/** Every station of the team and every site of the programme under a brief version, from stored runs. */
export async function programmePlaces(
  db: Knex,
  { teamId, programmeId, brief }: { teamId: string; programmeId: string; brief: ProgrammeBrief },
): Promise<PlacesUnderBrief> {
  const { briefVersionId, body } = brief;
  const [stations, years, runs, sites] = await Promise.all([
    listStationPlaces(db, teamId),
    listAcceptedYears(db, teamId),
    listRunsInShort(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION }),
    sitesOfProgramme(db, { teamId, programmeId }),
  ]);
  const places = makeJudgedPlaces({ brief: body, stations, years, runs });
  const elevations = new Map(stations.map(({ id, elevationM }) => [id, elevationM]));
  const seen = new Set<JudgedPlace>();
  const judgedStations = stations.map((station) => {
    const judged = places.at(station.id, station.elevationM);
    seen.add(judged);
    return { station, judged, grade: gradeAt(judged, AT_THE_STATION) };
  });
  const judgedSites = sites.map((site) => {
    const judged = judgeSite(site, { places, elevations, brief });
    if (judged.judged !== null) seen.add(judged.judged);
    return judged;
  });
  const pending = [...seen].reduce((sum, judged) => sum + judged.pending, 0);
  return { stations: judgedStations, sites: judgedSites, pending };
}

/** Some sites under a brief version, without looking at the runs of other places. */
export async function sitesUnderBrief(
  db: Knex,
  { teamId, brief, sites }: { teamId: string; brief: ProgrammeBrief; sites: readonly ResolvedSite[] },
): Promise<readonly SiteUnderBrief[]> {
  if (sites.length === 0) return [];
  const { briefVersionId, body } = brief;
  const [stations, all] = await Promise.all([listStationPlaces(db, teamId), listAcceptedYears(db, teamId)]);
  const wanted = new Set(sites.map(({ station }) => station?.id));
  const years = all.filter(({ stationId }) => wanted.has(stationId));
  const weatherYearIds = years.map(({ weatherYearId }) => weatherYearId);
  const asked = { teamId, briefVersionId, methodVersion: METHOD_VERSION, weatherYearIds };
  const places = makeJudgedPlaces({ brief: body, stations, years, runs: await listRunsInShort(db, asked) });
  const elevations = new Map(stations.map(({ id, elevationM }) => [id, elevationM]));
  return sites.map((site) => judgeSite(site, { places, elevations, brief }));
}

/** Every property by name: thousands are graded at once, and spreading two objects into a third takes longer than the grading. */
function gradeAt({ grading }: JudgedPlace, at: WhereItStands): GradeAnswer {
  return gradePlace({
    distanceKm: at.distanceKm,
    heightDifferenceM: at.heightDifferenceM,
    heightFromRelief: at.heightFromRelief ?? false,
    years: grading.years,
    measuredSharePct: grading.measuredSharePct,
    flagsInformative: grading.flagsInformative,
    kind: grading.kind,
  });
}

/** Where a site stands to its station, as its grade sees it. */
export function whereSiteStands(site: ResolvedSite): WhereItStands {
  const { station, elevationSource } = site;
  return {
    distanceKm: station?.distanceKm ?? Number.POSITIVE_INFINITY,
    heightDifferenceM: station?.heightDifferenceM ?? 0,
    heightFromRelief: elevationSource === 'relief' || elevationSource === null,
  };
}

function judgeSite(
  site: ResolvedSite,
  on: { places: JudgedPlaces; elevations: ReadonlyMap<string, number>; brief: ProgrammeBrief },
): SiteUnderBrief {
  const { places, elevations, brief } = on;
  const gates = siteGates(brief.body, site.gates);
  const stationElevationM = site.station === null ? undefined : elevations.get(site.station.id);
  if (site.station === null || stationElevationM === undefined) {
    const wire = withSiteGates(withoutWeather(site), gates);
    return { site, height: null, judged: null, wire, gates, grade: 'D' };
  }
  const height = heightUsed(site, stationElevationM);
  const judged = places.at(site.station.id, height.heightM);
  const { grade } = gradeAt(judged, whereSiteStands(site));
  return { site, height, judged, wire: withSiteGates(judged.wire, gates), gates, grade };
}

/** A site without a station, or with one that a person chose though it has no year. */
export function withoutWeather({ station }: Pick<ResolvedSite, 'station'>): FiguresOfPlace {
  const scoreNote =
    station === null ? 'not judged: no station stands for it' : 'not judged: its station has no accepted weather year';
  return {
    ...{ score: null, scoreNote, words: null, verdict: null, yearsMeeting: 0, yearsCounted: 0 },
    ...{ range: null, shown: null },
  };
}

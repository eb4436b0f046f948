import type { MapSite, MapStation } from '#contract/programme-map.ts';
import { failingSiteGates } from '#engine/score/site-gates.ts';
import { presentFigures } from './present-figures.ts';
import type { SiteUnderBrief, StationUnderBrief } from './programme-places.ts';

/**
 * Thousands at once: every property is named. V8 adds what follows a spread one property after another, which takes 50 microseconds an
 * object of this size, more than everything else of the map together.
 */
export function presentMapStation({ station, judged, grade }: StationUnderBrief): MapStation {
  const figures = presentFigures(judged.wire, grade.grade);
  return {
    id: station.id,
    name: station.name,
    latitude: station.latitude,
    longitude: station.longitude,
    elevationM: station.elevationM,
    score: figures.score,
    scoreNote: figures.scoreNote,
    words: figures.words,
    verdict: figures.verdict,
    yearsMeeting: figures.yearsMeeting,
    yearsCounted: figures.yearsCounted,
    range: figures.range,
    ledger: figures.ledger,
    litresPerKwh: figures.litresPerKwh,
    savedPct: figures.savedPct,
    worstSpellHours: figures.worstSpellHours,
    severityKh: figures.severityKh,
    grade: figures.grade,
  };
}

export function presentMapSite({ site, height, wire, gates, grade }: SiteUnderBrief): MapSite {
  const { station } = site;
  const figures = presentFigures(wire, grade);
  return {
    id: site.id,
    letters: site.letters,
    name: site.name,
    latitude: site.latitude,
    longitude: site.longitude,
    elevationM: site.elevationM,
    stationId: station?.id ?? null,
    distanceKm: station === null ? null : Math.round(station.distanceKm * 10) / 10,
    heightDifferenceM: station?.heightDifferenceM ?? null,
    heightAdjusted: height?.adjusted ?? false,
    loadKw: site.designLoadKw,
    gatesFailed: [...failingSiteGates(gates)],
    gatesNotKnown: gates.filter(({ answer }) => answer === 'not known').length,
    score: figures.score,
    scoreNote: figures.scoreNote,
    words: figures.words,
    verdict: figures.verdict,
    yearsMeeting: figures.yearsMeeting,
    yearsCounted: figures.yearsCounted,
    range: figures.range,
    ledger: figures.ledger,
    litresPerKwh: figures.litresPerKwh,
    savedPct: figures.savedPct,
    worstSpellHours: figures.worstSpellHours,
    severityKh: figures.severityKh,
    grade: figures.grade,
  };
}

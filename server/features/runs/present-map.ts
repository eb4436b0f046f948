import type { MapSite, MapStation } from '#contract/programme-map.ts';
import { failingSiteGates } from '#engine/score/site-gates.ts';
import { presentFigures } from './present-figures.ts';
import type { SiteUnderBrief, StationUnderBrief } from './programme-places.ts';

export function presentMapStation({ station, judged, grade }: StationUnderBrief): MapStation {
  return { ...station, ...presentFigures(judged.wire, grade.grade) };
}

export function presentMapSite({ site, height, wire, gates, grade }: SiteUnderBrief): MapSite {
  const { id, letters, name, latitude, longitude, elevationM, station, designLoadKw } = site;
  return {
    ...{ id, letters, name, latitude, longitude, elevationM },
    stationId: station?.id ?? null,
    distanceKm: station === null ? null : Math.round(station.distanceKm * 10) / 10,
    heightDifferenceM: station?.heightDifferenceM ?? null,
    heightAdjusted: height?.adjusted ?? false,
    loadKw: designLoadKw,
    gatesFailed: [...failingSiteGates(gates)],
    gatesNotKnown: gates.filter(({ answer }) => answer === 'not known').length,
    ...presentFigures(wire, grade),
  };
}

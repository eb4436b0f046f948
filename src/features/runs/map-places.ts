import type { PlaceFigures } from '../../contract/place-figures.ts';
import type { MapSite, MapStation, ProgrammeMap } from '../../contract/programme-map.ts';
import type { PlaceKind, PlaceRef } from '../../map/sheet-place.ts';

/** A station or a site of the map with its figures: saved ones, or those under a draft. */
export interface MapPlace extends PlaceFigures {
  readonly kind: PlaceKind;
  readonly id: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  /** Letters of a site; a station has none. */
  readonly letters?: string;
  /** The station whose weather the figures rest on: the station itself, or the one that stands for a site. */
  readonly stationId: string | null;
  /** Of a site: gates that fail, each with its reason, and how many nobody has answered. */
  readonly gatesFailed?: readonly string[];
  readonly gatesNotKnown?: number;
}

export interface MapPlaces {
  readonly stations: readonly MapPlace[];
  readonly sites: readonly MapPlace[];
}

export function placesOfMap({ stations, sites }: Pick<ProgrammeMap, 'stations' | 'sites'>): MapPlaces {
  return { stations: stations.map(stationPlace), sites: sites.map(sitePlace) };
}

function stationPlace(station: MapStation): MapPlace {
  return { ...station, kind: 'station', stationId: station.id };
}

function sitePlace(site: MapSite): MapPlace {
  return { ...site, kind: 'site' };
}

/** A place with the figures that it was last drafted with: an answer tells of a part of the places, the others stay who they are. */
const lastDrafted = new WeakMap<PlaceFigures, { readonly of: MapPlace; readonly place: MapPlace }>();

/** The same places with the figures of a draft where there are any. */
export function withFigures(places: MapPlaces, figures: ReadonlyMap<string, PlaceFigures>): MapPlaces {
  if (figures.size === 0) return places;
  const drafted = (place: MapPlace): MapPlace => {
    const found = figures.get(place.id);
    if (found === undefined) return place;
    const last = lastDrafted.get(found);
    if (last?.of === place) return last.place;
    const made = { ...place, ...found };
    lastDrafted.set(found, { of: place, place: made });
    return made;
  };
  return { stations: places.stations.map(drafted), sites: places.sites.map(drafted) };
}

export function findPlace({ stations, sites }: MapPlaces, ref: PlaceRef | null): MapPlace | undefined {
  if (ref === null) return undefined;
  return (ref.kind === 'site' ? sites : stations).find(({ id }) => id === ref.id);
}

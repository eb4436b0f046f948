import type { Feature, FeatureCollection, Point } from 'geojson';
import { inkName } from './mark-pictures.ts';
import type { MarkInks, PlaceKind, SheetPlace } from './sheet-place.ts';

export type MarkProperties = { readonly id: string; readonly ink: string; readonly letters: string };
export type NameProperties = { readonly id: string; readonly name: string; readonly figure: string };

/** Places as points for their marks. Nothing in them changes while a slider moves. */
export function markFeatures(kind: PlaceKind, places: readonly SheetPlace[]): FeatureCollection<Point, MarkProperties> {
  return collection(
    places.map((place) =>
      point(place, { id: place.id, ink: inkName(kind, place.grade === 'D'), letters: place.letters ?? '' }),
    ),
  );
}

/** Places as points for their names, with the figure of the layer under each. */
export function nameFeatures(places: readonly SheetPlace[], inks: MarkInks): FeatureCollection<Point, NameProperties> {
  return collection(places.map((place) => point(place, nameOf(place, inks))));
}

/** `held`: a chosen site under way to another place. */
type Raising = 'chosen' | 'pointed' | 'held';

export type RaisedProperties = NameProperties & {
  readonly kind: PlaceKind;
  readonly how: Raising;
  readonly ink: string;
  readonly letters: string;
};

export interface RaisedPlace {
  readonly place: SheetPlace;
  readonly kind: PlaceKind;
  readonly how: Raising;
}

/** The chosen place and the pointed one, drawn over all others. */
export function raisedFeatures(
  raised: readonly RaisedPlace[],
  inks: MarkInks,
): FeatureCollection<Point, RaisedProperties> {
  return collection(
    raised.map(({ place, kind, how }) =>
      point(place, {
        ...nameOf(place, inks),
        kind,
        how,
        ink: inkName(kind, place.grade === 'D'),
        letters: place.letters ?? '',
      }),
    ),
  );
}

function nameOf({ id, name, letters }: SheetPlace, inks: MarkInks): NameProperties {
  return { id, name: letters === undefined ? name : `${letters}  ${name}`, figure: inks.get(id)?.figure ?? '' };
}

function point<P>({ longitude, latitude }: SheetPlace, properties: P): Feature<Point, P> {
  return { type: 'Feature', geometry: { type: 'Point', coordinates: [longitude, latitude] }, properties };
}

function collection<P>(features: Feature<Point, P>[]): FeatureCollection<Point, P> {
  return { type: 'FeatureCollection', features };
}

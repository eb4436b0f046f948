import type { Feature, FeatureCollection, Point } from 'geojson';
import { inkName } from './mark-pictures.ts';
import type { MarkInks, PlaceKind, SheetPlace } from './sheet-place.ts';

export type MarkProperties = { readonly id: string; readonly ink: string; readonly letters: string };
export type NameProperties = { readonly id: string; readonly name: string };
export type FigureProperties = { readonly figure: string };

/** Places as points for their marks. Nothing in them changes while a slider moves. */
export function markFeatures(kind: PlaceKind, places: readonly SheetPlace[]): FeatureCollection<Point, MarkProperties> {
  return collection(
    places.map((place) =>
      point(place, { id: place.id, ink: inkName(kind, place.grade === 'D'), letters: place.letters ?? '' }),
    ),
  );
}

/** Places as points for their names, which stay where they are while figures change. */
export function nameFeatures(places: readonly SheetPlace[]): FeatureCollection<Point, NameProperties> {
  return collection(places.map((place) => point(place, { id: place.id, name: nameOf(place) })));
}

/** Places as points for the figures of the layer; those without one have none. */
export function figureFeatures(
  places: readonly SheetPlace[],
  inks: MarkInks,
): FeatureCollection<Point, FigureProperties> {
  return collection(
    places.flatMap((place) => {
      const figure = inks.get(place.id)?.figure ?? '';
      return figure === '' ? [] : [point(place, { figure })];
    }),
  );
}

/** `held`: a chosen site under way to another place. */
type Raising = 'chosen' | 'pointed' | 'held';

export type RaisedProperties = NameProperties &
  FigureProperties & {
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
        id: place.id,
        name: nameOf(place),
        figure: inks.get(place.id)?.figure ?? '',
        kind,
        how,
        ink: inkName(kind, place.grade === 'D'),
        letters: place.letters ?? '',
      }),
    ),
  );
}

function nameOf({ name, letters }: SheetPlace): string {
  return letters === undefined ? name : `${letters}  ${name}`;
}

function point<P>({ longitude, latitude }: SheetPlace, properties: P): Feature<Point, P> {
  return { type: 'Feature', geometry: { type: 'Point', coordinates: [longitude, latitude] }, properties };
}

function collection<P>(features: Feature<Point, P>[]): FeatureCollection<Point, P> {
  return { type: 'FeatureCollection', features };
}

/** What stands under the search box for what was typed. Pure. */
import type { FoundPlace } from '../../contract/places.ts';
import { readPosition } from '../../engine/interpolation/read-position.ts';
import { position as printPosition } from '../../lib/format.ts';

export interface Suggestion {
  readonly key: string;
  readonly name: string;
  readonly note: string;
  readonly place: Pick<FoundPlace, 'kind' | 'id' | 'programmeId'> | null;
  readonly latitude: number;
  readonly longitude: number;
}

const KINDS: Readonly<Record<FoundPlace['kind'], string>> = {
  station: 'station',
  site: 'site',
  capital: 'capital',
  seat: 'town',
  place: 'place',
};

/** Whether the text is to be looked up by name; a position is read without asking anyone. */
export function isName(text: string): boolean {
  return text.trim().length > 1 && readPosition(text).kind === 'words';
}

/** What a typed position reads as, and what is wrong with one that is none. */
export function readTyped(text: string): {
  readonly suggestions: readonly Suggestion[];
  readonly problem: string | null;
} {
  const read = readPosition(text);
  switch (read.kind) {
    case 'words':
      return { suggestions: [], problem: null };
    case 'position':
      return { suggestions: [pointSuggestion(read.position, 'position')], problem: null };
    case 'fault':
      return {
        suggestions: read.swapped === null ? [] : [pointSuggestion(read.swapped, 'the other way round')],
        problem: read.problem,
      };
  }
}

function pointSuggestion(point: { latitude: number; longitude: number }, note: string): Suggestion {
  return { key: 'point', name: printPosition(point), note, place: null, ...point };
}

/** A site of another programme is a place on the map here, and no more. */
export function foundSuggestions(places: readonly FoundPlace[]): readonly Suggestion[] {
  return places.map((place, index) => ({
    key: place.id ?? `${index}`,
    name: place.name,
    note: place.country === null ? KINDS[place.kind] : `${KINDS[place.kind]}, ${place.country}`,
    place: place.id === null ? null : { kind: place.kind, id: place.id, programmeId: place.programmeId },
    latitude: place.latitude,
    longitude: place.longitude,
  }));
}

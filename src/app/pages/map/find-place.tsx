import { PlaceSearch } from '../../../features/places/place-search.tsx';
import type { Suggestion } from '../../../features/places/place-suggestions.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import type { MapAddress } from './map-address.ts';

interface FindPlaceProps {
  readonly ids: ProgrammeIds;
  readonly onFind: (changes: Partial<MapAddress>) => void;
}

/** Near enough to see a town with its surroundings, far enough to see the next station. */
const FOUND_ZOOM = 7.5;

/** Names and positions in one box; what is found is chosen or pointed at, and brought into the frame. */
export function FindPlace({ ids, onFind }: FindPlaceProps) {
  const find = ({ place, latitude, longitude }: Suggestion) => {
    const camera = { zoom: FOUND_ZOOM, latitude, longitude };
    if (place?.id && place.kind === 'station')
      onFind({ place: { kind: 'station', id: place.id }, point: null, camera });
    else if (place?.id && place.kind === 'site' && place.programmeId === ids.programmeId)
      onFind({ place: { kind: 'site', id: place.id }, point: null, camera });
    else onFind({ point: { latitude, longitude }, place: null, camera });
  };
  return <PlaceSearch teamId={ids.teamId} onFind={find} />;
}

import { Link } from 'react-router-dom';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { paths } from '../../../lib/paths.ts';

/** Where one goes from the chosen place. */
export function PlaceActions({ ids, place }: { ids: ProgrammeIds; place: MapPlace }) {
  if (place.kind === 'station') {
    return (
      <p className="text-fine">
        <Link to={paths.station.to(ids.teamId, place.id)}>Open this station</Link>
      </p>
    );
  }
  return null;
}

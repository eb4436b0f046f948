import { Link } from 'react-router-dom';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { list } from '../../../lib/format.ts';
import { paths } from '../../../lib/paths.ts';

interface PlaceActionsProps {
  readonly ids: ProgrammeIds;
  readonly place: MapPlace;
  readonly mayMove: boolean;
}

/** Where one goes from the chosen place, and what can be done with it on the map. */
export function PlaceActions({ ids, place, mayMove }: PlaceActionsProps) {
  const { gatesFailed = [], gatesNotKnown = 0 } = place;
  return (
    <div className="grid gap-1 text-fine">
      {gatesFailed.length > 0 ? <p className="text-madder">Gates that fail: {list(gatesFailed)}.</p> : null}
      {gatesNotKnown > 0 ? (
        <p className="text-soft">
          {gatesNotKnown === 1 ? '1 gate is' : `${gatesNotKnown} gates are`} not answered yet.
        </p>
      ) : null}
      <p>
        {place.kind === 'site' ? (
          <Link to={paths.site.to({ ...ids, siteId: place.id })}>Open this site</Link>
        ) : (
          <Link to={paths.station.to(ids.teamId, place.id)}>Open this station</Link>
        )}
        <span className="text-soft">, </span>
        <Link to={compareWith(ids, place)}>compare it with others</Link>
        {mayMove ? <span className="text-soft">. Drag its mark on the map to move it.</span> : null}
      </p>
    </div>
  );
}

/** Under the brief of the map, where that is not the programme’s usual one. */
function compareWith(ids: ProgrammeIds, { kind, id }: MapPlace): string {
  return paths.compare.to(ids, { places: [{ kind, id }], briefs: ids.briefId === null ? [] : [ids.briefId] });
}

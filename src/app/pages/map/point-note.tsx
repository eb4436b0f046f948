import { useMemo } from 'react';
import { greatCircleKm } from '../../../engine/interpolation/great-circle-km.ts';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import { position, withUnit } from '../../../lib/format.ts';
import type { PlaceRef, Position } from '../../../map/sheet-place.ts';
import { Button } from '../../../ui/button.tsx';

interface PointNoteProps {
  readonly point: Position;
  readonly stations: readonly MapPlace[];
  readonly onChoose: (place: PlaceRef | null) => void;
}

/** A position between the places: what stands nearest to it. */
export function PointNote({ point, stations, onChoose }: PointNoteProps) {
  const nearest = useMemo(() => nearestOf(point, stations), [point, stations]);
  return (
    <section aria-label="Clicked point" className="grid content-start gap-3">
      <h2 className="text-title">{position(point)}</h2>
      {nearest === null ? null : (
        <p>
          Nearest station:{' '}
          <Button
            look="quiet"
            className="min-h-6! px-0!"
            onClick={() => onChoose({ kind: 'station', id: nearest.station.id })}
          >
            {nearest.station.name}
          </Button>
          , {withUnit(nearest.km, 'km', nearest.km < 10 ? 1 : 0)}
          {nearest.station.score === null ? '' : `, score ${nearest.station.score}`}, grade {nearest.station.grade}.
        </p>
      )}
      <p>
        <Button onClick={() => onChoose(null)}>Close</Button>
      </p>
    </section>
  );
}

function nearestOf(point: Position, stations: readonly MapPlace[]) {
  let found: { readonly station: MapPlace; readonly km: number } | null = null;
  for (const station of stations) {
    const km = greatCircleKm(point, station);
    if (found === null || km < found.km) found = { station, km };
  }
  return found;
}

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { AT_SEA_FROM_KM } from '../../engine/weather-files/relief.ts';
import { metres } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { positionOfDraft } from './site-draft.ts';
import { groundQuery, type ProgrammeKey } from './site-queries.ts';
import { exactPosition, heightDifference, kilometres } from './site-words.ts';

const WAIT_MS = 350;

interface PositionNoteProps {
  readonly programme: ProgrammeKey;
  readonly written: string;
  readonly elevation: string;
  readonly onPosition: (written: string) => void;
}

/** How a position was read, the ground and the station there, and what makes it doubtful. */
export function PositionNote({ programme, written, elevation, onPosition }: PositionNoteProps) {
  const settled = useSettled(written, WAIT_MS);
  const settledHeight = useSettled(elevation, WAIT_MS);
  const { position, swapped } = positionOfDraft(settled);
  const ground = useQuery({
    ...groundQuery(programme, { ...(position ?? { latitude: 0, longitude: 0 }), ...heightOf(settledHeight) }),
    enabled: position !== null,
    placeholderData: keepPreviousData,
  }).data;
  if (position === null) {
    return swapped === null ? null : (
      <Button look="quiet" onClick={() => onPosition(exactPosition(swapped))}>
        Use {exactPosition(swapped)}
      </Button>
    );
  }
  const first = ground?.candidates[0];
  const isAtSea = ground !== undefined && ground.kmFromLand > AT_SEA_FROM_KM;
  const turned = { latitude: position.longitude, longitude: position.latitude };
  return (
    <div role="status" className="text-fine text-soft">
      <p>
        Read: latitude, longitude {exactPosition(position)}.{' '}
        {ground === undefined || ground.reliefM === null || elevation.trim() !== ''
          ? ''
          : `The relief has about ${metres(ground.reliefM)} there, approximate: the height counts as grade C at best, and nothing is adjusted to it.`}
      </p>
      {first ? (
        <p>
          First station: {first.name}, {kilometres(first.distanceKm)}, height{' '}
          {heightDifference(first.heightDifferenceM)}.
        </p>
      ) : null}
      {isAtSea ? (
        <p className="font-medium text-madder">
          This lies in the sea, over 20 km from land. Are the two swapped, or is a sign lost?{' '}
          {Math.abs(turned.latitude) <= 90 ? (
            <Button look="quiet" onClick={() => onPosition(exactPosition(turned))}>
              Swap them
            </Button>
          ) : null}
        </p>
      ) : null}
    </div>
  );
}

/** A height that was typed, where it is one; else the server takes that of the relief. */
function heightOf(written: string): { elevationM?: number } {
  const value = Number(written.trim().replace(',', '.'));
  return written.trim() === '' || !(value >= -500 && value <= 9000) ? {} : { elevationM: value };
}

/** A value once it has not changed for a while. */
function useSettled(value: string, waitMs: number): string {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), waitMs);
    return () => clearTimeout(timer);
  }, [value, waitMs]);
  return settled;
}

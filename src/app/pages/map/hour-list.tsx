import { lazy, Suspense } from 'react';
import type { Place } from '../../../contract/place.ts';
import type { HourChoice } from '../../../features/runs/hour-choice.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { nameOfPlace } from '../../../features/runs/run-words.ts';

const HoursDialog = lazy(async () => ({
  default: (await import('../../../features/runs/hours-dialog.tsx')).HoursDialog,
}));

interface HourListProps {
  readonly place: Place;
  readonly ids: ProgrammeIds;
  readonly choice: HourChoice | null;
  readonly onClose: () => void;
}

/** The hours behind a bar, a cell or a day of a place, once they are asked for. */
export function HourList({ place, ids: { teamId }, choice, onClose }: HourListProps) {
  if (choice === null || place.shown === null) return null;
  return (
    <Suspense>
      <HoursDialog
        run={{ teamId, runId: place.shown.runId }}
        days={place.shown.ledger.hours / 24}
        choice={choice}
        placeName={nameOfPlace(place)}
        onClose={onClose}
      />
    </Suspense>
  );
}

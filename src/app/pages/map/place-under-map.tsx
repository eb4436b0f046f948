import { lazy, Suspense } from 'react';
import type { ChosenPlace } from './place-margin.tsx';

const PlaceFoot = lazy(async () => ({ default: (await import('./place-foot.tsx')).PlaceFoot }));

/** The year and the notes of the chosen place; the map is drawn before they are fetched. */
export function PlaceUnderMap(chosen: ChosenPlace) {
  return (
    <Suspense fallback={<div className="min-h-60" />}>
      <PlaceFoot {...chosen} />
    </Suspense>
  );
}

import { useEffect, useRef, useState } from 'react';
import { BottomSheet, PEEK_PX, type SheetStep } from '../../../ui/bottom-sheet.tsx';
import { Button } from '../../../ui/button.tsx';
import type { SheetProps } from './map-sheet.tsx';
import { PlaceMargin } from './place-margin.tsx';
import { PlaceUnderMap } from './place-under-map.tsx';

/** The map first, everything of its margins in a sheet at the foot of the screen. */
export function NarrowSheet({ title, brief, ranking, map, point, chosen, onLeave }: SheetProps) {
  const isAtPlace = chosen !== null || point !== null;
  const [step, setStep] = useState<SheetStep>(isAtPlace ? 'half' : 'peek');
  const shown = useRef(chosen?.figures.id ?? null);
  const chosenId = chosen?.figures.id ?? null;
  // A place that is chosen, on the map or in the list, is worth half the screen.
  useEffect(() => {
    if (chosenId === shown.current) return;
    shown.current = chosenId;
    if (chosenId !== null) setStep((held) => (held === 'peek' ? 'half' : held));
  }, [chosenId]);
  return (
    <div className="relative min-h-[30rem] flex-1">
      <div className="absolute inset-x-0 top-0" style={{ bottom: PEEK_PX }}>
        {map}
      </div>
      <BottomSheet label={isAtPlace ? 'Place panel' : 'Stations panel'} step={step} onStep={setStep}>
        {isAtPlace ? (
          <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
            <div>
              <h1 className="sr-only">{title}</h1>
              <Button look="quiet" className="-mt-1 text-fine" onClick={onLeave}>
                All places
              </Button>
              {point ?? (chosen === null ? null : <PlaceMargin {...chosen} />)}
            </div>
            {chosen === null ? null : <PlaceUnderMap {...chosen} />}
          </div>
        ) : (
          <div className="grid gap-4">
            {brief}
            {ranking}
          </div>
        )}
      </BottomSheet>
    </div>
  );
}

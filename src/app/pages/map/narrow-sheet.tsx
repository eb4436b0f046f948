import { useState } from 'react';
import { BriefNote } from '../../../features/runs/brief-note.tsx';
import { StationList } from '../../../features/runs/station-list.tsx';
import { ScoreLegend } from '../../../map/score-legend.tsx';
import { SheetMap } from '../../../map/sheet-map.tsx';
import { BottomSheet, PEEK_PX, type SheetStep } from '../../../ui/bottom-sheet.tsx';
import { Button } from '../../../ui/button.tsx';
import type { SheetProps } from './map-page.tsx';
import { PlaceFoot, PlaceMargin } from './place-parts.tsx';

/** The map first, everything of its margins in a sheet at the foot of the screen. */
export function NarrowSheet({ ids, map, choice, chosenId, onChoose }: SheetProps) {
  const [step, setStep] = useState<SheetStep>(chosenId === null ? 'peek' : 'half');
  const choose = (stationId: string) => {
    onChoose(stationId);
    setStep((held) => (held === 'peek' ? 'half' : held));
  };
  return (
    <div className="relative min-h-[30rem] flex-1">
      <div className="absolute inset-x-0 top-0" style={{ bottom: PEEK_PX }}>
        <SheetMap
          stations={map.stations}
          chosenId={chosenId}
          onChoose={choose}
          legend={<ScoreLegend stations={map.stations} />}
        />
      </div>
      <BottomSheet label={chosenId === null ? 'Stations panel' : 'Place panel'} step={step} onStep={setStep}>
        {chosenId === null ? (
          <div className="grid gap-4">
            <BriefNote map={map} choice={choice} />
            <StationList stations={map.stations} chosenId={chosenId} onChoose={choose} />
          </div>
        ) : (
          <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
            <div>
              <h1 className="sr-only">{map.brief.name}</h1>
              <Button look="quiet" className="-mt-1 text-fine" onClick={() => onChoose(null)}>
                All stations
              </Button>
              <PlaceMargin ids={ids} stationId={chosenId} />
            </div>
            <PlaceFoot ids={ids} stationId={chosenId} />
          </div>
        )}
      </BottomSheet>
    </div>
  );
}

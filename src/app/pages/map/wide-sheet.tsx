import { BriefNote } from '../../../features/runs/brief-note.tsx';
import { StationList } from '../../../features/runs/station-list.tsx';
import { ScoreLegend } from '../../../map/score-legend.tsx';
import { SheetMap } from '../../../map/sheet-map.tsx';
import type { SheetProps } from './map-page.tsx';
import { PlaceFoot, PlaceMargin } from './place-parts.tsx';

/** The sheet with its margins beside the map: brief and ranking left, the place right, its year and notes beneath. */
export function WideSheet({ ids, map, choice, chosenId, onChoose }: SheetProps) {
  return (
    <>
      <div className="grid min-h-[max(34rem,calc(100dvh-16.75rem))] grid-cols-[17rem_minmax(0,1fr)_20rem] border-b border-line max-xl:grid-cols-[14rem_minmax(0,1fr)_17.5rem]">
        <div className="relative">
          <div className="absolute inset-0 flex flex-col gap-4 px-5 py-4 max-xl:px-4">
            <BriefNote map={map} choice={choice} />
            <StationList stations={map.stations} chosenId={chosenId} onChoose={onChoose} />
          </div>
        </div>
        <div className="relative py-3">
          <SheetMap
            stations={map.stations}
            chosenId={chosenId}
            onChoose={onChoose}
            legend={<ScoreLegend stations={map.stations} />}
          />
        </div>
        <div className="px-5 py-4 max-xl:px-4">
          <PlaceMargin ids={ids} stationId={chosenId} />
        </div>
      </div>
      <PlaceFoot ids={ids} stationId={chosenId} />
    </>
  );
}

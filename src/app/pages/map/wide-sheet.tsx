import { KeyboardHelp } from './keyboard-help.tsx';
import type { SheetProps } from './map-sheet.tsx';
import { PlaceMargin } from './place-margin.tsx';
import { PlaceUnderMap } from './place-under-map.tsx';

/**
 * The sheet with its margins beside the map: brief and ranking left, the place right, its year and notes beneath. The map keeps its
 * height whichever place is chosen: what is longer scrolls in its margin, and nothing on the page jumps.
 */
export function WideSheet({ brief, ranking, map, point, chosen }: SheetProps) {
  return (
    <>
      <div className="grid h-[max(50rem,calc(100dvh-11rem))] grid-cols-[17rem_minmax(0,1fr)_20rem] border-b border-line max-xl:grid-cols-[15rem_minmax(0,1fr)_17.5rem]">
        <div className="relative">
          <div className="absolute inset-0 flex flex-col gap-3 overflow-y-auto px-5 py-4 max-xl:px-4">
            {brief}
            <div className="flex min-h-56 flex-1 flex-col">{ranking}</div>
            <KeyboardHelp />
          </div>
        </div>
        <div className="relative py-3">{map}</div>
        <div className="relative">
          <div className="absolute inset-0 overflow-y-auto px-5 py-4 max-xl:px-4">
            {point ?? (chosen === null ? <Nothing /> : <PlaceMargin {...chosen} />)}
          </div>
        </div>
      </div>
      {chosen === null ? null : <PlaceUnderMap {...chosen} />}
    </>
  );
}

function Nothing() {
  return <p className="text-soft">Choose a place on the map or in the list.</p>;
}

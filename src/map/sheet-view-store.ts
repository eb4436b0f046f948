import type { Map as MapLibreMap } from 'maplibre-gl';
import { useMemo, useSyncExternalStore } from 'react';
import type { SheetView } from './sheet-view.ts';

/** What a map shows, frame by frame, for the parts of the sheet that are drawn outside it. */
export function useSheetView(map: MapLibreMap | null): SheetView | null {
  const store = useMemo(() => sheetViewStore(map), [map]);
  return useSyncExternalStore(store.subscribe, store.read);
}

type SheetViewStore = {
  readonly subscribe: (changed: () => void) => () => void;
  readonly read: () => SheetView | null;
};

function sheetViewStore(map: MapLibreMap | null): SheetViewStore {
  let view = map === null ? null : viewOf(map);
  const subscribe = (changed: () => void) => {
    const look = () => {
      if (map !== null) view = viewOf(map);
      changed();
    };
    map?.on('move', look);
    map?.on('resize', look);
    return () => {
      map?.off('move', look);
      map?.off('resize', look);
    };
  };
  return { subscribe, read: () => view };
}

function viewOf(map: MapLibreMap): SheetView {
  const bounds = map.getBounds();
  const { clientWidth, clientHeight } = map.getContainer();
  return {
    west: bounds.getWest(),
    east: bounds.getEast(),
    south: bounds.getSouth(),
    north: bounds.getNorth(),
    widthPx: Math.max(1, clientWidth),
    heightPx: Math.max(1, clientHeight),
  };
}

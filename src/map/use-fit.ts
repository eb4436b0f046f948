import type { Map as MapLibreMap, PaddingOptions } from 'maplibre-gl';
import { useCallback, useEffect, useMemo, useRef } from 'react';
import { boxAround } from './fit-stations.ts';
import type { SheetPlace } from './sheet-place.ts';
import type { Furniture } from './use-furniture.ts';
import { OF_SHEET } from './use-tell-view.ts';

export const FIT = { padding: 48, maxZoom: 8 };
/** On a narrow sheet a wide margin would leave nothing between its sides. */
const NARROW_PX = 480;
const NARROW_PADDING = 26;
/** So far from furniture a mark is free of it. */
const CLEAR_PX = 12;
/** Looking whether marks stand free is for sheets that can be seen through. */
const MOST_LOOKED_AT = 400;
const FLIGHT_MS = 500;

type Padding = Required<PaddingOptions>;

interface FitInput {
  readonly places: readonly SheetPlace[];
  readonly furniture: readonly Furniture[];
  /** The address says where to look: nothing is fitted by itself. */
  readonly isPlaced: boolean;
}

/** Fits the places once when they and the map are there; gives the same for the button, null where there is nothing to fit. */
export function useFit(map: MapLibreMap | null, { places, furniture, isPlaced }: FitInput): (() => void) | null {
  const box = useMemo(() => boxAround(places), [places]);
  const showAll = useCallback(
    (animate: boolean) => {
      if (map === null || box === null) return;
      const view = bestView(map, { places, furniture, bounds: toBounds(box) });
      if (view === null) return;
      if (animate) map.easeTo({ ...view, duration: FLIGHT_MS });
      else map.jumpTo(view, OF_SHEET);
    },
    [map, box, places, furniture],
  );
  const settled = useRef(isPlaced);
  useEffect(() => {
    if (map === null || box === null || settled.current || furniture.length === 0) return;
    settled.current = true;
    showAll(false);
  }, [map, box, showAll, furniture]);
  return box === null ? null : () => showAll(true);
}

export function toBounds([west, south, east, north]: readonly [number, number, number, number]): [
  number,
  number,
  number,
  number,
] {
  return [west, south, east, north];
}

interface ViewInput {
  readonly places: readonly SheetPlace[];
  readonly furniture: readonly Furniture[];
  readonly bounds: [number, number, number, number];
}

/** The nearest view that shows every place free of the furniture, else the nearest that shows every place. */
function bestView(map: MapLibreMap, { places, furniture, bounds }: ViewInput) {
  const { clientWidth: width, clientHeight: height } = map.getContainer();
  const plain = width < NARROW_PX ? NARROW_PADDING : FIT.padding;
  const even: Padding = { top: plain, right: plain, bottom: plain, left: plain };
  const clearOf = ({ left, top, width: across, height: down }: Furniture): Padding[] => [
    left < width / 2 ? { ...even, left: left + across + plain / 2 } : { ...even, right: width - left + plain / 2 },
    top < height / 2 ? { ...even, top: top + down + plain / 2 } : { ...even, bottom: height - top + plain / 2 },
  ];
  const views = [even, ...(places.length > MOST_LOOKED_AT ? [] : furniture.flatMap(clearOf))].flatMap((padding) => {
    if (padding.left + padding.right > width * 0.8 || padding.top + padding.bottom > height * 0.8) return [];
    const found = map.cameraForBounds(bounds, { padding, maxZoom: FIT.maxZoom });
    return found?.center === undefined || found.zoom === undefined ? [] : [{ center: found.center, zoom: found.zoom }];
  });
  const before = { center: map.getCenter(), zoom: map.getZoom() };
  const free = views.filter((view) => {
    map.jumpTo(view, OF_SHEET);
    return places.every((place) => {
      const { x, y } = map.project([place.longitude, place.latitude]);
      return furniture.every((each) => isClear(each, { x, y }));
    });
  });
  map.jumpTo(before, OF_SHEET);
  return (free.length > 0 ? free : views.slice(0, 1)).sort((one, other) => other.zoom - one.zoom)[0] ?? null;
}

function isClear({ left, top, width, height }: Furniture, { x, y }: { x: number; y: number }): boolean {
  const isBeside = x < left - CLEAR_PX || x > left + width + CLEAR_PX;
  return isBeside || y < top - CLEAR_PX || y > top + height + CLEAR_PX;
}

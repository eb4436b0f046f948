import type { Map as MapLibreMap } from 'maplibre-gl';
import { useEffect, useRef, useState } from 'react';
import type { MapLayerMouseEvent, MapLayerTouchEvent } from 'react-map-gl/maplibre';
import { placeAt } from './place-at.ts';
import { isSame, type PlaceRef, type Position } from './sheet-place.ts';

export type MoveSite = (siteId: string, to: Position) => void;

interface DragInput {
  readonly map: MapLibreMap | null;
  readonly chosen: PlaceRef | null;
  readonly onMoveSite: MoveSite | undefined;
}

/** A pointer that goes no further than this has only been pressed. */
const SLACK_PX = 4;

/**
 * The chosen site follows the pointer that holds it, and is told when it is let go. Only the chosen one: a map that is panned
 * over ten thousand sites must move none of them. While it is held only its raised picture moves, not the source of all sites.
 */
export function useSiteDrag({ map, chosen, onMoveSite }: DragInput) {
  const [held, setHeld] = useState<Position | null>(null);
  const told = useRef(onMoveSite);
  const stop = useRef<(() => void) | null>(null);
  useEffect(() => {
    told.current = onMoveSite;
  });
  useEffect(() => () => stop.current?.(), []);

  const onStart = (event: MapLayerMouseEvent | MapLayerTouchEvent) => {
    if (map === null || onMoveSite === undefined || chosen?.kind !== 'site') return;
    if (!isSame(placeAt(event), chosen)) return;
    event.preventDefault();
    stop.current = followPointer(map, {
      from: event.point,
      onMove: setHeld,
      onEnd: (at) => {
        setHeld(null);
        if (at !== null) told.current?.(chosen.id, at);
      },
    });
  };
  return { heldAt: held, onStart };
}

interface Following {
  readonly from: { readonly x: number; readonly y: number };
  readonly onMove: (at: Position) => void;
  /** null: it was let go where it was taken. */
  readonly onEnd: (at: Position | null) => void;
}

function followPointer(map: MapLibreMap, { from, onMove, onEnd }: Following): () => void {
  let at: Position | null = null;
  const move = ({ point, lngLat }: MapLayerMouseEvent | MapLayerTouchEvent) => {
    if (at === null && Math.hypot(point.x - from.x, point.y - from.y) < SLACK_PX) return;
    at = { latitude: lngLat.lat, longitude: lngLat.wrap().lng };
    onMove(at);
  };
  const stop = () => {
    map.off('mousemove', move);
    map.off('touchmove', move);
    window.removeEventListener('mouseup', end);
    window.removeEventListener('touchend', end);
    window.removeEventListener('keydown', leave);
  };
  const end = () => {
    stop();
    onEnd(at);
  };
  const leave = ({ key }: KeyboardEvent) => {
    if (key !== 'Escape') return;
    stop();
    onEnd(null);
  };
  map.on('mousemove', move);
  map.on('touchmove', move);
  window.addEventListener('mouseup', end);
  window.addEventListener('touchend', end);
  window.addEventListener('keydown', leave);
  return stop;
}

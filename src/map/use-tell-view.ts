import type { Map as MapLibreMap } from 'maplibre-gl';
import { useEffect, useRef } from 'react';

/** Where the map looks; north up, no tilt. */
export interface SheetCamera {
  readonly longitude: number;
  readonly latitude: number;
  readonly zoom: number;
}

/** Degrees; `west` and `east` run on past 180 where the box crosses it. */
export interface SheetBox {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
}

/** Goes with a movement that the sheet makes by itself. */
export const OF_SHEET = { ofSheet: true };

/** `byHand`: a person moved the map; what it does by itself is no news for the address. */
export type ViewTold = (camera: SheetCamera, box: SheetBox, byHand: boolean) => void;

/** Tells where the map looks when it is there, and after each movement. */
export function useTellView(map: MapLibreMap | null, onView: ViewTold | undefined): void {
  const told = useRef(onView);
  useEffect(() => {
    told.current = onView;
  });
  useEffect(() => {
    if (map === null) return;
    const tell = (byHand: boolean) => {
      const { lng, lat } = map.getCenter();
      const bounds = map.getBounds();
      const box = {
        west: bounds.getWest(),
        south: bounds.getSouth(),
        east: bounds.getEast(),
        north: bounds.getNorth(),
      };
      told.current?.({ longitude: lng, latitude: lat, zoom: map.getZoom() }, box, byHand);
    };
    const moved = (event: object) => tell(!('ofSheet' in event));
    tell(false);
    map.on('moveend', moved);
    return () => {
      map.off('moveend', moved);
    };
  }, [map]);
}

/** The address rounds where the map looks: nearer than this it looks there already. */
const SAME_ZOOM = 0.02;
const SAME_DEGREES = 0.002;

/** Looks where an address says once it says something else, as after Back. */
export function useFollowCamera(map: MapLibreMap | null, camera: SheetCamera | null): void {
  useEffect(() => {
    if (map === null || camera === null || map.isMoving()) return;
    const { lng, lat } = map.getCenter();
    const isThere =
      Math.abs(map.getZoom() - camera.zoom) < SAME_ZOOM &&
      Math.abs(lng - camera.longitude) < SAME_DEGREES &&
      Math.abs(lat - camera.latitude) < SAME_DEGREES;
    if (!isThere) map.jumpTo({ center: [camera.longitude, camera.latitude], zoom: camera.zoom });
  }, [map, camera]);
}

import type { Map as MapLibreMap } from 'maplibre-gl';
import { useEffect } from 'react';
import { markPicture } from './mark-pictures.ts';
import { NOTHING, paintPixels } from './paint-pixels.ts';
import { SHEET_EDGE } from './sheet-edges.ts';
import { drawTownDot } from './town-dot.ts';

/** A distance field is as sharp at any size; more texels would only shorten its reach. */
const FIELD_RATIO = 2;

/** Draws the picture of a mark or a town when the map first needs it. */
export function usePictures(map: MapLibreMap | null): void {
  useEffect(() => {
    if (map === null) return;
    const pixelRatio = Math.max(2, window.devicePixelRatio);
    map.setMissingStyleImageResolver(async (name) => {
      if (map.hasImage(name)) return;
      const mark = markPicture(name, name.startsWith('field:') ? FIELD_RATIO : pixelRatio);
      if (mark !== null) {
        map.addImage(name, mark.pixels, { pixelRatio: mark.isField ? FIELD_RATIO : pixelRatio, sdf: mark.isField });
        return;
      }
      const picture =
        name === SHEET_EDGE ? paintPixels({ sizePx: 1, pixelRatio }, () => NOTHING) : drawTownDot(name, pixelRatio);
      if (picture !== null) map.addImage(name, picture, { pixelRatio });
    });
    return () => {
      map.setMissingStyleImageResolver(null);
    };
  }, [map]);
}

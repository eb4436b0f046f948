import type { Map as MapLibreMap } from 'maplibre-gl';

/** What comes within so long of a frame waits for the next one; the eye sees a map that fills up, not its single steps. */
const GAP_MS = 150;

/**
 * Draws fewer frames where each is dear, on a machine without a graphics processor: tiles, places, scores and names come one by one,
 * and the map would be drawn whole for each of them. While it moves nothing waits.
 */
export function spareFrames(map: MapLibreMap): void {
  const draw = map.triggerRepaint.bind(map);
  let drawnAt = Number.NEGATIVE_INFINITY;
  let timer: ReturnType<typeof setTimeout> | undefined;
  map.on('render', () => {
    drawnAt = performance.now();
  });
  map.on('remove', () => clearTimeout(timer));
  map.triggerRepaint = () => {
    const waitMs = drawnAt + GAP_MS - performance.now();
    if (waitMs <= 0 || map.isMoving()) draw();
    else
      timer ??= setTimeout(() => {
        timer = undefined;
        draw();
      }, waitMs);
  };
}

import type { Map as MapLibreMap } from 'maplibre-gl';
import { useEffect, useRef } from 'react';
import type { MarkInk, MarkInks, SheetPlace } from './sheet-place.ts';

/** A hollow mark lets the map be seen through it. */
export const HOLLOW = 'rgba(251, 249, 243, 0.55)';

/**
 * Tells the map the colour of every mark that has another than before. The geometry stays as it is: a colour is a state of its
 * feature, so that thousands of marks follow a slider within a frame.
 */
export function useMarkInks(
  map: MapLibreMap | null,
  source: string,
  { places, inks }: { readonly places: readonly SheetPlace[]; readonly inks: MarkInks },
): void {
  const told = useRef<ReadonlyMap<string, string | null>>(new Map());
  useEffect(() => {
    if (map === null) return;
    const tell = () => {
      if (map.getSource(source) === undefined) return;
      const next = new Map<string, string | null>();
      for (const { id } of places) {
        const colour = inks.get(id)?.colour ?? null;
        next.set(id, colour);
        if (!told.current.has(id) || told.current.get(id) !== colour)
          map.setFeatureState({ source, id }, stateOf(colour));
      }
      for (const id of told.current.keys()) if (!next.has(id)) map.removeFeatureState({ source, id });
      told.current = next;
    };
    tell();
    // A source that comes later than its colours, as when the style is on its way, is told then.
    const whenAdded = (event: { readonly sourceId?: string }) => {
      if (event.sourceId === source && told.current.size === 0) tell();
    };
    map.on('sourcedata', whenAdded);
    return () => {
      map.off('sourcedata', whenAdded);
    };
  }, [map, source, places, inks]);
}

function stateOf(colour: MarkInk['colour']): { readonly colour: string } {
  return { colour: colour ?? HOLLOW };
}

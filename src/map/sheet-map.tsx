import './sheet-map.css';
import * as maplibregl from 'maplibre-gl';
import workerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?url';
import { type ReactNode, type RefObject, useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { type MapLayerMouseEvent, type MapRef, Map as MapView } from 'react-map-gl/maplibre';
import type { MapStation } from '../contract/programme-map.ts';
import { boxAround } from './fit-stations.ts';
import { GraticuleLayer } from './graticule-layer.tsx';
import { ITALIC, mapFonts, ROMAN } from './map-fonts.ts';
import { MARGIN, Neatline } from './neatline.tsx';
import { NOTHING, type Pixels, paintPixels } from './paint-pixels.ts';
import type { UnitSystem } from './scale-bar.ts';
import { SheetEdgeLayer } from './sheet-edge-layer.tsx';
import { SHEET_EDGE } from './sheet-edges.ts';
import { Scale, Sources, ZoomButtons } from './sheet-furniture.tsx';
import { sheetStyle } from './sheet-style.ts';
import { StationKeys } from './station-keys.tsx';
import { STATION_MARKS, StationLayers } from './station-layers.tsx';
import { drawMark, markNamed } from './station-mark.ts';
import { drawTownDot } from './town-dot.ts';

// A built client answers an unknown address with its page; the worker has to be asked for by its real name.
maplibregl.setWorkerUrl(workerUrl);

export type SheetMapProps = {
  readonly stations: readonly MapStation[];
  readonly chosenId: string | null;
  readonly onChoose: (stationId: string) => void;
  /** A click beside every station. */
  readonly onBackground?: (position: { latitude: number; longitude: number }) => void;
  /** Where to look first; without it the stations are fitted into the frame, or the world where there are none. */
  readonly initialView?: { readonly longitude: number; readonly latitude: number; readonly zoom: number };
  /** Stands inside the frame where there is room, and under it on a narrow sheet. */
  readonly legend?: ReactNode;
  readonly units?: UnitSystem;
  /** More layers, drawn by react-map-gl's Source and Layer; see BELOW_LINES and BELOW_NAMES of sheet-style.ts. */
  readonly children?: ReactNode;
};

const WORLD = { longitude: 12, latitude: 18, zoom: 1.2 };
const ZOOM_LIMITS = { minZoom: 0.8, maxZoom: 11 };
const FIT = { padding: 56, maxZoom: 8 };
/** A finger or a pointer this near to a mark means it. */
const REACH_PX = 10;
const FADE_MS = 200;
const WORDS = { 'Map.Title': 'Map. Arrow keys move it, plus and minus zoom.' };

/** The map as a printed sheet. Fills its parent, which gives it its height. */
export function SheetMap(props: SheetMapProps) {
  const { stations, chosenId, onChoose, onBackground, legend, units = 'si', children } = props;
  const [map, setMap] = useState<maplibregl.Map | null>(null);
  const [pointedId, setPointedId] = useState<string | null>(null);
  const wrapper = useRef<HTMLDivElement>(null);
  const style = useSheetStyle();
  const hold = useCallback((ref: MapRef | null) => setMap(ref?.getMap() ?? null), []);
  usePictures(map);
  useIdleMark(map, wrapper);
  const fitAll = useFit(map, props);
  useChosenInView(map, props);

  const click = (event: MapLayerMouseEvent) => {
    const id = stationAt(event);
    if (id !== null) onChoose(id);
    else onBackground?.({ latitude: event.lngLat.lat, longitude: event.lngLat.wrap().lng });
  };
  const pointByKey = (station: MapStation | null) => {
    setPointedId(station?.id ?? null);
    if (map === null || station === null) return;
    const position: [number, number] = [station.longitude, station.latitude];
    if (!map.getBounds().contains(position)) map.easeTo({ center: position });
  };

  return (
    <div ref={wrapper} data-sheet-map="" className="@container flex size-full flex-col">
      <div className="relative min-h-0 flex-1">
        <Neatline map={map} />
        <div className="absolute isolate overflow-hidden bg-water" style={MARGIN}>
          <MapView
            ref={hold}
            mapLib={maplibregl}
            mapStyle={style}
            initialViewState={firstView(props)}
            style={{ width: '100%', height: '100%' }}
            {...ZOOM_LIMITS}
            maxPitch={0}
            dragRotate={false}
            touchPitch={false}
            pitchWithRotate={false}
            attributionControl={false}
            fadeDuration={lessMotion() ? 0 : FADE_MS}
            locale={WORDS}
            cursor={pointedId === null ? 'grab' : 'pointer'}
            onLoad={({ target }) => target.touchZoomRotate.disableRotation()}
            onClick={click}
            onMouseMove={(event) => setPointedId(stationAt(event))}
            onMouseOut={() => setPointedId(null)}
          >
            <GraticuleLayer map={map} />
            {children}
            <StationLayers stations={stations} chosenId={chosenId} pointedId={pointedId} />
            <SheetEdgeLayer map={map} />
          </MapView>
          <StationKeys stations={stations} chosenId={chosenId} onChoose={onChoose} onPoint={pointByKey} />
          <ZoomButtons onIn={() => map?.zoomIn()} onOut={() => map?.zoomOut()} onAll={fitAll} />
          <div className="absolute right-0 bottom-0 flex flex-col items-end">
            <Scale map={map} units={units} />
            <Sources />
          </div>
          {legend !== undefined && (
            <div className="absolute bottom-3 left-3 hidden w-56 border border-ink/60 bg-paper p-3 @xl:block">
              {legend}
            </div>
          )}
        </div>
      </div>
      {legend !== undefined && <div className="px-7 pt-2 @xl:hidden">{legend}</div>}
    </div>
  );
}

function useSheetStyle(): maplibregl.StyleSpecification {
  return useMemo(() => {
    const { origin, href } = window.location;
    return sheetStyle({ origin, fonts: mapFonts(href), faces: { roman: ROMAN, italic: ITALIC } });
  }, []);
}

function firstView({ stations, initialView }: SheetMapProps) {
  const box = boxAround(stations);
  if (initialView !== undefined) return { ...initialView };
  return box === null ? WORLD : { bounds: toBounds(box), fitBoundsOptions: FIT };
}

function toBounds([west, south, east, north]: readonly [number, number, number, number]): [
  number,
  number,
  number,
  number,
] {
  return [west, south, east, north];
}

/** Fits the stations once, when they come after the map; gives the same for the button. */
function useFit(map: maplibregl.Map | null, { stations, initialView }: SheetMapProps): (() => void) | null {
  const box = useMemo(() => boxAround(stations), [stations]);
  const settled = useRef(initialView !== undefined || box !== null);
  useEffect(() => {
    if (map === null || box === null || settled.current) return;
    settled.current = true;
    map.fitBounds(toBounds(box), { ...FIT, animate: false });
  }, [map, box]);
  return box === null ? null : () => map?.fitBounds(toBounds(box), FIT);
}

/** A station chosen elsewhere (in the ranking, by its address) is brought into the frame; one that is in it moves nothing. */
function useChosenInView(map: maplibregl.Map | null, { stations, chosenId }: SheetMapProps) {
  const shownId = useRef<string | null>(null);
  useEffect(() => {
    const chosen = stations.find(({ id }) => id === chosenId);
    if (map === null || chosen === undefined || shownId.current === chosen.id) return;
    shownId.current = chosen.id;
    const position: [number, number] = [chosen.longitude, chosen.latitude];
    if (!map.getBounds().contains(position)) map.easeTo({ center: position });
  }, [map, stations, chosenId]);
}

/** MapLibre itself turns flights into jumps for readers who want less motion; the fading of names is left to us. */
function lessMotion(): boolean {
  return window.matchMedia('(prefers-reduced-motion: reduce)').matches;
}

/** The station under the pointer, the nearest where several are in reach. */
function stationAt({ target: map, point }: MapLayerMouseEvent): string | null {
  if (map.getLayer(STATION_MARKS) === undefined) return null;
  const box: [maplibregl.PointLike, maplibregl.PointLike] = [
    [point.x - REACH_PX, point.y - REACH_PX],
    [point.x + REACH_PX, point.y + REACH_PX],
  ];
  let nearest: { id: string; distance: number } | null = null;
  for (const { geometry, properties } of map.queryRenderedFeatures(box, { layers: [STATION_MARKS] })) {
    if (geometry.type !== 'Point') continue;
    const [longitude = 0, latitude = 0] = geometry.coordinates;
    const distance = map.project([longitude, latitude]).dist(point);
    if (nearest === null || distance < nearest.distance) nearest = { id: String(properties.id), distance };
  }
  return nearest?.id ?? null;
}

/** Draws the picture of a station or a town when the map first needs it. */
function usePictures(map: maplibregl.Map | null) {
  useEffect(() => {
    if (map === null) return;
    const pixelRatio = Math.max(2, window.devicePixelRatio);
    map.setMissingStyleImageResolver(async (name) => {
      const picture = pictureOf(name, pixelRatio);
      if (picture !== null && !map.hasImage(name)) map.addImage(name, picture, { pixelRatio });
    });
    return () => {
      map.setMissingStyleImageResolver(null);
    };
  }, [map]);
}

function pictureOf(name: string, pixelRatio: number): Pixels | null {
  if (name === SHEET_EDGE) return paintPixels({ sizePx: 1, pixelRatio }, () => NOTHING);
  const mark = markNamed(name);
  return mark === null ? drawTownDot(name, pixelRatio) : drawMark(mark, pixelRatio);
}

/** `data-idle` stands on the sheet while everything asked for is drawn: what a test waits for. */
function useIdleMark(map: maplibregl.Map | null, wrapper: RefObject<HTMLDivElement | null>) {
  // After every change of what is to be drawn: not idle until the map has said so again.
  useEffect(() => {
    wrapper.current?.removeAttribute('data-idle');
    map?.triggerRepaint();
  });
  useEffect(() => {
    const busy = () => wrapper.current?.removeAttribute('data-idle');
    const idle = () => wrapper.current?.setAttribute('data-idle', '');
    map?.on('render', busy);
    map?.on('idle', idle);
    return () => {
      map?.off('render', busy);
      map?.off('idle', idle);
    };
  }, [map, wrapper]);
}

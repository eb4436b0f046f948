import './sheet-map.css';
import * as maplibregl from 'maplibre-gl';
import workerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?url';
import { type ReactNode, useCallback, useMemo, useRef, useState } from 'react';
import { type MapLayerMouseEvent, type MapRef, Map as MapView } from 'react-map-gl/maplibre';
import { isDrawnInSoftware } from './drawn-in-software.ts';
import { boxAround } from './fit-stations.ts';
import { GraticuleLayer } from './graticule-layer.tsx';
import { ITALIC, mapFonts, ROMAN } from './map-fonts.ts';
import { MARGIN, Neatline } from './neatline.tsx';
import { placeAt } from './place-at.ts';
import type { RaisedPlace } from './place-features.ts';
import { PlaceKeys } from './place-keys.tsx';
import { MARK_SOURCES, PlaceFigures, PlaceMarks, PlaceNames, RaisedNames, RaisedRings } from './place-layers.tsx';
import { PointLayer } from './point-layer.tsx';
import { loadShadedRelief, RELIEF_PROTOCOL } from './relief-tiles.ts';
import type { UnitSystem } from './scale-bar.ts';
import { SheetEdgeLayer } from './sheet-edge-layer.tsx';
import { Scale, Sources, ZoomButtons } from './sheet-furniture.tsx';
import { isSame, type MarkInks, type PlaceRef, type Position, type SheetPlace } from './sheet-place.ts';
import { sheetStyle } from './sheet-style.ts';
import { spareFrames } from './spare-frames.ts';
import { useChosenInView } from './use-chosen-in-view.ts';
import { FIT, toBounds, useFit } from './use-fit.ts';
import { useFurniture } from './use-furniture.ts';
import { useIdleMark } from './use-idle-mark.ts';
import { useIsWide } from './use-is-wide.ts';
import { useMarkInks } from './use-mark-inks.ts';
import { usePictures } from './use-pictures.ts';
import { type MoveSite, useSiteDrag } from './use-site-drag.ts';
import { type SheetCamera, useFollowCamera, useTellView, type ViewTold } from './use-tell-view.ts';

// A built client answers an unknown address with its page; the worker has to be asked for by its real name.
maplibregl.setWorkerUrl(workerUrl);
maplibregl.addProtocol(RELIEF_PROTOCOL, loadShadedRelief);

export type SheetMapProps = {
  readonly stations: readonly SheetPlace[];
  readonly sites: readonly SheetPlace[];
  readonly inks: MarkInks;
  /** What a reader who does not see the map is told of a place. */
  readonly sentence: (place: SheetPlace) => string;
  readonly chosen: PlaceRef | null;
  readonly onChoose: (place: PlaceRef) => void;
  /** A click beside every mark. */
  readonly onPoint?: (position: Position) => void;
  /** A position that is in view beside the map; marked by a cross. */
  readonly point?: Position | null;
  /** The chosen site was dragged to another place; without it nothing can be dragged. */
  readonly onMoveSite?: MoveSite;
  /** Where to look first; without it the places are fitted into the frame, or the world where there are none. */
  readonly camera: SheetCamera | null;
  /** After every movement: where the map looks, and which box it shows. */
  readonly onView?: ViewTold;
  /** Stands inside the frame where there is room, and under it on a narrow sheet. */
  readonly legend?: ReactNode;
  readonly units?: UnitSystem;
  /** More layers, drawn by react-map-gl's Source and Layer; see BELOW_LINES and BELOW_NAMES of sheet-style.ts. */
  readonly children?: ReactNode;
};

const WORLD = { longitude: 12, latitude: 18, zoom: 1.2 };
const ZOOM_LIMITS = { minZoom: 0.8, maxZoom: 11 };
const FADE_MS = 200;
/** From this width on the legend stands inside the frame. */
const ROOMY_PX = 576;
const WORDS = { 'Map.Title': 'Map. Arrow keys move it, plus and minus zoom.' };

/** The map as a printed sheet. Fills its parent, which gives it its height. */
export function SheetMap(props: SheetMapProps) {
  const { stations, sites, inks, chosen, onChoose, onPoint, legend, units = 'si', children } = props;
  const [map, setMap] = useState<maplibregl.Map | null>(null);
  const [pointed, setPointed] = useState<PlaceRef | null>(null);
  const wrapper = useRef<HTMLDivElement>(null);
  const frame = useRef<HTMLDivElement>(null);
  const furniture = useFurniture(frame);
  const isRoomy = useIsWide(wrapper, ROOMY_PX);
  const style = useSheetStyle();
  const hold = useCallback((ref: MapRef | null) => {
    const held = ref?.getMap() ?? null;
    if (held !== null && isDrawnInSoftware()) spareFrames(held);
    setMap(held);
  }, []);
  usePictures(map);
  useMarkInks(map, MARK_SOURCES.station, { places: stations, inks });
  useMarkInks(map, MARK_SOURCES.site, { places: sites, inks });
  useIdleMark(map, { wrapper, source: MARK_SOURCES.station });
  useTellView(map, props.onView);
  useFollowCamera(map, props.camera);
  const fitAll = useFit(map, { places: useAll(stations, sites), furniture, isPlaced: props.camera !== null });
  const { heldAt, onStart } = useSiteDrag({ map, chosen, onMoveSite: props.onMoveSite });
  const places = { stations, sites };
  const raised = useRaised(places, { chosen, pointed, heldAt });
  useChosenInView(map, raised.find(({ how }) => how === 'chosen')?.place);

  const click = (event: MapLayerMouseEvent) => {
    const place = placeAt(event);
    if (place !== null) onChoose(place);
    else onPoint?.({ latitude: event.lngLat.lat, longitude: event.lngLat.wrap().lng });
  };
  const point = (place: PlaceRef | null) => setPointed((held) => (isSame(held, place) ? held : place));
  const pointByKey = (kind: PlaceRef['kind']) => (place: SheetPlace | null) => {
    point(place && { kind, id: place.id });
    if (map === null || place === null) return;
    const position: [number, number] = [place.longitude, place.latitude];
    if (!map.getBounds().contains(position)) map.easeTo({ center: position });
  };
  const keys = (kind: PlaceRef['kind'], label: string) => (
    <PlaceKeys
      label={label}
      places={places[`${kind}s`]}
      sentence={props.sentence}
      chosenId={chosen?.kind === kind ? chosen.id : null}
      onChoose={(id) => onChoose({ kind, id })}
      onPoint={pointByKey(kind)}
    />
  );

  return (
    <div ref={wrapper} data-sheet-map="" className="flex size-full flex-col">
      <div className="relative min-h-0 flex-1">
        <Neatline map={map} />
        <div ref={frame} className="absolute isolate overflow-hidden bg-water" style={MARGIN}>
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
            fadeDuration={lessMotion() || isDrawnInSoftware() ? 0 : FADE_MS}
            {...(isDrawnInSoftware() ? { pixelRatio: 1 } : {})}
            locale={WORDS}
            cursor={heldAt !== null ? 'grabbing' : pointed === null ? 'grab' : 'pointer'}
            onLoad={({ target }) => target.touchZoomRotate.disableRotation()}
            onClick={click}
            onMouseDown={onStart}
            onTouchStart={onStart}
            onMouseMove={(event) => point(placeAt(event))}
            onMouseOut={() => point(null)}
          >
            <GraticuleLayer map={map} />
            {children}
            <RaisedRings raised={raised} inks={inks} />
            <PlaceNames kind="station" places={stations} raised={raised} />
            <PlaceNames kind="site" places={sites} raised={raised} />
            <PlaceFigures kind="station" places={stations} inks={inks} />
            <PlaceFigures kind="site" places={sites} inks={inks} />
            <PlaceMarks kind="station" places={stations} />
            <PlaceMarks kind="site" places={sites} />
            <RaisedNames />
            <PointLayer point={props.point ?? null} />
            <SheetEdgeLayer map={map} furniture={furniture} />
          </MapView>
          {keys('site', 'Sites on the map')}
          {keys('station', 'Stations on the map')}
          <ZoomButtons onIn={() => map?.zoomIn()} onOut={() => map?.zoomOut()} onAll={fitAll} />
          <div data-furniture="" className="absolute right-0 bottom-0 flex flex-col items-end">
            <Scale map={map} units={units} />
            <Sources />
          </div>
          {isRoomy ? (
            <div data-furniture="" className="absolute bottom-3 left-3 w-60 border border-ink/60 bg-paper p-3">
              {legend}
            </div>
          ) : null}
        </div>
      </div>
      {isRoomy ? null : <div className="px-7 pt-2">{legend}</div>}
    </div>
  );
}

function useSheetStyle(): maplibregl.StyleSpecification {
  return useMemo(() => {
    const { origin, href } = window.location;
    return sheetStyle({ origin, fonts: mapFonts(href), faces: { roman: ROMAN, italic: ITALIC } });
  }, []);
}

type Placed = Pick<SheetMapProps, 'stations' | 'sites'>;

function useAll(stations: readonly SheetPlace[], sites: readonly SheetPlace[]): readonly SheetPlace[] {
  return useMemo(() => [...stations, ...sites], [stations, sites]);
}

function firstView({ stations, sites, camera }: SheetMapProps) {
  const box = boxAround([...stations, ...sites]);
  if (camera !== null) return { ...camera };
  return box === null ? WORLD : { bounds: toBounds(box), fitBoundsOptions: FIT };
}

interface Attention {
  readonly chosen: PlaceRef | null;
  readonly pointed: PlaceRef | null;
  /** Where the chosen site is held. */
  readonly heldAt: Position | null;
}

/** The chosen place and the one under the pointer or the keyboard's cursor; one that is both is chosen. */
function useRaised({ stations, sites }: Placed, { chosen, pointed, heldAt }: Attention): readonly RaisedPlace[] {
  return useMemo(() => {
    const raise = (ref: PlaceRef | null, how: RaisedPlace['how']): RaisedPlace[] => {
      const place = ref && (ref.kind === 'site' ? sites : stations).find(({ id }) => id === ref.id);
      return ref && place ? [{ place: { ...place, ...heldAt }, kind: ref.kind, how }] : [];
    };
    if (heldAt !== null) return raise(chosen, 'held');
    return [...raise(chosen, 'chosen'), ...(isSame(chosen, pointed) ? [] : raise(pointed, 'pointed'))];
  }, [stations, sites, chosen, pointed, heldAt]);
}

/** MapLibre itself turns flights into jumps for readers who want less motion; the fading of names is left to us. */
function lessMotion(): boolean {
  return window.matchMedia('(prefers-reduced-motion: reduce)').matches;
}

import { lazy, type ReactNode, Suspense, useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { PlaceFigures } from '../../../contract/place-figures.ts';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import { LayerChoice } from '../../../features/runs/layer-choice.tsx';
import { gradeOf, layerTitle, layerUnit } from '../../../features/runs/map-layer.ts';
import { findPlace, type MapPlace, placesOfMap, withFigures } from '../../../features/runs/map-places.ts';
import { inkedLayer, placeSentence } from '../../../features/runs/place-inks.ts';
import { rankedPlaces } from '../../../features/runs/ranked-places.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { useLiveScores } from '../../../features/runs/use-live-scores.ts';
import { useMedia, WIDE } from '../../../lib/use-media.ts';
import { LayerLegend } from '../../../map/layer-legend.tsx';
import { SheetMap } from '../../../map/sheet-map.tsx';
import type { PlaceRef, SheetPlace } from '../../../map/sheet-place.ts';
import type { SheetBox } from '../../../map/use-tell-view.ts';
import { Loading } from '../../../ui/loading.tsx';
import { BriefMargin } from './brief-margin.tsx';
import { printCamera } from './map-address.ts';
import { MoveNote } from './move-note.tsx';
import { NarrowSheet } from './narrow-sheet.tsx';
import { PlaceActions } from './place-actions.tsx';
import type { ChosenPlace } from './place-margin.tsx';
import { Ranking } from './ranking.tsx';
import { useDepression } from './use-depression.ts';
import { useLiveDraft } from './use-live-draft.ts';
import { useMapAddress } from './use-map-address.ts';
import { useMoveSite } from './use-move-site.ts';
import { useSurfaceOnMap } from './use-surface-on-map.tsx';
import { useTry } from './use-try.ts';
import { WideSheet } from './wide-sheet.tsx';

// What the first drawing of the map does without comes after it.
const FindPlace = lazy(async () => ({ default: (await import('./find-place.tsx')).FindPlace }));
const PointNote = lazy(async () => ({ default: (await import('./point-note.tsx')).PointNote }));

/** What both compositions of the sheet are made from. */
export interface SheetProps {
  /** Name of the brief: what the page is about. */
  readonly title: string;
  readonly brief: ReactNode;
  readonly ranking: ReactNode;
  readonly map: ReactNode;
  /** A clicked position, in place of a place. */
  readonly point: ReactNode;
  readonly chosen: ChosenPlace | null;
  readonly onLeave: () => void;
}

interface MapSheetProps {
  readonly ids: ProgrammeIds;
  readonly map: ProgrammeMap;
}

/** The sheet with all that its parts share. Its state stands in the address: Back, a reload and a link all come back to it. */
export function MapSheet({ ids, map }: MapSheetProps) {
  const [address, changeAddress] = useMapAddress();
  const isWide = useMedia(WIDE);
  const saved = useMemo(() => placesOfMap(map), [map]);
  const live = useLiveDraft({ ids, brief: map.brief, address, changeAddress });
  const box = useRef<SheetBox | null>(null);
  const asked = useMemo(
    () => (live.body === null || live.key === null ? null : { key: live.key, body: live.body }),
    [live.body, live.key],
  );
  const scores = useLiveScores({ ids, places: saved, draft: asked, box });
  const [bridge, setBridge] = useState<Bridge | null>(null);
  const figures = asked === null ? bridgeFigures(bridge, map) : scores.figures;
  const places = useMemo(() => withFigures(saved, figures), [saved, figures]);
  const { layer } = address;
  const depression = useDepression(ids.teamId, layer);
  const inked = useMemo(() => inkedLayer(layer, places, depression), [layer, places, depression]);
  const sheetPlaces = useSheetPlaces(map);

  // Where there is room for it, a place is always in view: the first of the ranking until one is chosen.
  const first = useMemo(() => firstOf(saved), [saved]);
  const chosen = address.point !== null ? null : (address.place ?? (isWide ? first : null));
  const choose = useCallback((place: PlaceRef | null) => changeAddress({ place, point: null }), [changeAddress]);
  const moving = useMoveSite(ids, { map, chosen });
  const onTry = useTry(live);
  const place = findPlace(places, chosen);
  const savedPlace = findPlace(saved, chosen);

  const surface = useSurfaceOnMap({ ids, map, draft: asked, address, changeAddress });
  const toldCamera = useRef<string | null>(null);
  const move = useRef(moving.move);
  useEffect(() => {
    move.current = moving.move;
  });
  const mayMove = moving.move !== null;
  const { point, camera } = address;
  // A slider moves many times between two answers: the map is looked at anew only when there is something new to draw.
  const sheet = useMemo(
    () => (
      <SheetMap
        {...sheetPlaces}
        inks={inked.inks}
        sentence={(each) => sentenceOf(each, places, (found) => placeSentence(found, layer, depression))}
        chosen={chosen}
        onChoose={choose}
        onPoint={(at) => changeAddress({ point: at, place: null })}
        {...(mayMove ? { onMoveSite: (id, to) => move.current?.(id, to) } : {})}
        point={point}
        camera={camera}
        onView={(next, seen, byHand) => {
          box.current = seen;
          const printed = printCamera(next);
          if (byHand && printed !== toldCamera.current) changeAddress({ camera: next }, { replace: true });
          toldCamera.current = printed;
        }}
        legend={
          <>
            <LayerChoice
              layer={layer}
              onChoose={(next) => changeAddress({ layer: next }, { replace: next.kind === layer.kind })}
            />
            <LayerLegend
              title={layerTitle(layer)}
              unit={layerUnit(layer)}
              scale={inked.scale}
              places={inked.legend}
              noneWords={layer.kind === 'score' ? 'No score' : 'No figure'}
              {...(layer.kind === 'grade' ? { classNames: inked.scale.limits.slice(0, -1).map(gradeOf) } : {})}
            />
            {surface.legend}
          </>
        }
      >
        {surface.layer}
      </SheetMap>
    ),
    [
      sheetPlaces,
      inked,
      places,
      layer,
      depression,
      chosen,
      choose,
      changeAddress,
      mayMove,
      point,
      camera,
      surface.layer,
      surface.legend,
    ],
  );
  const props: SheetProps = {
    title: map.brief.name,
    map: (
      <>
        {sheet}
        <MoveNote moving={moving} />
      </>
    ),
    brief: (
      <>
        <Suspense fallback={<div className="min-h-9 flex-none" />}>
          <FindPlace ids={ids} onFind={changeAddress} />
        </Suspense>
        <BriefMargin
          ids={ids}
          map={map}
          live={live}
          scores={scores}
          onBrief={(briefId) => changeAddress({ briefId, draft: null })}
          onSaved={(version) => {
            setBridge({ version, figures: scores.figures });
            changeAddress({ draft: null });
          }}
        />
      </>
    ),
    ranking: (
      <Ranking
        places={places}
        address={address}
        changeAddress={changeAddress}
        chosen={chosen}
        onChoose={choose}
        inks={inked.inks}
        isBehind={scores.isBehind}
      />
    ),
    point:
      address.point === null ? null : (
        <Suspense fallback={<Loading what="the estimate" />}>
          <PointNote ids={ids} brief={map.brief} point={address.point} isDraft={asked !== null} onChoose={choose} />
        </Suspense>
      ),
    chosen:
      place === undefined || savedPlace === undefined
        ? null
        : {
            ids,
            figures: place,
            saved: savedPlace,
            draft: asked,
            actions: <PlaceActions ids={ids} place={place} mayMove={moving.move !== null} />,
            onTry,
          },
    onLeave: () => choose(null),
  };
  return isWide ? <WideSheet {...props} /> : <NarrowSheet {...props} />;
}

/** The figures of a draft that was saved, until the runs of its version are there: the map does not go blank meanwhile. */
interface Bridge {
  readonly version: number;
  readonly figures: ReadonlyMap<string, PlaceFigures>;
}

const NO_FIGURES: Bridge['figures'] = new Map();

function bridgeFigures(bridge: Bridge | null, { brief, pending }: ProgrammeMap): Bridge['figures'] {
  const isAhead =
    bridge !== null && (brief.version < bridge.version || (brief.version === bridge.version && pending > 0));
  return isAhead ? bridge.figures : NO_FIGURES;
}

/** What the map draws: it changes with the places themselves, never with their figures. */
function useSheetPlaces({ stations, sites }: ProgrammeMap): {
  readonly stations: readonly SheetPlace[];
  readonly sites: readonly SheetPlace[];
} {
  return useMemo(() => {
    const plain = ({ id, name, latitude, longitude, grade }: SheetPlace): SheetPlace => ({
      ...{ id, name, latitude, longitude, grade },
    });
    return { stations: stations.map(plain), sites: sites.map((site) => ({ ...plain(site), letters: site.letters })) };
  }, [stations, sites]);
}

function firstOf({ stations, sites }: { stations: readonly MapPlace[]; sites: readonly MapPlace[] }): PlaceRef | null {
  const first = rankedPlaces(sites.length > 0 ? sites : stations)[0]?.place;
  return first === undefined ? null : { kind: first.kind, id: first.id };
}

function sentenceOf(
  { id, letters, name }: SheetPlace,
  places: Parameters<typeof findPlace>[0],
  words: (place: MapPlace) => string,
): string {
  const found = findPlace(places, { kind: letters === undefined ? 'station' : 'site', id });
  return found === undefined ? name : words(found);
}

/** What of the map stands in its address, so that a link, a reload and Back come to the same view. Pure. */
import { type MapLayer, printLayer, readLayer } from '../../../features/runs/map-layer.ts';
import {
  BRIEF_PARAM,
  DRAFT_PARAM,
  FIND_PARAM,
  LAYER_PARAM,
  LIST_PARAM,
  PLACE_PARAM,
  POINT_PARAM,
  SITE_PARAM,
  SURFACE_PARAM,
  VIEW_PARAM,
} from '../../../lib/paths.ts';
import type { PlaceKind, PlaceRef, Position } from '../../../map/sheet-place.ts';
import type { SheetCamera } from '../../../map/use-tell-view.ts';

export interface MapAddress {
  readonly briefId: string | null;
  /** The chosen station or site. */
  readonly place: PlaceRef | null;
  /** Where between the places somebody has clicked. */
  readonly point: Position | null;
  readonly layer: MapLayer;
  /** As `printLiveDraft` writes it. */
  readonly draft: string | null;
  readonly find: string;
  /** Which ranking is shown; null: the usual one. */
  readonly list: PlaceKind | null;
  readonly camera: SheetCamera | null;
  /** Whether the score between stations is drawn. */
  readonly surface: boolean;
}

export function readMapAddress(search: URLSearchParams): MapAddress {
  const site = search.get(SITE_PARAM);
  const station = search.get(PLACE_PARAM);
  const list = search.get(LIST_PARAM);
  return {
    briefId: search.get(BRIEF_PARAM),
    place: site !== null ? { kind: 'site', id: site } : station !== null ? { kind: 'station', id: station } : null,
    point: readPoint(search.get(POINT_PARAM)),
    layer: readLayer(search.get(LAYER_PARAM)),
    draft: search.get(DRAFT_PARAM),
    find: search.get(FIND_PARAM) ?? '',
    list: list === 'site' || list === 'station' ? list : null,
    camera: readCamera(search.get(VIEW_PARAM)),
    surface: search.get(SURFACE_PARAM) !== OFF,
  };
}

/** The address with some of it changed; what it does not know stays. */
export function changedSearch(search: URLSearchParams, changes: Partial<MapAddress>): URLSearchParams {
  const next = new URLSearchParams(search);
  const put = (name: string, value: string | null) => {
    if (value === null || value === '') next.delete(name);
    else next.set(name, value);
  };
  if (changes.briefId !== undefined) put(BRIEF_PARAM, changes.briefId);
  if (changes.place !== undefined) {
    put(PLACE_PARAM, changes.place?.kind === 'station' ? changes.place.id : null);
    put(SITE_PARAM, changes.place?.kind === 'site' ? changes.place.id : null);
  }
  if (changes.point !== undefined) put(POINT_PARAM, changes.point && printPoint(changes.point));
  if (changes.layer !== undefined) put(LAYER_PARAM, printLayer(changes.layer));
  if (changes.draft !== undefined) put(DRAFT_PARAM, changes.draft);
  if (changes.find !== undefined) put(FIND_PARAM, changes.find);
  if (changes.list !== undefined) put(LIST_PARAM, changes.list);
  if (changes.camera !== undefined) put(VIEW_PARAM, changes.camera && printCamera(changes.camera));
  if (changes.surface !== undefined) put(SURFACE_PARAM, changes.surface ? null : OFF);
  return next;
}

/** As it usually is, it is not named. */
const OFF = 'off';
const DEGREE_DECIMALS = 3;

function printPoint({ latitude, longitude }: Position): string {
  return `${latitude.toFixed(DEGREE_DECIMALS)},${longitude.toFixed(DEGREE_DECIMALS)}`;
}

/** Zoom, latitude, longitude, rounded to what the eye tells apart. */
export function printCamera({ zoom, latitude, longitude }: SheetCamera): string {
  return `${zoom.toFixed(2)},${printPoint({ latitude, longitude })}`;
}

function readPoint(text: string | null): Position | null {
  const [latitude, longitude, ...more] = numbersIn(text);
  if (latitude === undefined || longitude === undefined || more.length > 0) return null;
  return isOnEarth(latitude, longitude) ? { latitude, longitude } : null;
}

function readCamera(text: string | null): SheetCamera | null {
  const [zoom, latitude, longitude, ...more] = numbersIn(text);
  if (zoom === undefined || latitude === undefined || longitude === undefined || more.length > 0) return null;
  return zoom >= 0 && zoom <= 24 && isOnEarth(latitude, longitude) ? { zoom, latitude, longitude } : null;
}

function numbersIn(text: string | null): number[] {
  const numbers = (text ?? '').split(',').map((part) => (part.trim() === '' ? Number.NaN : Number(part)));
  return numbers.every(Number.isFinite) ? numbers : [];
}

function isOnEarth(latitude: number, longitude: number): boolean {
  return Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180;
}

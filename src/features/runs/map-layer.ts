/** Layers of the map: what its marks are coloured by, how they are written in an address, and what a place has of each. */

import { metClasses, unmetClasses } from '../../charts/hour-class-colours.ts';
import { classWords } from '../../charts/hour-class-words.ts';
import { flatScale, type LayerScale, rampScale, roundTop } from '../../charts/layer-scale.ts';
import { BRONZE, GRADES, MADDER, MOSS, PLUM, type Sequence, UMBER } from '../../charts/sequences.ts';
import type { PlaceFigures } from '../../contract/place-figures.ts';
import { type HourClass, hourClasses } from '../../engine/hour-classes/hour-class.ts';
import { number } from '../../lib/format.ts';

/** `months`: numbers from 1 to 12, rising; all twelve are the year. */
export type MapLayer =
  | { readonly kind: 'score' }
  | { readonly kind: 'hours'; readonly hourClass: HourClass }
  | { readonly kind: 'depression'; readonly atLeastK: number; readonly months: readonly number[] }
  | { readonly kind: 'water' }
  | { readonly kind: 'electricity' }
  | { readonly kind: 'grade' };

export type LayerKind = MapLayer['kind'];

export const SCORE_LAYER: MapLayer = { kind: 'score' };
export const ALL_MONTHS: readonly number[] = Array.from({ length: 12 }, (_, index) => index + 1);
/** As the weather's counts go. */
export const MOST_DEPRESSION_K = 63;
const USUAL_DEPRESSION_K = 10;

export const layerKinds: readonly LayerKind[] = ['score', 'hours', 'depression', 'water', 'electricity', 'grade'];

export const layerNames: Readonly<Record<LayerKind, string>> = {
  score: 'Score',
  hours: 'Hours of a class',
  depression: 'Depression hours',
  water: 'Make-up water',
  electricity: 'Electricity saved',
  grade: 'Grade',
};

/** A layer of a kind as it is first shown. */
export function usualLayer(kind: LayerKind): MapLayer {
  if (kind === 'hours') return { kind, hourClass: 'damp' };
  if (kind === 'depression') return { kind, atLeastK: USUAL_DEPRESSION_K, months: ALL_MONTHS };
  return { kind };
}

/** "hours.damp", "depression.10.6-7-8", "water": as the address has it; null for the score, which needs no word. */
export function printLayer(layer: MapLayer): string | null {
  if (layer.kind === 'score') return null;
  if (layer.kind === 'hours') return `hours.${layer.hourClass}`;
  if (layer.kind !== 'depression') return layer.kind;
  const months = layer.months.length === ALL_MONTHS.length ? '' : `.${layer.months.join('-')}`;
  return `depression.${layer.atLeastK}${months}`;
}

/** What an address says; the score where it says nothing, or nothing that is known. */
export function readLayer(text: string | null): MapLayer {
  const [word = '', first = '', second] = (text ?? '').split('.');
  const kind = layerKinds.find((each) => each === word);
  if (kind === undefined) return SCORE_LAYER;
  if (kind === 'hours') {
    const hourClass = hourClasses.find((each) => each === first);
    return hourClass === undefined ? usualLayer(kind) : { kind, hourClass };
  }
  if (kind !== 'depression') return { kind };
  const atLeastK = /^\d{1,2}$/.test(first) ? Math.min(MOST_DEPRESSION_K, Number(first)) : USUAL_DEPRESSION_K;
  return { kind, atLeastK, months: readMonths(second) };
}

function readMonths(text: string | undefined): readonly number[] {
  const months = ALL_MONTHS.filter((month) => (text ?? '').split('-').includes(String(month)));
  return months.length === 0 ? ALL_MONTHS : months;
}

/** Depression hours by station; they come from the weather alone, apart from the brief. */
export type DepressionHours = ReadonlyMap<string, number | null>;

const GRADE_VALUES = { A: 3, B: 2, C: 1, D: 0 } as const;

/** What the layer has of a place; null where there is nothing to colour. A site has the depression of its station. */
export function layerValue(
  layer: MapLayer,
  place: PlaceFigures & { readonly stationId: string | null },
  depression: DepressionHours,
): number | null {
  switch (layer.kind) {
    case 'score':
      return place.score;
    case 'hours':
      return place.ledger?.classes[hourClasses.indexOf(layer.hourClass)] ?? null;
    case 'depression':
      return place.stationId === null ? null : (depression.get(place.stationId) ?? null);
    case 'water':
      return place.litresPerKwh;
    case 'electricity':
      return place.savedPct;
    case 'grade':
      return GRADE_VALUES[place.grade];
  }
}

/** The figure under a name: short, as a height under a summit. */
export function figureOf(layer: MapLayer, value: number | null): string {
  if (value === null) return '';
  switch (layer.kind) {
    case 'grade':
      return gradeOf(value);
    case 'water':
      return number(value, 1);
    case 'electricity':
      return `${number(value)}\u00a0%`;
    case 'score':
      return String(value);
    case 'hours':
    case 'depression':
      return `${number(value)}\u00a0h`;
  }
}

export function gradeOf(value: number): string {
  return Object.entries(GRADE_VALUES).find(([, each]) => each === value)?.[0] ?? '';
}

/** Limits of the flat layers stand still, so that a colour means the same while a slider moves and from map to map. */
const { POSITIVE_INFINITY: UP, NEGATIVE_INFINITY: DOWN } = Number;
const HOUR_LIMITS = [0, 50, 200, 500, 1000, 2000, UP];
const WATER_LIMITS = [0, 0.5, 1, 1.5, 2, 3, UP];
const SAVED_LIMITS = [DOWN, 0, 20, 40, 60, 80, 100];
const GRADE_SCALE: LayerScale = {
  limits: [0, 1, 2, 3, 4],
  isRamp: false,
  colours: [GRADES.D, GRADES.C, GRADES.B, GRADES.A],
};

/** @param mostDepression the greatest count in view of the layer of depression, which has no natural top */
export function scaleOf(layer: MapLayer, mostDepression: number): LayerScale {
  switch (layer.kind) {
    case 'score':
      return rampScale(100);
    case 'depression':
      return rampScale(roundTop(mostDepression));
    case 'hours':
      return flatScale(HOUR_LIMITS, sequenceOf(layer.hourClass));
    case 'water':
      return flatScale(WATER_LIMITS, PLUM);
    case 'electricity':
      return flatScale(SAVED_LIMITS, BRONZE);
    case 'grade':
      return GRADE_SCALE;
  }
}

function sequenceOf(hourClass: HourClass): Sequence {
  if (metClasses.some((each) => each === hourClass)) return MOSS;
  return unmetClasses.some((each) => each === hourClass) ? MADDER : UMBER;
}

export function layerTitle(layer: MapLayer): string {
  if (layer.kind === 'hours') return classWords[layer.hourClass];
  return layerNames[layer.kind];
}

export function layerUnit(layer: MapLayer): string {
  switch (layer.kind) {
    case 'score':
      return 'points of 100';
    case 'hours':
      return 'hours of the year';
    case 'depression':
      return layer.months.length === ALL_MONTHS.length ? 'hours of the year' : 'hours of the months';
    case 'water':
      return 'L per kWh of cooling';
    case 'electricity':
      return '% of the reference';
    case 'grade':
      return 'of the weather';
  }
}

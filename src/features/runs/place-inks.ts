import { classWords } from '../../charts/hour-class-words.ts';
import { colourOf, type LayerScale } from '../../charts/layer-scale.ts';
import type { LegendPlace } from '../../map/layer-legend.tsx';
import type { MarkInk, MarkInks } from '../../map/sheet-place.ts';
import { type DepressionHours, figureOf, layerValue, type MapLayer, scaleOf } from './map-layer.ts';
import type { MapPlace, MapPlaces } from './map-places.ts';

export interface InkedLayer {
  readonly scale: LayerScale;
  readonly inks: MarkInks;
  /** For the counts of the legend: sites where there are any, and stations. */
  readonly legend: readonly LegendPlace[];
}

/** How the layer inks every place of the map. */
export function inkedLayer(layer: MapLayer, { stations, sites }: MapPlaces, depression: DepressionHours): InkedLayer {
  const places = [...sites, ...stations];
  const values = places.map((place) => layerValue(layer, place, depression));
  const most = layer.kind === 'depression' ? values.reduce<number>((top, value) => Math.max(top, value ?? 0), 0) : 0;
  const scale = scaleOf(layer, most);
  const inks = new Map<string, MarkInk>();
  // Thousands of places have a hundred scores.
  const inkOf = new Map<number | null, MarkInk>();
  places.forEach(({ id }, index) => {
    const value = values[index] ?? null;
    const ink = inkOf.get(value) ?? {
      colour: value === null ? null : colourOf(scale, value),
      figure: figureOf(layer, value),
    };
    inkOf.set(value, ink);
    inks.set(id, ink);
  });
  return { scale, inks, legend: places.map(({ grade }, index) => ({ grade, value: values[index] ?? null })) };
}

/** What a reader who does not see the map is told of a place. */
export function placeSentence(place: MapPlace, layer: MapLayer, depression: DepressionHours): string {
  const score = place.score === null ? (place.scoreNote ?? 'no score') : `score ${place.score} of 100`;
  const verdict =
    place.verdict === null || place.verdict === 'no tolerance set'
      ? ''
      : place.verdict === 'does not'
        ? ', does not meet the brief'
        : ', meets the brief';
  const isSaid = layer.kind === 'score' || layer.kind === 'grade';
  const figure = isSaid ? '' : figureOf(layer, layerValue(layer, place, depression));
  const letters = place.letters === undefined ? '' : `Site ${place.letters}, `;
  return `${letters}${place.name}: ${score}, grade ${place.grade}${verdict}${figure === '' ? '' : `, ${layerPhrase(layer)} ${figure}`}`;
}

function layerPhrase(layer: MapLayer): string {
  switch (layer.kind) {
    case 'hours':
      return classWords[layer.hourClass].toLowerCase();
    case 'depression':
      return `at least ${layer.atLeastK} K of depression`;
    case 'water':
      return 'make-up water, litres per kWh,';
    default:
      return 'electricity saved';
  }
}

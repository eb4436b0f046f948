import { metresPerPixel, type SheetView } from './sheet-view.ts';

export type UnitSystem = 'si' | 'ip';

export type ScaleBar = {
  /** Length of the whole bar; it has two halves. */
  readonly widthPx: number;
  /** What stands at the start, the middle and the end. */
  readonly figures: readonly [string, string, string];
  readonly unit: 'km' | 'm' | 'mi' | 'ft';
};

const METRES_PER_MILE = 1609.344;
const METRES_PER_FOOT = 0.3048;

/** The longest bar of a round length (1, 2 or 5 times a power of ten) that fits into `mostPx`. */
export function scaleBar(view: SheetView, { mostPx, units }: { mostPx: number; units: UnitSystem }): ScaleBar {
  const mostMetres = metresPerPixel(view) * mostPx;
  const { unit, metres } = unitFor(mostMetres, units);
  const length = roundBelow(mostMetres / metres);
  return {
    widthPx: (length * metres) / metresPerPixel(view),
    figures: ['0', figure(length / 2), figure(length)],
    unit,
  };
}

function unitFor(mostMetres: number, units: UnitSystem): { unit: ScaleBar['unit']; metres: number } {
  if (units === 'si') return mostMetres >= 2000 ? { unit: 'km', metres: 1000 } : { unit: 'm', metres: 1 };
  return mostMetres >= 2 * METRES_PER_MILE
    ? { unit: 'mi', metres: METRES_PER_MILE }
    : { unit: 'ft', metres: METRES_PER_FOOT };
}

function roundBelow(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const lead = value / power;
  return (lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power;
}

function figure(value: number): string {
  return new Intl.NumberFormat('en', { maximumFractionDigits: 1 }).format(value);
}

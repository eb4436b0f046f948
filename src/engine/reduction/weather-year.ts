/** `typical` is made of months of several years; `actual` is one calendar year; `derived` comes from another weather year. */
export type YearKind = 'typical' | 'actual' | 'derived';

/**
 * The facts kept of a weather year, layout 1: one column per variable, slot order, 8760 or 8784 values.
 * Every figure, saved or previewed, is computed from these columns.
 */
export interface PackedYear {
  /** 0.01 °C; missing -32768. */
  readonly dryBulb: Int16Array;
  /** 2e-6 kg/kg; missing 65535. */
  readonly humidityRatio: Uint16Array;
  /** 2 Pa; missing 65535. */
  readonly pressure: Uint16Array;
  /** Provenance, see `hour-flags.ts`. */
  readonly flags: Uint8Array;
}

export const PACKED_LAYOUT = 1;

export interface WeatherYear {
  readonly kind: YearKind;
  /** The calendar year of an `actual` year, else null. */
  readonly year: number | null;
  /** Minutes that the slots' local standard time is ahead of UTC. */
  readonly utcOffsetMin: number;
  readonly packed: PackedYear;
}

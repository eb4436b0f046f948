/** How many hours of a year lie in each small field of the psychrometric chart. */

export interface DensityField {
  /** Lower edges: dry bulb, °C, and humidity ratio, kg/kg. */
  readonly fromC: number;
  readonly fromRatio: number;
  readonly hours: number;
}

export const FIELD_C = 1;
export const FIELD_RATIO = 0.0005;

/** Fields with hours in them; together they hold every hour of which both values are known. */
export function hourDensity(columns: {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
}): readonly DensityField[] {
  const fields = new Map<string, DensityField>();
  columns.dryBulbC.forEach((dryBulbC, slot) => {
    const ratio = columns.humidityRatio[slot] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + ratio)) return;
    const column = Math.floor(dryBulbC / FIELD_C);
    // A whole multiple must not fall into the field below by the rounding of binary fractions.
    const row = Math.floor(ratio / FIELD_RATIO + 1e-9);
    const key = `${column} ${row}`;
    const hours = (fields.get(key)?.hours ?? 0) + 1;
    fields.set(key, { fromC: column * FIELD_C, fromRatio: row * FIELD_RATIO, hours });
  });
  return [...fields.values()];
}

const PALE = 226;
const DARK = 96;

/** A neutral grey, darker the more hours; never the ramp, which says how much evaporation can do. */
export function densityGrey(hours: number, mostHours: number): string {
  const level = Math.round(PALE - (PALE - DARK) * Math.sqrt(hours / mostHours));
  return `rgb(${level} ${level} ${level})`;
}

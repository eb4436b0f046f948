import { saturationHumidityRatio } from '#engine/psychrometrics/moist-air.ts';
import type { WeatherYear, YearKind } from '#engine/reduction/weather-year.ts';

/** Weather of one slot: a humidity ratio, or a share of saturation, 0..1, in its place; null where nothing is known. */
export type SyntheticHour =
  | { readonly dryBulbC: number; readonly humidityRatio: number; readonly pressurePa?: number }
  | { readonly dryBulbC: number; readonly saturation: number; readonly pressurePa?: number }
  | null;

/** A weather year made up slot by slot and packed as a read one would be. */
export function syntheticYear(input: {
  at: (slot: number) => SyntheticHour;
  slots?: number;
  kind?: YearKind;
  year?: number | null;
  utcOffsetMin?: number;
}): WeatherYear {
  const { at, slots = 8760, kind = 'typical', year = null, utcOffsetMin = 0 } = input;
  const packed = {
    dryBulb: new Int16Array(slots).fill(-32768),
    humidityRatio: new Uint16Array(slots).fill(65535),
    pressure: new Uint16Array(slots).fill(65535),
    flags: new Uint8Array(slots),
  };
  for (let slot = 0; slot < slots; slot++) {
    const hour = at(slot);
    if (hour === null) continue;
    const pressurePa = hour.pressurePa ?? 101325;
    packed.dryBulb[slot] = Math.round(hour.dryBulbC * 100);
    packed.pressure[slot] = Math.round(pressurePa / 2);
    packed.humidityRatio[slot] = Math.round(humidityRatioOf(hour, pressurePa) / 2e-6);
  }
  return { kind, year, utcOffsetMin, packed };
}

function humidityRatioOf(hour: Exclude<SyntheticHour, null>, pressurePa: number): number {
  if ('humidityRatio' in hour) return hour.humidityRatio;
  return hour.saturation * saturationHumidityRatio(hour.dryBulbC, pressurePa);
}

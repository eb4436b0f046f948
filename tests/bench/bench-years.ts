import { unpackYear, type YearColumns } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { climates, climateYear } from '../support/synthetic-climates.ts';

/** So many made-up weather years: the ten climates in turn, each time with other weather. */
export function benchYears(count: number): readonly WeatherYear[] {
  return Array.from({ length: count }, (_none, index) => {
    const climate = climates[index % climates.length];
    if (climate === undefined) throw new Error('there are no climates');
    return climateYear(climate, 1000 + index);
  });
}

/** The hours of which everything is known, one year after another. */
export function knownHours(years: readonly WeatherYear[]): YearColumns {
  const rows = years.flatMap(({ packed }) => {
    const { dryBulbC, humidityRatio, pressurePa } = unpackYear(packed);
    return Array.from(dryBulbC, (tempC, slot) => [tempC, humidityRatio[slot] ?? 0, pressurePa[slot] ?? 0] as const);
  });
  const known = rows.filter((row) => row.every((value) => !Number.isNaN(value)));
  return {
    dryBulbC: Float64Array.from(known, ([tempC]) => tempC),
    humidityRatio: Float64Array.from(known, ([, ratio]) => ratio),
    pressurePa: Float64Array.from(known, ([, , pressurePa]) => pressurePa),
  };
}

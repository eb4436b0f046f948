/**
 * Figures of the air of many hours at once, from tabulated saturation pressure: good to a thousandth of a percent of relative humidity,
 * of an index point or of a kilopascal. Where that leaves a question open, `ofHour` answers by the formulas themselves.
 */
import { temperatureHumidityIndex } from '../hour-classes/index-limit.ts';
import { dewPointC, relativeHumidityPct, saturationPressurePa, vapourPressurePa } from '../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../psychrometrics/saturation-table.ts';
import { HOURS_PER_BLOCK } from './hour-columns.ts';

/** Some hours' air, by place. */
export interface AirColumns {
  count: number;
  readonly tempC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
}

export interface AirFigure {
  /** Writes the figure of every hour into `figureColumn`. */
  readonly fill: (air: AirColumns) => void;
  readonly ofHour: (air: AirColumns, at: number) => number;
}

const column = new Float64Array(HOURS_PER_BLOCK);
/** The figure that was filled in last. */
export const figureColumn = column;

const PA_PER_KPA = 1000;
/** Above any supply; a dew point is never answered above the dry bulb that is given. */
const HOTTER_THAN_ANY_SUPPLY_C = 150;

/** Relative humidity, %. */
export const humidityFigure: AirFigure = {
  fill: fillHumidity,
  ofHour: humidityOf,
};

/** Temperature-humidity index, points. */
export const indexFigure: AirFigure = {
  fill: (air) => {
    fillHumidity(air);
    for (let at = 0; at < air.count; at++) column[at] = temperatureHumidityIndex(air.tempC[at] ?? 0, column[at] ?? 0);
  },
  ofHour: (air, at) => temperatureHumidityIndex(air.tempC[at] ?? 0, humidityOf(air, at)),
};

/** Vapour pressure deficit, kPa. */
export const deficitFigure: AirFigure = {
  fill: (air) => {
    for (let at = 0; at < air.count; at++) {
      const saturationPa = tabledSaturationPa(air.tempC[at] ?? 0);
      const vapourPa = vapourPressurePa(air.humidityRatio[at] ?? 0, air.pressurePa[at] ?? 0);
      column[at] = Math.max(0, saturationPa - vapourPa) / PA_PER_KPA;
    }
  },
  ofHour: (air, at) =>
    (saturationPressurePa(air.tempC[at] ?? 0) * Math.max(0, 1 - humidityOf(air, at) / 100)) / PA_PER_KPA,
};

/** Dew point, °C, which the table alone answers. */
export const dewPointFigure: AirFigure = {
  fill: (air) => {
    for (let at = 0; at < air.count; at++) column[at] = dewPointOf(air, at);
  },
  ofHour: dewPointOf,
};

function fillHumidity(air: AirColumns): void {
  const { count, tempC, humidityRatio, pressurePa } = air;
  for (let at = 0; at < count; at++) {
    const vapourPa = vapourPressurePa(humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
    column[at] = 100 * (vapourPa / tabledSaturationPa(tempC[at] ?? 0));
  }
}

function humidityOf({ tempC, humidityRatio, pressurePa }: AirColumns, at: number): number {
  return relativeHumidityPct(tempC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
}

function dewPointOf({ humidityRatio, pressurePa }: AirColumns, at: number): number {
  return dewPointC(HOTTER_THAN_ANY_SUPPLY_C, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
}

/** Violent changes that are weather: the cold air under a thunderstorm, and the warm wind behind mountains. */
import { MISSING_INT16 } from '../../conventions.ts';
import type { Jump, TestedHours } from './tested-hours.ts';

const RISE_POINTS = 20;
const NO_RETURN_H = 3;
const FOEHN_UP_TO = 1_500;
/** Ours: a dew point that moves by no more than this in the hour counts as constant. */
const CONSTANT_DEW = 100;

/**
 * A fall of the dry bulb with a rise of the dew point, or of the relative humidity by at least 20 points, and no return within
 * 3 hours is an outflow. A rise up to 15 K with falling relative humidity at a constant dew point and no return is foehn. A return
 * (ours) is half the way back.
 * @param step the step after the change; the one before it holds a value
 */
export function weatherOf(hours: TestedHours, step: number): Jump['weather'] {
  const { values } = hours.dryBulb;
  const change = (values[step] ?? 0) - (values[step - 1] ?? 0);
  if (returns(hours, step, change)) return null;
  const dewRise = changeOf(hours.dewPoint.values, step);
  const humidity = hours.steps.relativeHumidityPct;
  const humidityRise = (humidity[step] ?? Number.NaN) - (humidity[step - 1] ?? Number.NaN);
  if (change < 0) return dewRise > 0 || humidityRise >= RISE_POINTS ? 'outflow' : null;
  const foehn = change <= FOEHN_UP_TO && humidityRise < 0 && Math.abs(dewRise) <= CONSTANT_DEW;
  return foehn ? 'foehn' : null;
}

function changeOf(values: Int16Array, step: number): number {
  const before = values[step - 1] ?? MISSING_INT16;
  const after = values[step] ?? MISSING_INT16;
  return before === MISSING_INT16 || after === MISSING_INT16 ? Number.NaN : after - before;
}

function returns({ dryBulb, steps }: TestedHours, step: number, change: number): boolean {
  const before = dryBulb.values[step - 1] ?? 0;
  for (let later = step + 1; later <= step + NO_RETURN_H * steps.stepsPerHour; later++) {
    const value = dryBulb.values[later] ?? MISSING_INT16;
    if (value === MISSING_INT16) continue;
    const left = (value - before) / change;
    if (left < 0.5) return true;
  }
  return false;
}

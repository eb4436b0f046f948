import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { DRY_BULB_LIMITS_C } from '#engine/weather-files/assembly/range-limits.ts';
import type { WeatherFileReading } from '#engine/weather-files/weather-file-reading.ts';
import { faultyFindings } from './readings.ts';

/** Whatever the bytes: no throw, whole sentences, and no hour outside what weather can be. */
export function problemsOf(reading: WeatherFileReading): readonly string[] {
  const problems: string[] = [];
  const sentences = faultyFindings(reading);
  if (sentences.length > 0) problems.push(`finding: ${sentences[0]?.message}`);
  if (reading.status === 'refused') {
    if (!reading.findings.some(({ severity }) => severity === 'refuse')) problems.push('refused without a reason');
    return problems;
  }
  if ((reading.status === 'asks') !== reading.asks.length > 0) problems.push('status and questions disagree');
  if (reading.hours === null) return problems;
  const { dryBulbC, humidityRatio, pressurePa } = reading.hours;
  const outside = (column: Float64Array, low: number, high: number) =>
    column.some((value) => value < low || value > high);
  if (outside(dryBulbC, DRY_BULB_LIMITS_C.low, DRY_BULB_LIMITS_C.high)) problems.push('dry bulb');
  if (outside(humidityRatio, 0, 0.2)) problems.push('humidity ratio');
  if (outside(pressurePa, 31_000, 110_000)) problems.push('pressure');
  const { facts } = reduceYear(reading);
  if (facts.measured + facts.estimated + facts.repaired + facts.missing !== facts.hours) problems.push('counts');
  if ((facts.maxDepressionK ?? 0) > 100) problems.push('depression');
  return problems;
}

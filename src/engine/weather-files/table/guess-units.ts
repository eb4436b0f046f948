/** Units by what a header says and by what values can be; a guess that a person confirms. */
import type { HumidityUnit, PressureUnit, TemperatureUnit } from './table-mapping.ts';

export interface UnitGuess<Unit> {
  readonly unit: Unit;
  /** false when the values fit another unit as well. */
  readonly sure: boolean;
}

/** Values sorted upwards, without missing ones. */
export function sortedKnown(values: readonly number[]): Float64Array {
  return Float64Array.from(values.filter((value) => Number.isFinite(value))).sort();
}

function quantile(sorted: Float64Array, share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? Number.NaN;
}

/** The unit of a temperature from the words beside its name, such as "°C" or "degF"; null when they say none. */
export function temperatureUnitOfWords(words: string): TemperatureUnit | null {
  const plain = words.toLowerCase();
  if (/\b(deg(rees?)?)?[ _]?(f|fahrenheit)\b|°\s*f/.test(plain)) return 'F';
  if (/\b(deg(rees?)?)?[ _]?(k|kelvin)\b|°\s*k/.test(plain)) return 'K';
  return /\b(deg(rees?)?)?[ _]?(c|celsius|centigrade)\b|°\s*c/.test(plain) ? 'C' : null;
}

/** Codes for a missing temperature that stand among its values; no weather of any unit is so warm by accident. */
const MISSING_CODES: readonly number[] = [99.9, 999, 999.9, 9999, 9999.9, 99_999];

function withoutCodes(sorted: Float64Array): Float64Array {
  let end = sorted.length;
  while (end > 0 && MISSING_CODES.includes(sorted[end - 1] ?? Number.NaN)) end--;
  return sorted.subarray(0, end);
}

/** 0.1 to 99.9 % of the values within -60 to 55: °C; a median of 200 to 330: K; over 45, or a maximum of 60 to 135: °F. */
export function temperatureUnitOfValues(values: Float64Array): UnitGuess<TemperatureUnit> {
  const sorted = withoutCodes(values);
  const median = quantile(sorted, 0.5);
  const most = sorted.at(-1) ?? Number.NaN;
  if (median >= 200 && median <= 330) return { unit: 'K', sure: true };
  if (median > 45 || (most >= 60 && most <= 135)) return { unit: 'F', sure: true };
  const fits = quantile(sorted, 0.001) >= -60 && quantile(sorted, 0.999) <= 55;
  // Up to 40 it may be an alpine year in °C, or a cold one in °F.
  return { unit: 'C', sure: fits && most > 40 };
}

export function humidityUnitOfWords(words: string): HumidityUnit | null {
  if (/%|percent|\bpct\b/i.test(words)) return '%';
  return /fraction|\b0-1\b|\bratio\b/i.test(words) ? 'fraction' : null;
}

/** A maximum of at most 1.05 and a median under 1: a fraction. */
export function humidityUnitOfValues(sorted: Float64Array): UnitGuess<HumidityUnit> {
  const most = sorted.at(-1) ?? Number.NaN;
  if (most <= 1.05 && quantile(sorted, 0.5) <= 1) return { unit: 'fraction', sure: true };
  return { unit: '%', sure: most <= 110 };
}

export function pressureUnitOfWords(words: string): PressureUnit | null {
  const plain = words.toLowerCase();
  if (/\bkpa\b|kilopascal/.test(plain)) return 'kPa';
  if (/\bhpa\b|\bmbars?\b|\bmb\b|millibar|hectopascal/.test(plain)) return 'hPa';
  if (/\binhg\b|\bin[. ]*hg\b|inches/.test(plain)) return 'inHg';
  if (/\bmm ?hg\b|torr/.test(plain)) return 'mmHg';
  return /\bpa\b|pascal/.test(plain) ? 'Pa' : null;
}

/** By the median; 400 to 800 is millimetres of mercury only beside another column in units of the United States. */
export function pressureUnitOfValues(
  sorted: Float64Array,
  besideUnitedStatesUnits: boolean,
): UnitGuess<PressureUnit> | null {
  const median = quantile(sorted, 0.5);
  if (median >= 31_000 && median <= 120_000) return { unit: 'Pa', sure: true };
  if (median >= 400 && median <= 800 && besideUnitedStatesUnits) return { unit: 'mmHg', sure: false };
  if (median >= 500 && median <= 1100) return { unit: 'hPa', sure: true };
  if (median >= 50 && median <= 110) return { unit: 'kPa', sure: true };
  return median >= 15 && median <= 32 ? { unit: 'inHg', sure: true } : null;
}

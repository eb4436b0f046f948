/**
 * Layout 1 of a weather year: dry bulb int16 0.01 °C, humidity ratio uint16 2e-6 kg/kg, pressure uint16 2 Pa, flags uint8,
 * slot order, each value rounded to the nearest step (halves upwards), missing -32768 or 65535. Serialised little-endian.
 */
import { MISSING_INT16, MISSING_UINT16, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../conventions.ts';
import { wholeNumber } from '../whole-number.ts';
import type { PackedYear } from './weather-year.ts';

const HUMIDITY_RATIO_STEP = 2e-6;
const PRESSURE_STEP_PA = 2;
const MOST_INT16 = 32_767;
const MOST_UINT16 = MISSING_UINT16 - 1;
/** Whether the machine itself writes the low byte first, as nearly all do. */
const LITTLE_ENDIAN = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/** The columns as numbers, NaN where missing. */
export interface YearColumns {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
}

/** Packs hourly values; those beyond the range of a column (a humidity ratio over 0.131) are set to its end. */
export function packYear(columns: YearColumns & { readonly flags: Uint8Array }): PackedYear {
  const dryBulb = new Int16Array(columns.dryBulbC.length);
  for (let slot = 0; slot < dryBulb.length; slot++) {
    const value = 100 * (columns.dryBulbC[slot] ?? Number.NaN);
    dryBulb[slot] = value >= -MOST_INT16 && value <= MOST_INT16 ? wholeNumber(value) : endOfInt16(value);
  }
  return {
    dryBulb,
    humidityRatio: packedColumn(columns.humidityRatio, HUMIDITY_RATIO_STEP),
    pressure: packedColumn(columns.pressurePa, PRESSURE_STEP_PA),
    flags: columns.flags.slice(),
  };
}

function packedColumn(values: Float64Array, step: number): Uint16Array {
  const packed = new Uint16Array(values.length);
  for (let slot = 0; slot < packed.length; slot++) {
    const steps = (values[slot] ?? Number.NaN) / step;
    packed[slot] = steps >= 0 && steps < MOST_UINT16 ? wholeNumber(steps) : endOfUint16(steps);
  }
  return packed;
}

function endOfUint16(steps: number): number {
  return Number.isNaN(steps) ? MISSING_UINT16 : steps < 0 ? 0 : MOST_UINT16;
}

function endOfInt16(value: number): number {
  return Number.isNaN(value) ? MISSING_INT16 : value < 0 ? -MOST_INT16 : MOST_INT16;
}

/** Columns for so many slots, not filled in. */
export function yearColumns(slots: number): YearColumns {
  return {
    dryBulbC: new Float64Array(slots),
    humidityRatio: new Float64Array(slots),
    pressurePa: new Float64Array(slots),
  };
}

/**
 * The numbers that the packed columns stand for.
 * @param into columns of at least as many slots to write them into; the answer is their beginning
 */
export function unpackYear(year: PackedYear, into?: YearColumns): YearColumns {
  const slots = year.flags.length;
  const room = into ?? yearColumns(slots);
  const { dryBulbC, humidityRatio, pressurePa } = room;
  for (let slot = 0; slot < slots; slot++) {
    const packedC = year.dryBulb[slot] ?? MISSING_INT16;
    const packedRatio = year.humidityRatio[slot] ?? MISSING_UINT16;
    const packedPa = year.pressure[slot] ?? MISSING_UINT16;
    dryBulbC[slot] = packedC === MISSING_INT16 ? Number.NaN : packedC / 100;
    humidityRatio[slot] = packedRatio === MISSING_UINT16 ? Number.NaN : packedRatio * HUMIDITY_RATIO_STEP;
    pressurePa[slot] = packedPa === MISSING_UINT16 ? Number.NaN : packedPa * PRESSURE_STEP_PA;
  }
  if (dryBulbC.length === slots) return room;
  return {
    dryBulbC: dryBulbC.subarray(0, slots),
    humidityRatio: humidityRatio.subarray(0, slots),
    pressurePa: pressurePa.subarray(0, slots),
  };
}

/** What one packed value stands for that is not missing: °C, kg/kg, Pa. */
export function unpackedDryBulbC(packed: number): number {
  return packed / 100;
}
export function unpackedRatio(packed: number): number {
  return packed * HUMIDITY_RATIO_STEP;
}
export function unpackedPa(packed: number): number {
  return packed * PRESSURE_STEP_PA;
}

/** Dry bulb of every slot, °C, NaN where missing. */
export function unpackDryBulb({ dryBulb }: PackedYear): Float64Array {
  const dryBulbC = new Float64Array(dryBulb.length);
  for (let slot = 0; slot < dryBulbC.length; slot++) {
    const packedC = dryBulb[slot] ?? MISSING_INT16;
    dryBulbC[slot] = packedC === MISSING_INT16 ? Number.NaN : packedC / 100;
  }
  return dryBulbC;
}

export interface PackedBytes {
  readonly dryBulb: Uint8Array;
  readonly humidityRatio: Uint8Array;
  readonly pressure: Uint8Array;
  readonly flags: Uint8Array;
}

/** The columns as they are stored and hashed: little-endian whatever the machine. */
export function packedBytes(year: PackedYear): PackedBytes {
  return {
    dryBulb: bytesOf16(year.dryBulb),
    humidityRatio: bytesOf16(year.humidityRatio),
    pressure: bytesOf16(year.pressure),
    flags: year.flags.slice(),
  };
}

/** A 16-bit column as little-endian bytes; serves the histogram too. */
export function bytesOf16(values: Int16Array | Uint16Array): Uint8Array {
  if (LITTLE_ENDIAN) return new Uint8Array(values.buffer, values.byteOffset, values.byteLength).slice();
  const bytes = new Uint8Array(values.length * 2);
  for (let index = 0; index < values.length; index++) {
    const value = values[index] ?? 0;
    bytes[2 * index] = value & 0xff;
    bytes[2 * index + 1] = (value >> 8) & 0xff;
  }
  return bytes;
}

/** Little-endian bytes as unsigned 16-bit values. */
export function uint16FromBytes(bytes: Uint8Array): Uint16Array {
  const values = new Uint16Array(bytes.length >> 1);
  for (let index = 0; index < values.length; index++) values[index] = unsigned16(bytes, index);
  return values;
}

function unsigned16(bytes: Uint8Array, index: number): number {
  return (bytes[2 * index] ?? 0) | ((bytes[2 * index + 1] ?? 0) << 8);
}

/**
 * The inverse of `packedBytes`. @throws RangeError when the lengths are not those of one year of 8760 or 8784 slots
 */
export function packedFromBytes(bytes: PackedBytes): PackedYear {
  const slots = bytes.flags.length;
  const lengths = [bytes.dryBulb.length, bytes.humidityRatio.length, bytes.pressure.length];
  const known = slots === SLOTS_PER_YEAR || slots === SLOTS_PER_LEAP_YEAR;
  if (!known || lengths.some((length) => length !== 2 * slots)) {
    throw new RangeError(
      `packed columns of ${lengths.join(', ')} and ${slots} bytes, expected 2, 2, 2 and 1 for each of 8760 or 8784 slots`,
    );
  }
  return {
    // The same 16 bits, with a sign.
    dryBulb: new Int16Array(uint16FromBytes(bytes.dryBulb).buffer),
    humidityRatio: uint16FromBytes(bytes.humidityRatio),
    pressure: uint16FromBytes(bytes.pressure),
    flags: Uint8Array.from(bytes.flags),
  };
}

/**
 * The packed columns of one weather year in memory that every thread sees: dry bulb, humidity ratio and pressure of two bytes a
 * slot, then flags of one, each column whole. In the machine's own byte order, so that typed arrays can lie over it.
 */
import { endianness } from 'node:os';
import type { PackedYear } from '#engine/reduction/weather-year.ts';

/** As they are stored, little-endian. */
export interface ColumnBytes {
  readonly dryBulb: Uint8Array;
  readonly humidityRatio: Uint8Array;
  readonly pressure: Uint8Array;
  readonly flags: Uint8Array;
}

const BYTES_PER_SLOT = 7;

export function bytesOfSlots(slots: number): number {
  return BYTES_PER_SLOT * slots;
}

export function shareColumns({ dryBulb, humidityRatio, pressure, flags }: ColumnBytes): SharedArrayBuffer {
  const slots = flags.length;
  if ([dryBulb, humidityRatio, pressure].some(({ length }) => length !== 2 * slots))
    throw new RangeError('columns of one weather year differ in length');
  const shared = new SharedArrayBuffer(bytesOfSlots(slots));
  const bytes = Buffer.from(shared);
  bytes.set(dryBulb, 0);
  bytes.set(humidityRatio, 2 * slots);
  bytes.set(pressure, 4 * slots);
  bytes.set(flags, 6 * slots);
  if (endianness() === 'BE') bytes.subarray(0, 6 * slots).swap16();
  return shared;
}

/** The same columns for the engine, without a copy. */
export function packedOver(shared: SharedArrayBuffer): PackedYear {
  const slots = shared.byteLength / BYTES_PER_SLOT;
  return {
    dryBulb: new Int16Array(shared, 0, slots),
    humidityRatio: new Uint16Array(shared, 2 * slots, slots),
    pressure: new Uint16Array(shared, 4 * slots, slots),
    flags: new Uint8Array(shared, 6 * slots, slots),
  };
}

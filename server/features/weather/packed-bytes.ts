import type { PackedYear } from '#engine/reduction/weather-year.ts';

/** The columns of a packed year as the database keeps them: layout 1, little-endian, slot order. */
export interface PackedBytes {
  readonly dryBulb: Buffer;
  readonly humidityRatio: Buffer;
  readonly pressure: Buffer;
  readonly flags: Buffer;
}

export function toPackedBytes(packed: PackedYear): PackedBytes {
  return {
    dryBulb: fromValues(packed.dryBulb, (buffer, value, at) => buffer.writeInt16LE(value, at)),
    humidityRatio: fromValues(packed.humidityRatio, (buffer, value, at) => buffer.writeUInt16LE(value, at)),
    pressure: fromValues(packed.pressure, (buffer, value, at) => buffer.writeUInt16LE(value, at)),
    flags: Buffer.from(packed.flags),
  };
}

export function fromPackedBytes(bytes: PackedBytes): PackedYear {
  const slots = bytes.flags.length;
  return {
    dryBulb: Int16Array.from({ length: slots }, (_, slot) => bytes.dryBulb.readInt16LE(slot * 2)),
    humidityRatio: Uint16Array.from({ length: slots }, (_, slot) => bytes.humidityRatio.readUInt16LE(slot * 2)),
    pressure: Uint16Array.from({ length: slots }, (_, slot) => bytes.pressure.readUInt16LE(slot * 2)),
    flags: Uint8Array.from(bytes.flags),
  };
}

function fromValues(
  values: Int16Array | Uint16Array,
  write: (buffer: Buffer, value: number, at: number) => void,
): Buffer {
  const buffer = Buffer.alloc(values.length * 2);
  values.forEach((value, slot) => {
    write(buffer, value, slot * 2);
  });
  return buffer;
}

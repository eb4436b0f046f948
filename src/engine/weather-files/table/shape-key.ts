const OFFSET = 0xcbf29ce484222325n;
const PRIME = 0x100000001b3n;
const MASK = (1n << 64n) - 1n;

/** A key of 16 hexadecimal digits that tables of one shape share: delimiter, number of fields, column names (FNV-1a, 64 bit). */
export function shapeKey(shape: {
  readonly delimiter: string;
  readonly fieldCount: number;
  readonly names: readonly string[];
}): string {
  const text = JSON.stringify([shape.delimiter, shape.fieldCount, shape.names]);
  let hash = OFFSET;
  for (let at = 0; at < text.length; at++) {
    const unit = text.charCodeAt(at);
    for (const byte of unit < 0x100 ? [unit] : [unit & 0xff, unit >> 8]) hash = ((hash ^ BigInt(byte)) * PRIME) & MASK;
  }
  return hash.toString(16).padStart(16, '0');
}

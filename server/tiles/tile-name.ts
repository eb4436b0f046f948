/** What a tile address may look like: no sign, no leading zeros, no room for anything but a number. */
const WHOLE_NUMBER = /^(?:0|[1-9]\d{0,7})$/;

/** The tile that an address names; null when it is not three whole numbers. */
export function tileNamed({ z, x, y }: { z: string; x: string; y: string }): {
  zoom: number;
  column: number;
  row: number;
} | null {
  if (![z, x, y].every((part) => WHOLE_NUMBER.test(part))) return null;
  return { zoom: Number(z), column: Number(x), row: Number(y) };
}

/** A column of so many values, each from its place; several times faster than `Float64Array.from` with a mapping. */
export function floatColumn(length: number, valueAt: (index: number) => number): Float64Array {
  const column = new Float64Array(length);
  for (let index = 0; index < length; index++) column[index] = valueAt(index);
  return column;
}

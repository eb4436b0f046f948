/** How a figure changes with height over all stations, by least squares, where they are enough and lie far enough apart. */

/** Fewer stations, or less between the lowest and the highest, tell no slope (method 9). */
export const LEAST_STATIONS = 8;
export const LEAST_SPAN_M = 300;

/** Sums over stations, from which any one can be taken out again. */
export interface HeightSums {
  readonly count: number;
  readonly heights: number;
  readonly values: number;
  readonly squares: number;
  readonly products: number;
}

export function heightSums(stations: readonly (readonly [heightM: number, value: number])[]): HeightSums {
  return stations.reduce(withStation, { count: 0, heights: 0, values: 0, squares: 0, products: 0 });
}

function withStation(sums: HeightSums, [heightM, value]: readonly [number, number]): HeightSums {
  return {
    count: sums.count + 1,
    heights: sums.heights + heightM,
    values: sums.values + value,
    squares: sums.squares + heightM * heightM,
    products: sums.products + heightM * value,
  };
}

export function withoutStation(sums: HeightSums, heightM: number, value: number): HeightSums {
  return {
    count: sums.count - 1,
    heights: sums.heights - heightM,
    values: sums.values - value,
    squares: sums.squares - heightM * heightM,
    products: sums.products - heightM * value,
  };
}

/** Change of the value per metre; 0 where the stations tell none. @param spanM between the lowest and the highest of them */
export function heightSlope({ count, heights, values, squares, products }: HeightSums, spanM: number): number {
  if (count < LEAST_STATIONS || spanM < LEAST_SPAN_M) return 0;
  return (count * products - heights * values) / (count * squares - heights * heights);
}

/** Least and greatest of some values, and what they are without any one of them. */
export interface Extremes {
  readonly least: number;
  readonly greatest: number;
  /** Least and greatest of the others, once each end is taken out. */
  readonly nextLeast: number;
  readonly nextGreatest: number;
}

export function extremesOf(values: readonly number[]): Extremes {
  const sorted = values.toSorted((one, other) => one - other);
  return {
    least: sorted[0] ?? Number.NaN,
    greatest: sorted.at(-1) ?? Number.NaN,
    nextLeast: sorted[1] ?? Number.NaN,
    nextGreatest: sorted.at(-2) ?? Number.NaN,
  };
}

export function extremesWithout(extremes: Extremes, value: number): { least: number; greatest: number } {
  return {
    least: value === extremes.least ? extremes.nextLeast : extremes.least,
    greatest: value === extremes.greatest ? extremes.nextGreatest : extremes.greatest,
  };
}

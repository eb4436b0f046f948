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

/** @param values by station; NaN is left out */
export function heightSums(heightsM: Float64Array, values: Float64Array): HeightSums {
  let [count, heights, sum, squares, products] = [0, 0, 0, 0, 0];
  for (let station = 0; station < values.length; station++) {
    const value = values[station] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    const heightM = heightsM[station] ?? 0;
    count++;
    heights += heightM;
    sum += value;
    squares += heightM * heightM;
    products += heightM * value;
  }
  return { count, heights, values: sum, squares, products };
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

/** @param values by station. @param where a value is NaN here, its station is left out */
export function extremesOf(values: Float64Array, where: Float64Array): Extremes {
  let [least, nextLeast] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  let [greatest, nextGreatest] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (let station = 0; station < values.length; station++) {
    if (Number.isNaN(where[station])) continue;
    const value = values[station] ?? Number.NaN;
    if (value < least) {
      nextLeast = least;
      least = value;
    } else if (value < nextLeast) nextLeast = value;
    if (value > greatest) {
      nextGreatest = greatest;
      greatest = value;
    } else if (value > nextGreatest) nextGreatest = value;
  }
  return { least, nextLeast, greatest, nextGreatest };
}

export function extremesWithout(extremes: Extremes, value: number): { least: number; greatest: number } {
  return {
    least: value === extremes.least ? extremes.nextLeast : extremes.least,
    greatest: value === extremes.greatest ? extremes.nextGreatest : extremes.greatest,
  };
}

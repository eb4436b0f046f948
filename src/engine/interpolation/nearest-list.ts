/** The few nearest of many, kept in order while the many are looked through; of equals, the lesser number first. */
export interface NearestList {
  /** How many are held, at most `most`. */
  count: number;
  readonly most: number;
  readonly stations: Int32Array;
  readonly squaredChords: Float64Array;
}

export function nearestList(most: number): NearestList {
  return { count: 0, most, stations: new Int32Array(most), squaredChords: new Float64Array(most) };
}

/** Squared chord beyond which nothing is taken any more. */
export function reachOf({ count, most, squaredChords }: NearestList): number {
  return count < most ? Number.POSITIVE_INFINITY : (squaredChords[most - 1] ?? 0);
}

export function offer(list: NearestList, station: number, squaredChord: number): void {
  const { most, stations, squaredChords } = list;
  let place = list.count;
  if (place === most) {
    place--;
    if (!isBefore(list, place, station, squaredChord)) return;
  } else list.count++;
  while (place > 0 && isBefore(list, place - 1, station, squaredChord)) {
    squaredChords[place] = squaredChords[place - 1] ?? 0;
    stations[place] = stations[place - 1] ?? 0;
    place--;
  }
  squaredChords[place] = squaredChord;
  stations[place] = station;
}

/** Beside `offer`, not within: a function made anew for each of millions of calls would cost more than what it does. */
function isBefore({ stations, squaredChords }: NearestList, place: number, station: number, squared: number): boolean {
  const held = squaredChords[place] ?? 0;
  return squared < held || (squared === held && station < (stations[place] ?? 0));
}

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
  const comesBefore = (place: number): boolean => {
    const held = squaredChords[place] ?? 0;
    return squaredChord < held || (squaredChord === held && station < (stations[place] ?? 0));
  };
  let place = list.count;
  if (place === most) {
    place--;
    if (!comesBefore(place)) return;
  } else list.count++;
  while (place > 0 && comesBefore(place - 1)) {
    squaredChords[place] = squaredChords[place - 1] ?? 0;
    stations[place] = stations[place - 1] ?? 0;
    place--;
  }
  squaredChords[place] = squaredChord;
  stations[place] = station;
}

import type { ClimateKind } from './climates.ts';

/** What an invented recorder does wrong beside the short gaps that every station has. */
export type RecordingFault = 'long gap' | 'humidity gap' | 'stuck dew point' | 'humidity over 100' | 'pressure spike';

/** An invented station. Means and daily ranges are for January and July; the dew points too. */
export interface DemoStation {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetH: number;
  readonly climate: ClimateKind;
  readonly dryBulbC: readonly [january: number, july: number];
  readonly dailyRangeK: readonly [january: number, july: number];
  readonly dewPointC: readonly [january: number, july: number];
  /** The calendar year of an actual year; null for a typical year made of months of several years. */
  readonly year: number | null;
  readonly faults: readonly RecordingFault[];
}

type Row = readonly [
  name: string,
  latitude: number,
  longitude: number,
  elevationM: number,
  climate: ClimateKind,
  dryBulbC: DemoStation['dryBulbC'],
  dailyRangeK: DemoStation['dailyRangeK'],
  dewPointC: DemoStation['dewPointC'],
  more?: { readonly year?: number; readonly faults?: readonly RecordingFault[] },
];

const ROWS: readonly Row[] = [
  // The dry interior.
  ['Korrel Pan', -26.6, 20.6, 1042, 'desert interior', [26.5, 11], [15.5, 19], [6.5, -4], { faults: ['long gap'] }],
  ['Ochre Wells', -23.8, 19.3, 1184, 'desert interior', [25.5, 12.5], [14.5, 18], [6.5, -5]],
  ['Dunefoot', -22.9, 15.3, 688, 'desert interior', [24, 18], [14, 15], [8.5, 1.5]],
  ['Milkbush Flat', -28.1, 17.6, 815, 'desert interior', [25.5, 12.5], [15, 15], [7.5, 0]],
  ['Kite Hollow', -24.2, 24.6, 1061, 'desert interior', [26, 12.5], [13.5, 18], [15.3, -0.5]],
  ['Sandgrouse Halt', -27.9, 24.2, 1158, 'desert interior', [25.5, 10.5], [15, 18.5], [13.8, -1.5], { year: 2023 }],
  ['Thornveil', -20.6, 21.2, 1127, 'tropical savanna', [26, 14.5], [12.5, 18.5], [16.2, 0]],
  ['Heron Reeds', -19.1, 22.7, 943, 'tropical savanna', [26, 16.5], [11.5, 17.5], [17.6, 4]],
  ['Saltlick Halt', -21.4, 26.2, 992, 'tropical savanna', [26, 14.5], [11.5, 17], [17.5, 3.5]],
  // The stony south and its edge.
  ['Shale Drift', -30.6, 22.9, 1243, 'escarpment highland', [23.5, 8.5], [16, 16], [8.5, -2]],
  ['Ashveld', -29.2, 25.2, 1312, 'escarpment highland', [24, 8.5], [15, 17.5], [13.2, -2]],
  [
    'Plover Rand',
    -32.3,
    23.7,
    904,
    'escarpment highland',
    [23.5, 10.5],
    [15, 15],
    [13.5, 2],
    { faults: ['humidity gap'] },
  ],
  ['Lark Hollow', -33.5, 21.9, 327, 'escarpment highland', [24.8, 12], [13.5, 13], [15, 5]],
  // Grassland, from the plateau to the eastern slope.
  [
    'Twin Kopjes',
    -27.6,
    26.6,
    1368,
    'grass highland',
    [23.5, 9.5],
    [13, 17.5],
    [16.2, -1.5],
    { faults: ['pressure spike'] },
  ],
  ['Harrow Ridge', -26.4, 28.4, 1594, 'grass highland', [22, 10.5], [11.5, 15], [16.4, -1], { year: 2025 }],
  ['Heronspruit', -28.9, 30.2, 1083, 'grass highland', [22.8, 12.8], [11, 14.5], [18.2, 5]],
  ['Bushbuck Neck', -32.5, 26.9, 522, 'grass highland', [23.6, 13.5], [11, 13], [18.2, 7]],
  ['Granite Dome', -18.5, 28.6, 1207, 'tropical savanna', [23.6, 14.8], [10.5, 14.5], [18.4, 7]],
  // West and south-west coast.
  [
    'Gannet Point',
    -26.72,
    15.25,
    24,
    'cool fog coast',
    [18.5, 14.5],
    [7, 8],
    [14.2, 9.5],
    { faults: ['humidity over 100'] },
  ],
  [
    'Lantern Bay',
    -32.7,
    18.25,
    17,
    'winter-rain south-west',
    [20.5, 13],
    [9.5, 9],
    [14, 8.5],
    { year: 2022, faults: ['stuck dew point'] },
  ],
  ['Vineward', -33.85, 18.8, 126, 'winter-rain south-west', [23.6, 12.5], [12, 9.5], [15.8, 8.5]],
  // East: lowland and warm coast.
  ['Cane Coast', -29.55, 31.1, 46, 'humid subtropical coast', [24.8, 17], [6.5, 9.5], [20.6, 11]],
  ['Fever Siding', -25.4, 31.9, 258, 'tropical lowland', [26.5, 17.5], [10, 15], [19.8, 9]],
  ['Baobab Gate', -24.4, 30.6, 563, 'tropical lowland', [25.5, 16], [10.5, 14], [18.6, 7.5]],
  ['Leadwood Halt', -22.8, 30.9, 437, 'tropical lowland', [27, 17.5], [11, 15], [18.2, 7], { faults: ['long gap'] }],
  ['Mangrove Landing', -20.4, 33.4, 64, 'tropical lowland', [28, 21], [9, 12], [22.5, 14]],
];

/** The 26 stations of the demo. Names, places and weather are invented; the coast and the heights are about right. */
export const demoStations: readonly DemoStation[] = ROWS.map(
  ([name, latitude, longitude, elevationM, climate, dryBulbC, dailyRangeK, dewPointC, more]) => ({
    name,
    latitude,
    longitude,
    elevationM,
    utcOffsetH: 2,
    climate,
    dryBulbC,
    dailyRangeK,
    dewPointC,
    year: more?.year ?? null,
    faults: more?.faults ?? [],
  }),
);

import type { Position } from './read-atlas.ts';

export type Sea = {
  readonly name: string;
  readonly kind: 'ocean' | 'sea';
  readonly position: Position;
  /** First and last zoom at which the label stands here. */
  readonly rank: number;
  readonly until: number;
};

/**
 * The names of the world's seas, set by hand for this map: Natural Earth's npm package has none. Positions are where a
 * label sits well, chosen by eye; a test keeps each of them off the land. Names are the common English ones.
 */

/** One label per ocean while the world is in view. */
const OCEANS_FROM_AFAR: readonly (readonly [name: string, longitude: number, latitude: number])[] = [
  ['North Pacific Ocean', -160, 30],
  ['South Pacific Ocean', -125, -32],
  ['North Atlantic Ocean', -42, 30],
  ['South Atlantic Ocean', -14, -28],
  ['Indian Ocean', 78, -22],
  ['Southern Ocean', 95, -61],
  ['Arctic Ocean', -160, 78],
];

/** Nearer by, an ocean is named along its shores, so that any coast in view has its name beside it. */
const OCEANS_NEARBY: readonly (readonly [name: string, places: readonly Position[]])[] = [
  [
    'Indian Ocean',
    [
      [40, -28],
      [36.5, -35],
      [48, -4],
      [60, -12],
      [62, -30],
      [57, 5],
      [74, -3],
      [90, -8],
      [85, -30],
      [103, -17],
      [108, -30],
      [122, -37],
    ],
  ],
  [
    'South Atlantic Ocean',
    [
      [9, -29],
      [4, -19],
      [15, -38],
      [3, -8],
      [-12, -15],
      [-28, -12],
      [-38, -28],
      [-25, -38],
      [-50, -42],
      [-5, -48],
    ],
  ],
  [
    'North Atlantic Ocean',
    [
      [-20, 32],
      [-24, 14],
      [-18, 44],
      [-22, 55],
      [-35, 22],
      [-50, 12],
      [-55, 30],
      [-68, 34],
      [-55, 40],
      [-40, 52],
      [-20, 3],
      [-38, 4],
    ],
  ],
  [
    'North Pacific Ocean',
    [
      [-125, 22],
      [-135, 34],
      [-132, 45],
      [-145, 50],
      [-110, 12],
      [-92, 8],
      [-157, 15],
      [-170, 40],
      [148, 36],
      [137, 26],
      [145, 20],
      [165, 12],
      [134, 8],
      [168, 46],
    ],
  ],
  [
    'South Pacific Ocean',
    [
      [-80, -22],
      [-86, -8],
      [-80, -40],
      [-100, -25],
      [-125, -15],
      [-150, -30],
      [-170, -38],
      [-165, -8],
      [178, -28],
      [165, -8],
      [160, -46],
      [-90, -55],
    ],
  ],
  [
    'Southern Ocean',
    [
      [20, -60],
      [60, -62],
      [130, -61],
      [-120, -64],
      [170, -63],
      [-20, -60],
    ],
  ],
  [
    'Arctic Ocean',
    [
      [-30, 84],
      [80, 83],
      [160, 80],
      [-140, 76],
    ],
  ],
];

const NEAR_ZOOM = 4;

/** Seas, gulfs, bays and straits with the zoom from which each is named. */
const SEAS_BY_ZOOM: Readonly<
  Record<2 | 3 | 4 | 5, readonly (readonly [name: string, longitude: number, latitude: number])[]>
> = {
  2: [
    ['Arabian Sea', 64, 15],
    ['Bay of Bengal', 88, 14.5],
    ['Caribbean Sea', -75, 15],
    ['Coral Sea', 154, -17.5],
    ['Hudson Bay', -86, 60],
    ['Mediterranean Sea', 18, 34.8],
    ['Philippine Sea', 132, 18],
    ['Tasman Sea', 160, -37],
    ['Bering Sea', -179, 57.5],
    ['Weddell Sea', -45, -71],
    ['Norwegian Sea', 3, 67.5],
  ],
  3: [
    ['Gulf of Mexico', -91, 25],
    ['South China Sea', 114, 14],
    ['East China Sea', 125, 29],
    ['Sea of Okhotsk', 149, 54],
    ['Sea of Japan', 135, 40],
    ['Black Sea', 34, 43.2],
    ['Caspian Sea', 51, 42.5],
    ['Red Sea', 37.8, 21],
    ['North Sea', 3.2, 56.2],
    ['Baffin Bay', -67, 73.5],
    ['Labrador Sea', -54, 57.5],
    ['Greenland Sea', -8, 76],
    ['Barents Sea', 40, 74],
    ['Kara Sea', 70, 76],
    ['Laptev Sea', 125, 76.5],
    ['East Siberian Sea', 162, 73.5],
    ['Beaufort Sea', -138, 72.5],
    ['Gulf of Alaska', -145, 57.5],
    ['Arafura Sea', 135, -9.5],
    ['Gulf of Guinea', 2.5, 1.5],
    ['Mozambique Channel', 41, -18.5],
    ['Great Australian Bight', 130, -34],
    ['Ross Sea', -174, -75],
    ['Scotia Sea', -45, -56.5],
    ['Andaman Sea', 96, 10.5],
  ],
  4: [
    ['Baltic Sea', 19.5, 57],
    ['Bay of Biscay', -5, 45.3],
    ['Gulf of Aden', 48, 12.3],
    ['Gulf of Oman', 58.7, 24.8],
    ['Persian Gulf', 51.5, 27],
    ['Gulf of Bothnia', 19.5, 61.7],
    ['Adriatic Sea', 15.6, 43],
    ['Aegean Sea', 25.1, 38.7],
    ['Ionian Sea', 18.5, 37.5],
    ['Tyrrhenian Sea', 12.2, 40],
    ['Celtic Sea', -7.5, 50],
    ['White Sea', 38, 65.6],
    ['Chukchi Sea', -169, 69.5],
    ['Gulf of California', -110.8, 26.5],
    ['Gulf of Saint Lawrence', -62, 48.3],
    ['Gulf of Thailand', 101.3, 9.8],
    ['Gulf of Carpentaria', 139, -14],
    ['Gulf of Tonkin', 107.7, 19.6],
    ['Yellow Sea', 123, 36],
    ['Java Sea', 110.5, -5],
    ['Banda Sea', 127.5, -5.7],
    ['Celebes Sea', 122, 3.5],
    ['Sulu Sea', 120, 8.5],
    ['Timor Sea', 127, -11.2],
    ['Flores Sea', 120.5, -7.4],
    ['Bismarck Sea', 148, -4],
    ['Solomon Sea', 153, -8],
    ['Bass Strait', 145.8, -39.9],
    ['Laccadive Sea', 75.2, 9],
    ['Davis Strait', -58, 65.5],
    ['Denmark Strait', -27, 67],
    ['Drake Passage', -64, -58.5],
    ['Gulf of Panama', -79.3, 8],
    ['Amundsen Sea', -112, -72.5],
    ['Bellingshausen Sea', -80, -70.5],
  ],
  5: [
    ['Alboran Sea', -3.2, 36],
    ['Balearic Sea', 1.9, 40],
    ['Ligurian Sea', 8.9, 43.5],
    ['Levantine Sea', 32.5, 33.8],
    ['Sea of Crete', 25, 35.9],
    ['Sea of Azov', 36.5, 46.1],
    ['Sea of Marmara', 28.1, 40.72],
    ['English Channel', -1.5, 50.2],
    ['Irish Sea', -5, 53.8],
    ['Kattegat', 11.4, 56.8],
    ['Skagerrak', 9.2, 58],
    ['Gulf of Finland', 26, 59.9],
    ['Gulf of Riga', 23.5, 57.7],
    ['Gulf of Sidra', 18.5, 31.4],
    ['Gulf of Gabès', 10.9, 34.2],
    ['Gulf of Suez', 33.1, 28.8],
    ['Gulf of Aqaba', 34.7, 28.6],
    ['Bo Hai', 119.8, 38.7],
    ['Korea Strait', 129.2, 34.3],
    ['Taiwan Strait', 119.3, 24.3],
    ['Luzon Strait', 121.3, 20],
    ['Strait of Malacca', 99.5, 4.3],
    ['Makassar Strait', 118.2, -1.5],
    ['Molucca Sea', 125.3, 0.5],
    ['Ceram Sea', 129.5, -2.5],
    ['Savu Sea', 122, -9.5],
    ['Bali Sea', 115.5, -7.7],
    ['Gulf of Martaban', 96.4, 15.8],
    ['Gulf of Kutch', 69.3, 22.6],
    ['Gulf of Khambhat', 72.3, 20.9],
    ['Palk Strait', 79.8, 10],
    ['Spencer Gulf', 136.8, -34.6],
    ['Bay of Campeche', -94, 20],
    ['Gulf of Honduras', -87.9, 16.3],
    ['Gulf of Maine', -69, 43],
    ['Bay of Fundy', -65.8, 45],
    ['James Bay', -80.5, 53.3],
    ['Hudson Strait', -70.5, 62],
    ['Ungava Bay', -67.5, 59.5],
    ['Foxe Basin', -79, 66.2],
    ['Bristol Bay', -159, 57.5],
    ['Cook Strait', 174.5, -41.1],
    ['Bay of Plenty', 177, -37.5],
    ['Gulf of Papua', 145, -8.7],
    ['Golfo San Jorge', -66.2, -46],
    ['Gulf of Venezuela', -71, 11.8],
    ['Walvis Bay', 14.47, -22.9],
  ],
};

const FOR_GOOD = 30;

export const SEAS: readonly Sea[] = [
  ...OCEANS_FROM_AFAR.map(
    ([name, longitude, latitude]): Sea => ({
      name,
      kind: 'ocean',
      position: [longitude, latitude],
      rank: 0,
      until: NEAR_ZOOM - 1,
    }),
  ),
  ...OCEANS_NEARBY.flatMap(([name, places]) =>
    places.map((position): Sea => ({ name, kind: 'ocean', position, rank: NEAR_ZOOM, until: FOR_GOOD })),
  ),
  ...Object.entries(SEAS_BY_ZOOM).flatMap(([zoom, seas]) =>
    seas.map(
      ([name, longitude, latitude]): Sea => ({
        name,
        kind: 'sea',
        position: [longitude, latitude],
        rank: Number(zoom),
        until: FOR_GOOD,
      }),
    ),
  ),
];

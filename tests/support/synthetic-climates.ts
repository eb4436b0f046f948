import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { type SyntheticHour, syntheticYear } from './synthetic-year.ts';

/** A made-up climate: yearly and daily waves of dry bulb, humidity and pressure with seeded weather on top. */
export interface Climate {
  readonly name: string;
  readonly meanC: number;
  readonly yearlyK: number;
  readonly dailyK: number;
  /** Mean share of saturation in January and July, 0..1. */
  readonly winterSaturation: number;
  readonly summerSaturation: number;
  readonly pressurePa: number;
  readonly zone: string;
  readonly utcOffsetMin: number;
  readonly kind: 'typical' | 'actual';
  /** Slots in a thousand that are not known. */
  readonly missingPerMille: number;
}

const calm = { kind: 'typical', missingPerMille: 0 } as const;

/** Ten climates from frost to steam and from below the sea to 3,000 m; the words say what each is like, no place is meant. */
export const climates: readonly Climate[] = [
  {
    name: 'hot desert',
    meanC: 24,
    yearlyK: 11,
    dailyK: 8,
    winterSaturation: 0.4,
    summerSaturation: 0.16,
    pressurePa: 97_300,
    zone: 'America/Phoenix',
    utcOffsetMin: -420,
    ...calm,
  },
  {
    name: 'dry highland',
    meanC: 11,
    yearlyK: 12,
    dailyK: 8,
    winterSaturation: 0.5,
    summerSaturation: 0.3,
    pressurePa: 82_500,
    zone: 'America/Denver',
    utcOffsetMin: -420,
    ...calm,
  },
  {
    name: 'mild coast',
    meanC: 11,
    yearlyK: 7,
    dailyK: 4,
    winterSaturation: 0.85,
    summerSaturation: 0.65,
    pressurePa: 101_300,
    zone: 'Europe/London',
    utcOffsetMin: 0,
    ...calm,
  },
  {
    name: 'inland plain',
    meanC: 12,
    yearlyK: 15,
    dailyK: 6,
    winterSaturation: 0.75,
    summerSaturation: 0.6,
    pressurePa: 99_500,
    zone: 'Europe/Berlin',
    utcOffsetMin: 60,
    ...calm,
  },
  {
    name: 'wet tropics',
    meanC: 27,
    yearlyK: 2,
    dailyK: 4,
    winterSaturation: 0.75,
    summerSaturation: 0.85,
    pressurePa: 100_900,
    zone: 'Asia/Singapore',
    utcOffsetMin: 480,
    ...calm,
  },
  {
    name: 'summer-dry coast',
    meanC: 17,
    yearlyK: 8,
    dailyK: 6,
    winterSaturation: 0.7,
    summerSaturation: 0.4,
    pressurePa: 101_200,
    zone: 'Europe/Athens',
    utcOffsetMin: 120,
    kind: 'actual',
    missingPerMille: 15,
  },
  {
    name: 'half-hour zone',
    meanC: 26,
    yearlyK: 8,
    dailyK: 7,
    winterSaturation: 0.5,
    summerSaturation: 0.55,
    pressurePa: 98_800,
    zone: 'Asia/Kolkata',
    utcOffsetMin: 330,
    ...calm,
  },
  {
    name: 'deep frost',
    meanC: -6,
    yearlyK: 22,
    dailyK: 5,
    winterSaturation: 0.7,
    summerSaturation: 0.55,
    pressurePa: 100_500,
    zone: 'Asia/Yakutsk',
    utcOffsetMin: 540,
    ...calm,
  },
  {
    name: 'thin air',
    meanC: 8,
    yearlyK: 5,
    dailyK: 9,
    winterSaturation: 0.35,
    summerSaturation: 0.5,
    pressurePa: 64_000,
    zone: 'America/La_Paz',
    utcOffsetMin: -240,
    ...calm,
  },
  {
    name: 'below the sea, with gaps',
    meanC: 24,
    yearlyK: 10,
    dailyK: 8,
    winterSaturation: 0.5,
    summerSaturation: 0.3,
    pressurePa: 103_600,
    zone: 'Asia/Jerusalem',
    utcOffsetMin: 120,
    kind: 'actual',
    missingPerMille: 40,
  },
];

/** Values as files hold them: 0.1 °C, 1 % of saturation, 10 Pa. */
function hourOf(climate: Climate, slot: number, weather: Weather): SyntheticHour {
  if (weather.next() * 1000 < climate.missingPerMille) return null;
  const day = slot / 24;
  const season = -Math.cos((2 * Math.PI * (day - 20)) / 365);
  const afternoon = Math.cos((2 * Math.PI * ((slot % 24) - 14)) / 24);
  const dryBulbC = climate.meanC + climate.yearlyK * season + climate.dailyK * afternoon + weather.warmthK;
  const level = climate.winterSaturation + ((climate.summerSaturation - climate.winterSaturation) * (1 + season)) / 2;
  const saturation = level * (1 - 0.25 * afternoon) + weather.moisture;
  return {
    dryBulbC: Math.round(10 * dryBulbC) / 10,
    saturation: Math.min(1, Math.max(0.03, Math.round(100 * saturation) / 100)),
    pressurePa: Math.round((climate.pressurePa + weather.pressurePa) / 10) * 10,
  };
}

interface Weather {
  readonly warmthK: number;
  readonly moisture: number;
  readonly pressurePa: number;
  readonly next: () => number;
}

/** Weather that lasts: each hour keeps 97 % of the last one's departure. */
function startWeather(seed: number): (slot: number) => Weather {
  let state = seed >>> 0;
  const next = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
  let warmthK = 0;
  let moisture = 0;
  let pressurePa = 0;
  return () => {
    warmthK = 0.97 * warmthK + 1.8 * (next() - 0.5);
    moisture = 0.97 * moisture + 0.06 * (next() - 0.5);
    pressurePa = 0.97 * pressurePa + 250 * (next() - 0.5);
    return { warmthK, moisture, pressurePa, next };
  };
}

const SEED = 20_291;
const made = new Map<Climate, WeatherYear>();

/**
 * A year of a climate, packed as a read one would be: the same seed, the same year. Without a seed it is the very same object,
 * which nobody may change, so that the wet bulbs that the engine keeps beside a year are found once for all briefs.
 */
export function climateYear(climate: Climate, seed?: number): WeatherYear {
  if (seed !== undefined) return makeYear(climate, seed);
  const year = made.get(climate) ?? makeYear(climate, SEED);
  made.set(climate, year);
  return year;
}

function makeYear(climate: Climate, seed: number): WeatherYear {
  const weatherAt = startWeather(seed + climates.indexOf(climate));
  return syntheticYear({
    at: (slot) => hourOf(climate, slot, weatherAt(slot)),
    kind: climate.kind,
    year: climate.kind === 'actual' ? 2019 : null,
    utcOffsetMin: climate.utcOffsetMin,
  });
}

/** Height, m, of the standard atmosphere at the climate's mean pressure (ASHRAE Fundamentals 2017 ch. 1 eq. 3, inverted). */
export function climateHeightM(climate: Climate): number {
  return Math.round((1 - (climate.pressurePa / 101_325) ** (1 / 5.2559)) / 2.25577e-5);
}

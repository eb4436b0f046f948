/** The kinds of climate that the invented stations have. All numbers are ours, chosen to be plausible by eye. */
export type ClimateKind =
  | 'desert interior'
  | 'escarpment highland'
  | 'grass highland'
  | 'winter-rain south-west'
  | 'cool fog coast'
  | 'humid subtropical coast'
  | 'tropical lowland'
  | 'tropical savanna';

/** Every pair is [January, July]; the year moves between the two. */
type Seasonal = readonly [january: number, july: number];

export interface Climate {
  /** Spread of the slow air-mass swings of dry bulb and dew point, K. */
  readonly dryBulbSwingK: Seasonal;
  readonly dewPointSwingK: Seasonal;
  /** Typical cloud, 0 to 1. */
  readonly cloud: Seasonal;
  /** Cool fronts a month, and what a front of strength 1 does to dry bulb and dew point behind it, K. */
  readonly frontsPerMonth: Seasonal;
  readonly frontCoolingK: number;
  readonly frontDryingK: number;
  /** Humid spells a month, how much they raise the dew point, K, and how long they last, h. */
  readonly humidSpellsPerMonth: Seasonal;
  readonly humidSpellK: number;
  readonly humidSpellH: number;
  /** Chance of a thunderstorm on an overcast afternoon at the height of summer. */
  readonly storminess: number;
  /** The dew point closes in on this and does not pass it: the warmest water that the air can have come over, °C. */
  readonly dewPointCeilingC: number;
  /** How much hotter the weeks before the rains are than the yearly curve, K, at the end of October. */
  readonly heatBeforeRainsK: number;
  /** Rise of mean pressure from January to July, share of the pressure: the winter high. */
  readonly winterHigh: number;
  /** Spread of pressure between days, share of the pressure. */
  readonly pressureSwing: number;
}

export const climates: Readonly<Record<ClimateKind, Climate>> = {
  'desert interior': {
    dryBulbSwingK: [2, 2.3],
    dewPointSwingK: [3.4, 2.8],
    cloud: [0.22, 0.1],
    frontsPerMonth: [1.2, 3],
    frontCoolingK: 5,
    frontDryingK: 2.5,
    humidSpellsPerMonth: [1.5, 0.05],
    humidSpellK: 6,
    humidSpellH: 80,
    storminess: 0.5,
    dewPointCeilingC: 19.5,
    heatBeforeRainsK: 0.8,
    winterHigh: 0.006,
    pressureSwing: 0.0026,
  },
  'escarpment highland': {
    dryBulbSwingK: [2.1, 2.5],
    dewPointSwingK: [3, 3.2],
    cloud: [0.3, 0.14],
    frontsPerMonth: [1.8, 4],
    frontCoolingK: 5.5,
    frontDryingK: 2.5,
    humidSpellsPerMonth: [1.8, 0.1],
    humidSpellK: 5,
    humidSpellH: 70,
    storminess: 0.6,
    dewPointCeilingC: 20.5,
    heatBeforeRainsK: 0.3,
    winterHigh: 0.005,
    pressureSwing: 0.0032,
  },
  'grass highland': {
    dryBulbSwingK: [1.6, 2],
    dewPointSwingK: [2, 3],
    cloud: [0.46, 0.12],
    frontsPerMonth: [1.4, 3],
    frontCoolingK: 4.5,
    frontDryingK: 2.5,
    humidSpellsPerMonth: [2.4, 0.1],
    humidSpellK: 3.2,
    humidSpellH: 72,
    storminess: 0.75,
    dewPointCeilingC: 20.8,
    heatBeforeRainsK: 0.8,
    winterHigh: 0.006,
    pressureSwing: 0.0027,
  },
  'winter-rain south-west': {
    dryBulbSwingK: [2.2, 1.7],
    dewPointSwingK: [2, 2.2],
    cloud: [0.24, 0.5],
    frontsPerMonth: [2.5, 5.5],
    frontCoolingK: 4.5,
    frontDryingK: 1,
    humidSpellsPerMonth: [1.6, 0.3],
    humidSpellK: 3.5,
    humidSpellH: 40,
    storminess: 0.05,
    dewPointCeilingC: 20.5,
    heatBeforeRainsK: 0,
    winterHigh: 0.004,
    pressureSwing: 0.0045,
  },
  'cool fog coast': {
    dryBulbSwingK: [1, 1.8],
    dewPointSwingK: [1.3, 2.6],
    cloud: [0.5, 0.35],
    frontsPerMonth: [1, 3],
    frontCoolingK: 2,
    frontDryingK: 1,
    humidSpellsPerMonth: [1, 0.2],
    humidSpellK: 1.5,
    humidSpellH: 40,
    storminess: 0,
    dewPointCeilingC: 18.5,
    heatBeforeRainsK: 0,
    winterHigh: 0.005,
    pressureSwing: 0.0028,
  },
  'humid subtropical coast': {
    dryBulbSwingK: [1.3, 1.7],
    dewPointSwingK: [1.6, 3],
    cloud: [0.55, 0.25],
    frontsPerMonth: [3, 4],
    frontCoolingK: 3,
    frontDryingK: 2,
    humidSpellsPerMonth: [1.5, 0.6],
    humidSpellK: 2,
    humidSpellH: 60,
    storminess: 0.2,
    dewPointCeilingC: 25,
    heatBeforeRainsK: 0,
    winterHigh: 0.008,
    pressureSwing: 0.0042,
  },
  'tropical lowland': {
    dryBulbSwingK: [1.5, 1.6],
    dewPointSwingK: [1.5, 2.4],
    cloud: [0.5, 0.2],
    frontsPerMonth: [0.8, 2],
    frontCoolingK: 3,
    frontDryingK: 1.5,
    humidSpellsPerMonth: [1.8, 0.3],
    humidSpellK: 1.8,
    humidSpellH: 80,
    storminess: 0.45,
    dewPointCeilingC: 26,
    heatBeforeRainsK: 1.5,
    winterHigh: 0.009,
    pressureSwing: 0.003,
  },
  'tropical savanna': {
    dryBulbSwingK: [1.7, 1.9],
    dewPointSwingK: [2.4, 2.8],
    cloud: [0.45, 0.08],
    frontsPerMonth: [0.8, 2],
    frontCoolingK: 3.5,
    frontDryingK: 1.5,
    humidSpellsPerMonth: [1.8, 0.05],
    humidSpellK: 3,
    humidSpellH: 90,
    storminess: 0.6,
    dewPointCeilingC: 22,
    heatBeforeRainsK: 3,
    winterHigh: 0.006,
    pressureSwing: 0.002,
  },
};

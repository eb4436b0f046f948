/**
 * What is computed, in words and plain typography: held as data so that the page and a printed method say the same.
 * In formulas `_{…}` lowers what it holds, `^{…}` raises it, and nothing else is marked up. Long, since it is one text.
 */
export interface Formula {
  readonly name: string;
  /** Such as "t_{s} = t + f". */
  readonly formula: string;
  readonly where?: string;
}

export interface MethodSection {
  readonly id: string;
  readonly title: string;
  readonly paragraphs: readonly string[];
  readonly formulas?: readonly Formula[];
}

/** Cautions that every result carries. */
export const cautions: readonly string[] = [
  'A screening result is not a design.',
  'Wetted equipment needs a water safety plan against legionella under local codes and standards (ASHRAE Standard 188 and Guideline 12, or the local equivalents).',
  'Typical years hide extremes: do not size plant from them.',
  'Heat can harm people and animals: follow local occupational and welfare rules.',
  'A licensed engineer is responsible for the design.',
  'Not assessed: smoke, dust, noise, thermal mass.',
];

export const methodSections: readonly MethodSection[] = [
  {
    id: 'moist-air',
    title: 'Moist air, hour by hour',
    paragraphs: [
      'From dry bulb t (°C), one of dew point, relative humidity or wet bulb, and station pressure p (Pa) come humidity ratio w (kg of water per kg of dry air), thermodynamic wet bulb and dew point, after ASHRAE Fundamentals, chapter 1.',
      'The wet bulb is found by one function, which everything calls: one Newton step from curves drawn beforehand. It is held to PsychroLib over the whole range.',
      'Near 0 °C an ice and a water wet bulb both satisfy the equations. The water one is taken whenever the enthalpy is at least that of air saturated over water at 0 °C.',
      'Below 0 °C a file’s humidity may stand for water or for ice. Each file is tested for it, and its record says which was found.',
      'Temperatures, humidities and index points are compared on whole hundredths; a tie is met.',
    ],
    formulas: [
      {
        name: 'Humidity ratio',
        formula: 'w = 0.621945 p_{v} / (p − p_{v})',
        where: 'p_{v} vapour pressure; never above saturation',
      },
      { name: 'Enthalpy', formula: 'h = 1.006 t + w (2501 + 1.86 t)', where: 'kJ per kg of dry air' },
      {
        name: 'Wet bulb over water',
        formula: 'w = ((2501 − 2.326 t_{wb}) w_{s} − 1.006 (t − t_{wb})) / (2501 + 1.86 t − 4.186 t_{wb})',
        where:
          'w_{s} saturation at the wet bulb t_{wb} and p; over ice 2830 − 0.24 t_{wb} and 2830 + 1.86 t − 2.1 t_{wb}',
      },
      { name: 'Depression', formula: 'd = t − t_{wb}', where: 'never negative' },
      {
        name: 'Pressure, where a file has none',
        formula: 'p = 101325 (1 − 2.25577 · 10^{−5} z)^{5.2559}',
        where: 'z elevation of the station, m',
      },
    ],
  },
  {
    id: 'weather-year',
    title: 'A weather year',
    paragraphs: [
      'A calendar of 8,760 (8,784) hours in local standard time is built first; rows of the file are matched to it. An hour ends at its hour: 13:00 stands for 12:00 to 13:00.',
      'Gaps of at most five hours are filled, never across a month joint of a typical year. Longer gaps stay missing, and a missing hour is never counted as not met.',
      'A month counts with 90 % of its hours; a year is usable for a brief when every month in which the brief has schedule counts.',
      'Design values are values passed in 0.4, 1, 2, 5 and 10 % of the hours, each with the mean of its companion over hours within 0.5 K.',
    ],
  },
  {
    id: 'stages',
    title: 'Stages',
    paragraphs: [
      'Airflow is constant. x from 0 to 1 is the share of full wetting: modulating control uses the least x that reaches the supply temperature, on-off control uses 1.',
      'A wet stage is tried only when the depression, the room without it, outdoor humidity and frost allow it. Humidity caps are tested on the air as it is supplied and as it is in the room.',
    ],
    formulas: [
      {
        name: 'Supply temperature wanted',
        formula: 't_{sup} = t_{set} − ΔT_{room} φ',
        where: 'φ the share of the design load in the hour',
      },
      {
        name: 'Fan rise',
        formula: 'f = fan W per L/s × v / 1.006',
        where: 'v volume of outdoor air, m³ per kg of dry air',
      },
      { name: 'Outdoor air', formula: 't_{s} = t + f' },
      { name: 'Direct', formula: 't_{s} = t − x e (t − t_{wb}) + f', where: 'along the line of constant wet bulb' },
      {
        name: 'Indirect',
        formula: 't_{s} = t − x e (t − t_{wb,secondary}) + f',
        where: 'not below the dew point; w as it was',
      },
      { name: 'Dew-point', formula: 't_{s} = t − x e (t − t_{dp}) + f', where: 'w as it was' },
      { name: 'Two-stage', formula: 'indirect at full effect, then direct with x from there' },
      {
        name: 'Return air of a hall',
        formula: 'dry: t_{ret} − e_{x} (t_{ret} − t);  wet: t_{ret} − e_{i} (t_{ret} − t_{wb})',
        where: 't_{ret} = t_{sup} + ΔT_{IT}',
      },
      { name: 'Cooling tower', formula: 'cold water = t_{wb} + approach + exchanger' },
      { name: 'Turbine inlet', formula: 'max(floor, t − e (t − t_{wb}))' },
    ],
  },
  {
    id: 'water',
    title: 'Water, electricity, money',
    paragraphs: [
      'All per kW of design load, hour by hour. Latent heat is 2,430 kJ/kg. Electricity counts fans and pumps by stage and a mechanical back-up for what is not met; the reference is the mechanical plant alone.',
      'The reference’s latent load is not counted, which favours it. The electricity of a basin heater is not counted. Without prices a result says “not priced”.',
    ],
    formulas: [
      { name: 'Air carrying the load', formula: 'm_{dry} = design load / (1.006 ΔT_{room})' },
      { name: 'Evaporated, direct', formula: 'E = m_{dry} (w_{s} − w)' },
      { name: 'Evaporated, indirect and dew-point', formula: 'E = k × sensible heat / latent heat' },
      { name: 'Evaporated, tower', formula: 'E = rejected heat × latent share / latent heat' },
      {
        name: 'Make-up',
        formula: 'M = E + B + D',
        where: 'bleed B = E / (C − 1), C cycles of concentration above 1; D drift',
      },
      {
        name: 'Back-up',
        formula: 'm_{dry} × 1.006 × S, at most φ × design load, divided by the COP',
        where: 'S the shortfall, K',
      },
      { name: 'Simple payback', formula: 'extra capital / yearly saving', where: '“never” when nothing is saved' },
    ],
  },
  {
    id: 'verdict',
    title: 'Gates and verdict',
    paragraphs: [
      'Gates stand outside the score: water available, exclusions of use, hygiene, limits of zero hours, coverage. A failed gate prints “excluded” with its reason and no number; one that is not known prints beside the score.',
      'The verdict is “meets the brief” when every tolerance holds, else “does not”, naming which fail and by how much; over years, “in n of N”.',
    ],
  },
  {
    id: 'place',
    title: 'From years to a place',
    paragraphs: [
      'With five or more usable actual years each figure of the score is the median over them, and the worst year’s served share the least. With fewer, the typical year counts if there is one, else the latest actual year.',
      'A run is stored once with the hash of its weather, its brief and the version of the method. The same inputs give the same bytes, in a saved run and in a preview alike.',
    ],
  },
];

/** Grade of a place: the worst of its columns. */
export const gradeRows: readonly (readonly [string, string, string, string, string])[] = [
  ['Distance', '25 km', '50 km', '100 km', 'beyond'],
  ['Height difference', '100 m', '150 m', '300 m', 'beyond'],
  ['Years', '10 actual', '5 actual, or typical and 3', 'typical, or 3 to 4 actual', 'fewer'],
  ['Measured share of temperature and humidity', '98 %', '95 %', '90 %', 'below'],
  ['Kind of weather', 'station', 'station', 'station, reanalysis, derived', 'estimate between stations'],
];

/** When an hour is of a class; the first that fits counts. */
export const classRules: Readonly<Record<string, string>> = {
  closed: 'Outside the schedule.',
  missing: 'In schedule, with temperature, humidity or pressure unknown. Excluded, never counted as not met.',
  idle: 'In schedule, at or under the temperature from which cooling is wanted.',
  frozen:
    'At or under the freeze lockout: wet parts are drained. Met when outdoor air alone reaches the supply temperature.',
  damp: 'Outdoor moisture itself breaks a cap where the room is to be held; after the stages have been tried, cold enough only by too much moisture. Not met.',
  air: 'Outdoor air reaches the supply temperature within the caps. Met.',
  direct: 'The first permitted stage, in the brief’s order, that reaches it within the caps: a direct one. Met.',
  indirect: 'The first permitted stage that reaches it: an indirect one. Met.',
  dewpoint: 'The first permitted stage that reaches it: a dew-point one. Met.',
  twostage: 'The first permitted stage that reaches it: indirect and direct in line. Met.',
  short: 'The plant gains at least 1 K, but not enough. Not met.',
  beyond: 'Otherwise. Not met.',
};

/**
 * Every field of a brief with its words, its unit, where its default comes from and which uses have it: what the editor,
 * the difference of two versions and the sheet go by. "Ours" is a policy choice of this program that can be changed. One table,
 * and long for it.
 */
import type { Limit } from './brief.ts';

/** Limits that are judged alike have the same fields. */
export type UseKind = 'room' | 'index' | 'hall' | 'tower' | 'turbine';

export type FieldGroup =
  | 'limit'
  | 'caps'
  | 'air'
  | 'plant'
  | 'schedule'
  | 'water'
  | 'reference'
  | 'prices'
  | 'tolerance'
  | 'gates'
  | 'reported'
  | 'score';

export interface BriefField {
  /** Its place in a brief, such as `caps.roomRhPct`. */
  readonly path: string;
  readonly group: FieldGroup;
  readonly label: string;
  readonly unit: string;
  /** `optional`: a number that may be left out. */
  readonly kind: 'number' | 'optional' | 'flag' | 'choice' | 'text';
  /** The words of a choice or a flag, by value. */
  readonly words?: Readonly<Record<string, string>>;
  readonly source: string;
  readonly uses: readonly UseKind[];
  /** A field of one kind of limit alone. */
  readonly limit?: Limit['kind'];
}

export function kindOfUse({ kind }: Pick<Limit, 'kind'>): UseKind {
  switch (kind) {
    case 'fixed':
    case 'adaptive':
      return 'room';
    case 'thi':
    case 'shade-heat':
      return 'index';
    case 'inlet':
      return 'hall';
    case 'tower':
    case 'turbine':
      return kind;
  }
}

/** The fields that a brief of this limit has. */
export function fieldsOfLimit(limit: Pick<Limit, 'kind'>): readonly BriefField[] {
  const use = kindOfUse(limit);
  return briefFields.filter((field) => field.uses.includes(use) && (field.limit ?? limit.kind) === limit.kind);
}

const OURS = 'ours';
const OF_PRESET = 'the preset, ours';
const NO_DEFAULT = 'no default: a price that is not typed is not known';
/** The derating that the method knows (method 3.1). */
export const DERATE_RULE = '1 K per 300 m above 900 m';
const ALL: readonly UseKind[] = ['room', 'index', 'hall', 'tower', 'turbine'];
const SERVED: readonly UseKind[] = ['room', 'index'];
const AIR_SIDE: readonly UseKind[] = ['room', 'index', 'hall'];
const DIRECT: readonly UseKind[] = ['room', 'index', 'turbine'];
const REFERENCE: readonly UseKind[] = ['room', 'index', 'hall', 'tower'];
const YES_NO = { true: 'yes', false: 'no' };

type Rest = Omit<BriefField, 'path' | 'label' | 'unit' | 'kind' | 'group'>;

/** Writes a group's fields in one line each. */
function group(name: FieldGroup) {
  return (
    path: string,
    [label, unit, kind]: readonly [label: string, unit: string, kind: BriefField['kind']],
    rest: Rest,
  ): BriefField => ({ path, group: name, label, unit, kind, ...rest });
}
const limit = group('limit');
const caps = group('caps');
const air = group('air');
const plant = group('plant');
const water = group('water');
const prices = group('prices');
const tolerance = group('tolerance');
const schedule = group('schedule');
const reference = group('reference');

const ADAPTIVE_WORDS = {
  'ashrae55-80': 'ASHRAE 55, 80 % acceptability',
  'ashrae55-90': 'ASHRAE 55, 90 % acceptability',
  'en16798-i': 'EN 16798-1, category I',
  'en16798-ii': 'EN 16798-1, category II',
  'en16798-iii': 'EN 16798-1, category III',
};

export const briefFields: readonly BriefField[] = [
  limit('limit.tempC', ['Room temperature', '°C', 'number'], { source: OF_PRESET, uses: ['room'], limit: 'fixed' }),
  limit('limit.model', ['Adaptive model', '', 'choice'], {
    source: 'ASHRAE 55 and EN 16798-1; made for rooms whose windows and clothing people choose themselves',
    uses: ['room'],
    limit: 'adaptive',
    words: ADAPTIVE_WORDS,
  }),
  limit('limit.ceilingC', ['Ceiling over the adaptive limit', '°C', 'optional'], {
    source: OURS,
    uses: ['room'],
    limit: 'adaptive',
  }),
  limit('limit.tempC', ['Temperature at the inlet', '°C', 'number'], {
    source: 'ASHRAE TC 9.9: 27 °C recommended, 32 °C allowable for class A1',
    uses: ['hall'],
    limit: 'inlet',
  }),
  limit('limit.derate', ['Derating with height', '', 'choice'], {
    source: 'ASHRAE TC 9.9',
    uses: ['hall'],
    limit: 'inlet',
    words: { '': 'none', [DERATE_RULE]: DERATE_RULE },
  }),
  limit('limit.value', ['Temperature-humidity index', '', 'number'], {
    source: 'index: NRC 1971; 72 as the alarm: Brouk, Smith and Harner, Kansas State',
    uses: ['index'],
    limit: 'thi',
  }),
  limit('limit.value', ['Shade heat figure', '', 'number'], { source: OURS, uses: ['index'], limit: 'shade-heat' }),
  limit('limit.coldC', ['Cold water', '°C', 'number'], { source: OURS, uses: ['tower'], limit: 'tower' }),
  limit('limit.rangeK', ['Range of the water', 'K', 'number'], { source: OURS, uses: ['tower'], limit: 'tower' }),
  limit('limit.approachK', ['Approach of the tower', 'K', 'number'], {
    source: 'ours, 3 to 5 K usual; as close as 2.2 to 2.8 K is possible (ASHRAE, cooling towers)',
    uses: ['tower'],
    limit: 'tower',
  }),
  limit('limit.exchangerK', ['Heat exchanger', 'K', 'number'], { source: OURS, uses: ['tower'], limit: 'tower' }),
  limit('limit.targetC', ['Target at the inlet', '°C', 'number'], {
    source: OURS,
    uses: ['turbine'],
    limit: 'turbine',
  }),
  limit('limit.floorC', ['Floor, not cooled below', '°C', 'number'], {
    source: OURS,
    uses: ['turbine'],
    limit: 'turbine',
  }),
  limit('dTroomK', ['Rise in the room', 'K', 'number'], { source: OF_PRESET, uses: SERVED }),
  limit('dTitK', ['Rise over the equipment', 'K', 'number'], { source: OURS, uses: ['hall'] }),
  limit('dwRoomKgKg', ['Moisture gain in the room', 'kg/kg', 'number'], { source: OF_PRESET, uses: SERVED }),
  limit('balanceTempC', ['Demand begins above', '°C outdoors', 'optional'], {
    source: 'ours, 14 °C; left out, every hour of the schedule has demand',
    uses: ['room', 'index', 'hall', 'tower'],
  }),
  limit('phi', ['Load over the year', '', 'choice'], {
    source: OURS,
    uses: SERVED,
    words: { constant: 'constant', linear: 'grows to the 1 % dry bulb of the year' },
  }),
  limit('source', ['Where the requirement comes from', '', 'text'], {
    source: 'the preset; name the standard, the contract or who agreed',
    uses: ALL,
  }),

  caps('caps.roomRhPct', ['Room humidity, at most', '% RH', 'optional'], { source: OF_PRESET, uses: SERVED }),
  caps('caps.supplyRhPct', ['Supply humidity, at most', '% RH', 'optional'], {
    source: 'ASHRAE TC 9.9 for halls; elsewhere ours',
    uses: AIR_SIDE,
  }),
  caps('caps.supplyDewPointC', ['Supply dew point, at most', '°C', 'optional'], {
    source: 'ASHRAE TC 9.9 for halls; elsewhere ours',
    uses: AIR_SIDE,
  }),
  caps('lowerLimits.roomRhPct', ['Room humidity, at least (reported)', '% RH', 'optional'], {
    source: OF_PRESET,
    uses: SERVED,
  }),
  caps('lowerLimits.supplyRhPct', ['Supply humidity, at least (reported)', '% RH', 'optional'], {
    source: 'ASHRAE TC 9.9 for halls; elsewhere ours',
    uses: AIR_SIDE,
  }),
  caps('lowerLimits.supplyDewPointC', ['Supply dew point, at least (reported)', '°C', 'optional'], {
    source: OURS,
    uses: AIR_SIDE,
  }),

  air('stagesReason', ['Written reason for wet stages', '', 'text'], {
    source: 'a clinic needs one for direct and two-stage cooling; it prints on every sheet',
    uses: SERVED,
  }),
  air('control', ['Control', '', 'choice'], {
    source: OURS,
    uses: ['room', 'index', 'hall', 'turbine'],
    words: { modulating: 'modulating', 'on-off': 'on and off' },
  }),
  air('secondaryAir', ['Secondary air of indirect stages', '', 'choice'], {
    source: OURS,
    uses: ['room'],
    words: { outdoor: 'outdoor air', exhaust: 'room exhaust' },
  }),
  air('effDirect', ['Direct effectiveness', '', 'number'], {
    source: 'ours, 0.85; new equipment 0.75 to 0.95 (HVAC handbook, eq. 9.8.6), aged about 0.75',
    uses: DIRECT,
  }),
  air('effIndirect', ['Indirect wet-bulb effectiveness', '', 'number'], {
    source: 'ours, 0.65; range in Duan et al., Renewable and Sustainable Energy Reviews 16 (2012) 6823',
    uses: AIR_SIDE,
  }),
  air('effDewPoint', ['Dew-point effectiveness', '', 'number'], { source: OURS, uses: SERVED }),
  air('effExchanger', ['Dry effectiveness of the exchanger', '', 'number'], { source: OURS, uses: ['hall'] }),
  air('cutInDepressionK', ['Water starts at a depression of', 'K', 'number'], { source: OURS, uses: DIRECT }),
  air('startRoomTempC', ['Water starts at a room temperature of', '°C', 'optional'], {
    source: 'the preset; broiler houses: Czarick, University of Georgia',
    uses: DIRECT,
  }),
  air('maxOutdoorRhPct', ['Water stops over outdoor humidity of', '% RH', 'optional'], {
    source: 'the preset; broiler houses: Czarick, University of Georgia',
    uses: DIRECT,
  }),
  air('freezeLockoutC', ['Wet parts drained at or below', '°C', 'number'], { source: OURS, uses: ALL }),
  air('basinHeat', ['Heated basin', '', 'flag'], { source: OF_PRESET, uses: ['tower'], words: YES_NO }),

  ...(
    [
      ['air', 'outdoor air', 'ours'],
      ['direct', 'direct', 'ours'],
      ['indirect', 'indirect', 'direct plus 0.5 (Hviid et al., E3S Web of Conferences 172 (2020) 02003)'],
      ['dewpoint', 'dew-point', 'ours'],
      ['twostage', 'two-stage', 'ours'],
    ] as const
  ).map(([name, word, source]) =>
    plant(`fanWPerLs.${name}`, [`Fan, ${word}`, 'W per L/s', 'number'], { source, uses: SERVED }),
  ),
  plant('fanWPerLs.returnAir', ['Fan, return air', 'W per L/s', 'number'], { source: OURS, uses: ['hall'] }),
  plant('pumpKwPerKw', ['Pump', 'kW per kW', 'number'], { source: OURS, uses: AIR_SIDE }),
  plant('towerFanPumpWPerKw', ['Fans and pumps of the tower', 'W per kW', 'number'], { source: OURS, uses: ['tower'] }),

  schedule('clock', ['Clock', '', 'choice'], {
    source: OF_PRESET,
    uses: ALL,
    words: { civil: 'local civil time, with summer time', standard: 'local standard time' },
  }),
  schedule('hours', ['Open', 'opening-closing, or daylight', 'text'], { source: OF_PRESET, uses: ALL }),
  schedule('weekdays', ['Days', '', 'choice'], {
    source: OF_PRESET,
    uses: ALL,
    words: { all: 'every day', 'mon-fri': 'Monday to Friday' },
  }),

  water('cycles', ['Cycles of concentration', '', 'number'], { source: 'ours, 4; over 1', uses: ALL }),
  water('k', ['Water over what evaporates indirectly', 'times', 'number'], { source: OURS, uses: AIR_SIDE }),
  water('driftPctOfCirculation', ['Drift', '% of circulation', 'number'], { source: OURS, uses: ['tower'] }),
  water('towerLatentShare', ['Share of heat that evaporates', '', 'number'], { source: OURS, uses: ['tower'] }),

  reference('reference.cop', ['COP of the compressor', '', 'number'], {
    source: 'ours, 3.0; code minima near COP 2.8 to 3.2 (Washington WAC 51-11C-403329)',
    uses: REFERENCE,
  }),
  reference('reference.economy', ['Outdoor air serves it too', '', 'flag'], {
    source: OURS,
    uses: REFERENCE,
    words: YES_NO,
  }),

  prices('prices.currency', ['Currency', '', 'text'], { source: NO_DEFAULT, uses: ALL }),
  prices('prices.electricityPerKwh', ['Electricity', 'per kWh', 'optional'], { source: NO_DEFAULT, uses: ALL }),
  prices('prices.waterPerM3', ['Water', 'per m³', 'optional'], { source: NO_DEFAULT, uses: ALL }),
  prices('prices.extraCapitalPerKw', ['Plant costs more by', 'per kW', 'optional'], { source: NO_DEFAULT, uses: ALL }),
  prices('prices.extraUpkeepPerKwYear', ['Upkeep costs more by', 'per kW and year', 'optional'], {
    source: NO_DEFAULT,
    uses: ALL,
  }),
  prices('grid.kgCo2PerKwh', ['Grid', 'kg CO₂ per kWh', 'optional'], {
    source: 'no default: name where the factor comes from and its year',
    uses: ALL,
  }),
  prices('grid.source', ['Source of the grid factor', '', 'text'], { source: 'no default', uses: ALL }),

  tolerance('tolerance.sharePct', ['Demand hours that may be unmet', '%', 'optional'], {
    source: OF_PRESET,
    uses: ALL,
  }),
  tolerance('tolerance.hours', ['Hours that may be unmet', 'h', 'optional'], { source: OF_PRESET, uses: ALL }),
  tolerance('tolerance.spellH', ['Longest spell', 'h', 'optional'], { source: OF_PRESET, uses: ALL }),
];

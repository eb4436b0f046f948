/**
 * How far a score moves with what is not known for certain (method 7.6): each doubt is a pair of its own, both ends judged
 * by the same method on the same year. The range over years is `placeFigures`' own.
 */
import type { Brief } from '../brief/brief.ts';
import {
  dewPointC,
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
  relativeHumidityPct,
} from '../psychrometrics/moist-air.ts';
import { packYear, unpackYear } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { type JudgeYearInput, judgeYear } from '../run/judge-year.ts';

export type RangeDoubt = 'humidity reading' | 'plant tolerance' | 'set-point' | 'humidity cap';

/** One end of a doubt. */
export interface RangeEnd {
  readonly label: string;
  /** Weighted sum before gates; null when no component applies. */
  readonly scoreExact: number | null;
  /** Normalised components in the order of the brief's score; null where one does not apply. */
  readonly normalised: readonly (number | null)[];
}

export interface RangePair {
  readonly doubt: RangeDoubt;
  readonly minus: RangeEnd;
  readonly plus: RangeEnd;
}

export interface ScoreRange {
  /** The year as it stands, which the ends are compared with. */
  readonly normalised: readonly (number | null)[];
  readonly pairs: readonly RangePair[];
  /** The doubt whose two ends lie furthest apart; null without any pair that has two scores. */
  readonly largest: RangeDoubt | null;
}

const DEW_POINT_K = 0.5;
const HUMIDITY_POINTS = 3;
const DIRECT_EFFECTIVENESS = 0.05;
const INDIRECT_EFFECTIVENESS = 0.1;
const SET_POINT_K = 1;
const CAP_POINTS = 5;
const DRIEST_PCT = 0.1;

/**
 * Judges the year again at both ends of every doubt that the brief has.
 * @param input.humidityFrom which column of the file the humidity was read from
 */
export function scoreRange(input: JudgeYearInput & { humidityFrom: 'dew point' | 'relative humidity' }): ScoreRange {
  const { brief, year, humidityFrom } = input;
  const pair = (doubt: RangeDoubt, label: string, change: (sign: 1 | -1) => Partial<JudgeYearInput>): RangePair => {
    const end = (sign: 1 | -1) => ({
      label: `${sign === 1 ? '+' : '-'}${label}`,
      ...figuresOf({ ...input, ...change(sign) }),
    });
    return { doubt, minus: end(-1), plus: end(1) };
  };
  const reading = humidityFrom === 'dew point' ? `${DEW_POINT_K} K dew point` : `${HUMIDITY_POINTS} points humidity`;
  const plant = `${DIRECT_EFFECTIVENESS} direct and ${INDIRECT_EFFECTIVENESS} indirect effectiveness`;
  const pairs = [
    pair('humidity reading', reading, (sign) => ({ year: otherHumidity(year, humidityFrom, sign) })),
    ...(brief.stages.length === 0
      ? []
      : [pair('plant tolerance', plant, (sign) => ({ brief: otherPlant(brief, sign) }))]),
    ...(hasSetPoint(brief)
      ? [pair('set-point', `${SET_POINT_K} K`, (sign) => ({ brief: otherSetPoint(brief, sign) }))]
      : []),
    ...(brief.caps.roomRhPct === undefined && brief.caps.supplyRhPct === undefined
      ? []
      : [pair('humidity cap', `${CAP_POINTS} %`, (sign) => ({ brief: otherCaps(brief, sign) }))]),
  ];
  return { normalised: figuresOf(input).normalised, pairs, largest: largestOf(pairs) };
}

function figuresOf(input: JudgeYearInput): Omit<RangeEnd, 'label'> {
  const { scoreExact, parts } = judgeYear(input);
  return { scoreExact, normalised: parts.map(({ normalised }) => normalised) };
}

function largestOf(pairs: readonly RangePair[]): RangeDoubt | null {
  const spread = ({ minus, plus }: RangePair): number =>
    minus.scoreExact === null || plus.scoreExact === null ? -1 : Math.abs(plus.scoreExact - minus.scoreExact);
  const [first] = pairs.filter((each) => spread(each) >= 0).toSorted((one, other) => spread(other) - spread(one));
  return first?.doubt ?? null;
}

function otherPlant(brief: Brief, sign: 1 | -1): Brief {
  return {
    ...brief,
    effDirect: Math.min(Math.max(brief.effDirect + sign * DIRECT_EFFECTIVENESS, 0), 1),
    effIndirect: Math.min(Math.max(brief.effIndirect + sign * INDIRECT_EFFECTIVENESS, 0), 1),
  };
}

/** Adaptive limits follow the weather and index limits are no temperatures, so neither has a set-point to doubt. */
function hasSetPoint({ limit }: Brief): boolean {
  return limit.kind === 'fixed' || limit.kind === 'inlet' || limit.kind === 'tower' || limit.kind === 'turbine';
}

function otherSetPoint(brief: Brief, sign: 1 | -1): Brief {
  const { limit } = brief;
  const moveK = sign * SET_POINT_K;
  switch (limit.kind) {
    case 'fixed':
    case 'inlet':
      return { ...brief, limit: { ...limit, tempC: limit.tempC + moveK } };
    case 'tower':
      return { ...brief, limit: { ...limit, coldC: limit.coldC + moveK } };
    case 'turbine':
      return { ...brief, limit: { ...limit, targetC: limit.targetC + moveK } };
    default:
      return brief;
  }
}

function otherCaps(brief: Brief, sign: 1 | -1): Brief {
  const moved = (pct: number): number => Math.min(Math.max(pct + sign * CAP_POINTS, DRIEST_PCT), 100);
  const { roomRhPct, supplyRhPct } = brief.caps;
  return {
    ...brief,
    caps: {
      ...brief.caps,
      ...(roomRhPct === undefined ? {} : { roomRhPct: moved(roomRhPct) }),
      ...(supplyRhPct === undefined ? {} : { supplyRhPct: moved(supplyRhPct) }),
    },
  };
}

/**
 * The year with every known humidity read a little drier or damper, never over saturation. Dew points and relative
 * humidities computed from a humidity ratio stand for ice below 0 °C, so they are read back so.
 */
function otherHumidity(year: WeatherYear, from: 'dew point' | 'relative humidity', sign: 1 | -1): WeatherYear {
  const columns = unpackYear(year.packed);
  const humidityRatio = columns.humidityRatio.map((ratio, slot) => {
    const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
    const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + ratio + pressurePa)) return ratio;
    const state = { dryBulbC, humidityRatio: ratio, pressurePa };
    return from === 'dew point' ? byDewPoint(state, sign) : byHumidity(state, sign);
  });
  return { ...year, packed: packYear({ ...columns, humidityRatio, flags: year.packed.flags }) };
}

interface State {
  readonly dryBulbC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
}

function byDewPoint({ dryBulbC, humidityRatio, pressurePa }: State, sign: 1 | -1): number {
  const moved = dewPointC(dryBulbC, humidityRatio, pressurePa) + sign * DEW_POINT_K;
  return humidityRatioFromDewPoint({
    dryBulbC,
    dewPointC: Math.min(moved, dryBulbC),
    pressurePa,
    belowZero: 'ice',
  });
}

function byHumidity({ dryBulbC, humidityRatio, pressurePa }: State, sign: 1 | -1): number {
  const moved = relativeHumidityPct(dryBulbC, humidityRatio, pressurePa) + sign * HUMIDITY_POINTS;
  const relative = Math.min(Math.max(moved, DRIEST_PCT), 100);
  return humidityRatioFromRelativeHumidity({ dryBulbC, relativeHumidityPct: relative, pressurePa, belowZero: 'ice' });
}

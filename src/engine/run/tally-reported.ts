/**
 * Hours that a brief asks to have reported and that make no class (method 3): lower humidity limits, and what its preset
 * names, such as "THI over 68". Counted over demand hours, in the air that runs; where the supply is colder than asked it is
 * mixed up to t_sup, as for the caps.
 */
import type { Brief } from '../brief/brief.ts';
import { reportedOf } from '../brief/reported.ts';
import { hundredths } from '../conventions.ts';
import { isIndexLimit } from '../hour-classes/index-limit.ts';
import {
  type AirColumns,
  type AirFigure,
  deficitFigure,
  dewPointFigure,
  figureColumn,
  humidityFigure,
  indexFigure,
} from './air-figures.ts';
import { HOURS_PER_BLOCK, type HourColumns } from './hour-columns.ts';
import type { ReportedHours } from './run-result.ts';

/** What is supplied in some demand hours; a humidity ratio is NaN where it is not known (the air of a hall, water). */
export type SuppliedHours = Pick<
  HourColumns,
  'count' | 'supplyC' | 'supplyRatio' | 'supplyAimC' | 'loadFraction' | 'pressurePa'
>;

/** Counts of a year so far. */
export interface ReportCounts {
  /** Adds hours, at most a block of them. */
  readonly add: (hours: SuppliedHours) => void;
  readonly ofYear: () => ReportedHours[];
}

/** One thing to report: hours in which a figure of the supply or of the room lies under, or over, a limit. */
interface Report {
  readonly what: string;
  /** null: this program cannot tell. */
  readonly test: Test | null;
}

interface Test {
  readonly figure: AirFigure;
  readonly of: 'supply' | 'room';
  readonly side: 'under' | 'over';
  readonly limit: number;
}

/** Ten times what tabulated saturation pressure can put a figure off, hundredths. */
const UNDECIDED_HUNDREDTHS = 0.1;

/** Where the air of a block of hours is put together. */
const airColumns = (): AirColumns => ({
  count: 0,
  tempC: new Float64Array(HOURS_PER_BLOCK),
  humidityRatio: new Float64Array(HOURS_PER_BLOCK),
  pressurePa: new Float64Array(HOURS_PER_BLOCK),
});
const airs = { supply: airColumns(), room: airColumns() };

/** Begins a year. @returns null when the brief has nothing to report */
export function startReports(brief: Brief): ReportCounts | null {
  const reports = [...lowerLimits(brief), ...brief.reported.flatMap(namedReports)];
  if (reports.length === 0) return null;
  const counts = reports.map(() => 0);
  let allKnown = true;
  return {
    add: (hours) => {
      if (allKnown) allKnown = fillAirs(brief, hours);
      if (!allKnown) return;
      for (const [nth, { test }] of reports.entries())
        if (test !== null) counts[nth] = (counts[nth] ?? 0) + count(test);
    },
    ofYear: () =>
      reports.map(({ what, test }, nth) => ({ what, hours: test === null || !allKnown ? null : (counts[nth] ?? 0) })),
  };
}

/** @returns whether the moisture of every supply is known */
function fillAirs(brief: Brief, hours: SuppliedHours): boolean {
  const { supply, room } = airs;
  const asItEnters = isIndexLimit(brief.limit);
  const { dTroomK, dwRoomKgKg } = brief;
  for (let at = 0; at < hours.count; at++) {
    const ratio = hours.supplyRatio[at] ?? Number.NaN;
    if (Number.isNaN(ratio)) return false;
    const suppliedC = hours.supplyC[at] ?? Number.NaN;
    const tempC = asItEnters ? suppliedC : Math.max(suppliedC, hours.supplyAimC[at] ?? Number.NaN);
    const pressurePa = hours.pressurePa[at] ?? Number.NaN;
    supply.tempC[at] = tempC;
    supply.humidityRatio[at] = ratio;
    supply.pressurePa[at] = pressurePa;
    room.tempC[at] = tempC + dTroomK * (hours.loadFraction[at] ?? Number.NaN);
    room.humidityRatio[at] = ratio + dwRoomKgKg;
    room.pressurePa[at] = pressurePa;
  }
  supply.count = hours.count;
  room.count = hours.count;
  return true;
}

/** Hours of the block that pass a test: by the figure from the table, by the formula where that leaves it open. */
function count({ figure, of, side, limit }: Test): number {
  const air = airs[of];
  figure.fill(air);
  const isUnder = side === 'under';
  const limitHundredths = hundredths(limit);
  // What rounds to less than the limit, or to more.
  const edge = isUnder ? limitHundredths - 0.5 : limitHundredths + 0.5;
  let passed = 0;
  for (let at = 0; at < air.count; at++) {
    const above = 100 * (figureColumn[at] ?? 0) - edge;
    if (Math.abs(above) > UNDECIDED_HUNDREDTHS) passed += above < 0 === isUnder ? 1 : 0;
    else {
      const found = hundredths(figure.ofHour(air, at));
      passed += (isUnder ? found < limitHundredths : found > limitHundredths) ? 1 : 0;
    }
  }
  return passed;
}

function lowerLimits({ lowerLimits: { roomRhPct, supplyRhPct, supplyDewPointC } }: Brief): Report[] {
  const under = (limit: number | undefined, what: string, test: Pick<Test, 'figure' | 'of'>): Report[] =>
    limit === undefined ? [] : [{ what, test: { ...test, side: 'under', limit } }];
  return [
    ...under(roomRhPct, `room under ${roomRhPct} % relative humidity`, { figure: humidityFigure, of: 'room' }),
    ...under(supplyRhPct, `supply under ${supplyRhPct} % relative humidity`, { figure: humidityFigure, of: 'supply' }),
    ...under(supplyDewPointC, `supply under a dew point of ${supplyDewPointC} °C`, {
      figure: dewPointFigure,
      of: 'supply',
    }),
  ];
}

/** The texts of the presets; of another this program says that it is not counted. */
function namedReports(text: string): Report[] {
  const asked = reportedOf(text);
  if (asked.kind === 'other') return [{ what: text, test: null }];
  if (asked.kind === 'thi') {
    return [{ what: text, test: { figure: indexFigure, of: 'room', side: 'over', limit: asked.over } }];
  }
  const { belowKpa, aboveKpa } = asked;
  const deficit = { figure: deficitFigure, of: 'room' } as const;
  return [
    {
      what: `vapour pressure deficit below ${belowKpa} kPa`,
      test: { ...deficit, side: 'under', limit: belowKpa },
    },
    {
      what: `vapour pressure deficit above ${aboveKpa} kPa`,
      test: { ...deficit, side: 'over', limit: aboveKpa },
    },
  ];
}

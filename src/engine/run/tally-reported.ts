/**
 * Hours that a brief asks to have reported and that make no class (method 3): lower humidity limits, and what its preset
 * names, such as "THI over 68". Counted over demand hours, in the air that runs; where the supply is colder than asked it is
 * mixed up to t_sup, as for the caps.
 */
import type { Brief } from '../brief/brief.ts';
import { reportedOf } from '../brief/reported.ts';
import { hundredths } from '../conventions.ts';
import { isIndexLimit, temperatureHumidityIndex } from '../hour-classes/index-limit.ts';
import { dewPointC, relativeHumidityPct, saturationPressurePa } from '../psychrometrics/moist-air.ts';
import type { ReportedHours } from './run-result.ts';

/** What is supplied in a demand hour. */
export interface SuppliedAir {
  readonly supplyC: number;
  /** kg/kg; null where it is not known (the air of a hall, water). */
  readonly supplyRatio: number | null;
  /** t_sup, °C; NaN under an index limit. */
  readonly supplyAimC: number;
  readonly loadFraction: number;
  readonly pressurePa: number;
}

interface AirState {
  readonly tempC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
}

/** One thing to report: whether an hour counts, by the air of the supply and of the room. */
interface Report {
  readonly what: string;
  /** null: this program cannot tell. */
  readonly counts: ((air: { supply: AirState; room: AirState }) => boolean) | null;
}

const PA_PER_KPA = 1000;
/** Above any supply; a dew point is never answered above the dry bulb that is given. */
const HOTTER_THAN_ANY_SUPPLY_C = 150;

/** @param hours asked for only when there is something to report */
export function tallyReported(brief: Brief, hours: () => Iterable<SuppliedAir>): ReportedHours[] {
  const reports = [...lowerLimits(brief), ...brief.reported.flatMap(namedReports)];
  if (reports.length === 0) return [];
  const airs = [...hours()].map((each) => airOf(each, brief));
  return reports.map(({ what, counts }) => ({
    what,
    hours: counts === null || airs.includes(null) ? null : airs.filter((air) => air !== null && counts(air)).length,
  }));
}

function airOf(hour: SuppliedAir, brief: Brief): { supply: AirState; room: AirState } | null {
  if (hour.supplyRatio === null) return null;
  const { pressurePa, supplyC, supplyAimC, supplyRatio, loadFraction } = hour;
  const tempC = isIndexLimit(brief.limit) ? supplyC : Math.max(supplyC, supplyAimC);
  const supply = { tempC, humidityRatio: supplyRatio, pressurePa };
  const room = {
    ...supply,
    tempC: tempC + brief.dTroomK * loadFraction,
    humidityRatio: supplyRatio + brief.dwRoomKgKg,
  };
  return { supply, room };
}

function lowerLimits({ lowerLimits: { roomRhPct, supplyRhPct, supplyDewPointC } }: Brief): Report[] {
  const under = (found: number, limit: number): boolean => hundredths(found) < hundredths(limit);
  return [
    ...(roomRhPct === undefined
      ? []
      : [
          {
            what: `room under ${roomRhPct} % relative humidity`,
            counts: ({ room }: { room: AirState }) => under(humidityPct(room), roomRhPct),
          },
        ]),
    ...(supplyRhPct === undefined
      ? []
      : [
          {
            what: `supply under ${supplyRhPct} % relative humidity`,
            counts: ({ supply }: { supply: AirState }) => under(humidityPct(supply), supplyRhPct),
          },
        ]),
    ...(supplyDewPointC === undefined
      ? []
      : [
          {
            what: `supply under a dew point of ${supplyDewPointC} °C`,
            counts: ({ supply }: { supply: AirState }) =>
              under(dewPointC(HOTTER_THAN_ANY_SUPPLY_C, supply.humidityRatio, supply.pressurePa), supplyDewPointC),
          },
        ]),
  ];
}

/** The texts of the presets; of another this program says that it is not counted. */
function namedReports(text: string): Report[] {
  const asked = reportedOf(text);
  if (asked.kind === 'other') return [{ what: text, counts: null }];
  if (asked.kind === 'thi') {
    return [{ what: text, counts: ({ room }) => hundredths(thiOf(room)) > hundredths(asked.over) }];
  }
  const { belowKpa: least, aboveKpa: most } = asked;
  return [
    {
      what: `vapour pressure deficit below ${least} kPa`,
      counts: ({ room }) => hundredths(deficitKPa(room)) < hundredths(least),
    },
    {
      what: `vapour pressure deficit above ${most} kPa`,
      counts: ({ room }) => hundredths(deficitKPa(room)) > hundredths(most),
    },
  ];
}

function humidityPct({ tempC, humidityRatio, pressurePa }: AirState): number {
  return relativeHumidityPct(tempC, humidityRatio, pressurePa);
}

function thiOf(air: AirState): number {
  return temperatureHumidityIndex(air.tempC, humidityPct(air));
}

function deficitKPa(air: AirState): number {
  return (saturationPressurePa(air.tempC) * Math.max(0, 1 - humidityPct(air) / 100)) / PA_PER_KPA;
}

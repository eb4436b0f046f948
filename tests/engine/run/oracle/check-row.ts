/**
 * One row of an export of hours, its class found again from its cells, the brief and the calendar alone, by the oracle (written
 * apart from the engine, PsychroLib for all moist air).
 */
import type { Brief } from '#engine/brief/brief.ts';
import { judgeByOracle, type OracleHour, type Threshold } from './oracle.ts';

type Row = Readonly<Record<string, string>>;

/** As the numbers are rounded in the export: a hundredth of a kelvin, 0.01 % RH; twice that for what follows from them. */
const NEAR: readonly { threshold: Threshold; by: number }[] = [
  { threshold: 'temperature', by: 0.02 },
  { threshold: 'cut-in', by: 0.02 },
  { threshold: 'gain', by: 0.02 },
  { threshold: 'dew-point', by: 0.02 },
  { threshold: 'rh', by: 0.1 },
  { threshold: 'index', by: 0.03 },
];

/** "same", "near a threshold" (so near that the rounding of the cells decides), or what is wrong. */
export function checkRow(brief: Brief, row: Row): string {
  const hour = oracleHour(brief, row);
  if (agrees(hour, row)) return 'same';
  if (nearThreshold(hour, row)) return 'near a threshold';
  return `${row.standard_time}: ${row.class}, not ${judgeByOracle(hour).hourClass}`;
}

/** The schedule from the row's own clock: a slot ending at h is open when h - 1 >= opening and h <= closing. */
function isOpen(brief: Brief, row: Row): boolean {
  const time = (brief.clock === 'civil' ? row.civil_time : row.standard_time) ?? '';
  const ends = new Date(`${time.replace(' ', 'T')}:00Z`);
  // The hour that ends at midnight belongs to the day before.
  const middle = new Date(ends.getTime() - 30 * 60_000);
  const hourEnding = middle.getUTCHours() + 1;
  const [opening = 0, closing = 24] = brief.hours.split('-').map(Number);
  const weekday = middle.getUTCDay();
  const dayOpens = brief.weekdays === 'all' || (weekday >= 1 && weekday <= 5);
  return dayOpens && hourEnding - 1 >= opening && hourEnding <= closing;
}

const numberOf = (cell: string | undefined): number => (cell === undefined || cell === '' ? Number.NaN : Number(cell));

function oracleHour(brief: Brief, row: Row): OracleHour {
  return {
    brief,
    open: isOpen(brief, row),
    dryBulbC: numberOf(row.dry_bulb_C),
    humidityRatio: numberOf(row.humidity_ratio_kg_kg),
    pressurePa: numberOf(row.pressure_Pa),
    limitC: numberOf(row.limit_C),
    moved: null,
  };
}

function agrees(hour: OracleHour, row: Row): boolean {
  const { hourClass, met } = judgeByOracle(hour);
  return hourClass === row.class && (met === null ? '' : met ? 'yes' : 'no') === row.met;
}

function nearThreshold(hour: OracleHour, row: Row): boolean {
  return NEAR.some(({ threshold, by }) =>
    [by, -by].some((moved) => agrees({ ...hour, moved: { threshold, by: moved } }, row)),
  );
}

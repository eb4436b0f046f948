import { HOURS_PER_DAY } from '../engine/conventions.ts';
import type { GapCalendar } from '../engine/reduction/gap-calendar.ts';
import { dayLabel, monthNames, monthStarts } from './calendar.ts';

const CELL = { width: 20, height: 16 } as const;
const LEFT = 34;
const TOP = 18;
const SOFT = '#55625e';

/** What is painted of a day, from the foot of its cell; the words say the same. */
export const gapKinds = [
  { kind: 'missing', word: 'Missing', fill: '#a8442f' },
  { kind: 'repaired', word: 'Repaired by a rule', fill: '#d79a4a' },
  { kind: 'estimated', word: 'Estimated by the source', fill: '#b9bdb8' },
] as const;

/** The days of a year, a row a month, each filled from its foot by the share of its hours that are not measured. */
export function GapCalendarPicture({ calendar, label }: { calendar: GapCalendar; label: string }) {
  const days = calendar.missing.length;
  const starts = monthStarts(days);
  const width = LEFT + 31 * CELL.width + 1;
  const height = TOP + 12 * CELL.height + 1;
  return (
    <svg viewBox={`0 0 ${width} ${height}`} role="img" aria-label={label} style={{ display: 'block', width: '100%' }}>
      <g fontSize="10" fill={SOFT}>
        {[1, 5, 10, 15, 20, 25, 30].map((day) => (
          <text key={day} x={LEFT + (day - 0.5) * CELL.width} y={TOP - 6} textAnchor="middle">
            {day}
          </text>
        ))}
        {monthNames.map((name, month) => (
          <text key={name} x={LEFT - 6} y={TOP + (month + 0.75) * CELL.height} textAnchor="end">
            {name}
          </text>
        ))}
      </g>
      {Array.from({ length: days }, (_, day) => {
        const month = starts.findLastIndex((start) => start <= day);
        return (
          <Day
            key={dayLabel(day, days)}
            calendar={calendar}
            day={day}
            x={LEFT + (day - (starts[month] ?? 0)) * CELL.width}
            y={TOP + month * CELL.height}
          />
        );
      })}
    </svg>
  );
}

function Day({ calendar, day, x, y }: { calendar: GapCalendar; day: number; x: number; y: number }) {
  let under = 0;
  const bars = gapKinds.flatMap(({ kind, fill }) => {
    const hours = calendar[kind][day] ?? 0;
    if (hours === 0) return [];
    const height = (CELL.height * hours) / HOURS_PER_DAY;
    under += height;
    return [<rect key={kind} x={x} y={y + CELL.height - under} width={CELL.width} height={height} fill={fill} />];
  });
  return (
    <>
      {bars}
      <rect x={x + 0.5} y={y + 0.5} width={CELL.width} height={CELL.height} fill="none" stroke="#d5ccb9" />
    </>
  );
}

export interface GapRun {
  /** Days of the year, 0 first, both included. */
  readonly firstDay: number;
  readonly lastDay: number;
  readonly missing: number;
  readonly repaired: number;
}

/** Neighbouring days with missing or repaired hours, as one row each. */
export function gapRuns({ missing, repaired }: GapCalendar): readonly GapRun[] {
  const runs: GapRun[] = [];
  for (let day = 0; day < missing.length; day += 1) {
    const [lost, mended] = [missing[day] ?? 0, repaired[day] ?? 0];
    if (lost + mended === 0) continue;
    const last = runs.at(-1);
    if (last?.lastDay === day - 1) {
      runs[runs.length - 1] = {
        ...last,
        lastDay: day,
        missing: last.missing + lost,
        repaired: last.repaired + mended,
      };
    } else runs.push({ firstDay: day, lastDay: day, missing: lost, repaired: mended });
  }
  return runs;
}

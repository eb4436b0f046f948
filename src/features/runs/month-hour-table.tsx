import { type KeyboardEvent, useMemo, useRef, useState } from 'react';
import { monthNames } from '../../charts/calendar.ts';
import { unmetClasses } from '../../charts/hour-class-colours.ts';
import { inkOn } from '../../charts/ink-on.ts';
import { monthHours } from '../../charts/month-hours.ts';
import { MADDER } from '../../charts/sequences.ts';
import { hourClasses } from '../../engine/hour-classes/hour-class.ts';
import { number } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

interface MonthHourTableProps {
  readonly codes: Uint8Array;
  /** Lists the hours of a cell: month 1 to 12, hour of day by its end. */
  readonly onList: (month: number, hour: number) => void;
}

const HOURS = 24;
/** Hours of the day by their ends. */
const hourEnds = Array.from({ length: HOURS }, (_, index) => index + 1);
const UNMET: ReadonlySet<number> = new Set(
  [...unmetClasses, 'frozen' as const].map((each) => hourClasses.indexOf(each)),
);

/** Unmet hours by month and hour of day as printed figures with a tint; a cell lists its hours. */
export function MonthHourTable({ codes, onList }: MonthHourTableProps) {
  const counts = useMemo(() => monthHours(codes, (code) => UNMET.has(code)), [codes]);
  const most = Math.max(1, ...counts.flat());
  const [at, setAt] = useState({ month: 0, hour: 12 });
  const table = useRef<HTMLTableElement>(null);
  const go = (event: KeyboardEvent) => {
    const next = moved(at, event.key);
    if (next === null) return;
    event.preventDefault();
    setAt(next);
    table.current?.querySelector<HTMLElement>(`[data-cell="${next.month}-${next.hour}"]`)?.focus();
  };
  return (
    <>
      <p className="mb-1.5 max-w-[70ch] text-fine text-soft">
        Hours with demand that are not met, standard time. A figure lists its hours; arrow keys go from cell to cell.
      </p>
      <ScrollInside label="Unmet hours by month and hour of day, scrolls sideways">
        <table ref={table} className="min-w-[50rem] border-collapse text-[0.6875rem]" onKeyDown={go}>
          <caption className="sr-only">Unmet hours by month and hour of day</caption>
          <thead>
            <tr>
              <td />
              {hourEnds.map((end) => (
                <th key={end} scope="col" className="w-8 pb-0.5 text-center font-normal text-soft">
                  {end}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {counts.map((row, month) => (
              <tr key={monthNames[month]}>
                <th scope="row" className="pr-2 text-left font-normal text-soft">
                  {monthNames[month]}
                </th>
                {hourEnds.map((end) => (
                  <td key={end} className="border border-line p-0 text-center">
                    <Cell
                      id={`${month}-${end}`}
                      count={row[end - 1] ?? 0}
                      share={(row[end - 1] ?? 0) / most}
                      isCurrent={at.month === month && at.hour === end}
                      label={`${monthNames[month]}, hour ${end}: ${number(row[end - 1] ?? 0)} unmet`}
                      onFocus={() => setAt({ month, hour: end })}
                      onPress={() => onList(month + 1, end)}
                    />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </>
  );
}

interface CellProps {
  readonly id: string;
  readonly count: number;
  readonly share: number;
  readonly isCurrent: boolean;
  readonly label: string;
  readonly onFocus: () => void;
  readonly onPress: () => void;
}

function Cell({ id, count, share, isCurrent, label, onFocus, onPress }: CellProps) {
  const colour = count === 0 ? null : (MADDER[Math.min(MADDER.length - 1, Math.floor(share * MADDER.length))] ?? null);
  return (
    <button
      type="button"
      data-cell={id}
      aria-label={label}
      tabIndex={isCurrent ? 0 : -1}
      onFocus={onFocus}
      onClick={onPress}
      className="block h-6 w-full focus-visible:-outline-offset-1"
      style={colour === null ? {} : { backgroundColor: colour, color: inkOn(colour) }}
    >
      {count === 0 ? '' : count}
    </button>
  );
}

function moved({ month, hour }: { month: number; hour: number }, key: string): { month: number; hour: number } | null {
  const held = (nextMonth: number, nextHour: number) => ({
    month: Math.min(11, Math.max(0, nextMonth)),
    hour: Math.min(HOURS, Math.max(1, nextHour)),
  });
  if (key === 'ArrowLeft') return held(month, hour - 1);
  if (key === 'ArrowRight') return held(month, hour + 1);
  if (key === 'ArrowUp') return held(month - 1, hour);
  if (key === 'ArrowDown') return held(month + 1, hour);
  return null;
}

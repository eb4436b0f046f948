import { useMemo } from 'react';
import { dayLabel } from '../../charts/calendar.ts';
import { GapCalendarPicture, gapKinds, gapRuns } from '../../charts/gap-calendar.tsx';
import type { WeatherFileRecord, YearFacts } from '../../contract/weather.ts';
import { gapCalendar } from '../../engine/reduction/gap-calendar.ts';
import { number, plural } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { useRecordYear } from './record-year.ts';

/** A year with more runs than this is read off the picture. */
const MOST_ROWS = 40;

/** What is missing or repaired, day by day. */
export function GapCalendarSection({ record, facts }: { record: WeatherFileRecord; facts: YearFacts }) {
  const year = useRecordYear(record.file, facts);
  const flags = year.data?.packed.flags;
  const calendar = useMemo(() => (flags ? gapCalendar(flags) : null), [flags]);
  // What went wrong is said once, where the year is drawn first.
  if (calendar === null) return null;
  const runs = gapRuns(calendar);
  const sentence = sentenceOf(calendar.missing, calendar.repaired);
  return (
    <section aria-labelledby="gap-calendar">
      <h2 id="gap-calendar" className="text-name">
        Gap calendar
      </h2>
      <p className="mt-0.5 mb-2 text-soft">{sentence}</p>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,20rem)]">
        <div>
          <ScrollInside label="Gap calendar, scrolls sideways">
            <div className="min-w-[32rem]">
              <GapCalendarPicture
                calendar={calendar}
                label={`Days of the year with hours that are not measured. ${sentence}`}
              />
            </div>
          </ScrollInside>
          <ul className="mt-1 flex flex-wrap gap-x-4 text-fine text-soft">
            {gapKinds.map(({ kind, word, fill }) => (
              <li key={kind} className="flex items-center gap-1.5">
                <span aria-hidden="true" className="size-2.5 border border-ink/30" style={{ backgroundColor: fill }} />
                {word}
              </li>
            ))}
            <li>Each cell is a day, filled from its foot by the share of its 24 hours.</li>
          </ul>
        </div>
        {runs.length === 0 ? null : <Runs runs={runs} days={calendar.missing.length} />}
      </div>
    </section>
  );
}

function Runs({ runs, days }: { runs: ReturnType<typeof gapRuns>; days: number }) {
  return (
    <div>
      <table className="ruled">
        <caption className="sr-only">Days with missing or repaired hours</caption>
        <thead>
          <tr>
            <th scope="col">Days</th>
            <th scope="col" className="figure">
              Missing, h
            </th>
            <th scope="col" className="figure">
              Repaired, h
            </th>
          </tr>
        </thead>
        <tbody>
          {runs.slice(0, MOST_ROWS).map(({ firstDay, lastDay, missing, repaired }) => (
            <tr key={firstDay}>
              <th scope="row">
                {firstDay === lastDay
                  ? dayLabel(firstDay, days)
                  : `${dayLabel(firstDay, days)} to ${dayLabel(lastDay, days)}`}
              </th>
              <td className="figure">{number(missing)}</td>
              <td className="figure">{number(repaired)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {runs.length > MOST_ROWS ? (
        <p className="mt-1 text-fine text-soft">
          The first {MOST_ROWS} of {number(runs.length)} stretches; the picture shows them all.
        </p>
      ) : null}
    </div>
  );
}

function sentenceOf(missing: readonly number[], repaired: readonly number[]): string {
  const words = (hoursByDay: readonly number[], done: string) => {
    const total = hoursByDay.reduce((sum, count) => sum + count, 0);
    const days = hoursByDay.filter((count) => count > 0).length;
    return total === 0
      ? `No hour is ${done}`
      : `${plural(total, 'hour')} on ${plural(days, 'day')} ${total === 1 ? 'is' : 'are'} ${done}`;
  };
  return `${words(missing, 'missing')}. ${words(repaired, 'repaired')}.`;
}

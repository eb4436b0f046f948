import { monthNames } from '../../charts/calendar.ts';
import type { ClimateDifference } from '../../contract/weather-change.ts';
import { hours, number, plural } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

const THRESHOLDS_K: readonly number[] = [3, 6, 9, 12, 15];

interface DifferenceProps {
  readonly difference: ClimateDifference;
  readonly cappedHours: number;
}

/** A derived year beside its parent: months, depression hours, and the hours that were held at saturation. */
export function DifferenceTables({ difference, cappedHours }: DifferenceProps) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-6">
      <DepressionHours difference={difference} />
      <p className="max-w-[70ch]">
        {cappedHours === 0
          ? 'In no hour would the humidity pass saturation.'
          : `In ${plural(cappedHours, 'hour')} the humidity would pass saturation and is held there.`}
      </p>
      <Months difference={difference} />
    </div>
  );
}

function DepressionHours({ difference }: { difference: ClimateDifference }) {
  const rows = difference.depressionHours.filter(({ atLeastK }) => THRESHOLDS_K.includes(atLeastK));
  return (
    <div>
      <h3 className="mb-1">Hours with a depression of at least</h3>
      <table className="ruled max-w-[30rem]">
        <caption className="sr-only">Hours of the year with a wet-bulb depression of at least so many kelvin</caption>
        <thead>
          <tr>
            <th scope="col">Depression</th>
            <th scope="col" className="figure">
              Parent
            </th>
            <th scope="col" className="figure">
              Derived
            </th>
            <th scope="col" className="figure">
              Difference
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ atLeastK, before, after }) => (
            <tr key={atLeastK}>
              <th scope="row">{number(atLeastK)}&nbsp;K</th>
              <td className="figure text-soft">{hours(before)}</td>
              <td className="figure font-medium">{hours(after)}</td>
              <td className="figure">{signed(after - before, 0)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

const figures = [
  { key: 'meanC', title: 'Mean dry bulb' },
  { key: 'meanMaxC', title: 'Daily highest' },
  { key: 'meanMinC', title: 'Daily lowest' },
  { key: 'meanWetBulbC', title: 'Mean wet bulb' },
] as const;

function Months({ difference }: { difference: ClimateDifference }) {
  const { meanDryBulbC, meanWetBulbC } = difference;
  return (
    <div>
      <h3 className="mb-1">Means of each month, °C: parent, then derived</h3>
      <ScrollInside label="Means of each month, scrolls sideways">
        <table className="ruled min-w-[34rem]">
          <caption className="sr-only">Means of each month in °C, of the parent and of the derived year</caption>
          <thead>
            <tr>
              <th scope="col">Month</th>
              {figures.map(({ key, title }) => (
                <th key={key} scope="colgroup" colSpan={2} className="figure">
                  {title}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {difference.months.map(({ before, after }, month) => (
              <tr key={monthNames[month]}>
                <th scope="row" className="text-soft">
                  {monthNames[month]}
                </th>
                {figures.map(({ key }) => (
                  <Pair key={key} before={before?.[key] ?? null} after={after?.[key] ?? null} />
                ))}
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr>
              <th scope="row">Year</th>
              <Pair before={meanDryBulbC.before} after={meanDryBulbC.after} />
              <td colSpan={4} />
              <Pair before={meanWetBulbC.before} after={meanWetBulbC.after} />
            </tr>
          </tfoot>
        </table>
      </ScrollInside>
    </div>
  );
}

function Pair({ before, after }: { before: number | null; after: number | null }) {
  return (
    <>
      <td className="figure font-normal text-soft">{before === null ? '–' : number(before, 1)}</td>
      <td className="figure font-medium">{after === null ? '–' : number(after, 1)}</td>
    </>
  );
}

/** "+120", "−4", "0". */
function signed(value: number, decimals: number): string {
  return value > 0 ? `+${number(value, decimals)}` : number(value, decimals);
}

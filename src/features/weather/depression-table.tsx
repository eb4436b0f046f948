import { monthNames } from '../../charts/calendar.ts';
import { depressionScaleK } from '../../charts/depression-cloth.ts';
import { inkOn } from '../../charts/ink-on.ts';
import { RAMP_GRADIENT, rampColour } from '../../charts/ramp.ts';
import type { YearFacts } from '../../contract/weather.ts';
import { number, share } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

const HOURS = Array.from({ length: 24 }, (_, hour) => hour + 1);

/** Mean depression by month and hour of day, as figures with a tint. */
export function DepressionTable({ facts }: { facts: YearFacts }) {
  const known = facts.meanDepressionK.flat().filter((value) => value !== null);
  const scaleK = depressionScaleK(Math.max(0, ...known));
  return (
    <section aria-labelledby="depression">
      <h2 id="depression" className="mb-2 text-name">
        Depression by month and hour of day
      </h2>
      <ScrollInside label="Mean depression, scrolls sideways">
        <table className="w-full min-w-[58rem] table-fixed print:min-w-0 print:text-[0.5625rem] border-collapse text-center text-fine">
          <caption className="sr-only">
            Mean wet-bulb depression in kelvin by month and hour ending in local standard time, with the share of hours
            present in each month
          </caption>
          <thead>
            <tr className="text-soft">
              <th scope="col" className="w-10 text-left font-normal">
                <span className="sr-only">Month</span>
              </th>
              {HOURS.map((hour) => (
                <th key={hour} scope="col" className="pb-0.5 font-normal">
                  {String(hour).padStart(2, '0')}
                </th>
              ))}
              <th scope="col" className="w-18 pl-3 text-right font-normal">
                Complete
              </th>
            </tr>
          </thead>
          <tbody>
            {monthNames.map((name, month) => (
              <tr key={name}>
                <th scope="row" className="text-left font-normal text-soft">
                  {name}
                </th>
                {HOURS.map((hour) => (
                  <Figure key={hour} valueK={facts.meanDepressionK[month]?.[hour - 1] ?? null} scaleK={scaleK} />
                ))}
                <td className="pl-3 text-right whitespace-nowrap">{share(facts.monthCompletePct[month] ?? 0)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      <div className="mt-2 flex items-center gap-2 text-fine text-soft">
        <span>0</span>
        <span
          aria-hidden="true"
          className="h-2.5 w-40 border border-ink/40"
          style={{ backgroundImage: RAMP_GRADIENT }}
        />
        <span>{number(scaleK)}&nbsp;K, mean. Hours end at the figure above them, local standard time.</span>
      </div>
    </section>
  );
}

function Figure({ valueK, scaleK }: { valueK: number | null; scaleK: number }) {
  if (valueK === null) return <td className="text-soft">–</td>;
  const colour = rampColour(valueK / scaleK);
  return (
    <td className="h-6 border border-paper" style={{ backgroundColor: colour, color: inkOn(colour) }}>
      {number(valueK, 1)}
    </td>
  );
}

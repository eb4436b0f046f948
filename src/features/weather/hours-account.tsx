import type { YearFacts } from '../../contract/weather.ts';
import { differenceK, hours, temperatureC } from '../../lib/format.ts';

/** Where the hours come from, adding up to the year, and what kind of year it is. */
export function HoursAccount({ facts, isDerived = false }: { facts: YearFacts; isDerived?: boolean }) {
  const sources = [
    ['Measured', facts.measured],
    ['Estimated by the source', facts.estimated],
    ['Repaired by a rule', facts.repaired],
    ['Missing', facts.missing],
  ] as const;
  return (
    <section aria-labelledby="hours-account">
      <h2 id="hours-account" className="mb-1 text-name">
        The hours and the air
      </h2>
      <table className="ruled">
        <caption className="sr-only">Hours of the year by where they come from</caption>
        <tbody>
          {sources.map(([source, count]) => (
            <tr key={source}>
              <th scope="row">{source}</th>
              <td className="figure">{hours(count)}</td>
            </tr>
          ))}
        </tbody>
        <tfoot>
          <tr>
            <th scope="row">Hours of the year</th>
            <td className="figure">{hours(facts.hours)}</td>
          </tr>
        </tfoot>
      </table>
      {isDerived ? (
        <p className="mt-1 text-fine text-soft">
          Where the hours of the parent come from. Nobody measured the hours of a derived year.
        </p>
      ) : null}
      <table className="ruled mt-4">
        <caption className="sr-only">The air of the year</caption>
        <tbody>
          <tr>
            <th scope="row">Mean dry bulb</th>
            <td className="figure">{temperatureC(facts.meanDryBulbC, 2)}</td>
          </tr>
          <tr>
            <th scope="row">Mean wet bulb</th>
            <td className="figure">
              {facts.meanWetBulbC === null ? 'not known' : temperatureC(facts.meanWetBulbC, 2)}
            </td>
          </tr>
          <tr>
            <th scope="row">Largest depression</th>
            <td className="figure">
              {facts.maxDepressionK === null ? 'not known' : differenceK(facts.maxDepressionK)}
            </td>
          </tr>
          <tr>
            <th scope="row">Pressure assumed from the elevation</th>
            <td className="figure">{hours(facts.assumedPressure)}</td>
          </tr>
          <tr>
            <th scope="row">Humidity below 0&nbsp;°C stands for</th>
            <td className="figure">{facts.belowZero === 'water' ? 'liquid water' : 'ice'}</td>
          </tr>
        </tbody>
      </table>
    </section>
  );
}

import { Link } from 'react-router-dom';
import { CURVE_DASHES, CumulativeCurves } from '../../charts/cumulative-curves.tsx';
import { countedCurve } from '../../charts/depression-curve.ts';
import type { StationRecord } from '../../contract/stations.ts';
import type { WeatherFile, YearFacts } from '../../contract/weather.ts';
import { yearWords } from '../../lib/file-words.ts';
import { list, number, plural, share, temperatureC } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

/** Depressions that the table counts, K. */
const COUNTED_K = [4, 8, 11] as const;
/** More lines than this in one picture are not told apart; the table has them all. */
const MOST_CURVES = CURVE_DASHES.length;
/** Share of the hours for the design wet bulb, %. */
const DESIGN_PERCENT = 1;

interface Year {
  readonly file: WeatherFile;
  readonly facts: YearFacts;
}

/** The years of the station that count, side by side, and their cumulative curves in one picture. */
export function StationYears({ record }: { record: StationRecord }) {
  const years = record.files.flatMap(({ file, facts }) =>
    facts !== null && file.status === 'accepted' ? [{ file, facts }] : [],
  );
  return (
    <section aria-labelledby="years">
      <h2 id="years" className="mb-2 text-name">
        Its years side by side
      </h2>
      {years.length === 0 ? (
        <p>No year of this station is accepted. The files below wait, or no longer count.</p>
      ) : (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-5 xl:grid-cols-[minmax(0,1fr)_26rem]">
          <YearTable years={years} />
          <Curves years={years} name={record.station.name} />
        </div>
      )}
    </section>
  );
}

function YearTable({ years }: { years: readonly Year[] }) {
  const { teamId } = useTeam();
  return (
    <ScrollInside label="Years of the station, scrolls sideways">
      <table className="ruled min-w-[38rem]">
        <caption className="sr-only">Accepted years of the station</caption>
        <thead>
          <tr>
            <th scope="col">Year</th>
            <th scope="col" className="figure">
              Complete
            </th>
            {COUNTED_K.map((kelvin) => (
              <th key={kelvin} scope="col" className="figure">
                Hours at {kelvin}&nbsp;K or more
              </th>
            ))}
            <th scope="col" className="figure">
              Wet bulb of {DESIGN_PERCENT}&nbsp;%
            </th>
            <th scope="col">Findings</th>
          </tr>
        </thead>
        <tbody>
          {years.map(({ file, facts }) => (
            <tr key={file.id}>
              <th scope="row" className="whitespace-nowrap">
                <Link to={paths.weatherFile.to(teamId, file.id)} title={file.name}>
                  {yearWords(file)}
                </Link>
              </th>
              <td className="figure">{file.completePct === null ? '–' : share(file.completePct)}</td>
              {COUNTED_K.map((kelvin) => (
                <td key={kelvin} className="figure">
                  {number(hoursAt(facts, kelvin))}
                </td>
              ))}
              <td className="figure">{designWetBulb(facts)}</td>
              <td>{findingWords(file.findingCounts)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function Curves({ years, name }: { years: readonly Year[]; name: string }) {
  const drawn = years.slice(0, MOST_CURVES);
  const curves = drawn.map(({ file, facts }) => ({
    name: file.id,
    points: countedCurve(facts.hours - facts.missing, facts.depressionHours),
  }));
  const hoursOfYear = Math.max(...drawn.map(({ facts }) => facts.hours));
  return (
    <div>
      <h3 className="mb-1">Hours at or above a depression</h3>
      <CumulativeCurves
        curves={curves}
        hoursOfYear={hoursOfYear}
        readAtK={null}
        label={`Cumulative curves of depression of ${plural(drawn.length, 'year')} at ${name}. The table says the same at ${list(COUNTED_K.map(String))} K.`}
      />
      <ul className="mt-1 flex flex-wrap gap-x-4 gap-y-0.5 text-fine text-soft">
        {drawn.map(({ file }, index) => (
          <li key={file.id} className="flex items-center gap-1.5">
            <svg width="28" height="8" aria-hidden="true">
              <line
                x1="0"
                x2="28"
                y1="4"
                y2="4"
                stroke="#22302f"
                strokeWidth="1.75"
                strokeDasharray={CURVE_DASHES[index]}
              />
            </svg>
            {yearWords(file)}
          </li>
        ))}
      </ul>
      {years.length > drawn.length ? (
        <p className="mt-1 text-fine text-soft">
          The newest {drawn.length} of {years.length} years are drawn.
        </p>
      ) : null}
    </div>
  );
}

function hoursAt({ depressionHours }: YearFacts, kelvin: number): number {
  return depressionHours.find(({ atLeastK }) => atLeastK === kelvin)?.hours ?? 0;
}

function designWetBulb({ design }: YearFacts): string {
  const row = design.wetBulb.find(({ percent }) => percent === DESIGN_PERCENT);
  return row ? temperatureC(row.valueC) : '–';
}

function findingWords({ doubt, repair, note }: WeatherFile['findingCounts']): string {
  const words = [
    doubt > 0 ? plural(doubt, 'doubt') : null,
    repair > 0 ? plural(repair, 'repair') : null,
    note > 0 ? plural(note, 'note') : null,
  ].filter((word) => word !== null);
  return words.length === 0 ? 'None' : list(words);
}

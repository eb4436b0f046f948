import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useWatch } from 'react-hook-form';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { number } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import type { AnswerDraft } from './answer-draft.ts';
import { type MappingField, mappingOfDraft, mappingProblems } from './mapping-draft.ts';
import { type SampleRow, sampleUnder } from './table-sample.ts';
import { firstLinesQuery } from './weather-queries.ts';

const quantities = [
  { key: 'dryBulbC', field: 'dryBulb', head: 'Dry bulb, °C', decimals: 1 },
  { key: 'dewPointC', field: 'dewPoint', head: 'Dew point, °C', decimals: 1 },
  { key: 'relativeHumidityPct', field: 'relativeHumidity', head: 'Relative humidity, %', decimals: 0 },
  { key: 'wetBulbC', field: 'wetBulb', head: 'Wet bulb, °C', decimals: 1 },
  { key: 'pressurePa', field: 'pressure', head: 'Pressure, Pa', decimals: 0 },
] as const satisfies readonly { key: keyof SampleRow; field: MappingField; head: string; decimals: number }[];

/** The first ten rows, read as the form now says. */
export function SampleTable({ record }: { record: WeatherFileRecord }) {
  const { file, table } = record;
  const { teamId } = useTeam();
  const lines = useQuery({ ...firstLinesQuery(teamId, file.id), enabled: table !== null });
  const draft = useWatch<AnswerDraft, 'mapping'>({ name: 'mapping' });
  const rows = useMemo((): readonly SampleRow[] | null => {
    if (table === null || Object.keys(mappingProblems(draft)).length > 0) return null;
    const mapping = mappingOfDraft(draft);
    const names = table.columns.map(({ name }) => name);
    const texts = lines.data?.lines.map(({ text }) => text) ?? [];
    const live = texts.length > 0 ? sampleUnder(texts, mapping, names) : null;
    // Until the lines are there, the rows under the guess serve as long as the guess stands.
    return live ?? (JSON.stringify(mapping) === JSON.stringify(table.mapping) ? table.sample : null);
  }, [draft, lines.data, table]);
  const columns = quantities.filter(({ field }) => draft[field] !== '');
  return (
    <section aria-labelledby="sample">
      <h3 id="sample" className="mb-1 text-body text-ink">
        The first rows, read so
      </h3>
      {rows === null || rows.length === 0 ? (
        <p className="text-soft">They show here once the columns are chosen.</p>
      ) : (
        <>
          <ScrollInside label="The first rows, scrolls sideways">
            <table className="ruled min-w-[32rem]">
              <caption className="sr-only">The first rows of the table under these answers</caption>
              <thead>
                <tr>
                  <th scope="col">Line</th>
                  <th scope="col">Time in the row</th>
                  {columns.map(({ key, head }) => (
                    <th key={key} scope="col" className="figure">
                      {head}
                    </th>
                  ))}
                </tr>
              </thead>
              <tbody>
                {rows.map((row) => (
                  <tr key={row.line}>
                    <td>{number(row.line)}</td>
                    <td className={row.time === null ? 'text-madder' : ''}>
                      {row.time === null ? 'no time' : row.time.replace('T', ' ')}
                    </td>
                    {columns.map(({ key, decimals }) => (
                      <td key={key} className="figure">
                        {row[key] === null ? '–' : number(row[key], decimals)}
                      </td>
                    ))}
                  </tr>
                ))}
              </tbody>
            </table>
          </ScrollInside>
          <NotRead rows={rows} />
        </>
      )}
    </section>
  );
}

/** Says what the mapping misses in every one of the first rows. */
function NotRead({ rows }: { rows: readonly SampleRow[] }) {
  const isMissed = (of: (row: SampleRow) => unknown) => rows.every((row) => of(row) === null);
  const missed = [
    ...(isMissed(({ time }) => time) ? ['a time'] : []),
    ...(isMissed(({ dryBulbC }) => dryBulbC) ? ['a dry bulb'] : []),
    ...(isMissed((row) => row.dewPointC ?? row.relativeHumidityPct ?? row.wetBulbC) ? ['a humidity'] : []),
  ];
  if (missed.length === 0) return null;
  return (
    <p role="status" className="mt-1 font-medium text-madder">
      None of these rows gives {missed.join(' or ')} so. Choose other columns, or another way in which they are written.
    </p>
  );
}

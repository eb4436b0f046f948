import { useQueries } from '@tanstack/react-query';
import { CumulativeCurves } from '../../../charts/cumulative-curves.tsx';
import { type CurvePoint, countedCurve } from '../../../charts/depression-curve.ts';
import type { StationRecord } from '../../../contract/stations.ts';
import { stationQuery } from '../../../features/stations/station-queries.ts';
import { CurveKey, CurveTable } from './curve-parts.tsx';
import type { CompareColumn } from './use-compare-columns.ts';

const READ_AT_K = [2, 4, 6, 8, 10, 12, 15, 20] as const;

/** The weather itself: how many hours of each year have at least so much wet-bulb depression, whatever the brief. */
export function CompareDepressions({ columns, teamId }: { columns: readonly CompareColumn[]; teamId: string }) {
  const stationIds = [...new Set(columns.map(({ place }) => place.station.id))];
  const records = useQueries({ queries: stationIds.map((stationId) => stationQuery(teamId, stationId)) });
  const files = records.flatMap(({ data }) => data?.files ?? []);
  const curves = columns.flatMap((column) => depressionOf(column, files));
  if (curves.length === 0) return null;
  const kelvins = READ_AT_K.filter((kelvin) => curves.some(({ points }) => hoursAt(points, kelvin) > 0));
  return (
    <section aria-labelledby="depressions">
      <h2 id="depressions" className="mb-1 text-name">
        Hours at or above a depression
      </h2>
      <p className="mb-2 text-fine text-soft">The weather of the stations, at their own heights.</p>
      <div className="max-w-[32rem]">
        <CumulativeCurves
          curves={curves.map(({ key, points }) => ({ name: key, points }))}
          hoursOfYear={Math.max(...curves.map(({ hours }) => hours))}
          readAtK={null}
          label={`Cumulative curves of wet-bulb depression, for ${curves.map(({ name }) => name).join(', ')}; the table below says the same.`}
        />
        <CurveKey curves={curves} />
      </div>
      <CurveTable
        caption="Hours at or above a wet-bulb depression"
        heads={kelvins.map((kelvin) => `${kelvin} K`)}
        rows={curves.map(({ key, name, points }) => ({
          key,
          name,
          hours: kelvins.map((kelvin) => hoursAt(points, kelvin)),
        }))}
      />
    </section>
  );
}

interface DepressionOfColumn {
  readonly key: string;
  readonly name: string;
  readonly points: readonly CurvePoint[];
  readonly hours: number;
}

/** Of the one year that the column shows; none while its figures are not there. */
function depressionOf(
  { key, title, fileId }: Pick<CompareColumn, 'key' | 'title' | 'fileId'>,
  files: StationRecord['files'],
): readonly DepressionOfColumn[] {
  const facts = files.find(({ file }) => file.id === fileId)?.facts ?? null;
  if (facts === null) return [];
  const points = countedCurve(facts.hours - facts.missing, facts.depressionHours);
  return [{ key, name: title, points, hours: facts.hours }];
}

function hoursAt(points: readonly CurvePoint[], kelvin: number): number {
  return points.find(({ atLeastK }) => atLeastK === kelvin)?.hours ?? 0;
}

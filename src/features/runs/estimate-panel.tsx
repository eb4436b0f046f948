import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { getEstimate, type PlaceEstimate } from '../../contract/surface.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { metres, number, percent, sensible, withUnit } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import type { ProgrammeIds } from './run-queries.ts';
import { bandWords } from './run-words.ts';

interface EstimatePanelProps {
  readonly ids: ProgrammeIds;
  readonly point: { readonly latitude: number; readonly longitude: number };
  /** The version in view: another one is asked anew. */
  readonly briefVersionId: string;
  readonly onStation: (stationId: string) => void;
}

/** What a position comes to between stations, and all that it rests on. */
export function EstimatePanel({ ids, point, briefVersionId, onStation }: EstimatePanelProps) {
  const { teamId, programmeId, briefId } = ids;
  const { latitude, longitude } = point;
  const query = { latitude, longitude, ...(briefId === null ? {} : { brief: briefId }) };
  const asked = apiQuery(getEstimate, { params: { teamId, programmeId }, query });
  const estimate = useQuery({
    ...asked,
    queryKey: [...asked.queryKey, briefVersionId],
    placeholderData: keepPreviousData,
  });
  if (estimate.data) {
    return (
      <div aria-busy={estimate.isPlaceholderData} className={estimate.isPlaceholderData ? 'opacity-50' : ''}>
        <Estimate found={estimate.data} onStation={onStation} />
      </div>
    );
  }
  if (estimate.isPending) return <Loading what="the estimate" />;
  return (
    <Notice tone="wrong" live actions={<Button onClick={() => estimate.refetch()}>Try again</Button>}>
      {errorSentence(estimate.error)}
    </Notice>
  );
}

function Estimate({ found, onStation }: { found: PlaceEstimate; onStation: (stationId: string) => void }) {
  const { score, scoreNote, brief } = found;
  const isStation = found.stations[0]?.distanceKm === 0;
  return (
    <div className="grid gap-3">
      <p className="text-soft">
        {found.atSea ? 'At sea. ' : `About ${metres(found.elevationM)}, read from the relief. `}
        Brief version {brief.version}, method {brief.methodVersion}.
      </p>
      <div className="grid grid-cols-[auto_minmax(0,1fr)] items-start gap-x-4 border-y border-line py-2.5">
        {score === null ? null : (
          <p className="flex flex-col">
            <span className="serif text-figure">{score}</span>
            <span className="mt-1 text-fine text-soft">of 100</span>
          </p>
        )}
        <div className={`grid gap-0.5 ${score === null ? 'col-span-2' : ''}`}>
          {score === null ? (
            <p className="serif text-name">No estimate: {heldTogether(scoreNote ?? '')}.</p>
          ) : (
            <p>{bandWords(found.words)}</p>
          )}
          {score === null ? null : <p className="font-medium">Estimate between stations, no verdict.</p>}
          <p>
            <span className="font-medium">Grade {found.grade}</span>: estimate between stations, not ranked.
          </p>
          {score === null ? null : <p className="text-fine text-soft">{supportWords(found)}</p>}
        </div>
      </div>
      {found.stations.length > 0 ? <Basis found={found} onStation={onStation} /> : null}
      {score === null || isStation ? null : <Components found={found} />}
    </div>
  );
}

/** A figure and its unit stay on one line. */
function heldTogether(words: string): string {
  return words.replace(/(\d) (km|m)\b/g, '$1\u00a0$2');
}

function supportWords({ support, error }: PlaceEstimate): string {
  const near =
    support === 'full'
      ? 'A station is within 50 km and 150 m of height.'
      : 'A station is within 100 km and 300 m of height, none within 50 km and 150 m.';
  if (error === null) return near;
  return `${near} Stations estimated from the others are out by ${number(error.rootMeanSquare, 1)} points (root mean square over ${error.stations}).`;
}

function Basis({ found, onStation }: { found: PlaceEstimate; onStation: (stationId: string) => void }) {
  return (
    <section aria-labelledby="estimate-basis">
      <h3 id="estimate-basis" className="mb-1">
        {found.score === null ? 'Nearest stations' : 'Rests on'}
      </h3>
      <ScrollInside label="Stations of the estimate, scrolls sideways">
        <table className="ruled w-full text-fine">
          <caption className="sr-only">
            Stations of the estimate: distance, height above the point, share, score
          </caption>
          <thead>
            <tr>
              <th scope="col">Station</th>
              <th scope="col" className="figure">
                km
              </th>
              <th scope="col" className="figure">
                m higher
              </th>
              {found.score === null ? null : (
                <th scope="col" className="figure">
                  Share
                </th>
              )}
              <th scope="col" className="figure">
                Score
              </th>
            </tr>
          </thead>
          <tbody>
            {found.stations.map((station) => (
              <tr key={station.stationId}>
                <th scope="row">
                  <Button
                    look="quiet"
                    className="min-h-6! px-0! text-fine! whitespace-normal! text-left"
                    onClick={() => onStation(station.stationId)}
                  >
                    {station.name}
                  </Button>
                </th>
                <td className="figure">{number(station.distanceKm, station.distanceKm < 10 ? 1 : 0)}</td>
                <td className="figure">{number(station.heightDifferenceM)}</td>
                {found.score === null ? null : <td className="figure">{percent(station.weightPct, 0)}</td>}
                <td className="figure">{station.score}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      {found.score === null ? null : (
        <p className="mt-1 text-fine text-soft">
          Shares by distance to the power of {number(found.power, Number.isInteger(found.power) ? 0 : 1)}, the one that
          is least out at the stations.
        </p>
      )}
    </section>
  );
}

function Components({ found }: { found: PlaceEstimate }) {
  const withHeight = new Set(found.withHeight);
  const applying = found.parts.filter(({ raw }) => raw !== null);
  return (
    <section aria-labelledby="estimate-components">
      <h3 id="estimate-components" className="mb-1">
        Components between stations
      </h3>
      <dl>
        {applying.map(({ component, label, unit, raw, points }) => (
          <div key={component} className="flex items-baseline justify-between gap-4 border-t border-line py-[5px]">
            <dt>
              {label}
              {withHeight.has(component) ? <span className="text-soft">, with height</span> : null}
            </dt>
            <dd className="text-right font-medium">
              {sensible(raw ?? 0, unit === '%' || unit === 'h' ? unit : '')}
              <span className="font-normal text-soft">, {withUnit(points ?? 0, 'points', 1)}</span>
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

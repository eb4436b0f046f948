import { useQuery } from '@tanstack/react-query';
import { classWords } from '../../charts/hour-class-words.ts';
import type { DesignPoints } from '../../contract/design-points.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { capital, number, percent, sensible, sentence, temperatureC, withUnit } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { designPointsQuery } from './run-queries.ts';

interface DesignPointsNoteProps {
  readonly run: { readonly teamId: string; readonly runId: string };
  /** Design load of a site; null: figures for each kilowatt. */
  readonly loadKw: number | null;
}

/** What the plant does where the weather of the year is at its design values. */
export function DesignPointsNote({ run, loadKw }: DesignPointsNoteProps) {
  const design = useQuery(designPointsQuery(run));
  if (design.isError) {
    return (
      <p role="alert">
        {errorSentence(design.error)} <Button onClick={() => design.refetch()}>Try again</Button>
      </p>
    );
  }
  if (design.isPending) return <Loading what="the design points" />;
  if (design.data.points.length === 0) return <p>The air pressure of this year is not known, so there are none.</p>;
  return <DesignTable design={design.data} loadKw={loadKw} />;
}

function DesignTable({ design, loadKw }: { design: DesignPoints; loadKw: number | null }) {
  const times = loadKw ?? 1;
  const isTower = design.follows === 'wet bulb';
  const what = isTower
    ? 'The wet bulb that is reached or passed in so many percent of the hours, with the mean dry bulb beside it'
    : 'The dry bulb that is reached or passed in so many percent of the hours, with the mean wet bulb beside it';
  return (
    <>
      <p className="mb-1 max-w-[70ch] text-fine text-soft">
        {what}; the load at its design value, for {loadKw === null ? 'each kilowatt' : withUnit(loadKw, 'kW')} of it.
      </p>
      <ScrollInside label="Design points">
        <table className="ruled max-w-[60rem]">
          <caption className="sr-only">The plant at the design points of the year</caption>
          <thead>
            <tr>
              <th scope="col">Passed in</th>
              <th scope="col" className="text-right">
                Dry bulb
              </th>
              <th scope="col" className="text-right">
                Wet bulb
              </th>
              <th scope="col" className="pl-6">
                Hour
              </th>
              <th scope="col" className="text-right">
                {isTower ? 'Cold water' : 'Supply'}
              </th>
              {isTower ? null : (
                <th scope="col" className="text-right">
                  Airflow
                </th>
              )}
              <th scope="col" className="text-right">
                Capacity
              </th>
              <th scope="col" className="text-right">
                Back-up
              </th>
              <th scope="col" className="text-right">
                Water
              </th>
            </tr>
          </thead>
          <tbody>
            {design.points.map(({ percent: passed, dryBulbC, wetBulbC, state }) => (
              <tr key={passed}>
                <th scope="row">{percent(passed, passed < 1 ? 1 : 0)}</th>
                <td className="figure">{temperatureC(dryBulbC)}</td>
                <td className="figure">{temperatureC(wetBulbC)}</td>
                {state === null ? (
                  <td colSpan={isTower ? 5 : 6} className="pl-6 text-soft">
                    No cooling wanted
                  </td>
                ) : (
                  <>
                    <td className="pl-6">{classWords[state.hourClass]}</td>
                    <td className="figure">{temperatureC(state.supplyC)}</td>
                    {isTower ? null : <td className="figure">{airflow(state.airflowLPerS, times)}</td>}
                    <td className="figure">{sensible(state.capacityKw * times, 'kW')}</td>
                    <td className="figure">{sensible(state.backUpKw * times, 'kW')}</td>
                    <td className="figure">{sensible(state.makeUpLitresPerH * times, 'L/h')}</td>
                  </>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      {design.caution === null ? null : <p className="mt-1 max-w-[70ch]">{sentence(capital(design.caution))}</p>}
    </>
  );
}

function airflow(litresPerS: number | null, times: number): string {
  if (litresPerS === null) return '–';
  const value = litresPerS * times;
  return value >= 10_000 ? `${number(value / 1000, 1)}\u00a0m³/s` : sensible(value, 'L/s');
}

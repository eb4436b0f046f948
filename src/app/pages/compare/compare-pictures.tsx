import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import { classWords, dampWords } from '../../../charts/hour-class-words.ts';
import { LedgerBar } from '../../../charts/ledger-bar.tsx';
import { hoursOver, SupplyCurves } from '../../../charts/supply-curves.tsx';
import { runHoursQuery } from '../../../features/runs/run-queries.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { number } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { YearClothCanvas } from '../../../ui/year-cloth-canvas.tsx';
import { CurveKey, CurveTable } from './curve-parts.tsx';
import { metSentence } from './figure-rows.ts';
import type { CompareColumn } from './use-compare-columns.ts';

const CLOTH_PX = 96;

/** Ledger and year of each, one under the other on the same days, so that the eye can go straight down. */
export function CompareCloths({ columns, teamId }: { columns: readonly CompareColumn[]; teamId: string }) {
  return (
    <section aria-labelledby="cloths">
      <h2 id="cloths" className="text-name">
        The years, hour by hour
      </h2>
      <p className="mb-2 text-fine text-soft">Each column is a day, each row an hour, midnight at the top.</p>
      <div className="grid gap-5">
        {columns.map((column) => (
          <OneCloth key={column.key} column={column} teamId={teamId} />
        ))}
      </div>
    </section>
  );
}

function OneCloth({ column, teamId }: { column: CompareColumn; teamId: string }) {
  const id = useId();
  const { shown, title } = column;
  const codes = useQuery({ ...runHoursQuery(teamId, shown?.runId ?? ''), enabled: shown !== null });
  if (shown === null) return <p className="text-soft">{title}: no weather year can be shown.</p>;
  const { ledger } = shown;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-6 gap-y-1 lg:grid-cols-[14rem_minmax(0,1fr)]">
      <div>
        <h3>{title}</h3>
        <p className="mb-1 text-fine text-soft">
          {column.yearWords}; {metSentence(column)}
        </p>
        <LedgerBar
          id={`bar${id}`}
          classes={ledger.classes}
          demand={ledger.demand}
          heightPx={12}
          label={`${title}: ${number(ledger.met)} of ${number(ledger.demand)} hours with demand are met.`}
        />
      </div>
      {codes.isError ? (
        <p role="alert">
          {errorSentence(codes.error)} <Button onClick={() => codes.refetch()}>Try again</Button>
        </p>
      ) : null}
      {codes.isPending ? <div style={{ height: CLOTH_PX + 40 }} aria-busy="true" className="bg-shade/50" /> : null}
      {codes.data ? (
        <YearClothCanvas
          codes={codes.data}
          heightPx={CLOTH_PX}
          label={`The year of ${title} hour by hour: ${number(ledger.met)} of ${number(ledger.demand)} hours with demand are met.`}
          words={(hourClass) => (hourClass === 'damp' ? dampWords(ledger) : classWords[hourClass])}
        />
      ) : null}
    </div>
  );
}

const READ_AT_C = [12, 14, 16, 18, 20, 22, 24, 26, 28, 30];

/** How warm the supply is, over the hours with demand. */
export function CompareCurves({ columns }: { columns: readonly CompareColumn[] }) {
  const curves = columns.flatMap(({ key, title, run }) =>
    run === null ? [] : [{ key, name: title, bins: run.supplyCurve }],
  );
  if (curves.length === 0) return null;
  const temperatures = READ_AT_C.filter((tempC) => curves.some(({ bins }) => hoursOver(bins, tempC) > 0));
  return (
    <section aria-labelledby="curves">
      <h2 id="curves" className="mb-1 text-name">
        Supply temperatures
      </h2>
      <div className="max-w-[48rem]">
        <SupplyCurves
          curves={curves}
          label={`Hours with demand at or over each supply temperature, for ${curves.map(({ name }) => name).join(', ')}; the table below says the same.`}
        />
        <CurveKey curves={curves} />
      </div>
      <CurveTable
        caption="Hours with demand at or over a supply temperature"
        heads={temperatures.map((tempC) => `${tempC} °C`)}
        rows={curves.map(({ key, name, bins }) => ({
          key,
          name,
          hours: temperatures.map((tempC) => hoursOver(bins, tempC)),
        }))}
      />
    </section>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classMeaning, classWords, dampWords } from '../../charts/hour-class-words.ts';
import type { Place } from '../../contract/place.ts';
import { HOURS_PER_DAY } from '../../engine/conventions.ts';
import type { HourClass } from '../../engine/hour-classes/hour-class.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { number } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { YearClothCanvas } from '../../ui/year-cloth-canvas.tsx';
import { HoursLink } from './hours-link.tsx';
import { runHoursQuery } from './run-queries.ts';
import { metWords, nameOfPlace } from './run-words.ts';
import { useHourInWords } from './use-hour-in-words.ts';

const CLOTH_PX = 144;

/** The year cloth of a place with its legend, across the sheet. */
interface YearStripProps {
  readonly place: Place;
  readonly teamId: string;
  readonly mayExport: boolean;
  /** Lists the hours of a day, 1 first. */
  readonly onListDay: (day: number) => void;
}

export function YearStrip({ place, teamId, mayExport, onListDay }: YearStripProps) {
  const { shown } = place;
  if (!shown) return null;
  const met = metWords(shown.ledger);
  return (
    <section
      aria-labelledby="year-cloth"
      className="grid grid-cols-[minmax(0,1fr)] gap-x-6 gap-y-2 xl:grid-cols-[14.5rem_minmax(0,1fr)_17.5rem]"
    >
      <div>
        <h2 id="year-cloth" className="text-name">
          The year at {nameOfPlace(place)}
        </h2>
        <p className="mt-1 text-soft">
          Each column is a day, each row an hour, midnight at the top.{' '}
          {met === null
            ? 'No hour with demand.'
            : `${met} of the hours with demand are met by outdoor air or evaporation.`}{' '}
          A press lists the hours of a day.
        </p>
        {mayExport ? (
          <p className="mt-1">
            <HoursLink teamId={teamId} runId={shown.runId}>
              Every hour as a table, CSV
            </HoursLink>
          </p>
        ) : null}
      </div>
      <Cloth run={{ teamId, runId: shown.runId }} place={place} onListDay={onListDay} />
      <Legend ledger={shown.ledger} />
    </section>
  );
}

interface ClothProps {
  readonly run: { readonly teamId: string; readonly runId: string };
  readonly place: Place;
  readonly onListDay: (day: number) => void;
}

function Cloth({ run, place, onListDay }: ClothProps) {
  const codes = useQuery(runHoursQuery(run.teamId, run.runId));
  const { read, more } = useHourInWords(run);
  if (codes.isError) {
    return (
      <p role="alert">
        {errorSentence(codes.error)} <Button onClick={() => codes.refetch()}>Try again</Button>
      </p>
    );
  }
  if (codes.isPending) return <div style={{ height: CLOTH_PX + 40 }} aria-busy="true" className="bg-shade/50" />;
  const ledger = place.shown?.ledger;
  return (
    <YearClothCanvas
      codes={codes.data}
      heightPx={CLOTH_PX}
      label={`The year at ${nameOfPlace(place)} hour by hour${ledger ? `: ${number(ledger.met)} of ${number(ledger.demand)} hours with demand are met` : ''}.`}
      words={(hourClass) => (hourClass === 'damp' && ledger ? dampWords(ledger) : classWords[hourClass])}
      more={more}
      onRead={read}
      onChoose={(slot) => onListDay(Math.floor(slot / HOURS_PER_DAY) + 1)}
    />
  );
}

const legendOrder: readonly HourClass[] = [
  'air',
  'direct',
  'indirect',
  'dewpoint',
  'twostage',
  'frozen',
  'short',
  'damp',
  'beyond',
  'idle',
  'closed',
  'missing',
];

/** The classes that this year holds. */
function Legend({ ledger }: { ledger: NonNullable<Place['shown']>['ledger'] }) {
  const id = useId();
  const present = legendOrder.filter((hourClass) => ledger.classes[hourClass] > 0);
  return (
    <ul className="grid content-start gap-x-4 gap-y-0.5 text-fine max-xl:grid-cols-3 max-sm:grid-cols-2">
      {present.map((hourClass) => (
        <li key={hourClass} className="flex items-baseline gap-2">
          <span className="translate-y-[2px]">
            <ClassSwatch hourClass={hourClass} id={`${id}-${hourClass}`} />
          </span>
          <span>
            {hourClass === 'damp' ? dampWords(ledger) : classWords[hourClass]}
            <span className="text-soft max-xl:hidden">, {classMeaning[hourClass]}</span>
          </span>
        </li>
      ))}
    </ul>
  );
}

import { useCallback, useId, useMemo, useState } from 'react';
import { CumulativeCurves } from '../../charts/cumulative-curves.tsx';
import { depressionCloth, depressionScaleK } from '../../charts/depression-cloth.ts';
import { type CurvePoint, depressionCurve, hoursAtOrAbove } from '../../charts/depression-curve.ts';
import { RAMP_GRADIENT } from '../../charts/ramp.ts';
import type { WeatherFileRecord, YearFacts } from '../../contract/weather.ts';
import { HOURS_PER_DAY } from '../../engine/conventions.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { differenceK, hours, number, share } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { type ClothSize, HourGridCanvas } from '../../ui/hour-grid-canvas.tsx';
import { hourWords, slotWords } from './record-hour-words.ts';
import { type RecordYear, useRecordYear } from './record-year.ts';

const CLOTH_PX = 168;
/** Thresholds of the table beside the curve, K. */
const TABLE_K = [2, 4, 6, 8, 10, 12, 15, 20] as const;

interface DepressionPicturesProps {
  readonly record: WeatherFileRecord;
  readonly facts: YearFacts;
  /** The hour that the psychrometric chart shows, and how to choose another. */
  readonly slot: number | null;
  readonly onChoose: (slot: number) => void;
}

/** The year cloth of depression and the cumulative curve: what the record leads with. */
export function DepressionPictures({ record, facts, slot, onChoose }: DepressionPicturesProps) {
  const year = useRecordYear(record.file, facts);
  if (year.isError) {
    return (
      <p role="alert">
        {errorSentence(year.error)} <Button onClick={() => year.refetch()}>Try again</Button>
      </p>
    );
  }
  if (year.isPending) return <div aria-busy="true" className="h-[36rem] bg-shade/50" />;
  if (facts.meanWetBulbC === null) {
    return <p>No hour has a wet bulb: neither pressure nor elevation is known, so no depression can be drawn.</p>;
  }
  return (
    <>
      <Cloth year={year.data} slot={slot} onChoose={onChoose} />
      <Curve year={year.data} />
    </>
  );
}

interface ClothProps extends Pick<DepressionPicturesProps, 'slot' | 'onChoose'> {
  readonly year: RecordYear;
}

function Cloth({ year, slot, onChoose }: ClothProps) {
  const { depressionK } = year;
  const highest = useMemo(() => highestOf(depressionK), [depressionK]);
  const scaleK = depressionScaleK(highest.valueK);
  const draw = useCallback(
    (size: ClothSize) => depressionCloth({ depressionK, scaleK, ...size }),
    [depressionK, scaleK],
  );
  const sentence = `The largest is ${differenceK(highest.valueK)}, on ${slotWords(highest.slot, depressionK.length)}.`;
  return (
    <section aria-labelledby="year-of-depression">
      <h2 id="year-of-depression" className="text-name">
        The year of wet-bulb depression
      </h2>
      <p className="mt-0.5 mb-2 text-soft">
        Each column is a day, each row an hour, midnight at the top: the darker, the more evaporation can do. {sentence}{' '}
        <span className="no-print">Press an hour to see it on the psychrometric chart.</span>
      </p>
      <HourGridCanvas
        days={depressionK.length / HOURS_PER_DAY}
        heightPx={CLOTH_PX}
        label={`Wet-bulb depression of every hour of the year. ${sentence} The table of means by month and hour below says the same in figures.`}
        draw={draw}
        read={(at) => hourWords(year, at)}
        chosen={slot}
        onChoose={onChoose}
      />
      <div className="mt-1 flex flex-wrap items-center gap-2 pl-6 text-fine text-soft">
        <span>0</span>
        <span
          aria-hidden="true"
          className="h-2.5 w-40 border border-ink/40"
          style={{ backgroundImage: RAMP_GRADIENT }}
        />
        <span>{differenceK(scaleK, 0)}. Hatched: not known. Local standard time.</span>
      </div>
    </section>
  );
}

function highestOf(depressionK: Float64Array): { valueK: number; slot: number } {
  let highest = { valueK: 0, slot: 0 };
  depressionK.forEach((valueK, slot) => {
    if (valueK > highest.valueK) highest = { valueK, slot };
  });
  return highest;
}

function Curve({ year }: { year: RecordYear }) {
  const curve = useMemo(() => depressionCurve(year.depressionK), [year.depressionK]);
  const [atK, setAtK] = useState(8);
  const id = useId();
  const known = curve[0]?.hours ?? 0;
  const at = hoursAtOrAbove(curve, atK);
  const endK = Math.ceil(curve.at(-1)?.atLeastK ?? 0);
  return (
    <section aria-labelledby="cumulative-depression">
      <h2 id="cumulative-depression" className="mb-2 text-name">
        Hours at or above a depression
      </h2>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,17rem)]">
        <div className="max-w-[32rem]">
          <CumulativeCurves
            curves={[{ name: 'This year', points: curve }]}
            hoursOfYear={year.depressionK.length}
            readAtK={atK}
            label={`Cumulative curve of depression: ${hours(known)} are known, ${hours(hoursAtOrAbove(curve, 8))} of them at or above 8 K. The table beside it says the same in figures.`}
          />
          <div className="no-print mt-2 flex flex-wrap items-center gap-x-4 gap-y-1">
            <label htmlFor={id} className="text-fine font-semibold text-soft">
              Read off at, K
            </label>
            <input
              id={id}
              type="range"
              min={0}
              max={endK}
              step={0.5}
              value={Math.min(atK, endK)}
              onChange={(event) => setAtK(Number(event.currentTarget.value))}
              aria-valuetext={`${differenceK(atK)}: ${hours(at)}`}
              className="min-w-40 flex-1 accent-indigo"
            />
            <output htmlFor={id}>
              {differenceK(atK)}: <span className="font-semibold">{hours(at)}</span>,{' '}
              {known > 0 ? shareOf(at, known) : '0 %'} of the hours known
            </output>
          </div>
        </div>
        <CurveTable curve={curve} known={known} />
      </div>
    </section>
  );
}

function CurveTable({ curve, known }: { curve: readonly CurvePoint[]; known: number }) {
  return (
    <table className="ruled self-start">
      <caption className="sr-only">Hours at or above a wet-bulb depression</caption>
      <thead>
        <tr>
          <th scope="col">At least</th>
          <th scope="col" className="figure">
            Hours
          </th>
          <th scope="col" className="figure">
            Of those known
          </th>
        </tr>
      </thead>
      <tbody>
        {TABLE_K.map((atLeastK) => {
          const at = hoursAtOrAbove(curve, atLeastK);
          return (
            <tr key={atLeastK}>
              <th scope="row">{differenceK(atLeastK, 0)}</th>
              <td className="figure">{number(at)}</td>
              <td className="figure text-soft">{shareOf(at, known)}</td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function shareOf(count: number, known: number): string {
  return known === 0 ? '–' : share((100 * count) / known);
}

import { useId } from 'react';
import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classWords, dampOutsideWords, dampPlantWords } from '../../charts/hour-class-words.ts';
import { LedgerBar } from '../../charts/ledger-bar.tsx';
import type { Ledger } from '../../contract/runs.ts';
import type { HourClass } from '../../engine/hour-classes/hour-class.ts';
import { hours, number, share } from '../../lib/format.ts';
import { identitySentence, metWords, sumOfClasses } from './run-words.ts';

interface Row {
  readonly hourClass: HourClass;
  readonly words: string;
  readonly count: number;
}

/** These stand in the table even without an hour: that a plant was never too weak is an answer. */
const ALWAYS: readonly HourClass[] = ['air', 'direct', 'short', 'beyond'];

interface LedgerPanelProps {
  readonly ledger: ShownLedger;
  /** Lists the hours of a class; without it there is nothing to list, as under a draft. */
  readonly onList?: (hourClass: HourClass) => void;
}

/** Hours with demand as a bar, every class as a figure, and the sum that proves that none is lost. */
export function LedgerPanel({ ledger, onList }: LedgerPanelProps) {
  const id = useId();
  const { classes, demand } = ledger;
  const met = metWords(ledger);
  const withDemand = demandRows(ledger);
  return (
    <section aria-label="Ledger">
      <h3 className="mb-1.5">
        Hours with demand: {number(demand)}
        {met === null ? '' : `, ${met} met`}
      </h3>
      <LedgerBar
        id={`bar${id}`}
        classes={classes}
        demand={demand}
        label={
          demand === 0
            ? 'No hour with demand.'
            : `Of ${number(demand)} hours with demand: ${withDemand
                .filter(({ count }) => count > 0)
                .map(({ words, count }) => `${words} ${number(count)}`)
                .join(', ')}.`
        }
      />
      <table className="mt-1 w-full">
        <caption className="sr-only">Hours of the year by class</caption>
        <thead className="sr-only">
          <tr>
            <th scope="col">Class</th>
            <th scope="col">Hours</th>
            <th scope="col">Share of hours with demand</th>
          </tr>
        </thead>
        <tbody>
          {withDemand.map((row, index) => (
            <LedgerRow key={row.words} row={row} id={`${id}-${index}`} demand={demand} onList={onList} />
          ))}
        </tbody>
        <tbody className="border-t border-line">
          {(['idle', 'closed', 'missing'] as const).map((hourClass) => {
            const row = { hourClass, words: classWords[hourClass], count: classes[hourClass] };
            return <LedgerRow key={hourClass} row={row} id={`${id}-${hourClass}`} demand={null} onList={onList} />;
          })}
        </tbody>
      </table>
      <p
        className={`mt-1 border-t border-ink pt-1 text-fine ${
          sumOfClasses(ledger) === ledger.hours ? 'text-soft' : 'font-semibold text-madder'
        }`}
      >
        {identitySentence(ledger)}
      </p>
    </section>
  );
}

interface LedgerRowProps {
  readonly row: Row;
  readonly id: string;
  readonly demand: number | null;
  readonly onList: ((hourClass: HourClass) => void) | undefined;
}

function LedgerRow({ row, id, demand, onList }: LedgerRowProps) {
  return (
    <tr className={row.count === 0 ? 'text-soft' : ''}>
      <th scope="row" className="py-px text-left font-normal">
        <span className="flex items-center gap-2">
          <ClassSwatch hourClass={row.hourClass} id={id} />
          {onList === undefined || row.count === 0 ? (
            row.words
          ) : (
            <button
              type="button"
              title="List these hours"
              onClick={() => onList(row.hourClass)}
              className="text-left underline decoration-ink/25 underline-offset-[3px] hover:decoration-ink"
            >
              {row.words}
            </button>
          )}
        </span>
      </th>
      <td className="pl-2 text-right whitespace-nowrap">{hours(row.count)}</td>
      <td className="w-14 pl-2 text-right whitespace-nowrap text-soft">
        {demand !== null && demand > 0 ? share((100 * row.count) / demand) : ''}
      </td>
    </tr>
  );
}

/** Under a draft nobody has told the two reasons of `damp` apart. */
export type ShownLedger = Omit<Ledger, 'dampOutside' | 'dampPlant'> & {
  readonly dampOutside: number | null;
  readonly dampPlant: number | null;
};

function demandRows({ classes, dampOutside, dampPlant }: ShownLedger): Row[] {
  const row = (hourClass: HourClass): Row => ({ hourClass, words: classWords[hourClass], count: classes[hourClass] });
  const rows: Row[] = [
    ...(['air', 'direct', 'indirect', 'dewpoint', 'twostage', 'frozen', 'short'] as const).map(row),
    ...(dampOutside === null || dampPlant === null
      ? [row('damp')]
      : [
          { hourClass: 'damp' as const, words: dampOutsideWords, count: dampOutside },
          { hourClass: 'damp' as const, words: dampPlantWords, count: dampPlant },
        ]),
    row('beyond'),
  ];
  return rows.filter(({ hourClass, words, count }) => {
    return count > 0 || ALWAYS.includes(hourClass) || words === dampOutsideWords;
  });
}

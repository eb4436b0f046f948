import { type ReactNode, useId } from 'react';
import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classWords } from '../../charts/hour-class-words.ts';
import { barOrder } from '../../charts/ledger-bar.tsx';
import type { BriefChange } from '../../contract/briefs.ts';
import type { GateAnswer } from '../../contract/runs.ts';
import { capital, hours, number, sensible } from '../../lib/format.ts';
import { signed } from './brief-words.ts';
import { ChangeList } from './change-list.tsx';
import { EffectPartsTable } from './effect-parts-table.tsx';
import { type EffectSides, figure, head, headRight } from './effect-table.ts';
import type { DraftEffect } from './use-effect-of-draft.ts';

interface EffectDetailsProps {
  readonly effect: DraftEffect;
  readonly changes: readonly BriefChange[] | null;
  readonly savedVersion: number;
}

/** What changed, and how the score and the verdict of the example year come about, each against the saved version. */
export function EffectDetails({ effect: { now, before }, changes, savedVersion }: EffectDetailsProps) {
  const sides = { now, before, savedVersion };
  return (
    <div className="grid min-w-0 gap-4">
      {changes !== null && changes.length > 0 ? (
        <Fold title={`Changes against version ${savedVersion}`}>
          <ChangeList changes={changes} label="Changes of the draft" />
        </Fold>
      ) : null}
      {now === undefined ? null : (
        <>
          <Fold title="Tolerances and gates">
            <ToleranceTable {...sides} now={now} />
          </Fold>
          <Fold title="Hours with demand">
            <ClassTable {...sides} now={now} />
          </Fold>
          <Fold title="How the score is made">
            <EffectPartsTable {...sides} now={now} />
          </Fold>
        </>
      )}
    </div>
  );
}

function Fold({ title, children }: { title: string; children: ReactNode }) {
  return (
    <details open className="min-w-0 border-t border-line pt-1.5">
      <summary className="cursor-pointer font-semibold">{title}</summary>
      <div className="pt-1">{children}</div>
    </details>
  );
}

function ToleranceTable({ now, before, savedVersion }: EffectSides) {
  const answered = now.gates.filter(({ answer }) => answer !== 'not known');
  const open = now.gates.filter(({ answer }) => answer === 'not known');
  return (
    <div className="grid gap-1 text-fine">
      {now.tolerances.length === 0 ? (
        <p>The draft sets no tolerance, so there is no verdict.</p>
      ) : (
        <table className="w-full">
          <caption className="sr-only">
            Each tolerance with what was found, and what version {savedVersion} found
          </caption>
          <thead>
            <tr>
              <th scope="col" className={head}>
                Tolerance
              </th>
              <th scope="col" className={headRight}>
                Found
              </th>
              <th scope="col" className={headRight}>
                Allowed
              </th>
              <th scope="col" className={headRight}>
                Version {savedVersion}
              </th>
            </tr>
          </thead>
          <tbody>
            {now.tolerances.map(({ tolerance, found, allowed, unit, holds }) => {
              const was = before?.tolerances.find((each) => each.tolerance === tolerance);
              return (
                <tr key={tolerance}>
                  <th scope="row" className="py-px text-left font-normal">
                    {capital(tolerance)}
                    <span className={holds ? 'text-soft' : 'font-semibold text-madder'}>
                      {holds ? ', holds' : ', fails'}
                    </span>
                  </th>
                  <td className={figure}>{sensible(found, unit)}</td>
                  <td className={figure}>{sensible(allowed, unit)}</td>
                  <td className={`${figure} text-soft`}>{was === undefined ? 'not set' : sensible(was.found, unit)}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      )}
      {answered.map((gate) => (
        <p key={gate.gate} className={gate.answer === 'fail' ? 'font-semibold text-madder' : 'text-soft'}>
          {gateWords(gate)}
        </p>
      ))}
      {open.length > 0 ? (
        <p className="text-soft">To be answered for each site: {open.map(({ gate }) => gate).join(', ')}.</p>
      ) : null}
    </div>
  );
}

function gateWords({ gate, answer, note }: GateAnswer): string {
  return `${capital(gate)}: ${answer}, ${note}.`;
}

function ClassTable({ now, before, savedVersion }: EffectSides) {
  const id = useId();
  const classes = barOrder.filter((each) => now.ledger.classes[each] > 0 || (before?.ledger.classes[each] ?? 0) > 0);
  return (
    <table className="w-full text-fine">
      <caption className="sr-only">Hours with demand by class, and the change from version {savedVersion}</caption>
      <thead>
        <tr>
          <th scope="col" className={head}>
            {number(now.ledger.demand)} hours with demand
          </th>
          <th scope="col" className={headRight}>
            Hours
          </th>
          <th scope="col" className={headRight}>
            Change
          </th>
        </tr>
      </thead>
      <tbody>
        {classes.map((each) => (
          <tr key={each}>
            <th scope="row" className="py-px text-left font-normal">
              <span className="flex items-center gap-2">
                <ClassSwatch hourClass={each} id={`${id}-${each}`} />
                {classWords[each]}
              </span>
            </th>
            <td className={figure}>{hours(now.ledger.classes[each])}</td>
            <td className={`${figure} text-soft`}>
              {before === undefined ? '' : signed(now.ledger.classes[each] - before.ledger.classes[each], 'h')}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

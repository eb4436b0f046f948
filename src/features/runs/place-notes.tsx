import type { ReactNode } from 'react';
import type { GateAnswer, Place } from '../../contract/runs.ts';
import { differenceK, hours, percent, sensible } from '../../lib/format.ts';

type Shown = NonNullable<Place['shown']>;

function Note({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section>
      <h2 className="mb-1 text-name">{title}</h2>
      {children}
    </section>
  );
}

function Facts({ rows }: { rows: readonly (readonly [label: string, value: string])[] }) {
  return (
    <dl>
      {rows.map(([label, value]) => (
        <div key={label} className="flex items-baseline justify-between gap-4 border-t border-line py-[5px]">
          <dt>{label}</dt>
          <dd className="text-right font-medium">{value}</dd>
        </div>
      ))}
    </dl>
  );
}

/** Each tolerance of the brief with what was found, and the gates outside the score. */
export function VerdictNote({ shown }: { shown: Shown }) {
  return (
    <Note title="Tolerances and gates">
      <Facts
        rows={shown.tolerances.map(({ tolerance, found, allowed, unit, holds }) => [
          capital(tolerance),
          `${sensible(found, unit)} of ${sensible(allowed, unit)} allowed, ${holds ? 'holds' : 'fails'}`,
        ])}
      />
      <Facts rows={shown.gates.map((gate) => [capital(gate.gate), gateWords(gate)])} />
    </Note>
  );
}

function gateWords({ answer, note }: GateAnswer): string {
  return note === '' ? answer : `${answer}: ${note}`;
}

/** The longest run of hours that are not met. */
export function SpellNote({ shown }: { shown: Shown }) {
  const { worstSpell } = shown;
  return (
    <Note title="Worst spell">
      {worstSpell === null ? (
        <p className="border-t border-line py-[5px]">No hour with demand is left unmet.</p>
      ) : (
        <Facts
          rows={[
            ['Unmet hours in a row', hours(worstSpell.hours)],
            ['From', worstSpell.start],
            ['To', worstSpell.cutAtJoint ? `${worstSpell.end}, cut at the joint` : worstSpell.end],
            ['Severity', sensible(worstSpell.severityKh, 'K h')],
            ['Worst hour', `${differenceK(worstSpell.worstK)} short`],
            ['Severity of the whole year', sensible(shown.severityKh, 'K h')],
          ]}
        />
      )}
    </Note>
  );
}

/** Water and electricity of the year, for each kilowatt of design load. */
export function WaterElectricityNote({ shown: { water, electricity, money, moneyNote, carbon } }: { shown: Shown }) {
  return (
    <Note title="Water and electricity">
      <p className="text-fine text-soft">Of the year, for each kilowatt of design load.</p>
      <Facts
        rows={[
          ['Make-up water, with bleed-off', sensible(water.makeUpLitres, 'L')],
          [
            'Water for the cooling delivered',
            water.litresPerKwh === null ? 'not applicable' : sensible(water.litresPerKwh, 'L/kWh'),
          ],
          ['Peak day', water.peakDay === null ? 'none' : `${sensible(water.peakDayLitres, 'L')}, ${water.peakDay}`],
          ...electricityRows(electricity),
          ...moneyRows(money),
          ...carbonRows(carbon),
        ]}
      />
      {[...(moneyNote === null ? [] : [moneyNote]), ...(money?.notes ?? [])].map((note) => (
        <p key={note} className="mt-1 text-fine text-soft">
          {capital(note)}.
        </p>
      ))}
    </Note>
  );
}

function electricityRows(electricity: Shown['electricity']): readonly (readonly [label: string, value: string])[] {
  if (electricity === null) return [['Electricity', 'not applicable']];
  return [
    ['Electricity', sensible(electricity.kwh, 'kWh')],
    ['Reference plant', sensible(electricity.referenceKwh, 'kWh')],
    ['Saved', electricity.savedPct === null ? 'not applicable' : percent(electricity.savedPct)],
    ['Peak, with back-up', sensible(electricity.peakKw, 'kW')],
    ['Peak of the reference', sensible(electricity.referencePeakKw, 'kW')],
  ];
}

function moneyRows(money: Shown['money']): readonly (readonly [label: string, value: string])[] {
  if (money === null) return [];
  const { currency, plant, reference, saving, payback } = money;
  return [
    ['Cost of a year', sensible(plant, currency)],
    ['Cost of a year, reference plant', sensible(reference, currency)],
    ['Saved in a year', sensible(saving, currency)],
    ...(payback === null
      ? []
      : [['Simple payback', typeof payback === 'number' ? sensible(payback, 'years') : payback] as const]),
  ];
}

function carbonRows(carbon: Shown['carbon']): readonly (readonly [label: string, value: string])[] {
  if (carbon === null) return [];
  return [[`Carbon dioxide saved, by ${carbon.source}`, sensible(carbon.savedKg, 'kg')]];
}

/** Why the weather can be trusted for this place as far as it can. */
export function GradeNote({ place }: { place: Place }) {
  return (
    <Note title={`Grade ${place.grade}`}>
      <p className="text-fine text-soft">How far the weather can be trusted for this place: the worst of these.</p>
      <Facts rows={place.gradeColumns.map(({ column, grade, reason }) => [capital(column), `${grade}, ${reason}`])} />
    </Note>
  );
}

export function CautionsNote({ shown }: { shown: Shown }) {
  return (
    <Note title="Before anyone builds">
      <ul className="gap-x-10 lg:columns-3">
        {shown.cautions.map((caution) => (
          <li key={caution} className="break-inside-avoid border-t border-line py-[5px]">
            {caution}
          </li>
        ))}
      </ul>
    </Note>
  );
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

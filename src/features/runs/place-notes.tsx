import type { ReactNode } from 'react';
import type { Place } from '../../contract/place.ts';
import type { GateAnswer } from '../../contract/runs.ts';
import { capital, differenceK, hours, percent, sensible, withUnit } from '../../lib/format.ts';

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

interface WaterElectricityProps {
  readonly shown: Shown;
  /** Design load of a site, kW; null: figures are for each kilowatt of it. */
  readonly loadKw: number | null;
}

/** Water and electricity of the year, for the design load of a site or for each kilowatt of it. */
export function WaterElectricityNote({ shown, loadKw }: WaterElectricityProps) {
  const { water, electricity, money, moneyNote, carbon } = shown;
  const of = scaledBy(loadKw);
  return (
    <Note title="Water and electricity">
      <p className="text-fine text-soft">
        Of the year, for {loadKw === null ? 'each kilowatt' : withUnit(loadKw, 'kW')} of design load.
      </p>
      <Facts
        rows={[
          ['Make-up water, with bleed-off', of.litres(water.makeUpLitres)],
          [
            'Water for the cooling delivered',
            water.litresPerKwh === null ? 'not applicable' : sensible(water.litresPerKwh, 'L/kWh'),
          ],
          ['Peak day', water.peakDay === null ? 'none' : `${of.litres(water.peakDayLitres)}, ${water.peakDay}`],
          ...electricityRows(electricity, of),
          ...moneyRows(money, of),
          ...carbonRows(carbon, of),
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

type Scaled = ReturnType<typeof scaledBy>;

/** Figures that are given per kilowatt, times the load; large ones in the next unit. */
function scaledBy(loadKw: number | null) {
  const times = loadKw ?? 1;
  const stepped = (value: number, [small, large]: readonly [string, string]) =>
    value * times >= 10_000 ? sensible((value * times) / 1000, large) : sensible(value * times, small);
  return {
    litres: (value: number) => stepped(value, ['L', 'm³']),
    kwh: (value: number) => stepped(value, ['kWh', 'MWh']),
    kg: (value: number) => stepped(value, ['kg', 't']),
    plain: (value: number, unit: string) => sensible(value * times, unit),
  };
}

type Rows = readonly (readonly [label: string, value: string])[];

function electricityRows(electricity: Shown['electricity'], of: Scaled): Rows {
  if (electricity === null) return [['Electricity', 'not applicable']];
  return [
    ['Electricity', of.kwh(electricity.kwh)],
    ['Reference plant', of.kwh(electricity.referenceKwh)],
    ['Saved', electricity.savedPct === null ? 'not applicable' : percent(electricity.savedPct)],
    ['Peak, with back-up', of.plain(electricity.peakKw, 'kW')],
    ['Peak of the reference', of.plain(electricity.referencePeakKw, 'kW')],
  ];
}

function moneyRows(money: Shown['money'], of: Scaled): Rows {
  if (money === null) return [];
  const { currency, plant, reference, saving, payback } = money;
  return [
    ['Cost of a year', of.plain(plant, currency)],
    ['Cost of a year, reference plant', of.plain(reference, currency)],
    ['Saved in a year', of.plain(saving, currency)],
    ...(payback === null
      ? []
      : [['Simple payback', typeof payback === 'number' ? sensible(payback, 'years') : payback] as const]),
  ];
}

function carbonRows(carbon: Shown['carbon'], of: Scaled): Rows {
  if (carbon === null) return [];
  return [[`Carbon dioxide saved, by ${carbon.source}`, of.kg(carbon.savedKg)]];
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
    <ul className="gap-x-10 lg:columns-3">
      {shown.cautions.map((caution) => (
        <li key={caution} className="break-inside-avoid border-t border-line py-[5px]">
          {caution}
        </li>
      ))}
    </ul>
  );
}

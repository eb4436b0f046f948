/** The figures that stand beside one another, row by row, with how two of them differ. */
import { classWords } from '../../../charts/hour-class-words.ts';
import { hourClasses } from '../../../engine/hour-classes/hour-class.ts';
import { number, share } from '../../../lib/format.ts';
import type { CompareColumn } from './use-compare-columns.ts';

export interface FigureRow {
  readonly label: string;
  readonly unit: string;
  readonly cells: readonly FigureCell[];
  /** Some cell says something else than the first. */
  readonly differs: boolean;
}

export interface FigureCell {
  readonly text: string;
  /** Against the first column: "+12"; null for words, for the first and where it is the same. */
  readonly difference: string | null;
  readonly isOther: boolean;
}

export interface FigureGroup {
  readonly title: string;
  readonly rows: readonly FigureRow[];
}

type Value = number | string | null;

export function figureGroups(columns: readonly CompareColumn[]): readonly FigureGroup[] {
  const row = (label: string, unit: string, decimals: number, value: (column: CompareColumn) => Value): FigureRow =>
    rowOf({ label, unit, decimals, values: columns.map(value) });
  const hours = hourClasses
    .filter((hourClass) => columns.some(({ shown }) => (shown?.ledger.classes[hourClass] ?? 0) > 0))
    .map((hourClass) => row(classWords[hourClass], 'h', 0, ({ shown }) => shown?.ledger.classes[hourClass] ?? null));
  return [
    {
      title: 'Verdict',
      rows: [
        row('Verdict', '', 0, ({ shown }) => shown?.verdict ?? null),
        row('Score', '', 0, ({ shown }) => shown?.score ?? shown?.scoreNote ?? null),
        row('Grade of the weather', '', 0, ({ place }) => place.grade),
        row('Rests on', '', 0, ({ yearWords }) => yearWords),
      ],
    },
    {
      title: 'Ledger',
      rows: [
        row('Hours with demand', 'h', 0, ({ shown }) => shown?.ledger.demand ?? null),
        row('Met', 'h', 0, ({ shown }) => shown?.ledger.met ?? null),
        row('Met of demand', '%', 1, servedPct),
        ...hours,
      ],
    },
    {
      title: 'Unmet hours',
      rows: [
        row('Severity', 'K h', 1, ({ shown }) => shown?.severityKh ?? null),
        row('Worst spell', 'h', 0, ({ shown }) => shown?.worstSpell?.hours ?? (shown === null ? null : 0)),
        row('Begins', '', 0, ({ shown }) => shown?.worstSpell?.start ?? null),
      ],
    },
    {
      title: 'Water and electricity, per kW of design load',
      rows: [
        row('Make-up of the year', 'L', 0, ({ shown }) => shown?.water.makeUpLitres ?? null),
        row('Make-up', 'L/kWh', 2, ({ shown }) => shown?.water.litresPerKwh ?? null),
        row('Peak day', 'L', 1, ({ shown }) => shown?.water.peakDayLitres ?? null),
        row('Electricity', 'kWh', 0, ({ shown }) => shown?.electricity?.kwh ?? null),
        row('Saved', '%', 1, ({ shown }) => shown?.electricity?.savedPct ?? null),
        row('Peak', 'kW', 2, ({ shown }) => shown?.electricity?.peakKw ?? null),
      ],
    },
  ];
}

function servedPct({ shown }: CompareColumn): number | null {
  const demand = shown?.ledger.demand ?? 0;
  return shown === null || demand === 0 ? null : (100 * shown.ledger.met) / demand;
}

/** Differences are of the printed figures, so that they can be checked by eye. */
export function rowOf(of: { label: string; unit: string; decimals: number; values: readonly Value[] }): FigureRow {
  const { label, unit, decimals, values } = of;
  const printed = values.map((value) => (typeof value === 'number' ? printedValue(value, decimals) : value));
  const [first = null] = printed;
  const cells = printed.map((value) => ({
    text: value === null ? 'none' : typeof value === 'number' ? number(value, decimals) : value,
    difference:
      typeof value === 'number' && typeof first === 'number' && value !== first
        ? signed(printedValue(value - first, decimals), decimals)
        : null,
    isOther: value !== first,
  }));
  return { label, unit, cells, differs: cells.some(({ isOther }) => isOther) };
}

function printedValue(value: number, decimals: number): number {
  return Math.round(value * 10 ** decimals) / 10 ** decimals;
}

function signed(value: number, decimals: number): string {
  return `${value > 0 ? '+' : '−'}${number(Math.abs(value), decimals)}`;
}

/** "84 % of hours with demand" for the sentence over a column. */
export function metSentence(column: CompareColumn): string {
  const pct = servedPct(column);
  return pct === null ? 'no hour with demand' : `${share(pct)} of hours with demand met`;
}

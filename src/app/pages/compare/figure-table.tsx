import { number } from '../../../lib/format.ts';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';
import { type FigureCell, type FigureRow, figureGroups, rowOf } from './figure-rows.ts';
import type { CompareColumn } from './use-compare-columns.ts';

/** Every figure side by side; what differs from the first column says by how much, what is the same stands back. */
export function FigureTable({ columns }: { columns: readonly CompareColumn[] }) {
  return (
    <section aria-labelledby="figures">
      <h2 id="figures" className="mb-1 text-name">
        Figures
      </h2>
      <ScrollInside label="Figures side by side, scrolls sideways">
        <table className="ruled" style={widthOf(columns)}>
          <caption className="sr-only">Figures side by side, with the difference from the first column</caption>
          <ColumnHeads columns={columns} first="Figure" />
          {figureGroups(columns).map(({ title, rows }) => (
            <tbody key={title}>
              <tr>
                <th scope="rowgroup" colSpan={columns.length + 1} className="pt-3 text-fine font-semibold text-soft">
                  {title}
                </th>
              </tr>
              {rows.map((row) => (
                <Row key={row.label} row={row} />
              ))}
            </tbody>
          ))}
        </table>
      </ScrollInside>
    </section>
  );
}

/** How each score comes about: what was found, and the points that it brings. */
export function ArithmeticTable({ columns }: { columns: readonly CompareColumn[] }) {
  const components = [...new Set(columns.flatMap(({ shown }) => shown?.parts.map(({ component }) => component) ?? []))];
  const partOf = ({ shown }: CompareColumn, component: string) =>
    shown?.parts.find((part) => part.component === component);
  const sum = ({ shown }: CompareColumn) =>
    shown === null ? null : shown.parts.reduce((points, part) => points + (part.points ?? 0), 0);
  return (
    <section aria-labelledby="arithmetic">
      <h2 id="arithmetic" className="mb-1 text-name">
        How each score is made
      </h2>
      <ScrollInside label="Score arithmetic side by side, scrolls sideways">
        <table className="ruled" style={widthOf(columns)}>
          <caption className="sr-only">Points of each component, with what was found under them</caption>
          <ColumnHeads columns={columns} first="Component, points" />
          <tbody>
            {components.map((component) => {
              const parts = columns.map((column) => partOf(column, component));
              const [one] = parts.filter((part) => part !== undefined);
              const row = rowOf({
                ...{ label: one?.label ?? component, unit: '', decimals: 2 },
                values: parts.map((part) => part?.points ?? null),
              });
              const found = parts.map((part) => (part?.raw == null ? 'not applicable' : foundWords(part)));
              return <Row key={component} row={row} under={found} />;
            })}
          </tbody>
          <tfoot>
            <Row row={rowOf({ label: 'Sum', unit: '', decimals: 2, values: columns.map(sum) })} />
          </tfoot>
        </table>
      </ScrollInside>
      <p className="mt-1.5 max-w-[70ch] text-fine text-soft">
        Points = scaled × weight / 100; anchors and weights belong to the brief. Under the points stand what was found
        and the weight.
      </p>
    </section>
  );
}

function foundWords({ raw, unit, weight }: { raw: number | null; unit: string; weight: number }): string {
  const value = raw ?? 0;
  const short = unit.replace(' per 1000 demand hours', '/1000 h');
  return `${number(value, Math.abs(value) < 10 ? 2 : 1)} ${short}; weight ${number(weight, 1)}`;
}

/** Two columns stand no further apart than six. */
function widthOf({ length }: readonly CompareColumn[]): { minWidth: string; maxWidth: string } {
  return { minWidth: `${9 + 8 * length}rem`, maxWidth: `${18 + 12 * length}rem` };
}

/** The names of the rows stay in view while the columns pass under them. */
const ROW_NAME = 'pr-3 max-lg:sticky max-lg:left-0 max-lg:z-1 max-lg:bg-cloth max-sm:max-w-[7.5rem]';

function ColumnHeads({ columns, first }: { columns: readonly CompareColumn[]; first: string }) {
  return (
    <thead>
      <tr>
        <th scope="col" className={ROW_NAME}>
          {first}
        </th>
        {columns.map(({ key, title, note }) => (
          <th key={key} scope="col" className="figure align-bottom whitespace-normal">
            {title}
            <span className="block font-normal whitespace-normal text-soft">{note}</span>
          </th>
        ))}
      </tr>
    </thead>
  );
}

function Row({ row, under }: { row: FigureRow; under?: readonly string[] }) {
  return (
    <tr className={row.differs ? '' : 'text-soft'}>
      <th scope="row" className={ROW_NAME}>
        {row.label}
        {row.unit === '' ? null : <span className="text-soft">, {row.unit}</span>}
      </th>
      {row.cells.map((cell, at) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: columns have no other name here and stand in their order
        <Cell key={at} cell={cell} under={under?.[at] ?? null} />
      ))}
    </tr>
  );
}

function Cell({ cell, under }: { cell: FigureCell; under: string | null }) {
  return (
    <td className={`figure align-top ${cell.isOther ? 'font-medium' : ''}`}>
      {cell.text}
      {cell.difference === null ? null : (
        <span className="block text-fine font-normal text-indigo">{cell.difference}</span>
      )}
      {under === null ? null : <span className="block text-fine font-normal whitespace-normal text-soft">{under}</span>}
    </td>
  );
}

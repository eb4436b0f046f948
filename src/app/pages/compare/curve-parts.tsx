import { CURVE_DASHES } from '../../../charts/cumulative-curves.tsx';
import { number } from '../../../lib/format.ts';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';

/** Which stroke is whose, in the order of the curves. */
export function CurveKey({ curves }: { curves: readonly { readonly key: string; readonly name: string }[] }) {
  return (
    <ul className="mb-2 flex flex-wrap gap-x-5 gap-y-1 text-fine">
      {curves.map(({ key, name }, index) => (
        <li key={key} className="flex items-center gap-2">
          <svg width="34" height="8" aria-hidden="true">
            <line
              x1="0"
              x2="34"
              y1="4"
              y2="4"
              stroke="#22302f"
              strokeWidth="1.75"
              strokeDasharray={CURVE_DASHES[index % CURVE_DASHES.length]}
            />
          </svg>
          {name}
        </li>
      ))}
    </ul>
  );
}

interface CurveTableProps {
  readonly caption: string;
  /** What the hours are counted at, with its unit. */
  readonly heads: readonly string[];
  readonly rows: readonly { readonly key: string; readonly name: string; readonly hours: readonly number[] }[];
}

/** The curves in figures. */
export function CurveTable({ caption, heads, rows }: CurveTableProps) {
  return (
    <ScrollInside label={`${caption}, scrolls sideways`}>
      <table className="ruled" style={{ minWidth: `${10 + 4 * heads.length}rem` }}>
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            <th scope="col">At or over</th>
            {heads.map((head) => (
              <th key={head} scope="col" className="figure">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ key, name, hours }) => (
            <tr key={key}>
              <th scope="row">{name}</th>
              {hours.map((each, index) => (
                <td key={heads[index]} className="figure">
                  {number(each)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

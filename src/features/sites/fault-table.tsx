import { number, plural } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

const MOST_SHOWN = 200;

interface Remark {
  readonly line: number;
  readonly column: string;
  readonly message: string;
}

/** Faults or doubts by line and column; more than can be read at once are counted. */
export function FaultTable({ what, count, told }: { what: string; count: number; told: readonly Remark[] }) {
  const shown = told.slice(0, MOST_SHOWN);
  return (
    <>
      <div className="max-h-80 overflow-y-auto">
        <ScrollInside label={`${what}, scrolls sideways`}>
          <table className="ruled">
            <caption className="sr-only">{what} by line and column</caption>
            <thead>
              <tr>
                <th scope="col" className="w-16">
                  Line
                </th>
                <th scope="col" className="w-32">
                  Column
                </th>
                <th scope="col">What is wrong</th>
              </tr>
            </thead>
            <tbody>
              {shown.map(({ line, column, message }) => (
                <tr key={`${line} ${column} ${message}`}>
                  <td>{number(line)}</td>
                  <td className="first-letter:uppercase">{column}</td>
                  <td dir="auto">{message}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollInside>
      </div>
      {count > shown.length ? (
        <p className="mt-1 text-fine text-soft">And {plural(count - shown.length, 'more', 'more')}.</p>
      ) : null}
    </>
  );
}

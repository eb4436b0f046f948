import { number, plural } from '../../lib/format.ts';

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
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: it scrolls, and the keyboard has to reach what is further down. */}
      <section tabIndex={0} aria-label={`${what} by line`} className="max-h-80 overflow-auto">
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
      </section>
      {count > shown.length ? (
        <p className="mt-1 text-fine text-soft">And {plural(count - shown.length, 'more', 'more')}.</p>
      ) : null}
    </>
  );
}

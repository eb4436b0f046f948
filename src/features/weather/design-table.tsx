import type { YearFacts } from '../../contract/weather.ts';
import { number, percent } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

const columns = [
  { key: 'dryBulb', title: 'Dry bulb', coincident: 'with wet bulb' },
  { key: 'wetBulb', title: 'Wet bulb', coincident: 'with dry bulb' },
  { key: 'dewPoint', title: 'Dew point', coincident: 'with dry bulb' },
] as const;

interface DesignTableProps {
  readonly design: YearFacts['design'];
  readonly isTypical: boolean;
}

/** Values passed in a small share of the hours, each with the mean of its companion over hours within 0.5 K. */
export function DesignTable({ design, isTypical }: DesignTableProps) {
  return (
    <section aria-labelledby="design-values">
      <h2 id="design-values" className="mb-1 text-name">
        Design values of this year
      </h2>
      <ScrollInside label="Design values, scrolls sideways">
        <table className="ruled min-w-[34rem]">
          <caption className="sr-only">Temperatures in °C that are passed in a share of the hours</caption>
          <thead>
            <tr>
              <th scope="col">Share of hours</th>
              {columns.map(({ key, title, coincident }) => [
                <th key={key} scope="col" className="figure">
                  {title}, °C
                </th>,
                <th key={`${key}-with`} scope="col" className="figure">
                  {coincident}
                </th>,
              ])}
            </tr>
          </thead>
          <tbody>
            {design.dryBulb.map(({ percent: sharePct }) => (
              <tr key={sharePct}>
                <th scope="row">{percent(sharePct, sharePct < 1 ? 1 : 0)}</th>
                {columns.map(({ key }) => {
                  const row = design[key].find((candidate) => candidate.percent === sharePct);
                  return [
                    <td key={key} className="figure font-medium">
                      {row ? number(row.valueC, 1) : '–'}
                    </td>,
                    <td key={`${key}-with`} className="figure text-soft">
                      {row ? number(row.coincidentC, 1) : '–'}
                    </td>,
                  ];
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      <p className="mt-2 max-w-[70ch] text-fine text-soft">
        {isTypical
          ? 'A typical year hides extremes. Do not size plant from these values.'
          : 'One year is not a climate. Do not size plant from these values alone.'}
      </p>
    </section>
  );
}

import { Fragment } from 'react';
import { Link } from 'react-router-dom';
import type { DerivedPlaceYear, YearFigures } from '../../contract/runs.ts';
import { hours, number, sensible } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { HoursLink } from './hours-link.tsx';
import { metWords } from './run-words.ts';

interface DerivedYearsProps {
  readonly derived: readonly DerivedPlaceYear[];
  readonly teamId: string;
  readonly mayExport: boolean;
}

/** Years of other climates under the brief, each beside the measured year that it was made of. */
export function DerivedYears({ derived, teamId, mayExport }: DerivedYearsProps) {
  if (derived.length === 0) return null;
  return (
    <section aria-labelledby="other-climates">
      <h2 id="other-climates" className="mb-1 text-name">
        Other climates
      </h2>
      <p className="mb-2 max-w-[70ch] text-fine text-soft">
        Derived years beside the years that they were made of. They are in no score, range or grade of this place.
      </p>
      <ScrollInside label="Other climates, scrolls sideways">
        <table className="ruled min-w-[50rem] max-sm:min-w-[44rem]">
          <caption className="sr-only">Derived years and their parents under this brief</caption>
          <thead>
            <tr>
              <th scope="col">Year</th>
              {columns.map(({ title }) => (
                <th key={title} scope="col" className="figure">
                  {title}
                </th>
              ))}
              {mayExport ? (
                <th scope="col" className="figure">
                  Hours
                </th>
              ) : null}
            </tr>
          </thead>
          <tbody>
            {byParent(derived).map((group) => (
              <Fragment key={group[0].parent.weatherFileId}>
                <ParentRow parent={group[0].parent} teamId={teamId} mayExport={mayExport} />
                {group.map((year) => (
                  <tr key={year.weatherFileId}>
                    <th scope="row" className="max-w-[24rem] max-sm:max-w-44">
                      <span className="block pl-4">
                        Derived: <Link to={paths.weatherFile.to(teamId, year.weatherFileId)}>{year.name}</Link>
                        <span className="block text-fine text-soft">{year.words}</span>
                      </span>
                    </th>
                    <Figures figures={year.figures} teamId={teamId} mayExport={mayExport} />
                  </tr>
                ))}
              </Fragment>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </section>
  );
}

const columns: readonly { title: string; value: (figures: YearFigures) => string }[] = [
  { title: 'Hours with demand', value: ({ demand }) => hours(demand) },
  { title: 'Met', value: (figures) => metWords(figures) ?? '–' },
  { title: 'Score of the year', value: ({ score }) => (score === null ? '–' : number(score)) },
  { title: 'Severity', value: ({ severityKh }) => sensible(severityKh, 'K h') },
  { title: 'Worst spell', value: ({ worstSpellHours }) => hours(worstSpellHours) },
  { title: 'Make-up water', value: ({ makeUpLitres }) => sensible(makeUpLitres, 'L/kW') },
];

function ParentRow({
  parent,
  teamId,
  mayExport,
}: { parent: DerivedPlaceYear['parent'] } & Omit<DerivedYearsProps, 'derived'>) {
  const words = parent.kind === 'actual' && parent.year !== null ? `The year ${parent.year}` : 'Typical year';
  const gone = parent.status === 'accepted' ? '' : `, ${parent.status}: it counts no longer`;
  return (
    <tr>
      <th scope="row">
        <Link to={paths.weatherFile.to(teamId, parent.weatherFileId)}>{words}</Link>
        {gone}
      </th>
      <Figures figures={parent.figures} teamId={teamId} mayExport={mayExport} />
    </tr>
  );
}

function Figures({ figures, teamId, mayExport }: { figures: YearFigures | null; teamId: string; mayExport: boolean }) {
  return (
    <>
      {columns.map(({ title, value }) => (
        <td key={title} className="figure">
          {figures === null ? '–' : value(figures)}
        </td>
      ))}
      {mayExport ? (
        <td className="figure">
          {figures === null ? (
            '–'
          ) : (
            <HoursLink teamId={teamId} runId={figures.runId}>
              CSV
            </HoursLink>
          )}
        </td>
      ) : null}
    </>
  );
}

/** In the order in which the parents first come. */
function byParent(derived: readonly DerivedPlaceYear[]): readonly [DerivedPlaceYear, ...DerivedPlaceYear[]][] {
  const groups = new Map<string, [DerivedPlaceYear, ...DerivedPlaceYear[]]>();
  for (const year of derived) {
    const group = groups.get(year.parent.weatherFileId);
    if (group === undefined) groups.set(year.parent.weatherFileId, [year]);
    else group.push(year);
  }
  return [...groups.values()];
}

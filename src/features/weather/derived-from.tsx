import { Link } from 'react-router-dom';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { changeWords } from '../../engine/climate/change-words.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Notice } from '../../ui/notice.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';
import { DifferenceTables } from './climate-difference.tsx';
import { MonthlyChanges } from './monthly-changes.tsx';
import { statusWord, yearWords } from './weather-words.ts';

/** A derived year beside its parent: what was changed, and what became of it. */
export function DerivedFrom({ record: { file, derivation } }: { record: WeatherFileRecord }) {
  const { teamId } = useTeam();
  const { parent } = file;
  if (parent === null || derivation === null) return null;
  const { monthly, humidityRule, difference, cappedHours } = derivation;
  const words = changeWords(monthly, humidityRule);
  return (
    <section aria-labelledby="derived-from">
      <h2 id="derived-from" className="mb-1 text-name">
        Derived, beside its parent
      </h2>
      <p className="max-w-[70ch]">
        Made of <Link to={paths.weatherFile.to(teamId, parent.fileId)}>{parent.name}</Link>,{' '}
        {yearWords(parent).toLowerCase()}: {words}. A changed climate, not a measurement.
      </p>
      {parent.status === 'accepted' ? null : (
        <div className="mt-3">
          <Notice tone="attention">
            The parent is {statusWord[parent.status].toLowerCase()} and counts no longer. Withdraw this year too, or
            derive it anew from the weather that stands in the parent’s place.
          </Notice>
        </div>
      )}
      <div className="mt-5 grid grid-cols-[minmax(0,1fr)] gap-6">
        <MonthlyChanges monthly={monthly} humidityRule={humidityRule} />
        <DifferenceTables difference={difference} cappedHours={cappedHours} />
      </div>
    </section>
  );
}

/** The derived years that were made of a measured one. */
export function DerivedChildren({ items }: { items: WeatherFileRecord['children'] }) {
  const { teamId } = useTeam();
  if (items.length === 0) return null;
  return (
    <section aria-labelledby="derived-years">
      <h2 id="derived-years" className="mb-1 text-name">
        Years derived from it
      </h2>
      <ul>
        {items.map(({ fileId, name, status }) => (
          <li key={fileId} className="flex flex-wrap items-center gap-x-4 border-t border-line py-1.5 last:border-b">
            <Link to={paths.weatherFile.to(teamId, fileId)} className="font-medium">
              {name}
            </Link>
            <span className="flex items-center gap-2 text-soft">
              <StatusMark status={status} />
              {statusWord[status]}, derived
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

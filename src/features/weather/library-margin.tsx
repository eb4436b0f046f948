import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { StatusMark } from '../../ui/status-mark.tsx';
import { libraryQuery } from './weather-queries.ts';
import { statusWords, yearWords } from './weather-words.ts';

/** The newest files beside a record, to go from one to the next. */
export function LibraryMargin({ teamId, fileId }: { teamId: string; fileId: string }) {
  const library = useQuery(libraryQuery(teamId));
  return (
    <nav aria-label="Weather files" className="relative max-xl:hidden">
      <div className="sticky top-0 max-h-dvh overflow-y-auto px-5 pt-6 pb-8">
        <h2 className="text-name">
          <Link to={paths.weather.to(teamId)} className="text-ink no-underline hover:underline">
            Weather files
          </Link>
        </h2>
        <p className="mt-0.5 mb-3 text-fine text-soft">
          {library.data ? `${plural(library.data.total, 'file')}, newest first` : ''}
        </p>
        <ul>
          {library.data?.items.map((file) => (
            <li key={file.id} className="border-t border-line last:border-b">
              <Link
                to={paths.weatherFile.to(teamId, file.id)}
                aria-current={file.id === fileId ? 'page' : undefined}
                className="-mx-2 grid grid-cols-[1fr_auto] gap-x-3 px-2 py-1.5 text-ink no-underline hover:bg-paper aria-[current]:bg-shade"
              >
                <span className="truncate font-medium">{file.station?.name ?? file.name}</span>
                <span className="text-fine text-soft">{yearWords(file)}</span>
                <span className="col-span-2 flex items-center gap-1.5 text-fine text-soft">
                  <StatusMark status={file.status} failed={file.failure !== null} />
                  {statusWords(file)}
                  {file.parent ? <span className="truncate">{file.name}</span> : null}
                </span>
              </Link>
            </li>
          ))}
        </ul>
      </div>
    </nav>
  );
}

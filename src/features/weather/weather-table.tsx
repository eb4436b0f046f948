import { useEffect, useRef } from 'react';
import { Link } from 'react-router-dom';
import type { WeatherFile } from '../../contract/weather.ts';
import type { LibrarySort } from '../../contract/weather-library.ts';
import { moment, share } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';
import { type LibraryView, librarySearch, sortedBy } from './library-view.ts';
import { RetryButton } from './retry-button.tsx';
import { formatWord, parentWords, statusWords, yearWords } from './weather-words.ts';

export type ChosenFiles = ReadonlyMap<string, WeatherFile>;

interface FileChoice {
  readonly chosen: ChosenFiles;
  readonly onChosen: (chosen: ChosenFiles) => void;
}

interface WeatherTableProps {
  readonly teamId: string;
  readonly items: readonly WeatherFile[];
  /** With it the heads sort. */
  readonly view?: LibraryView;
  /** With it rows can be chosen, and stopped files tried again. */
  readonly choice?: FileChoice;
}

export function WeatherTable({ teamId, items, view, choice }: WeatherTableProps) {
  return (
    <ScrollInside label="Weather files, scrolls sideways">
      <table className="ruled min-w-[56rem] max-sm:min-w-[48rem]">
        <caption className="sr-only">Weather files of the team</caption>
        <thead>
          <tr>
            {choice ? (
              <th scope="col" className="w-9">
                <ChooseAll items={items} choice={choice} />
              </th>
            ) : null}
            <th scope="col" aria-sort={sortOf(view, 'station', 'name')}>
              <SortLink view={view} sort="station">
                Station
              </SortLink>{' '}
              and{' '}
              <SortLink view={view} sort="name">
                file
              </SortLink>
            </th>
            <th scope="col">Status</th>
            <th scope="col">Year</th>
            <th scope="col">Format</th>
            <th scope="col" className="figure" aria-sort={sortOf(view, 'complete')}>
              <SortLink view={view} sort="complete">
                Complete
              </SortLink>
            </th>
            <th scope="col" className="pl-6" aria-sort={sortOf(view, 'uploaded')}>
              <SortLink view={view} sort="uploaded">
                Uploaded
              </SortLink>
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((file) => (
            <FileRow key={file.id} teamId={teamId} file={file} {...(choice ? { choice } : {})} />
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function FileRow({ teamId, file, choice }: { teamId: string; file: WeatherFile; choice?: FileChoice }) {
  const isChosen = choice?.chosen.has(file.id) ?? false;
  return (
    <tr className={isChosen ? 'bg-shade' : ''}>
      {choice ? (
        <td>
          <input
            type="checkbox"
            className="size-5 align-middle accent-indigo"
            aria-label={`Choose ${file.name}${file.part === '' ? '' : `, ${file.part}`}`}
            checked={isChosen}
            onChange={() =>
              choice.onChosen(isChosen ? without(choice.chosen, [file]) : withFiles(choice.chosen, [file]))
            }
          />
        </td>
      ) : null}
      <th scope="row" className="w-[34%] max-sm:w-44">
        <Link to={paths.weatherFile.to(teamId, file.id)} className="font-medium">
          {file.station?.name ?? file.name}
        </Link>
        {file.station ? <span className="block text-fine break-all text-soft">{file.name}</span> : null}
      </th>
      <td>
        <span className="flex items-center gap-2">
          <StatusMark status={file.status} failed={file.failure !== null} />
          {statusWords(file)}
        </span>
        {choice && file.failure !== null ? <RetryButton what="file" id={file.id} name={file.name} /> : null}
      </td>
      <td className="min-w-14 sm:whitespace-nowrap">
        {yearWords(file)}
        {file.parent ? (
          <span className="block text-fine text-soft">
            <Link to={paths.weatherFile.to(teamId, file.parent.fileId)}>{parentWords(file.parent)}</Link>
            {file.parent.status === 'accepted' ? '' : `, ${file.parent.status}`}
          </span>
        ) : null}
      </td>
      <td>{file.format === null ? '–' : formatWord(file.format)}</td>
      <td className="figure">{file.completePct === null ? '–' : share(file.completePct)}</td>
      <td className="pl-6">
        <span className="whitespace-nowrap">{moment(file.uploadedAt)}</span>
        <span className="block text-fine text-soft">{file.uploadedBy}</span>
      </td>
    </tr>
  );
}

/** Chooses every file of the page, or none of them. */
function ChooseAll({ items, choice: { chosen, onChosen } }: { items: readonly WeatherFile[]; choice: FileChoice }) {
  const box = useRef<HTMLInputElement>(null);
  const count = items.filter(({ id }) => chosen.has(id)).length;
  const isAll = items.length > 0 && count === items.length;
  useEffect(() => {
    if (box.current) box.current.indeterminate = count > 0 && !isAll;
  }, [count, isAll]);
  return (
    <input
      ref={box}
      type="checkbox"
      className="size-5 align-middle accent-indigo"
      aria-label="Choose all files on this page"
      checked={isAll}
      onChange={() => onChosen(isAll ? without(chosen, items) : withFiles(chosen, items))}
    />
  );
}

function withFiles(chosen: ChosenFiles, files: readonly WeatherFile[]): ChosenFiles {
  return new Map([...chosen, ...files.map((file) => [file.id, file] as const)]);
}

function without(chosen: ChosenFiles, files: readonly WeatherFile[]): ChosenFiles {
  const next = new Map(chosen);
  for (const { id } of files) next.delete(id);
  return next;
}

function SortLink({ view, sort, children }: { view: LibraryView | undefined; sort: LibrarySort; children: string }) {
  if (view === undefined) return children;
  const isNow = view.sort === sort;
  return (
    <Link
      to={librarySearch(sortedBy(view, sort))}
      className={`py-1 text-soft ${isNow ? 'font-semibold text-ink' : ''}`}
    >
      {children}
      {isNow ? <span aria-hidden="true"> {view.order === 'asc' ? '↑' : '↓'}</span> : null}
    </Link>
  );
}

function sortOf(
  view: LibraryView | undefined,
  ...sorts: readonly LibrarySort[]
): 'ascending' | 'descending' | undefined {
  if (view === undefined || !sorts.includes(view.sort)) return undefined;
  return view.order === 'asc' ? 'ascending' : 'descending';
}

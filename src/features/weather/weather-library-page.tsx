import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import type { WeatherFile } from '../../contract/weather.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { number, plural } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { BatchList } from './batch-list.tsx';
import { BulkActs } from './bulk-acts.tsx';
import { LibraryFilter } from './library-filter.tsx';
import { isFiltered, type LibraryView, librarySearch, readLibraryView, withoutFilter } from './library-view.ts';
import { DropArea, DropHint, UploadButton, UploadList } from './upload-panel.tsx';
import { libraryQuery } from './weather-queries.ts';
import { WeatherTable } from './weather-table.tsx';
import { mayChangeWeather } from './weather-words.ts';

export function WeatherLibraryPage() {
  const { teamId, role } = useTeam();
  const mayUpload = mayChangeWeather(role);
  const [search] = useSearchParams();
  const view = readLibraryView(search);
  const library = useQuery({ ...libraryQuery(teamId, view), placeholderData: keepPreviousData });
  const all = library.data ? allFiles(library.data.counts) : null;
  const content = (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Weather</PageTitle>
      <header className="mb-5 flex flex-wrap items-end justify-between gap-4">
        <div>
          <h1 className="text-title">Weather files</h1>
          <p className="mt-1 text-soft" role="status">
            {library.data && all ? countWords(view, library.data.total, all) : 'Hourly years, as they were uploaded'}
          </p>
        </div>
        <div className="flex flex-wrap items-center gap-3">
          {all === 0 ? null : (
            <Link to={paths.stations.to(teamId)} className={buttonLook('plain')}>
              Stations
            </Link>
          )}
          {mayUpload && all !== 0 ? <UploadButton teamId={teamId} /> : null}
        </div>
      </header>
      {mayUpload ? <DropHint /> : null}
      <div className="my-4 grid grid-cols-[minmax(0,1fr)] gap-3">
        {mayUpload ? <UploadList teamId={teamId} items={library.data?.items ?? []} /> : null}
        <BatchList teamId={teamId} />
      </div>
      {library.isPending ? <Loading what="the library" /> : null}
      {library.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => library.refetch()}>Try again</Button>}>
          {errorSentence(library.error)}
        </Notice>
      ) : null}
      {all === 0 ? <EmptyLibrary teamId={teamId} mayUpload={mayUpload} /> : null}
      {library.data && all !== 0 ? (
        <>
          <LibraryFilter view={view} counts={library.data.counts} formats={library.data.formats} />
          <Files view={view} library={library.data} isBehind={library.isPlaceholderData} mayChange={mayUpload} />
        </>
      ) : null}
    </div>
  );
  return mayUpload ? <DropArea teamId={teamId}>{content}</DropArea> : content;
}

function allFiles({ stopped: _stopped, ...statuses }: Readonly<Record<string, number>>): number {
  return Object.values(statuses).reduce((sum, count) => sum + count, 0);
}

function countWords(view: LibraryView, total: number, all: number): string {
  if (isFiltered(view)) return `${number(total)} of ${plural(all, 'file')}`;
  const isUsual = view.sort === 'uploaded' && view.order === 'desc';
  return all === 0
    ? 'Hourly years, as they were uploaded'
    : `${plural(total, 'file')}${isUsual ? ', newest first' : ''}`;
}

interface FilesProps {
  readonly view: LibraryView;
  readonly library: { readonly items: readonly WeatherFile[]; readonly total: number; readonly pages: number };
  /** What is shown is the answer to the question before. */
  readonly isBehind: boolean;
  readonly mayChange: boolean;
}

/** The table with what may be done about the files that are chosen in it; the choice outlasts a change of page or filter. */
function Files({ view, library, isBehind, mayChange }: FilesProps) {
  const { teamId } = useTeam();
  const [chosen, setChosen] = useState<ReadonlyMap<string, WeatherFile>>(new Map());
  const { items, total, pages } = library;
  return (
    <>
      {mayChange ? <BulkActs chosen={chosen} items={items} onChosen={setChosen} /> : null}
      {items.length === 0 ? (
        <NothingLeft view={view} />
      ) : (
        <div className={isBehind ? 'opacity-60' : ''} aria-busy={isBehind}>
          <WeatherTable
            teamId={teamId}
            items={items}
            view={view}
            {...(mayChange ? { choice: { chosen, onChosen: setChosen } } : {})}
          />
          <Paging shown={items.length} total={total} view={view} pages={pages} />
        </div>
      )}
    </>
  );
}

interface PagingProps {
  readonly shown: number;
  readonly total: number;
  readonly view: LibraryView;
  readonly pages: number;
}

function Paging({ shown, total, view, pages }: PagingProps) {
  if (pages === 1) return null;
  const to = (page: number) => librarySearch({ ...view, page });
  return (
    <nav aria-label="Pages of the library" className="mt-4 flex flex-wrap items-center gap-3">
      <p className="mr-auto text-fine text-soft">
        {number(shown)} of {plural(total, 'file')} on page {number(view.page)} of {number(pages)}
      </p>
      {view.page === 1 ? null : (
        <Link to={to(view.page - 1)} className={buttonLook('plain')}>
          Page before
        </Link>
      )}
      {view.page >= pages ? null : (
        <Link to={to(view.page + 1)} className={buttonLook('plain')}>
          Next page
        </Link>
      )}
    </nav>
  );
}

function NothingLeft({ view }: { view: LibraryView }) {
  if (view.page > 1) {
    return (
      <p className="py-4">
        The library does not go on to page {number(view.page)}.{' '}
        <Link to={librarySearch({ ...view, page: 1 })}>Go to the first page</Link>.
      </p>
    );
  }
  return (
    <p className="py-4">
      No file fits this filter. <Link to={librarySearch(withoutFilter(view))}>Show every file</Link>.
    </p>
  );
}

function EmptyLibrary(props: { teamId: string; mayUpload: boolean }) {
  return (
    <section className="mt-6 max-w-[36rem]">
      <h2 className="mb-2 text-name">No weather file yet</h2>
      <p className="mb-4">
        {props.mayUpload
          ? 'Upload the hourly weather files that you hold, one by one or as a zip. Each is read and checked in the background, then waits for you to accept it; its station appears on the map from then on.'
          : 'An engineer of the team uploads hourly weather files here. Their stations appear on the map once they are accepted.'}
      </p>
      {props.mayUpload ? (
        <UploadButton teamId={props.teamId} />
      ) : (
        <Link to={paths.home} className={buttonLook('plain')}>
          Go to the map
        </Link>
      )}
    </section>
  );
}

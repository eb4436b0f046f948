import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { errorSentence } from '../../lib/api-error.ts';
import { number, plural } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { DropArea, DropHint, UploadButton, UploadList } from './upload-panel.tsx';
import { libraryQuery } from './weather-queries.ts';
import { WeatherTable } from './weather-table.tsx';
import { mayChangeWeather } from './weather-words.ts';

/** The page of the library, counted from 1, in the query of its address. */
const PAGE_PARAM = 'page';

export function WeatherLibraryPage() {
  const { teamId, role } = useTeam();
  const mayUpload = mayChangeWeather(role);
  const [search] = useSearchParams();
  const page = Math.max(1, Number.parseInt(search.get(PAGE_PARAM) ?? '1', 10) || 1);
  const library = useQuery({ ...libraryQuery(teamId, page), placeholderData: keepPreviousData });
  const isEmpty = library.data?.items.length === 0;
  const content = (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Weather</PageTitle>
      <header className="mb-5 flex flex-wrap items-end justify-between gap-4">
        <div>
          <h1 className="text-title">Weather files</h1>
          <p className="mt-1 text-soft">
            {library.data && !isEmpty
              ? `${plural(library.data.total, 'file')}, newest first`
              : 'Hourly years, as they were uploaded'}
          </p>
        </div>
        {mayUpload && !isEmpty ? <UploadButton teamId={teamId} /> : null}
      </header>
      {mayUpload ? <DropHint /> : null}
      {mayUpload ? (
        <div className="my-4">
          <UploadList teamId={teamId} items={library.data?.items ?? []} />
        </div>
      ) : null}
      {library.isPending ? <Loading what="the library" /> : null}
      {library.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => library.refetch()}>Try again</Button>}>
          {errorSentence(library.error)}
        </Notice>
      ) : null}
      {isEmpty ? <EmptyLibrary teamId={teamId} mayUpload={mayUpload} isFirstPage={page === 1} /> : null}
      {library.data && library.data.items.length > 0 ? (
        <div className={library.isPlaceholderData ? 'opacity-60' : ''} aria-busy={library.isPlaceholderData}>
          <WeatherTable teamId={teamId} items={library.data.items} />
          <Paging shown={library.data.items.length} total={library.data.total} page={page} pages={library.data.pages} />
        </div>
      ) : null}
    </div>
  );
  return mayUpload ? <DropArea teamId={teamId}>{content}</DropArea> : content;
}

interface PagingProps {
  readonly shown: number;
  readonly total: number;
  readonly page: number;
  readonly pages: number;
}

function Paging({ shown, total, page, pages }: PagingProps) {
  if (pages === 1) return null;
  return (
    <nav aria-label="Pages of the library" className="mt-4 flex items-center gap-3">
      <p className="mr-auto text-fine text-soft">
        {number(shown)} of {plural(total, 'file')} on this page
      </p>
      {page === 1 ? null : (
        <Link to={page === 2 ? '?' : `?${PAGE_PARAM}=${page - 1}`} className={buttonLook('plain')}>
          Newer files
        </Link>
      )}
      {page >= pages ? null : (
        <Link to={`?${PAGE_PARAM}=${page + 1}`} className={buttonLook('plain')}>
          Older files
        </Link>
      )}
    </nav>
  );
}

function EmptyLibrary(props: { teamId: string; mayUpload: boolean; isFirstPage: boolean }) {
  if (!props.isFirstPage) {
    return (
      <p>
        No older files. <Link to="?">Go to the newest files</Link>.
      </p>
    );
  }
  return (
    <section className="mt-6 max-w-[36rem]">
      <h2 className="mb-2 text-name">No weather file yet</h2>
      <p className="mb-4">
        {props.mayUpload
          ? 'Upload the hourly EPW files that you hold. Each is read and checked in the background, then waits for you to accept it; its station appears on the map from then on.'
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

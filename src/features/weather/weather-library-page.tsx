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

/** The page of the library that starts after a given file, in the query of its address. */
const AFTER_PARAM = 'after';

export function WeatherLibraryPage() {
  const { teamId, role } = useTeam();
  const mayUpload = mayChangeWeather(role);
  const [search] = useSearchParams();
  const after = search.get(AFTER_PARAM) ?? undefined;
  const library = useQuery({ ...libraryQuery(teamId, after), placeholderData: keepPreviousData });
  const isEmpty = library.data?.items.length === 0;
  const page = (
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
      {isEmpty ? <EmptyLibrary teamId={teamId} mayUpload={mayUpload} isFirstPage={after === undefined} /> : null}
      {library.data && library.data.items.length > 0 ? (
        <div className={library.isPlaceholderData ? 'opacity-60' : ''} aria-busy={library.isPlaceholderData}>
          <WeatherTable teamId={teamId} items={library.data.items} />
          <Paging shown={library.data.items.length} total={library.data.total} next={library.data.next} after={after} />
        </div>
      ) : null}
    </div>
  );
  return mayUpload ? <DropArea teamId={teamId}>{page}</DropArea> : page;
}

interface PagingProps {
  readonly shown: number;
  readonly total: number;
  readonly next: string | null;
  readonly after: string | undefined;
}

function Paging({ shown, total, next, after }: PagingProps) {
  if (next === null && after === undefined) return null;
  return (
    <nav aria-label="Pages of the library" className="mt-4 flex items-center gap-3">
      <p className="mr-auto text-fine text-soft">
        {number(shown)} of {plural(total, 'file')} on this page
      </p>
      {after === undefined ? null : (
        <Link to="?" className={buttonLook('plain')}>
          Newest files
        </Link>
      )}
      {next === null ? null : (
        <Link to={`?${AFTER_PARAM}=${encodeURIComponent(next)}`} className={buttonLook('plain')}>
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

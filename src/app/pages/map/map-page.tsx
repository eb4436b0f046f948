import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { lazy, Suspense } from 'react';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import { mapQuery } from '../../../features/runs/run-queries.ts';
import { errorSentence, isApiError } from '../../../lib/api-error.ts';
import { sentence } from '../../../lib/format.ts';
import { PageTitle } from '../../../lib/page-title.tsx';
import { BRIEF_PARAM, paths } from '../../../lib/paths.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button, buttonLook } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';

// The engine of the map is the largest part of the page: it comes while the places are asked for.
const sheet = import('./map-sheet.tsx');
sheet.catch(() => undefined);
const MapSheet = lazy(async () => ({ default: (await sheet).MapSheet }));

export function MapPage() {
  const { teamId, role, programmes } = useTeam();
  const { programmeId = '' } = useParams();
  const [search] = useSearchParams();
  const ids = { teamId, programmeId, briefId: search.get(BRIEF_PARAM) };
  // Another brief of the programme draws the same places: the sheet stays while its figures come.
  const map = useQuery({ ...mapQuery(ids), placeholderData: keepPreviousData });
  const title = programmes.find(({ id }) => id === programmeId)?.name ?? 'Map';
  return (
    <>
      <PageTitle>{title}</PageTitle>
      {map.isPending ? <Loading what="the map" /> : null}
      {map.isError && !map.data ? <MapProblem error={map.error} onRetry={() => map.refetch()} /> : null}
      {map.data && map.data.stations.length === 0 ? (
        <EmptyMap map={map.data} mayUpload={role === 'engineer' || role === 'lead'} />
      ) : null}
      {map.data && map.data.stations.length > 0 ? (
        <Suspense fallback={<Loading what="the map" />}>
          <MapSheet ids={ids} map={map.data} />
        </Suspense>
      ) : null}
    </>
  );
}

function MapProblem({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const isGone = isApiError(error, 'not_found') || isApiError(error, 'invalid_input');
  return (
    <div className="p-6">
      <Notice
        tone="wrong"
        live
        actions={
          isGone ? (
            <Link className={buttonLook('plain')} to={paths.home}>
              Go to the map
            </Link>
          ) : (
            <Button onClick={onRetry}>Try again</Button>
          )
        }
      >
        {isGone ? 'There is no such programme, or it belongs to a team that you are not in.' : errorSentence(error)}
      </Notice>
    </div>
  );
}

function EmptyMap({ map, mayUpload }: { map: ProgrammeMap; mayUpload: boolean }) {
  const { teamId } = useTeam();
  return (
    <section className="mx-auto w-full max-w-[36rem] px-6 pt-14">
      <p className="text-fine text-soft">{map.programme.name}</p>
      <h1 className="mb-2 text-title">No station on the map yet</h1>
      <p className="mb-2">
        {mayUpload
          ? 'A station appears here once a weather file of it is accepted. Upload an hourly EPW file, look at what was found in it, and accept it.'
          : 'A station appears here once an engineer of the team has accepted a weather file of it.'}
      </p>
      <p className="mb-5 text-soft">
        Every station is tested against {map.brief.name}, version {map.brief.version}. {sentence(map.brief.sentence)}
      </p>
      <Link className={buttonLook('primary')} to={paths.weather.to(teamId)}>
        {mayUpload ? 'Upload a weather file' : 'See the weather files'}
      </Link>
    </section>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { StationRecord } from '../../contract/stations.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { mayChangeWeather } from '../../lib/file-words.ts';
import { metres, plural, position, utcOffset } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { MergeDialog } from './merge-dialog.tsx';
import { MoveDialog } from './move-dialog.tsx';
import { StationFiles } from './station-files.tsx';
import { stationQuery } from './station-queries.ts';
import { StationRules } from './station-rules.tsx';
import { StationYears } from './station-years.tsx';

/** One station: its years side by side, its files of every status, and what may be put right about it. */
export function StationPage() {
  const { teamId } = useTeam();
  const { stationId = '' } = useParams();
  const record = useQuery(stationQuery(teamId, stationId));
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <Link to={paths.stations.to(teamId)} className="no-print mb-2 inline-block text-fine">
        All stations
      </Link>
      {record.isPending ? <Loading what="the station" /> : null}
      {record.isError ? <StationProblem error={record.error} onRetry={() => record.refetch()} /> : null}
      {record.data ? <StationView record={record.data} /> : null}
    </div>
  );
}

function StationView({ record }: { record: StationRecord }) {
  const { role } = useTeam();
  const mayChange = mayChangeWeather(role);
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
      <PageTitle>{record.station.name}</PageTitle>
      <Heading record={record} mayChange={mayChange} />
      <StationYears record={record} />
      <StationFiles files={record.files} />
      <StationRules station={record.station} rulesOff={record.rulesOff} mayChange={mayChange} />
    </div>
  );
}

function Heading({ record: { station }, mayChange }: { record: StationRecord; mayChange: boolean }) {
  const { teamId, programmes } = useTeam();
  const [open, setOpen] = useState<'move' | 'merge' | null>(null);
  const programme = programmes[0];
  const close = () => setOpen(null);
  return (
    <header className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
      <div>
        <h1 className="text-title break-words">{station.name}</h1>
        <p className="mt-1.5">
          {position(station)}, {metres(station.elevationM)}, {utcOffset(station.utcOffsetH)}, {station.zone}
          {station.wmoNumber === null ? '' : `, WMO ${station.wmoNumber}`}. {plural(station.years, 'accepted year')},{' '}
          {plural(station.files, 'file')}.
        </p>
      </div>
      <div className="no-print flex flex-wrap gap-2">
        {programme && station.years > 0 ? (
          <Link className={buttonLook('plain')} to={paths.map.to({ teamId, programmeId: programme.id }, station.id)}>
            Show on the map
          </Link>
        ) : null}
        {mayChange ? (
          <>
            <Button onClick={() => setOpen('move')}>Correct the place</Button>
            <Button onClick={() => setOpen('merge')}>Merge with another</Button>
          </>
        ) : null}
      </div>
      {open === 'move' ? <MoveDialog station={station} onClose={close} /> : null}
      {open === 'merge' ? <MergeDialog station={station} onClose={close} /> : null}
    </header>
  );
}

function StationProblem({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const isGone = isApiError(error, 'not_found') || isApiError(error, 'invalid_input');
  return (
    <>
      <PageTitle>Station</PageTitle>
      <Notice tone="wrong" live actions={isGone ? null : <Button onClick={onRetry}>Try again</Button>}>
        {isGone
          ? 'There is no such station: it was merged into another, or it belongs to a team that you are not in.'
          : errorSentence(error)}
      </Notice>
    </>
  );
}

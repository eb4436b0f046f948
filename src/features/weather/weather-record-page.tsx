import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense, useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Answering } from './answering.tsx';
import { DepressionTable } from './depression-table.tsx';
import { DerivedChildren, DerivedFrom } from './derived-from.tsx';
import { DesignTable } from './design-table.tsx';
import { Findings } from './findings.tsx';
import { HoursAccount } from './hours-account.tsx';
import { LibraryMargin } from './library-margin.tsx';
import { PsychrometricFold } from './psychrometric-fold.tsx';
import { RecordHeading } from './record-heading.tsx';
import { RecordOriginal } from './record-original.tsx';
import { RecordState } from './record-state.tsx';
import { recordQuery } from './weather-queries.ts';
import { mayChangeWeather, recordTitle } from './weather-words.ts';

/** The hours come with the engine, which the state of a file does not wait for. */
const DepressionPictures = lazy(async () => ({
  default: (await import('./depression-pictures.tsx')).DepressionPictures,
}));
const GapCalendarSection = lazy(async () => ({ default: (await import('./gap-calendar.tsx')).GapCalendarSection }));

export function WeatherRecordPage() {
  const { teamId } = useTeam();
  const { fileId = '' } = useParams();
  const record = useQuery(recordQuery(teamId, fileId));
  return (
    <div className="grid flex-1 xl:grid-cols-[19rem_minmax(0,1fr)] print:block">
      <div className="no-print">
        <LibraryMargin teamId={teamId} fileId={fileId} />
      </div>
      <article className="min-w-0 border-line bg-paper px-8 pt-6 pb-16 max-sm:px-4 xl:border-l">
        <Link to={paths.weather.to(teamId)} className="no-print mb-3 inline-block text-fine xl:hidden">
          All weather files
        </Link>
        {record.isPending ? <Loading what="the file's record" /> : null}
        {record.isError ? <RecordProblem error={record.error} onRetry={() => record.refetch()} /> : null}
        {record.data ? <Record record={record.data} /> : null}
      </article>
    </div>
  );
}

function Record({ record }: { record: WeatherFileRecord }) {
  const { role } = useTeam();
  const { file, facts } = record;
  const isDerived = file.parent !== null;
  // The hour that cloth and chart both show.
  const [slot, setSlot] = useState<number | null>(null);
  const inView = { record, slot, onChoose: setSlot };
  return (
    <div className="grid max-w-[68rem] grid-cols-[minmax(0,1fr)] gap-8">
      <PageTitle>{recordTitle(file)}</PageTitle>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
        <RecordHeading record={record} />
        <RecordState record={record} />
        <Answering record={record} />
      </div>
      {facts ? (
        // As high as the pictures, so that nothing below moves when they have come.
        <div className="min-h-[44rem] print:min-h-0">
          <Suspense fallback={<Loading what="the hours of the year" />}>
            <DepressionPictures facts={facts} {...inView} />
          </Suspense>
        </div>
      ) : null}
      <DerivedFrom record={record} />
      {isDerived ? null : (
        <Findings
          originalOf={mayChangeWeather(role) ? file.id : null}
          findings={record.findings}
          asks={record.asks}
          isReading={file.status === 'reading'}
        />
      )}
      <DerivedChildren items={record.children} />
      {facts ? (
        <>
          <DepressionTable facts={facts} />
          <PsychrometricFold facts={facts} {...inView} />
          <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,20rem)_minmax(0,1fr)]">
            <HoursAccount facts={facts} isDerived={isDerived} />
            <DesignTable design={facts.design} isTypical={(file.parent?.kind ?? file.kind) === 'typical'} />
          </div>
          <Suspense fallback={null}>
            <GapCalendarSection record={record} facts={facts} />
          </Suspense>
        </>
      ) : null}
      <RecordOriginal record={record} />
    </div>
  );
}

function RecordProblem({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const isGone = isApiError(error, 'not_found') || isApiError(error, 'invalid_input');
  return (
    <>
      <PageTitle>Weather file</PageTitle>
      <Notice tone="wrong" live actions={isGone ? null : <Button onClick={onRetry}>Try again</Button>}>
        {isGone ? 'There is no such weather file, or it belongs to a team that you are not in.' : errorSentence(error)}
      </Notice>
    </>
  );
}

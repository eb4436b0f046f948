import { useMutation, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { type BatchState, changeWeatherBatch, type WeatherBatch } from '../../contract/weather-batches.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { moment, number, plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Progress } from '../../ui/progress.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';
import { ArchiveRow } from './archive-row.tsx';
import { batchShare, batchWords, countedStatuses, filesOf } from './batch-words.ts';
import { pageUploads, useUploads } from './page-uploads.ts';
import { ReadingSteps } from './reading-steps.tsx';
import { UploadRow } from './upload-panel.tsx';
import { isUnderWay } from './upload-queue.ts';
import { readingNowQuery, useWeatherChanged } from './weather-queries.ts';
import { mayChangeWeather, statusWord } from './weather-words.ts';

/** One batch: how far it is, what became of its files, what its archives left out, and what may be done about it. */
export function BatchCard({ batch }: { batch: WeatherBatch }) {
  const { teamId, role } = useTeam();
  const uploads = useUploads(teamId).filter(({ batchId }) => batchId === batch.id);
  const sending = uploads.filter(isUnderWay).length;
  const isOpen = !batch.ended || sending > 0;
  return (
    <li className="border-t border-line py-2.5 first:border-t-0">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h3 className="min-w-0 text-body break-words text-ink">
          <Link to={paths.weather.to(teamId, { batch: batch.id })}>{batch.name}</Link>{' '}
          <span className="font-normal text-fine text-soft">
            {moment(batch.madeAt)}, {batch.madeBy}
          </span>
        </h3>
        {mayChangeWeather(role) && isOpen && batch.state !== 'cancelled' ? <BatchActs batch={batch} /> : null}
      </div>
      <p role="status" className={isOpen ? 'font-medium' : 'text-soft'}>
        {sending > 0 ? `Sending ${plural(sending, 'file')}; you can go to other pages meanwhile. ` : ''}
        {batchWords(batch, sending)}.
      </p>
      {batch.stopped > 0 ? (
        <p className="font-medium text-madder">
          {plural(batch.stopped, 'file or archive', 'files and archives')} stopped for a fault of ours.{' '}
          <Link to={paths.weather.to(teamId, { batch: batch.id, status: 'stopped' })}>Show the files</Link>
        </p>
      ) : null}
      {isOpen ? (
        <div className="my-1.5">
          <Progress label={`Progress of ${batch.name}`} share={batchShare(batch, sending)} />
        </div>
      ) : null}
      <StatusLinks batch={batch} />
      <ul>
        {batch.archives.map((archive) => (
          <ArchiveRow key={archive.id} archive={archive} />
        ))}
      </ul>
      <ul aria-label={`On their way into ${batch.name}`}>
        {uploads
          .filter(({ state, answer }) => state === 'sending' || state === 'failed' || answer?.known)
          .map((upload) => (
            <UploadRow key={upload.id} upload={upload} file={upload.answer?.file ?? null} />
          ))}
      </ul>
      {batch.files.reading > 0 && batch.state === 'running' ? <ReadingNow batch={batch} /> : null}
    </li>
  );
}

/** How many files stand where; each leads to them. */
function StatusLinks({ batch }: { batch: WeatherBatch }) {
  const { teamId } = useTeam();
  const there = countedStatuses.filter((status) => batch.files[status] > 0);
  if (filesOf(batch).total === 0) return null;
  return (
    <ul className="flex flex-wrap gap-x-4 gap-y-0.5 text-fine" aria-label={`Files of ${batch.name} by status`}>
      {there.map((status) => (
        <li key={status} className="flex items-center gap-1.5">
          <StatusMark status={status} />
          <Link to={paths.weather.to(teamId, { batch: batch.id, status })} className="inline-block py-0.5">
            {number(batch.files[status])} {statusWord[status].toLowerCase()}
          </Link>
        </li>
      ))}
    </ul>
  );
}

/** The steps of what is being read at the moment; the rest of the batch stands in the table. */
function ReadingNow({ batch }: { batch: WeatherBatch }) {
  const { teamId } = useTeam();
  const now = useQuery(readingNowQuery(teamId, batch.id));
  const items = now.data?.items.filter(({ status, failure }) => status === 'reading' && failure === null) ?? [];
  const more = batch.files.reading - items.length;
  if (items.length === 0) return null;
  return (
    <ul aria-label={`Being read of ${batch.name}`} className="mt-1">
      {items.map((file) => (
        <li
          key={file.id}
          className="grid grid-cols-[minmax(0,16rem)_minmax(0,1fr)] items-center gap-x-4 border-t border-line py-1 max-md:grid-cols-1"
        >
          <Link to={paths.weatherFile.to(teamId, file.id)} className="truncate">
            {file.name}
          </Link>
          <ReadingSteps file={file} />
        </li>
      ))}
      {more > 0 ? <li className="border-t border-line py-1 text-fine text-soft">{number(more)} more wait.</li> : null}
    </ul>
  );
}

function BatchActs({ batch }: { batch: WeatherBatch }) {
  const { teamId } = useTeam();
  const changed = useWeatherChanged();
  const [isAsking, setIsAsking] = useState(false);
  const change = useMutation({
    mutationFn: (state: BatchState) =>
      call(changeWeatherBatch, { params: { teamId, batchId: batch.id }, query: {}, body: { state } }),
    onSuccess: (_batch, state) => {
      if (state === 'cancelled') pageUploads.stopBatch(batch.id);
    },
    onSettled: () => {
      setIsAsking(false);
      changed();
    },
  });
  const isPaused = batch.state === 'paused';
  return (
    <div className="flex flex-wrap items-center gap-x-3">
      <Button
        look="quiet"
        busy={change.isPending}
        aria-label={`${isPaused ? 'Resume' : 'Pause'} ${batch.name}`}
        onClick={() => change.mutate(isPaused ? 'running' : 'paused')}
      >
        {isPaused ? 'Resume' : 'Pause'}
      </Button>
      <Button look="quiet" disabled={change.isPending} onClick={() => setIsAsking(true)}>
        Cancel the batch
      </Button>
      {change.isError ? (
        <p role="alert" className="w-full text-fine text-madder">
          {errorSentence(change.error)}
        </p>
      ) : null}
      <Dialog isOpen={isAsking} onClose={() => setIsAsking(false)} title="Cancel this batch">
        <p className="mb-4">
          What of it has not been read is withdrawn, and nothing more of it is sent or taken out of an archive. What has
          been read stays. It cannot be resumed; its files can be uploaded again.
        </p>
        <div className="flex justify-end gap-2">
          <Button onClick={() => setIsAsking(false)}>Let it go on</Button>
          <Button look="primary" busy={change.isPending} onClick={() => change.mutate('cancelled')}>
            Cancel the batch
          </Button>
        </div>
      </Dialog>
    </div>
  );
}

import { useQuery } from '@tanstack/react-query';
import { type DragEvent, type ReactNode, useRef, useState } from 'react';
import { Link } from 'react-router-dom';
import { MAX_FILE_BYTES, type WeatherFile } from '../../contract/weather.ts';
import { MAX_ARCHIVE_BYTES } from '../../contract/weather-batches.ts';
import { fileSize, percent, plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Progress } from '../../ui/progress.tsx';
import { entriesOfDrop, filesOfEntries } from './dropped-files.ts';
import { pageUploads, useUpload, useUploads } from './page-uploads.ts';
import { ReadingSteps } from './reading-steps.tsx';
import { isUnderWay, type Upload } from './upload-queue.ts';
import { recordQuery } from './weather-queries.ts';

/** The button that opens the browser's choice of files. */
export function UploadButton({ teamId }: { teamId: string }) {
  const input = useRef<HTMLInputElement>(null);
  const upload = useUpload(teamId);
  return (
    <>
      <input
        ref={input}
        type="file"
        multiple
        hidden
        aria-label="Weather files"
        onChange={(event) => {
          upload([...(event.currentTarget.files ?? [])]);
          event.currentTarget.value = '';
        }}
      />
      <Button look="primary" onClick={() => input.current?.click()}>
        Upload files
      </Button>
    </>
  );
}

/** Takes files that are dropped anywhere on what it holds, and says so while they hover. */
export function DropArea({ teamId, children }: { teamId: string; children: ReactNode }) {
  const upload = useUpload(teamId);
  const [isOver, setIsOver] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const take = (dropped: DataTransfer) => {
    filesOfEntries(entriesOfDrop(dropped)).then(
      (files) => {
        setProblem(files.length === 0 ? 'There is no file in what was dropped.' : null);
        if (files.length > 0) upload(files);
      },
      () =>
        setProblem('The browser could not open what was dropped. Nothing was sent; choose the files by the button.'),
    );
  };
  const holdsFiles = (event: DragEvent) => event.dataTransfer.types.includes('Files');
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is the pointer's short cut; the button does the same
    <div
      className={`min-h-0 flex-1 ${isOver ? 'outline-2 -outline-offset-8 outline-indigo outline-dashed' : ''}`}
      onDragOver={(event) => {
        if (!holdsFiles(event)) return;
        event.preventDefault();
        setIsOver(true);
      }}
      onDragLeave={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget instanceof Node ? event.relatedTarget : null))
          setIsOver(false);
      }}
      onDrop={(event) => {
        if (!holdsFiles(event)) return;
        event.preventDefault();
        setIsOver(false);
        take(event.dataTransfer);
      }}
    >
      {problem ? (
        <div className="px-6 pt-3">
          <Notice tone="wrong" live actions={<Button onClick={() => setProblem(null)}>Close</Button>}>
            {problem}
          </Notice>
        </div>
      ) : null}
      {children}
    </div>
  );
}

export function DropHint() {
  return (
    <p className="border border-dashed border-[#b9af9b] px-4 py-3 text-center text-fine text-soft max-md:hidden">
      Drop hourly files, folders or a zip anywhere here: EPW, TMY2, TMY3, ISD, ISD-Lite, Global Hourly, or any table
      with a time column. Files up to {fileSize(MAX_FILE_BYTES)}, a zip up to {fileSize(MAX_ARCHIVE_BYTES)}.
    </p>
  );
}

/** What this page has sent or is sending outside of batches, with what became of it. */
export function UploadList({ teamId, items }: { teamId: string; items: readonly WeatherFile[] }) {
  const uploads = useUploads(teamId).filter(({ batchId }) => batchId === null);
  if (uploads.length === 0) return null;
  const waiting = uploads.filter(isUnderWay).length;
  const sent = uploads.filter(({ state }) => state === 'sent').length;
  const failed = uploads.filter(({ state }) => state === 'failed').length;
  const ended = [
    sent > 0 ? `${plural(sent, 'file')} sent` : '',
    failed > 0 ? `${plural(failed, 'file')} not sent` : '',
  ];
  return (
    <section aria-label="Uploads" className="border-y border-line bg-paper px-4 py-2.5">
      <div className="flex items-baseline justify-between gap-4">
        <h2 className="text-lead">
          <span role="status">
            {waiting > 0
              ? `Sending ${plural(waiting, 'file')}. You can go to other pages meanwhile.`
              : ended.filter((part) => part !== '').join(', ')}
          </span>
        </h2>
        <Button look="quiet" onClick={() => pageUploads.clearEnded()}>
          Clear the list
        </Button>
      </div>
      <ul>
        {uploads.map((upload) => (
          <SingleUpload key={upload.id} upload={upload} items={items} />
        ))}
      </ul>
    </section>
  );
}

/** A file as the library now has it; where the table does not show it, as its record has it. */
function SingleUpload({ upload, items }: { upload: Upload; items: readonly WeatherFile[] }) {
  const answered = upload.answer?.file ?? null;
  const listed = items.find(({ id }) => id === answered?.id);
  const record = useQuery({
    ...recordQuery(upload.teamId, answered?.id ?? ''),
    enabled: answered !== null && listed === undefined,
  });
  return <UploadRow upload={upload} file={listed ?? record.data?.file ?? answered} />;
}

/** One file on its way, and what became of it. */
export function UploadRow({ upload, file }: { upload: Upload; file: WeatherFile | null }) {
  return (
    <li className="grid grid-cols-[minmax(0,16rem)_minmax(0,1fr)] items-center gap-x-4 gap-y-1 border-t border-line py-2 max-md:grid-cols-1">
      <p className="truncate">
        {file ? <Link to={paths.weatherFile.to(upload.teamId, file.id)}>{upload.name}</Link> : upload.name}{' '}
        <span className="text-fine text-soft">{fileSize(upload.bytes)}</span>
      </p>
      <div className="text-fine">
        {upload.state === 'waiting' ? <p className="text-soft">Waiting for its turn</p> : null}
        {upload.state === 'sending' ? (
          <div className="flex items-center gap-3">
            <Progress label={`Sending ${upload.name}`} share={upload.sentShare} />
            <span className="w-24 flex-none text-right">Sent {percent(upload.sentShare * 100, 0)}</span>
          </div>
        ) : null}
        {upload.state === 'failed' ? <FailedUpload upload={upload} /> : null}
        {file && upload.answer?.known ? (
          <p>
            Already here: these are the same bytes as{' '}
            <Link to={paths.weatherFile.to(upload.teamId, file.id)}>{file.name}</Link>. Nothing was stored twice.
          </p>
        ) : null}
        {file && !upload.answer?.known ? <ReadingSteps file={file} /> : null}
      </div>
    </li>
  );
}

function FailedUpload({ upload }: { upload: Upload }) {
  return (
    <p className="font-medium text-madder" role="alert">
      Not sent. {upload.problem}{' '}
      {pageUploads.isHeld(upload.id) ? (
        <Button look="quiet" className="text-fine" onClick={() => pageUploads.retry(upload.id)}>
          Send it again
        </Button>
      ) : null}
    </p>
  );
}

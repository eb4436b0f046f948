import { useQuery } from '@tanstack/react-query';
import { type ChangeEvent, useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { SiteImport } from '../../contract/site-imports.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { number, plural } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Progress } from '../../ui/progress.tsx';
import { ImportCheck } from './import-check.tsx';
import { ImportPreview } from './import-preview.tsx';
import { readTableFile, type TableFile } from './read-table-file.ts';
import { type ProgrammeKey, sitesQuery } from './site-queries.ts';
import { useImport } from './use-import.ts';

/** A table of sites from file to table: columns, preview, the server's check, and what waits for a person afterwards. */
export function ImportPage() {
  const { teamId } = useTeam();
  const { programmeId = '' } = useParams();
  const programme = { teamId, programmeId };
  const [table, setTable] = useState<TableFile | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const { state, send, finish, reset } = useImport(programme);
  const choose = async (file: File) => {
    reset();
    setTable(null);
    try {
      setTable(await readTableFile(file));
      setProblem(null);
    } catch (error) {
      setProblem(error instanceof RangeError ? error.message : 'The file could not be read.');
    }
  };
  const another = () => {
    reset();
    setTable(null);
  };
  return (
    <div className="mx-auto w-full max-w-[68rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Import sites</PageTitle>
      <Link to={paths.sites.to(programme)} className="mb-2 inline-block text-fine">
        All sites
      </Link>
      <h1 className="mb-4 text-title">Import a table of sites</h1>
      {state.kind === 'done' ? <Done programme={programme} done={state.done} onAnother={another} /> : null}
      {table === null && state.kind !== 'done' ? <FileChoice problem={problem} onFile={choose} /> : null}
      {table !== null && state.kind !== 'done' ? (
        // Kept while the server checks, so that the columns stand as they were chosen when one goes back.
        <div className={state.kind === 'idle' ? '' : 'hidden'}>
          <ImportPreview
            key={`${table.name} ${table.rows.length}`}
            table={table}
            onSend={(rows) => send(table.name, rows)}
            onOther={another}
          />
        </div>
      ) : null}
      {state.kind === 'sending' ? <Sending {...state} onStop={reset} /> : null}
      {state.kind === 'checked' || state.kind === 'finishing' ? (
        <ImportCheck check={state.check} isBusy={state.kind === 'finishing'} onFinish={finish} onBack={reset} />
      ) : null}
      {state.kind === 'failed' ? (
        <Notice
          tone="wrong"
          live
          title="Nothing was imported"
          actions={<Button onClick={reset}>Back to the columns</Button>}
        >
          <p>{errorSentence(state.error)}</p>
          {isApiError(state.error) ? (
            <ul>
              {state.error.problems.map(({ line, path, message }) => (
                <li key={`${line} ${path} ${message}`}>
                  {line === undefined ? '' : `Line ${number(line)}: `}
                  {message}
                </li>
              ))}
            </ul>
          ) : null}
        </Notice>
      ) : null}
    </div>
  );
}

function FileChoice({ problem, onFile }: { problem: string | null; onFile: (file: File) => void }) {
  const choose = ({ currentTarget }: ChangeEvent<HTMLInputElement>) => {
    const file = currentTarget.files?.[0];
    if (file) onFile(file);
    // The same file can be chosen again once it is mended.
    currentTarget.value = '';
  };
  return (
    <div className="grid max-w-[40rem] gap-4">
      <p>
        A CSV file from any spreadsheet: the first row names the columns, each other row is a site with its name and
        position. Elevation in metres, design load in kW and notes are taken along where they are there. Nothing becomes
        a site before you have seen what was read.
      </p>
      <label
        className={`${buttonLook('primary')} w-fit cursor-pointer focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-indigo`}
      >
        Choose a CSV file
        <input type="file" accept=".csv,.tsv,.txt,text/csv" className="sr-only" onChange={choose} />
      </label>
      {problem === null ? null : (
        <Notice tone="wrong" live title="This is no table of sites">
          {problem}
        </Notice>
      )}
    </div>
  );
}

function Sending({ sent, rows, onStop }: { sent: number; rows: number; onStop: () => void }) {
  const words =
    sent < rows ? `${number(sent)} of ${plural(rows, 'row')} sent` : 'All rows are sent; the server checks them';
  return (
    <div className="grid max-w-[30rem] gap-2">
      <p role="status">{words}.</p>
      <Progress label="Sending the table" share={sent < rows ? sent / rows : null} />
      <Button className="w-fit" onClick={onStop}>
        Stop
      </Button>
    </div>
  );
}

interface DoneProps {
  readonly programme: ProgrammeKey;
  readonly done: SiteImport;
  readonly onAnother: () => void;
}

function Done({ programme, done, onAnother }: DoneProps) {
  const waiting = useQuery(sitesQuery(programme, { filter: 'to settle', importId: done.id, limit: 1 })).data;
  const first = waiting?.items[0];
  return (
    <Notice
      live
      title={`${plural(done.sites, 'site')} imported from ${done.name}`}
      actions={
        <>
          {first ? (
            <Link to={paths.site.to({ ...programme, siteId: first.id }, true)} className={buttonLook('primary')}>
              Go through the flagged ones
            </Link>
          ) : null}
          <Link
            to={`${paths.sites.to(programme)}?${new URLSearchParams({ importId: done.id })}`}
            className={buttonLook(first ? 'plain' : 'primary')}
          >
            Show its sites
          </Link>
          <Button onClick={onAnother}>Import another table</Button>
        </>
      }
    >
      Each has the station that stands nearest in distance and height.{' '}
      {waiting === undefined
        ? ''
        : waiting.total === 0
          ? 'None is too far off.'
          : `${plural(waiting.total, 'site')} ${waiting.total === 1 ? 'is' : 'are'} flagged: the station is too far away, or too different in height.`}{' '}
      The import can be undone from the table of sites.
    </Notice>
  );
}

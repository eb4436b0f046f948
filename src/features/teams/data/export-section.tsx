import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { askExport, EXPORT_DAYS, getExport, listExports, type TeamExport } from '../../../contract/team-data.ts';
import { call, urlOf } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../../lib/api-query.ts';
import { fileSize, moment } from '../../../lib/format.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button, buttonLook } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { Progress } from '../../../ui/progress.tsx';

const LOOK_EVERY_MS = 1_500;

/** Asks for an archive of all that the team has, shows how far it is, and hands it out. */
export function ExportSection() {
  const { teamId } = useTeam();
  const client = useQueryClient();
  const exports = useQuery({
    ...apiQuery(listExports, { params: { teamId }, query: {} }),
    refetchInterval: ({ state }) => (state.data?.items.some(isMaking) ? LOOK_EVERY_MS : false),
  });
  const ask = useMutation({
    mutationFn: () => call(askExport, { params: { teamId }, query: {} }),
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listExports) }),
  });
  const items = exports.data?.items ?? [];
  const error = exports.error ?? ask.error;
  return (
    <section aria-labelledby="export" className="border-t border-line pt-5">
      <h2 id="export" className="text-name">
        Export
      </h2>
      <p className="mt-1 max-w-[70ch] text-soft">
        One zip archive: people, stations, weather files with their findings, sites, every version of every brief, the
        figures of every run, the trail of who did what; and the original files whose licence lets them be passed on.
        Tables open in any spreadsheet. It is kept for {EXPORT_DAYS} days.
      </p>
      <div className="mt-3 grid max-w-[46rem] gap-4">
        {error ? (
          <Notice tone="wrong" live>
            {errorSentence(error)}
          </Notice>
        ) : null}
        {exports.isPending ? <Loading what="the exports" /> : null}
        <div>
          <Button look="primary" busy={ask.isPending || items.some(isMaking)} onClick={() => ask.mutate()}>
            Make an export
          </Button>
        </div>
        {items.length > 0 ? (
          <ul aria-label="Exports" className="grid gap-3">
            {items.map((each) => (
              <ExportLine key={each.id} teamId={teamId} made={each} />
            ))}
          </ul>
        ) : null}
      </div>
    </section>
  );
}

function isMaking({ state }: TeamExport): boolean {
  return state === 'making';
}

function ExportLine({ teamId, made }: { teamId: string; made: TeamExport }) {
  const { id, askedAt, askedBy } = made;
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 border-t border-line pt-3">
      <span className="min-w-0">
        Of {moment(askedAt)}
        <span className="block text-fine text-soft">
          asked for by {askedBy}; {stateWords(made)}
        </span>
      </span>
      {made.state === 'ready' ? (
        <a
          href={urlOf(getExport, { params: { teamId, exportId: id }, query: {} })}
          download
          className={buttonLook('plain')}
          aria-label={`Download the export of ${moment(askedAt)}`}
        >
          Download
        </a>
      ) : null}
      {isMaking(made) ? (
        <div className="w-full">
          <Progress label={`The export of ${moment(askedAt)}`} share={made.share} />
          <p role="status" className="mt-1 text-fine text-soft">
            You can leave this page: a notice tells you when it is ready.
          </p>
        </div>
      ) : null}
    </li>
  );
}

function stateWords({ state, share, bytes, expiresAt }: TeamExport): string {
  if (state === 'making') return share === null ? 'about to begin' : `${Math.round(share * 100)} % made`;
  if (state === 'ready' && bytes !== null && expiresAt !== null)
    return `${fileSize(bytes)}, until ${moment(expiresAt)}`;
  return state === 'over' ? 'removed when its time was over' : 'could not be made: ask for another one';
}

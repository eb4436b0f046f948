import { useMutation, useQueryClient } from '@tanstack/react-query';
import { getMap } from '../../../contract/programme-map.ts';
import { versionQuery } from '../../../features/briefs/brief-queries.ts';
import { mayChangeBriefs } from '../../../features/briefs/brief-words.ts';
import { useSaveDraft } from '../../../features/briefs/use-save-draft.ts';
import { draftWords } from '../../../features/runs/live-parameters.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import type { LiveDraftState } from './use-live-draft.ts';

interface DraftNoteProps {
  readonly ids: ProgrammeIds;
  readonly live: LiveDraftState;
  /** Some places do not stand under the draft yet. */
  readonly isBehind: boolean;
  readonly error: unknown;
  /** The draft has become this version. */
  readonly onSaved: (version: number) => void;
}

/** That the map shows a draft, in what it differs, and what can be done with it. */
export function DraftNote({ ids, live, isBehind, error, onSaved }: DraftNoteProps) {
  const { role } = useTeam();
  const client = useQueryClient();
  const { record, draft, parameters, body, key } = live;
  const briefKey = { ...ids, briefId: record?.version.briefId ?? '' };
  const version = record?.version.version ?? 1;
  const save = useSaveDraft(briefKey, { basedOn: version, onSaved: () => undefined });
  const saveAll = useMutation({
    mutationFn: async () => {
      const { version: saved } = await save.mutateAsync({ ...body });
      // The sliders stay where they are until the version that they made is there to begin from.
      await client.ensureQueryData(versionQuery({ ...briefKey }, saved.version));
      await client.invalidateQueries({ queryKey: [getMap.path] });
      return saved.version;
    },
    onSuccess: onSaved,
  });
  if (key === null || record === undefined) return null;
  return (
    <section aria-label="Draft" className="border-y border-ink/50 py-1.5">
      <p className="text-fine">
        <span className="font-semibold">Draft</span>, differs from version {version} in: {draftWords(parameters, draft)}
        .
      </p>
      <div className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1">
        {mayChangeBriefs(role) ? (
          <Button
            look="primary"
            className="min-h-8!"
            busy={saveAll.isPending}
            disabled={body === null}
            onClick={() => saveAll.mutate()}
          >
            {`Save as version ${record.newest + 1}`}
          </Button>
        ) : null}
        <Button look="quiet" onClick={() => live.change({}, true)}>
          Back to version {version}
        </Button>
      </div>
      <p role="status" className="text-fine text-soft empty:hidden">
        {isBehind && error === null ? 'The map follows.' : ''}
      </p>
      {[error, saveAll.error].map((fault) =>
        fault === null ? null : (
          <p key={errorSentence(fault)} role="alert" className="text-fine text-madder">
            {errorSentence(fault)}
          </p>
        ),
      )}
    </section>
  );
}

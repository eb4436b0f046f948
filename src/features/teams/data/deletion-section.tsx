import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import {
  askDeletion,
  DELETION_DAYS,
  getDeletion,
  stopDeletion,
  type TeamDeletion,
} from '../../../contract/team-data.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../../lib/api-query.ts';
import { moment } from '../../../lib/format.ts';
import { issuesOf } from '../../../lib/issues-of.ts';
import { sessionQuery } from '../../../lib/session-query.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { FieldsForm } from '../../../ui/fields-form.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';

/** Gives up all that the team has, after a time in which any lead can stop it. */
export function DeletionSection() {
  const { teamId } = useTeam();
  const deletion = useQuery(apiQuery(getDeletion, { params: { teamId }, query: {} }));
  const [isAsking, setAsking] = useState(false);
  return (
    <section aria-labelledby="deletion" className="border-t border-line pt-5">
      <h2 id="deletion" className="text-name">
        Deletion of the team
      </h2>
      <p className="mt-1 max-w-[70ch] text-soft">
        {DELETION_DAYS} days after a lead has asked for it, the team is deleted with all its sites, briefs, weather and
        results. Until then nothing changes for anybody, every lead is told, and any lead can stop it: nothing is lost
        then. What stays for ever is the note in the trail that it happened. The accounts of its people stay theirs.
      </p>
      <div className="mt-3 grid max-w-[46rem] gap-4">
        {deletion.isPending ? <Loading what="what was decided" /> : null}
        {deletion.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(deletion.error)}
          </Notice>
        ) : null}
        {deletion.data?.waiting ? <Waiting deletion={deletion.data.waiting} /> : null}
        {deletion.data?.waiting === null ? (
          <div>
            <Button onClick={() => setAsking(true)}>Delete the team</Button>
          </div>
        ) : null}
      </div>
      {isAsking ? <AskDialog onClose={() => setAsking(false)} /> : null}
    </section>
  );
}

function useDeletionChanged(): () => Promise<void> {
  const client = useQueryClient();
  return async () => {
    await client.invalidateQueries({ queryKey: apiKey(getDeletion) });
    await client.invalidateQueries({ queryKey: sessionQuery.queryKey });
  };
}

function Waiting({ deletion: { askedBy, askedAt, endsAt } }: { deletion: TeamDeletion }) {
  const { teamId } = useTeam();
  const changed = useDeletionChanged();
  const stop = useMutation({
    mutationFn: () => call(stopDeletion, { params: { teamId }, query: {} }),
    onSettled: changed,
  });
  return (
    <Notice
      tone="attention"
      title={`The team will be deleted on ${moment(endsAt)}.`}
      actions={
        <Button look="primary" busy={stop.isPending} onClick={() => stop.mutate()}>
          Keep the team
        </Button>
      }
    >
      {askedBy} asked for it on {moment(askedAt)}. Make an export before if you may want any of it later.
      {stop.isError ? <p role="alert">{errorSentence(stop.error)}</p> : null}
    </Notice>
  );
}

function AskDialog({ onClose }: { onClose: () => void }) {
  const { teamId, teamName } = useTeam();
  const changed = useDeletionChanged();
  return (
    <Dialog isOpen onClose={onClose} title={`Delete ${teamName}`}>
      <div className="grid gap-4">
        <p>
          In {DELETION_DAYS} days all that the team has here is deleted, for everybody, and cannot be brought back. Any
          lead can stop it until then.
        </p>
        <FieldsForm
          fields={[
            { name: 'name', label: 'Name of the team', hint: `Type ${teamName}.` },
            { name: 'password', label: 'Your password', type: 'password', autoComplete: 'current-password' },
          ]}
          check={(body) => issuesOf(askDeletion.body.schema, body)}
          send={(body) => call(askDeletion, { params: { teamId }, query: {}, body })}
          onDone={async () => {
            await changed();
            onClose();
          }}
          act={`Delete in ${DELETION_DAYS} days`}
        />
        <div>
          <Button look="quiet" onClick={onClose}>
            Keep the team
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

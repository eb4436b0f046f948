import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { listProgrammes, makeProgramme, type Programme, renameProgramme } from '../../../contract/programmes.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../../lib/api-query.ts';
import { plural } from '../../../lib/format.ts';
import { issuesOf } from '../../../lib/issues-of.ts';
import { paths } from '../../../lib/paths.ts';
import { sessionQuery } from '../../../lib/session-query.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { FieldsForm } from '../../../ui/fields-form.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { TeamHeader } from '../team-header.tsx';
import { OpenToDialog } from './open-to-dialog.tsx';

/** The team's bodies of work: each with its own briefs, sites and sheets, and those to whom it is open. */
export function ProgrammesPage() {
  const client = useQueryClient();
  const { teamId, role } = useTeam();
  const programmes = useQuery(apiQuery(listProgrammes, { params: { teamId }, query: {} }));
  const [renaming, setRenaming] = useState<Programme | null>(null);
  const [opening, setOpening] = useState<Programme | null>(null);
  const refresh = () => {
    client.invalidateQueries({ queryKey: apiKey(listProgrammes) });
    client.invalidateQueries({ queryKey: sessionQuery.queryKey });
  };
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-8 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="Programmes">
        A programme is a body of work with its own briefs, sites and sheets. It is open to everyone in the team, or to
        some and the leads.
      </TeamHeader>
      {programmes.isPending ? <Loading what="the programmes" /> : null}
      {programmes.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(programmes.error)}
        </Notice>
      ) : null}
      <ul aria-label="Programmes" className="grid max-w-[46rem] gap-3">
        {(programmes.data?.items ?? []).map((programme) => (
          <li key={programme.id} className="flex flex-wrap items-baseline justify-between gap-x-4">
            <span>
              <Link to={paths.map.to({ teamId, programmeId: programme.id })}>{programme.name}</Link>
              <span className="text-soft">, {openWords(programme)}</span>
            </span>
            <span className="flex gap-3">
              {role !== 'viewer' ? (
                <Button look="quiet" aria-label={`Rename ${programme.name}`} onClick={() => setRenaming(programme)}>
                  Rename
                </Button>
              ) : null}
              {role === 'lead' ? (
                <Button
                  look="quiet"
                  aria-label={`Who may open ${programme.name}`}
                  onClick={() => setOpening(programme)}
                >
                  Who may open it
                </Button>
              ) : null}
            </span>
          </li>
        ))}
      </ul>
      {role === 'viewer' ? null : <NewProgramme teamId={teamId} onDone={refresh} />}
      {renaming ? (
        <RenameDialog teamId={teamId} programme={renaming} onClose={() => setRenaming(null)} onDone={refresh} />
      ) : null}
      {opening ? (
        <OpenToDialog teamId={teamId} programme={opening} onClose={() => setOpening(null)} onDone={refresh} />
      ) : null}
    </div>
  );
}

function openWords({ restricted, memberIds }: Programme): string {
  return restricted
    ? `open to ${plural(memberIds.length, 'person', 'people')} and the leads`
    : 'open to the whole team';
}

function NewProgramme({ teamId, onDone }: { teamId: string; onDone: () => void }) {
  return (
    <section aria-labelledby="new-programme" className="max-w-[34rem]">
      <h2 id="new-programme" className="mb-2 text-name">
        New programme
      </h2>
      <FieldsForm
        fields={[{ name: 'name', label: 'Name', hint: 'It begins with the office brief.' }]}
        check={(body) => issuesOf(makeProgramme.body.schema, body)}
        send={(body) => call(makeProgramme, { params: { teamId }, query: {}, body })}
        onDone={onDone}
        act="Make the programme"
        done="Made."
      />
    </section>
  );
}

interface RenameDialogProps {
  readonly teamId: string;
  readonly programme: Programme;
  readonly onClose: () => void;
  readonly onDone: () => void;
}

function RenameDialog({ teamId, programme, onClose, onDone }: RenameDialogProps) {
  return (
    <Dialog isOpen onClose={onClose} title={`Rename ${programme.name}`}>
      <FieldsForm
        fields={[{ name: 'name', label: 'Name', initial: programme.name }]}
        check={(body) => issuesOf(renameProgramme.body.schema, body)}
        send={(body) => call(renameProgramme, { params: { teamId, programmeId: programme.id }, query: {}, body })}
        onDone={() => {
          onDone();
          onClose();
        }}
        act="Save the name"
      />
    </Dialog>
  );
}

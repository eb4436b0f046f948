import { useMutation, useQuery } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { listMembers } from '../../../contract/members.ts';
import { type Programme, setProgrammeMembers } from '../../../contract/programmes.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiQuery } from '../../../lib/api-query.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Notice } from '../../../ui/notice.tsx';

interface OpenToDialogProps {
  readonly teamId: string;
  readonly programme: Programme;
  readonly onClose: () => void;
  readonly onDone: () => void;
}

/** Opens a programme to the whole team or to some of it. */
export function OpenToDialog({ teamId, programme, onClose, onDone }: OpenToDialogProps) {
  const members = useQuery(apiQuery(listMembers, { params: { teamId }, query: {} }));
  const [restricted, setRestricted] = useState(programme.restricted);
  const [memberIds, setMemberIds] = useState<readonly string[]>(programme.memberIds);
  const save = useMutation({
    mutationFn: () =>
      call(setProgrammeMembers, {
        params: { teamId, programmeId: programme.id },
        query: {},
        body: { restricted, memberIds: [...memberIds] },
      }),
    onSuccess: () => {
      onDone();
      onClose();
    },
  });
  const error = members.error ?? save.error;
  const others = (members.data?.items ?? []).filter(({ role }) => role !== 'lead');
  return (
    <Dialog isOpen onClose={onClose} title={`Who may open ${programme.name}`}>
      <div className="grid gap-4">
        {error ? (
          <Notice tone="wrong" live>
            {errorSentence(error)}
          </Notice>
        ) : null}
        <fieldset>
          <legend className="sr-only">Open to</legend>
          <Choice type="radio" isChosen={!restricted} onChoose={() => setRestricted(false)}>
            Everyone in the team
          </Choice>
          <Choice type="radio" isChosen={restricted} onChoose={() => setRestricted(true)}>
            The leads, and these people
          </Choice>
        </fieldset>
        {restricted ? (
          <fieldset className="max-h-64 overflow-y-auto pl-6">
            <legend className="sr-only">These people</legend>
            {others.length === 0 ? <p className="text-soft">There is nobody else in the team yet.</p> : null}
            {others.map(({ personId, name, role }) => (
              <Choice
                key={personId}
                type="checkbox"
                isChosen={memberIds.includes(personId)}
                onChoose={(isChosen) =>
                  setMemberIds(isChosen ? [...memberIds, personId] : memberIds.filter((id) => id !== personId))
                }
              >
                {name}, {role}
              </Choice>
            ))}
          </fieldset>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave it</Button>
          <Button look="primary" busy={save.isPending} onClick={() => save.mutate()}>
            Save
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

interface ChoiceProps {
  readonly type: 'radio' | 'checkbox';
  readonly isChosen: boolean;
  readonly onChoose: (isChosen: boolean) => void;
  readonly children: ReactNode;
}

function Choice({ type, isChosen, onChoose, children }: ChoiceProps) {
  return (
    <label className="flex items-baseline gap-2 py-0.5">
      <input
        type={type}
        checked={isChosen}
        onChange={({ currentTarget }) => onChoose(currentTarget.checked)}
        className="size-4 flex-none translate-y-0.5 accent-indigo"
      />
      <span>{children}</span>
    </label>
  );
}

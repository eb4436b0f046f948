import { useMutation, useQueryClient } from '@tanstack/react-query';
import { changeMember, endMemberSessions, listMembers, type Member, removeMember } from '../../../contract/members.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey } from '../../../lib/api-query.ts';
import { issuesOf } from '../../../lib/issues-of.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { FieldsForm } from '../../../ui/fields-form.tsx';
import { Notice } from '../../../ui/notice.tsx';

export interface MemberQuestion {
  readonly act: 'last day' | 'sessions' | 'remove';
  readonly member: Member;
}

interface MemberDialogProps {
  readonly teamId: string;
  readonly question: MemberQuestion;
  readonly onClose: () => void;
}

/** Asks once more before a person is signed out or taken out, and for the last day of somebody from outside. */
export function MemberDialog({ teamId, question: { act, member }, onClose }: MemberDialogProps) {
  if (act === 'last day') return <LastDayDialog teamId={teamId} member={member} onClose={onClose} />;
  return <AskDialog teamId={teamId} act={act} member={member} onClose={onClose} />;
}

type DialogProps = Pick<MemberDialogProps, 'teamId' | 'onClose'> & { readonly member: Member };

function LastDayDialog({ teamId, member, onClose }: DialogProps) {
  const client = useQueryClient();
  const bodyOf = ({ lastDay }: Readonly<Record<'lastDay', string>>) => ({ lastDay: lastDay === '' ? null : lastDay });
  return (
    <Dialog isOpen onClose={onClose} title={`Last day of ${member.name}`}>
      <FieldsForm
        fields={[
          {
            name: 'lastDay',
            label: 'Last day',
            type: 'date',
            initial: member.lastDay ?? '',
            hint: 'For somebody from outside: in until this day ends, in UTC. Leave it empty for a member of the house.',
          },
        ]}
        check={(values) => issuesOf(changeMember.body.schema, bodyOf(values))}
        send={(values) =>
          call(changeMember, { params: { teamId, personId: member.personId }, query: {}, body: bodyOf(values) })
        }
        onDone={() => {
          client.invalidateQueries({ queryKey: apiKey(listMembers) });
          onClose();
        }}
        act="Save"
      />
    </Dialog>
  );
}

const questions = {
  sessions: {
    title: 'Sign out',
    words: 'Every session of this person ends at once, on every device. The person can sign in again.',
    keep: 'Leave it',
    act: 'End the sessions',
  },
  remove: {
    title: 'Remove',
    words: 'The person sees nothing of the team from then on. What the person did stays, under the person’s name.',
    keep: 'Keep the person',
    act: 'Remove from the team',
  },
} as const;

function AskDialog({ teamId, act, member, onClose }: DialogProps & { readonly act: keyof typeof questions }) {
  const client = useQueryClient();
  const { title, words, keep, act: actWords } = questions[act];
  const send = useMutation({
    mutationFn: () =>
      call(act === 'sessions' ? endMemberSessions : removeMember, {
        params: { teamId, personId: member.personId },
        query: {},
      }),
    onSuccess: onClose,
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listMembers) }),
  });
  return (
    <Dialog isOpen onClose={onClose} title={`${title} ${member.name}`}>
      <div className="grid gap-4">
        <p>{words}</p>
        {send.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(send.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>{keep}</Button>
          <Button look="primary" busy={send.isPending} onClick={() => send.mutate()}>
            {actWords}
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Role } from '../../../contract/accounts.ts';
import { changeMember, listMembers, type Member } from '../../../contract/members.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey } from '../../../lib/api-query.ts';
import { moment } from '../../../lib/format.ts';
import { sessionQuery } from '../../../lib/session-query.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { ChoiceField } from '../../../ui/choice-field.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';
import { MemberDialog, type MemberQuestion } from './member-dialog.tsx';

export function MemberTable({ items }: { items: readonly Member[] }) {
  const client = useQueryClient();
  const { teamId, role } = useTeam();
  const isLead = role === 'lead';
  const [asked, setAsked] = useState<MemberQuestion | null>(null);
  const change = useMutation({
    mutationFn: ({ personId, to }: { personId: string; to: Role }) =>
      call(changeMember, { params: { teamId, personId }, query: {}, body: { role: to } }),
    onSettled: () => {
      client.invalidateQueries({ queryKey: apiKey(listMembers) });
      client.invalidateQueries({ queryKey: sessionQuery.queryKey });
    },
  });
  return (
    <>
      {change.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(change.error)}
        </Notice>
      ) : null}
      <ScrollInside label="People, scrolls sideways">
        <table className={`ruled ${isLead ? 'min-w-[52rem]' : 'min-w-[30rem]'}`}>
          <caption className="sr-only">People of the team, by name</caption>
          <thead>
            <tr>
              <th scope="col">Name</th>
              {isLead ? <th scope="col">E-mail</th> : null}
              <th scope="col">Role</th>
              <th scope="col">Since</th>
              <th scope="col">Until</th>
              {isLead ? (
                <th scope="col">
                  <span className="sr-only">What can be done</span>
                </th>
              ) : null}
            </tr>
          </thead>
          <tbody>
            {items.map((member) => (
              <tr key={member.personId} className={member.ended ? 'text-soft' : ''}>
                <th scope="row">{member.name}</th>
                {isLead ? <td className="break-all">{member.email}</td> : null}
                <td>
                  {isLead && !member.ended ? (
                    <ChoiceField
                      label={`Role of ${member.name}`}
                      isLabelHidden
                      value={member.role}
                      isDisabled={change.isPending}
                      onChange={(value) => change.mutate({ personId: member.personId, to: Role.parse(value) })}
                    >
                      <RoleOptions />
                    </ChoiceField>
                  ) : (
                    member.role
                  )}
                </td>
                <td className="whitespace-nowrap">{moment(member.since)}</td>
                <td className="whitespace-nowrap">{untilWords(member)}</td>
                {isLead ? <Acts member={member} onAsk={setAsked} /> : null}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      {asked ? <MemberDialog teamId={teamId} question={asked} onClose={() => setAsked(null)} /> : null}
    </>
  );
}

export function RoleOptions() {
  return Role.options.map((each) => (
    <option key={each} value={each}>
      {each}
    </option>
  ));
}

function untilWords({ lastDay, ended }: Member): string {
  if (lastDay === null) return '';
  return ended ? `${lastDay}, over` : lastDay;
}

function Acts({ member, onAsk }: { member: Member; onAsk: (question: MemberQuestion) => void }) {
  const acts = [
    { act: 'last day', words: 'Last day' },
    { act: 'sessions', words: 'Sign out' },
    { act: 'remove', words: 'Remove' },
  ] as const;
  return (
    <td>
      <div className="flex justify-end gap-3">
        {acts.map(({ act, words }) => (
          <Button key={act} look="quiet" aria-label={`${words}: ${member.name}`} onClick={() => onAsk({ act, member })}>
            {words}
          </Button>
        ))}
      </div>
    </td>
  );
}

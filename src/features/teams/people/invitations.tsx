import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Role } from '../../../contract/accounts.ts';
import {
  type Invitation,
  invite,
  listInvitations,
  resendInvitation,
  revokeInvitation,
} from '../../../contract/invitations.ts';
import { listMails } from '../../../contract/mails.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../../lib/api-query.ts';
import { moment } from '../../../lib/format.ts';
import { issuesOf } from '../../../lib/issues-of.ts';
import { Button } from '../../../ui/button.tsx';
import { ChoiceField } from '../../../ui/choice-field.tsx';
import { FieldsForm } from '../../../ui/fields-form.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';
import { RoleOptions } from './member-table.tsx';

/** Brings people in: a mail with a link each, which can be sent again or taken back until it is accepted. */
export function Invitations({ teamId }: { teamId: string }) {
  const client = useQueryClient();
  const [role, setRole] = useState<Role>('planner');
  const invitations = useQuery(apiQuery(listInvitations, { params: { teamId }, query: {} }));
  const refresh = () => {
    client.invalidateQueries({ queryKey: apiKey(listInvitations) });
    client.invalidateQueries({ queryKey: apiKey(listMails) });
  };
  const bodyOf = ({ email, lastDay }: Readonly<Record<'email' | 'lastDay', string>>) => ({
    email,
    role,
    lastDay: lastDay === '' ? null : lastDay,
  });
  const items = invitations.data?.items ?? [];
  return (
    <section aria-labelledby="invitations">
      <h2 id="invitations" className="mb-2 text-name">
        Invitations
      </h2>
      <div className="mb-5 max-w-[34rem]">
        <FieldsForm
          fields={[
            { name: 'email', label: 'E-mail', type: 'email' },
            { name: 'lastDay', label: 'Last day, for somebody from outside', type: 'date' },
          ]}
          check={(values) => issuesOf(invite.body.schema, bodyOf(values))}
          send={(values) => call(invite, { params: { teamId }, query: {}, body: bodyOf(values) })}
          onDone={refresh}
          act="Invite"
          done="Invited."
        >
          <ChoiceField label="Role" value={role} onChange={(value) => setRole(Role.parse(value))}>
            <RoleOptions />
          </ChoiceField>
        </FieldsForm>
      </div>
      {invitations.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(invitations.error)}
        </Notice>
      ) : null}
      {items.length > 0 ? <InvitationTable teamId={teamId} items={items} onChange={refresh} /> : null}
    </section>
  );
}

interface InvitationTableProps {
  readonly teamId: string;
  readonly items: readonly Invitation[];
  readonly onChange: () => void;
}

function InvitationTable({ teamId, items, onChange }: InvitationTableProps) {
  const change = useMutation({
    mutationFn: ({ id, to }: { id: string; to: 'again' | 'back' }) =>
      call(to === 'again' ? resendInvitation : revokeInvitation, { params: { teamId, invitationId: id }, query: {} }),
    onSettled: onChange,
  });
  return (
    <>
      {change.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(change.error)}
        </Notice>
      ) : null}
      <ScrollInside label="Invitations, scrolls sideways">
        <table className="ruled min-w-[46rem]">
          <caption className="sr-only">Invitations, newest first</caption>
          <thead>
            <tr>
              <th scope="col">E-mail</th>
              <th scope="col">Role</th>
              <th scope="col">Sent</th>
              <th scope="col">Holds until</th>
              <th scope="col">State</th>
              <th scope="col">
                <span className="sr-only">What can be done</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {items.map(({ id, email, role, lastDay, madeAt, invitedBy, expiresAt, state }) => (
              <tr key={id} className={state === 'open' ? '' : 'text-soft'}>
                <th scope="row" className="break-all">
                  {email}
                </th>
                <td>{lastDay ? `${role}, until ${lastDay}` : role}</td>
                <td>
                  <span className="whitespace-nowrap">{moment(madeAt)}</span> by {invitedBy}
                </td>
                <td className="whitespace-nowrap">{moment(expiresAt)}</td>
                <td>{state}</td>
                <td>
                  {state === 'open' || state === 'expired' ? (
                    <div className="flex justify-end gap-3">
                      <Button
                        look="quiet"
                        aria-label={`Send again to ${email}`}
                        disabled={change.isPending}
                        onClick={() => change.mutate({ id, to: 'again' })}
                      >
                        Send again
                      </Button>
                      <Button
                        look="quiet"
                        aria-label={`Take back from ${email}`}
                        disabled={change.isPending}
                        onClick={() => change.mutate({ id, to: 'back' })}
                      >
                        Take back
                      </Button>
                    </div>
                  ) : null}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </>
  );
}

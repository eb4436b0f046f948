import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import type { Membership } from '../../contract/accounts.ts';
import { acceptOwnInvitation, listOwnInvitations } from '../../contract/invitations.ts';
import { leaveTeam, makeTeam } from '../../contract/members.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { Notice } from '../../ui/notice.tsx';
import { AccountSection } from './account-section.tsx';

/** The person's teams, invitations into others, and the way to a team of one's own. */
export function TeamsSection() {
  const client = useQueryClient();
  const navigate = useNavigate();
  const memberships = useQuery(sessionQuery).data?.memberships ?? [];
  const [leaving, setLeaving] = useState<Membership | null>(null);
  return (
    <AccountSection title="Teams">
      <Invitations />
      {memberships.length === 0 ? <p>You are in no team yet.</p> : null}
      <ul aria-label="Teams" className="grid gap-2">
        {memberships.map((team) => (
          <li key={team.teamId} className="flex flex-wrap items-baseline justify-between gap-x-4">
            <span>
              <Link to={`/teams/${team.teamId}`}>{team.teamName}</Link>
              <span className="text-soft">, {team.role}</span>
            </span>
            <Button look="quiet" aria-label={`Leave ${team.teamName}`} onClick={() => setLeaving(team)}>
              Leave
            </Button>
          </li>
        ))}
      </ul>
      {leaving ? <LeaveDialog team={leaving} onClose={() => setLeaving(null)} /> : null}
      <FieldsForm
        fields={[{ name: 'name', label: 'Make a team of your own', hint: 'You will be its lead.' }]}
        check={(body) => issuesOf(makeTeam.body.schema, body)}
        send={(body) => call(makeTeam, { params: {}, query: {}, body })}
        onDone={async ({ teamId }) => {
          await client.invalidateQueries({ queryKey: sessionQuery.queryKey });
          navigate(paths.people.to(teamId));
        }}
        act="Make the team"
      />
    </AccountSection>
  );
}

function Invitations() {
  const client = useQueryClient();
  const invitations = useQuery(apiQuery(listOwnInvitations, { params: {}, query: {} }));
  const accept = useMutation({
    mutationFn: (invitationId: string) => call(acceptOwnInvitation, { params: { invitationId }, query: {} }),
    onSuccess: (session) => client.setQueryData(sessionQuery.queryKey, session),
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listOwnInvitations) }),
  });
  const items = invitations.data?.items ?? [];
  return (
    <>
      {accept.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(accept.error)}
        </Notice>
      ) : null}
      {items.map(({ id, teamName, role }) => (
        <Notice
          key={id}
          actions={
            <Button look="primary" busy={accept.isPending} onClick={() => accept.mutate(id)}>
              Accept
            </Button>
          }
        >
          You are invited into the team {teamName}. Your role: {role}.
        </Notice>
      ))}
    </>
  );
}

function LeaveDialog({ team, onClose }: { team: Membership; onClose: () => void }) {
  const client = useQueryClient();
  const leave = useMutation({
    mutationFn: () => call(leaveTeam, { params: { teamId: team.teamId }, query: {} }),
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: sessionQuery.queryKey });
      onClose();
    },
  });
  return (
    <Dialog isOpen onClose={onClose} title={`Leave ${team.teamName}`}>
      <div className="grid gap-4">
        <p>You see nothing of the team from then on. What you did there stays, under your name.</p>
        {leave.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(leave.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Stay</Button>
          <Button look="primary" busy={leave.isPending} onClick={() => leave.mutate()}>
            Leave the team
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

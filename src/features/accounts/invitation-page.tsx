import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { acceptAsNewPerson, openInvitation } from '../../contract/invitations.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { EntryPage } from './entry-page.tsx';

const invitationQuery = (key: string) =>
  queryOptions({
    queryKey: [openInvitation.path, key],
    queryFn: ({ signal }) => call(openInvitation, { params: {}, query: {}, body: { key } }, { signal }),
  });

/** Where the link of an invitation leads: makes the account that it was sent to. */
export function InvitationPage() {
  const { key = '' } = useParams();
  const invitation = useQuery(invitationQuery(key));
  const found = invitation.data;
  return (
    <EntryPage
      title="Invitation"
      intro={found ? `Into the team ${found.teamName}, as ${found.role}.` : 'Into a team on this server.'}
    >
      <PageTitle>Invitation</PageTitle>
      {invitation.isPending ? <Loading what="the invitation" /> : null}
      {invitation.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(invitation.error)}
        </Notice>
      ) : null}
      {found?.hasAccount ? (
        <p>
          {found.email} has an account. <Link to={paths.signIn.to(paths.account)}>Sign in</Link>, and accept the
          invitation on your account page.
        </p>
      ) : null}
      {found && !found.hasAccount ? <NewPersonForm invitationKey={key} email={found.email} /> : null}
    </EntryPage>
  );
}

function NewPersonForm({ invitationKey: key, email }: { invitationKey: string; email: string }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  return (
    <>
      <p className="mb-4">
        Your account will be <b className="break-all">{email}</b>.
      </p>
      <FieldsForm
        fields={[
          { name: 'name', label: 'Your name', autoComplete: 'name' },
          {
            name: 'password',
            label: 'Password',
            type: 'password',
            autoComplete: 'new-password',
            hint: '12 characters or more, and none that many people use.',
          },
        ]}
        check={(values) => issuesOf(acceptAsNewPerson.body.schema, { key, ...values })}
        send={(values) => call(acceptAsNewPerson, { params: {}, query: {}, body: { key, ...values } })}
        onDone={(session) => {
          client.setQueryData(sessionQuery.queryKey, session);
          navigate(paths.home, { replace: true });
        }}
        act="Accept"
      />
    </>
  );
}

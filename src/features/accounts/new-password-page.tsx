import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { askReset, resetPassword } from '../../contract/account-links.ts';
import { call } from '../../lib/api-client.ts';
import { isApiError } from '../../lib/api-error.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { EntryPage } from './entry-page.tsx';

/** Asks for a link with which a new password is set. Says the same whether there is such an account or not. */
export function ForgottenPage() {
  const [asked, setAsked] = useState(false);
  return (
    <EntryPage title="New password" intro="A link to set a new password goes to your address. It works for an hour.">
      <PageTitle>New password</PageTitle>
      {asked ? (
        <p role="status" className="mb-4">
          If there is an account with this address, a mail is on its way. Where this server sends no mail, whoever runs
          it has the link.
        </p>
      ) : (
        <FieldsForm
          fields={[{ name: 'email', label: 'E-mail', type: 'email', autoComplete: 'username' }]}
          check={(body) => issuesOf(askReset.body.schema, body)}
          send={(body) => call(askReset, { params: {}, query: {}, body })}
          onDone={() => setAsked(true)}
          act="Send the link"
        />
      )}
      <p className="mt-4 text-fine">
        <Link to={paths.signIn.to()}>Back to signing in</Link>
      </p>
    </EntryPage>
  );
}

/** Where the link of the mail leads. */
export function NewPasswordPage() {
  const { key = '' } = useParams();
  const [isSet, setIsSet] = useState(false);
  return (
    <EntryPage title="New password" intro="Every session of your account ends with it.">
      <PageTitle>New password</PageTitle>
      {isSet ? (
        <p role="status">
          Your new password holds. <Link to={paths.signIn.to()}>Sign in</Link> with it.
        </p>
      ) : (
        <FieldsForm
          fields={[
            {
              name: 'password',
              label: 'New password',
              type: 'password',
              autoComplete: 'new-password',
              hint: '12 characters or more, and none that many people use.',
            },
          ]}
          check={(values) => issuesOf(resetPassword.body.schema, { key, ...values })}
          send={(values) => call(resetPassword, { params: {}, query: {}, body: { key, ...values } })}
          onDone={() => setIsSet(true)}
          act="Set the password"
          explain={(error) =>
            isApiError(error, 'link_not_valid') ? (
              <>
                {error.message} <Link to={paths.forgotten}>Ask for another link</Link>.
              </>
            ) : null
          }
        />
      )}
    </EntryPage>
  );
}

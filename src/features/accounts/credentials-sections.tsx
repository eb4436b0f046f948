import { useQueryClient } from '@tanstack/react-query';
import { askEmailChange, changePassword, listSessions } from '../../contract/own-account.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey } from '../../lib/api-query.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { AccountSection } from './account-section.tsx';

export function EmailSection({ email }: { email: string }) {
  return (
    <AccountSection
      title="E-mail"
      intro={`You sign in as ${email}. Another address holds once the link that goes to it has been followed.`}
    >
      <FieldsForm
        fields={[
          { name: 'email', label: 'New e-mail', type: 'email', autoComplete: 'email' },
          { name: 'password', label: 'Your password', type: 'password', autoComplete: 'current-password' },
        ]}
        check={(body) => issuesOf(askEmailChange.body.schema, body)}
        send={(body) => call(askEmailChange, { params: {}, query: {}, body })}
        act="Send the link"
        done="A link is on its way to the new address."
      />
    </AccountSection>
  );
}

export function PasswordSection() {
  const client = useQueryClient();
  return (
    <AccountSection title="Password" intro="With a new one every other session of your account ends.">
      <FieldsForm
        fields={[
          { name: 'password', label: 'Old password', type: 'password', autoComplete: 'current-password' },
          {
            name: 'newPassword',
            label: 'New password',
            type: 'password',
            autoComplete: 'new-password',
            hint: '12 characters or more, and none that many people use.',
          },
        ]}
        check={(body) => issuesOf(changePassword.body.schema, body)}
        send={(body) => call(changePassword, { params: {}, query: {}, body })}
        onDone={() => client.invalidateQueries({ queryKey: apiKey(listSessions) })}
        act="Change the password"
        done="Changed. Other sessions have ended."
      />
    </AccountSection>
  );
}

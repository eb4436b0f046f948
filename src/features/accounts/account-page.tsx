import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { type Account, getAccount, renamePerson } from '../../contract/own-account.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { Button } from '../../ui/button.tsx';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Wordmark } from '../../ui/wordmark.tsx';
import { AccountSection } from './account-section.tsx';
import { EmailSection, PasswordSection } from './credentials-sections.tsx';
import { NoticeKindsSection, NoticesSection } from './notices-sections.tsx';
import { SessionsSection } from './sessions-section.tsx';
import { TeamsSection } from './teams-section.tsx';
import { TwoFactorSection } from './two-factor-section.tsx';

/** A person's own account, over all teams: what concerns the person, and what keeps the account theirs. */
export function AccountPage() {
  const account = useQuery(apiQuery(getAccount, { params: {}, query: {} }));
  return (
    <>
      <header className="flex h-13 items-center gap-6 border-b border-line px-5 max-sm:px-4">
        <Link to={paths.home} className="flex items-center no-underline" aria-label="Muslin, go to the map">
          <Wordmark />
        </Link>
        <Link to={paths.home}>Back to the map</Link>
      </header>
      <main className="mx-auto grid w-full max-w-[56rem] grid-cols-[minmax(0,1fr)] gap-7 px-5 pt-6 pb-16 max-sm:px-4">
        <PageTitle>Account</PageTitle>
        <h1 className="text-title">Account</h1>
        {account.isPending ? <Loading what="your account" /> : null}
        {account.isError ? (
          <Notice tone="wrong" live actions={<Button onClick={() => account.refetch()}>Try again</Button>}>
            {errorSentence(account.error)}
          </Notice>
        ) : null}
        {account.data ? <Sections account={account.data} /> : null}
      </main>
    </>
  );
}

function Sections({ account }: { account: Account }) {
  return (
    <>
      <NoticesSection />
      <TeamsSection />
      <NameSection name={account.name} />
      <EmailSection email={account.email} />
      <PasswordSection />
      <TwoFactorSection twoFactor={account.twoFactor} />
      <SessionsSection />
      <NoticeKindsSection off={account.noticesOff} />
    </>
  );
}

function NameSection({ name }: { name: string }) {
  const client = useQueryClient();
  return (
    <AccountSection title="Name" intro="Under this name others see what you do.">
      <FieldsForm
        fields={[{ name: 'name', label: 'Your name', autoComplete: 'name', initial: name }]}
        check={(body) => issuesOf(renamePerson.body.schema, body)}
        send={(body) => call(renamePerson, { params: {}, query: {}, body })}
        onDone={(account) => {
          client.setQueryData(apiKey(getAccount, { params: {}, query: {} }), account);
          client.invalidateQueries({ queryKey: sessionQuery.queryKey });
        }}
        act="Save the name"
        done="Saved."
      />
    </AccountSection>
  );
}

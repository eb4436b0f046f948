import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { confirmEmail } from '../../contract/account-links.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { EntryPage } from './entry-page.tsx';

/** Where the link that was sent to a new address leads; a press confirms it, so that a reader of mails that follows links does not. */
export function NewAddressPage() {
  const { key = '' } = useParams();
  const client = useQueryClient();
  const confirm = useMutation({
    mutationFn: () => call(confirmEmail, { params: {}, query: {}, body: { key } }),
    onSuccess: () => client.invalidateQueries({ queryKey: sessionQuery.queryKey }),
  });
  return (
    <EntryPage title="New e-mail address" intro="From then on you sign in with this address, and mails go there.">
      <PageTitle>New e-mail address</PageTitle>
      {confirm.isSuccess ? (
        <p role="status">
          Your new address holds. <Link to={paths.home}>Go on</Link>.
        </p>
      ) : (
        <div className="grid gap-4">
          {confirm.isError ? (
            <Notice tone="wrong" live>
              {errorSentence(confirm.error)}
            </Notice>
          ) : null}
          <Button look="primary" busy={confirm.isPending} onClick={() => confirm.mutate()}>
            Use this address
          </Button>
        </div>
      )}
    </EntryPage>
  );
}

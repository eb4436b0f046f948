import { useQuery } from '@tanstack/react-query';
import { listMails } from '../../../contract/mails.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiQuery } from '../../../lib/api-query.ts';
import { moment } from '../../../lib/format.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { CopyButton } from '../../../ui/copy-button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { TeamHeader } from '../team-header.tsx';

/** Mails of the team that have not gone out, for its leads to hand over themselves. */
export function MailsPage() {
  const { role } = useTeam();
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-6 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="Mails">
        What waits to be sent. Mails that open somebody’s account never show here; whoever runs this server prints them
        with “muslin outbox”.
      </TeamHeader>
      {role === 'lead' ? <Waiting /> : <p>The leads of the team see its mails.</p>}
    </div>
  );
}

function Waiting() {
  const { teamId } = useTeam();
  const mails = useQuery(apiQuery(listMails, { params: { teamId }, query: {} }));
  if (mails.isPending) return <Loading what="the mails" />;
  if (mails.isError) {
    return (
      <Notice tone="wrong" live>
        {errorSentence(mails.error)}
      </Notice>
    );
  }
  const { items, sends } = mails.data;
  return (
    <>
      {sends ? null : (
        <Notice tone="attention">
          This server sends no mail. Hand over what stands here yourself, above all the links of invitations.
        </Notice>
      )}
      {items.length === 0 ? <p>No mail waits.</p> : null}
      <ul aria-label="Mails" className="grid grid-cols-[minmax(0,1fr)] gap-5">
        {items.map(({ id, recipient, subject, text, madeAt }) => (
          <li key={id} className="max-w-[46rem] border-t border-line pt-3">
            <h2 className="font-semibold">{subject}</h2>
            <p className="text-fine text-soft">
              To {recipient}, {moment(madeAt)}
            </p>
            <p className="my-2 whitespace-pre-wrap [overflow-wrap:anywhere]">{text}</p>
            <CopyButton text={text} what={`the mail to ${recipient}`} />
          </li>
        ))}
      </ul>
    </>
  );
}

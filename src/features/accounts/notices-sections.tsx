import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listNotices, type NoticeKind, noticeKinds, readNotices } from '../../contract/notices.ts';
import { getAccount, setNoticesOff } from '../../contract/own-account.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { moment } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { AccountSection } from './account-section.tsx';

/** What the person was told of, newest first; new ones say so in a word. */
export function NoticesSection() {
  const client = useQueryClient();
  const notices = useQuery(apiQuery(listNotices, { params: {}, query: {} }));
  const read = useMutation({
    mutationFn: () => call(readNotices, { params: {}, query: {} }),
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listNotices) }),
  });
  const error = notices.error ?? read.error;
  return (
    <AccountSection title="Notices">
      {error ? (
        <Notice tone="wrong" live>
          {errorSentence(error)}
        </Notice>
      ) : null}
      {notices.data?.items.length === 0 ? <p>Nothing yet.</p> : null}
      <ul aria-label="Notices" className="grid gap-2">
        {(notices.data?.items ?? []).map(({ id, words, path, madeAt, read: isRead }) => (
          <li key={id}>
            {isRead ? '' : <b>New: </b>}
            <Link to={path}>{words}</Link>
            <span className="block text-fine text-soft">{moment(madeAt)}</span>
          </li>
        ))}
      </ul>
      {notices.data && notices.data.unread > 0 ? (
        <div>
          <Button busy={read.isPending} onClick={() => read.mutate()}>
            Mark all as read
          </Button>
        </div>
      ) : null}
    </AccountSection>
  );
}

const kindWords: Readonly<Record<NoticeKind, string>> = {
  invitation: 'Somebody invites you into a team',
  reset: 'Your password was set anew by a link',
  'review asked': 'Somebody asks you to review a sheet',
  'signed off': 'A sheet of yours was signed off',
  comment: 'Somebody comments on your sheet',
  'import finished': 'An import of yours has finished',
  'export ready': 'An export of a team that you asked for is ready',
  'team deletion': 'A team that you lead is to be deleted, or is kept after all',
};

/** Which of them the person wants. */
export function NoticeKindsSection({ off }: { off: readonly NoticeKind[] }) {
  const client = useQueryClient();
  const choose = useMutation({
    mutationFn: (next: NoticeKind[]) => call(setNoticesOff, { params: {}, query: {}, body: { off: next } }),
    onSuccess: (account) => client.setQueryData(apiKey(getAccount, { params: {}, query: {} }), account),
  });
  const shown = choose.isPending ? choose.variables : off;
  return (
    <AccountSection
      title="What you are told of"
      intro="Here and by mail. Links that you ask for yourself, such as to a new password, come all the same."
    >
      {choose.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(choose.error)}
        </Notice>
      ) : null}
      <fieldset>
        <legend className="sr-only">Kinds of notice</legend>
        {noticeKinds.map((kind) => (
          <label key={kind} className="flex items-baseline gap-2 py-0.5">
            <input
              type="checkbox"
              className="size-4 flex-none translate-y-0.5 accent-indigo"
              checked={!shown.includes(kind)}
              onChange={({ currentTarget }) =>
                choose.mutate(
                  noticeKinds.filter((each) => (each === kind ? !currentTarget.checked : shown.includes(each))),
                )
              }
            />
            {kindWords[kind]}
          </label>
        ))}
      </fieldset>
    </AccountSection>
  );
}

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { endOtherSessions, endSession, listSessions, type SessionOfPerson } from '../../contract/own-account.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { moment } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { AccountSection } from './account-section.tsx';
import { browserWords } from './browser-words.ts';

/** Where the account is signed in, and the way to end it. */
export function SessionsSection() {
  const client = useQueryClient();
  const sessions = useQuery(apiQuery(listSessions, { params: {}, query: {} }));
  const refresh = { onSettled: () => client.invalidateQueries({ queryKey: apiKey(listSessions) }) };
  const end = useMutation({
    mutationFn: (sessionId: string) => call(endSession, { params: { sessionId }, query: {} }),
    ...refresh,
  });
  const endOthers = useMutation({ mutationFn: () => call(endOtherSessions, { params: {}, query: {} }), ...refresh });
  const items = sessions.data?.items ?? [];
  const error = sessions.error ?? end.error ?? endOthers.error;
  return (
    <AccountSection
      title="Sessions"
      intro="Where you are signed in. A session that is ended is worth nothing from then on."
    >
      {error ? (
        <Notice tone="wrong" live>
          {errorSentence(error)}
        </Notice>
      ) : null}
      <ul aria-label="Sessions" className="grid gap-2">
        {items.map((session) => (
          <li key={session.id} className="flex flex-wrap items-baseline justify-between gap-x-4">
            <SessionWords session={session} />
            {session.current ? (
              <span className="text-soft">this one</span>
            ) : (
              <Button
                look="quiet"
                aria-label={`End the session of ${browserWords(session.browser)}`}
                disabled={end.isPending}
                onClick={() => end.mutate(session.id)}
              >
                End
              </Button>
            )}
          </li>
        ))}
      </ul>
      {items.length > 1 ? (
        <div>
          <Button busy={endOthers.isPending} onClick={() => endOthers.mutate()}>
            End all others
          </Button>
        </div>
      ) : null}
    </AccountSection>
  );
}

function SessionWords({ session: { browser, address, beganAt, endsAt } }: { session: SessionOfPerson }) {
  return (
    <span className="min-w-0">
      {browserWords(browser)}
      {address ? ` at ${address}` : ''}
      <span className="block text-fine text-soft">
        {beganAt ? `since ${moment(beganAt)}, ` : ''}until {moment(endsAt)}
      </span>
    </span>
  );
}

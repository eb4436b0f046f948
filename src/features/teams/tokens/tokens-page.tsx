import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { type ApiToken, listTokens } from '../../../contract/tokens.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiQuery } from '../../../lib/api-query.ts';
import { moment } from '../../../lib/format.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';
import { TeamHeader } from '../team-header.tsx';
import { MakeToken } from './make-token.tsx';
import { RevokeDialog } from './revoke-dialog.tsx';
import { scopeWords, stateWord } from './token-words.ts';

/** API tokens of the team, for its leads: what programs may do, until when, and the way to stop them. */
export function TokensPage() {
  const { teamId, role, teamName } = useTeam();
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-8 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="API tokens">
        With a token a program brings in weather for {teamName}, or reads what was found, within its scopes. Only its
        hash is kept here: the token itself is shown once, when it is made.
      </TeamHeader>
      {role === 'lead' ? (
        <>
          <MakeToken teamId={teamId} />
          <Tokens teamId={teamId} />
        </>
      ) : (
        <p>The leads of the team make API tokens and see them.</p>
      )}
    </div>
  );
}

function Tokens({ teamId }: { teamId: string }) {
  const tokens = useQuery(apiQuery(listTokens, { params: { teamId }, query: {} }));
  const [asked, setAsked] = useState<ApiToken | null>(null);
  return (
    <section aria-labelledby="tokens">
      <h2 id="tokens" className="mb-2 text-name">
        Tokens of the team
      </h2>
      {tokens.isPending ? <Loading what="the tokens" /> : null}
      {tokens.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => tokens.refetch()}>Try again</Button>}>
          {errorSentence(tokens.error)}
        </Notice>
      ) : null}
      {tokens.data?.items.length === 0 ? (
        <p>No token yet. Make the first one above; it can be revoked at any time.</p>
      ) : null}
      {tokens.data && tokens.data.items.length > 0 ? (
        <TokenTable items={tokens.data.items} onRevoke={setAsked} />
      ) : null}
      {asked ? <RevokeDialog teamId={teamId} token={asked} onClose={() => setAsked(null)} /> : null}
    </section>
  );
}

function TokenTable({ items, onRevoke }: { items: readonly ApiToken[]; onRevoke: (token: ApiToken) => void }) {
  return (
    <ScrollInside label="Tokens, scrolls sideways">
      <table className="ruled min-w-[52rem]">
        <caption className="sr-only">API tokens, newest first</caption>
        <thead>
          <tr>
            <th scope="col">Name</th>
            <th scope="col">May</th>
            <th scope="col">Made</th>
            <th scope="col">Expires</th>
            <th scope="col">Last used</th>
            <th scope="col">State</th>
            <th scope="col">
              <span className="sr-only">What can be done</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((token) => (
            <tr key={token.id} className={token.state === 'valid' ? '' : 'text-soft'}>
              <th scope="row" className="break-words">
                {token.name}
              </th>
              <td>
                <ul>
                  {token.scopes.map((scope) => (
                    <li key={scope}>{scopeWords[scope].title}</li>
                  ))}
                </ul>
              </td>
              <td>
                <span className="whitespace-nowrap">{moment(token.madeAt)}</span> by {token.madeBy}
              </td>
              <td className="whitespace-nowrap">{moment(token.expiresAt)}</td>
              <td className="whitespace-nowrap">{token.lastUsedAt === null ? 'Never' : moment(token.lastUsedAt)}</td>
              <td>{stateWord[token.state]}</td>
              <td className="text-right">
                {token.state === 'valid' ? (
                  <Button look="quiet" aria-label={`Revoke ${token.name}`} onClick={() => onRevoke(token)}>
                    Revoke
                  </Button>
                ) : null}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

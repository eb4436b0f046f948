import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { listTokens, makeToken, type TokenScope, tokenScopes } from '../../../contract/tokens.ts';
import { uploadWeatherFile } from '../../../contract/weather.ts';
import { call, urlOf } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey } from '../../../lib/api-query.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../../../lib/form-problems.ts';
import { moment } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { CopyButton } from '../../../ui/copy-button.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { scopeWords, uploadLine } from './token-words.ts';

const USUAL_DAYS = '90';

/** Makes a token, and shows it this once. */
export function MakeToken({ teamId }: { teamId: string }) {
  const client = useQueryClient();
  const [name, setName] = useState('');
  const [scopes, setScopes] = useState<readonly TokenScope[]>(['weather:upload', 'weather:read']);
  const [days, setDays] = useState(USUAL_DAYS);
  const [found, setFound] = useState<FormProblems>(noProblems);
  const make = useMutation({
    mutationFn: (body: { name: string; scopes: TokenScope[]; days: number }) =>
      call(makeToken, { params: { teamId }, query: {}, body }),
    onSuccess: () => {
      setName('');
      setFound(noProblems);
    },
    onError: (error) => setFound(problemsOfError(error) ?? noProblems),
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listTokens) }),
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const typedDays = days.trim() === '' ? Number.NaN : Number(days);
    const parsed = makeToken.body.schema.safeParse({ name, scopes, days: typedDays });
    setFound(parsed.success ? noProblems : problemsOfIssues(parsed.error.issues));
    if (parsed.success) make.mutate(parsed.data);
  };
  return (
    <section aria-labelledby="make-token" className="no-print">
      <h2 id="make-token" className="mb-2 text-name">
        Make a token
      </h2>
      <form noValidate onSubmit={submit} className="grid max-w-[44rem] gap-4">
        <div className="grid items-start gap-3 sm:grid-cols-[minmax(0,1fr)_9rem]">
          <TextField
            label="Name"
            value={name}
            onChange={setName}
            problem={found.fields.name}
            hint="What the program is, such as nightly upload."
            autoComplete="off"
          />
          <TextField
            label="Days until it expires"
            inputMode="numeric"
            value={days}
            onChange={setDays}
            problem={found.fields.days}
          />
        </div>
        <Scopes scopes={scopes} onChange={setScopes} problem={found.fields.scopes} />
        {make.isError && Object.keys(found.fields).length === 0 ? (
          <Notice tone="wrong" live>
            {errorSentence(make.error)}
          </Notice>
        ) : null}
        <div>
          <Button type="submit" look="primary" busy={make.isPending}>
            Make the token
          </Button>
        </div>
      </form>
      {make.data ? <MadeToken teamId={teamId} token={make.data.token} made={make.data.made} /> : null}
    </section>
  );
}

interface ScopesProps {
  readonly scopes: readonly TokenScope[];
  readonly onChange: (scopes: readonly TokenScope[]) => void;
  readonly problem: string | undefined;
}

function Scopes({ scopes, onChange, problem }: ScopesProps) {
  return (
    <fieldset>
      <legend className="mb-1 text-fine font-semibold text-soft">What it may do</legend>
      {tokenScopes.map((scope) => (
        <label key={scope} className="flex items-baseline gap-2 py-0.5">
          <input
            type="checkbox"
            checked={scopes.includes(scope)}
            onChange={(event) =>
              onChange(
                tokenScopes.filter((each) => (each === scope ? event.currentTarget.checked : scopes.includes(each))),
              )
            }
            className="size-4 flex-none translate-y-0.5 accent-indigo"
          />
          <span>
            {scopeWords[scope].title}
            <span className="text-soft">, {scopeWords[scope].meaning}</span>
          </span>
        </label>
      ))}
      {problem ? <p className="mt-1 text-fine font-medium text-madder">{problem}</p> : null}
    </fieldset>
  );
}

interface MadeTokenProps {
  readonly teamId: string;
  readonly token: string;
  readonly made: { readonly name: string; readonly expiresAt: string; readonly scopes: readonly TokenScope[] };
}

function MadeToken({ teamId, token, made }: MadeTokenProps) {
  const path = urlOf(uploadWeatherFile, { params: { teamId }, query: {} });
  const line = uploadLine({ origin: window.location.origin, path, token });
  return (
    <div className="mt-5 max-w-[60rem]">
      <Notice tone="attention" title={`${made.name} is made. Copy it now: it is not shown again.`} live>
        <p className="mt-1 flex flex-wrap items-center gap-x-3">
          <code className="font-mono break-all">{token}</code>
          <CopyButton text={token} what="the token" />
        </p>
        <p className="mt-1">It expires on {moment(made.expiresAt)}.</p>
        {made.scopes.includes('weather:upload') ? (
          <>
            <p className="mt-2">To upload one file:</p>
            <p className="flex flex-wrap items-center gap-x-3">
              <code className="font-mono text-fine break-all">{line}</code>
              <CopyButton text={line} what="the line" />
            </p>
          </>
        ) : null}
      </Notice>
    </div>
  );
}

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { type FormEvent, useEffect, useRef, useState } from 'react';
import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { signIn } from '../../contract/accounts.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { waitingTime } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths, safeReturn } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { EntryPage } from './entry-page.tsx';

export function SignInPage() {
  const [search] = useSearchParams();
  const session = useQuery(sessionQuery);
  if (session.data?.person) return <Navigate to={safeReturn(search.get('from'))} replace />;
  return (
    <EntryPage title="Sign in" intro="Where evaporation can carry the cooling.">
      <PageTitle>Sign in</PageTitle>
      <SignInForm />
    </EntryPage>
  );
}

function SignInForm() {
  const client = useQueryClient();
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [code, setCode] = useState('');
  const [asksForCode, setAsksForCode] = useState(false);
  const [found, setFound] = useState<FormProblems>(noProblems);
  const emailInput = useRef<HTMLInputElement>(null);
  const passwordInput = useRef<HTMLInputElement>(null);
  const enter = useMutation({
    mutationFn: (body: { email: string; password: string; code?: string | undefined }) =>
      call(signIn, { params: {}, query: {}, body }),
    // The page sees the person in the session and leads on to where they came from.
    onSuccess: (session) => client.setQueryData(sessionQuery.queryKey, session),
    onError: (error) => {
      const located = problemsOfError(error);
      if (located) setFound(located);
      if (isApiError(error, 'wrong_sign_in')) passwordInput.current?.select();
      if (isApiError(error, 'code_needed')) setAsksForCode(true);
    },
  });
  useEffect(() => emailInput.current?.focus(), []);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = signIn.body.schema.safeParse({ email, password, ...(asksForCode ? { code } : {}) });
    if (parsed.success) {
      setFound(noProblems);
      return enter.mutate(parsed.data);
    }
    const problems = problemsOfIssues(parsed.error.issues);
    setFound(problems);
    (problems.fields.email ? emailInput : passwordInput).current?.focus();
  };
  return (
    <form noValidate onSubmit={submit} className="grid gap-4">
      {enter.isError ? <SignInProblem error={enter.error} /> : null}
      <TextField
        label="E-mail"
        type="email"
        name="email"
        autoComplete="username"
        value={email}
        onChange={setEmail}
        problem={found.fields.email}
        inputRef={emailInput}
      />
      <TextField
        label="Password"
        type="password"
        name="password"
        autoComplete="current-password"
        value={password}
        onChange={setPassword}
        problem={found.fields.password}
        inputRef={passwordInput}
      />
      {asksForCode ? (
        <TextField
          label="Code"
          name="code"
          inputMode="text"
          autoComplete="one-time-code"
          autoFocus
          value={code}
          onChange={setCode}
          problem={found.fields.code}
          hint="Six figures of your authenticator, or a recovery code."
        />
      ) : null}
      <Button type="submit" look="primary" busy={enter.isPending} className="mt-1">
        Sign in
      </Button>
      <p className="text-fine">
        <Link to={paths.forgotten}>I have forgotten my password</Link>
      </p>
    </form>
  );
}

function SignInProblem({ error }: { error: unknown }) {
  if (isApiError(error, 'too_many_requests')) return <TooManyTries seconds={error.retryAfterS} />;
  if (isApiError(error, 'wrong_sign_in')) {
    return (
      <Notice tone="wrong" live>
        E-mail and password do not belong together. Check both and try again.
      </Notice>
    );
  }
  return (
    <Notice tone={isApiError(error, 'code_needed') ? 'note' : 'wrong'} live>
      {errorSentence(error)}
    </Notice>
  );
}

/** Counts the waiting time down, so that nobody tries in vain and makes it longer. */
function TooManyTries({ seconds }: { seconds: number | null }) {
  const [leftS, setLeftS] = useState(seconds ?? 0);
  useEffect(() => {
    setLeftS(seconds ?? 0);
    const timer = setInterval(() => setLeftS((left) => Math.max(0, left - 1)), 1000);
    return () => clearInterval(timer);
  }, [seconds]);
  return (
    <Notice tone="attention" live title="Too many tries">
      {seconds === null || leftS > 0
        ? `Signing in rests for ${seconds === null ? 'a few minutes' : waitingTime(leftS)}.`
        : 'You can try again now.'}
    </Notice>
  );
}

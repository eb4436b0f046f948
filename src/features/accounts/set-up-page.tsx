import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type FormEvent, useRef, useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { setUp } from '../../contract/accounts.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { EntryPage } from './entry-page.tsx';

const fields = [
  { name: 'teamName', label: 'Name of the team', type: 'text', autoComplete: 'organization' },
  { name: 'name', label: 'Your name', type: 'text', autoComplete: 'name' },
  { name: 'email', label: 'Your e-mail', type: 'email', autoComplete: 'username' },
  {
    name: 'password',
    label: 'Password',
    type: 'password',
    autoComplete: 'new-password',
    hint: '12 characters or more.',
  },
] as const;

type FieldName = (typeof fields)[number]['name'];

/** The page of the one-time link that the first start prints: makes the first team and its lead. */
export function SetUpPage() {
  const { key = '' } = useParams();
  return (
    <EntryPage
      title="Set up"
      intro="This link makes the first team of this server, and you as its lead. It works once."
    >
      <PageTitle>Set up</PageTitle>
      <SetUpForm setUpKey={key} />
    </EntryPage>
  );
}

function SetUpForm({ setUpKey }: { setUpKey: string }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useRef<HTMLFormElement>(null);
  const [values, setValues] = useState<Record<FieldName, string>>({ teamName: '', name: '', email: '', password: '' });
  const [found, setFound] = useState<FormProblems>(noProblems);
  const make = useMutation({
    mutationFn: (body: Record<FieldName | 'key', string>) => call(setUp, { params: {}, query: {}, body }),
    onSuccess: (session) => {
      client.setQueryData(sessionQuery.queryKey, session);
      navigate(paths.home, { replace: true });
    },
    onError: (error) => setFound(problemsOfError(error) ?? noProblems),
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = setUp.body.schema.safeParse({ key: setUpKey, ...values });
    if (parsed.success) {
      setFound(noProblems);
      return make.mutate(parsed.data);
    }
    const problems = problemsOfIssues(parsed.error.issues);
    setFound(problems);
    const first = fields.find(({ name }) => problems.fields[name]);
    if (first) form.current?.querySelector<HTMLInputElement>(`[name="${first.name}"]`)?.focus();
  };
  return (
    <form ref={form} noValidate onSubmit={submit} className="grid gap-4">
      {make.isError && problemsOfError(make.error) === null ? (
        <Notice tone="wrong" live>
          {isApiError(make.error, 'link_not_valid') ? (
            <>
              This link has been used, or was never given out. If your team is there already,{' '}
              <Link to={paths.signIn.to()}>sign in</Link>; if not, start the server again for a new link.
            </>
          ) : (
            errorSentence(make.error)
          )}
        </Notice>
      ) : null}
      {fields.map(({ name, label, ...rest }) => (
        <TextField
          {...rest}
          key={name}
          name={name}
          label={label}
          value={values[name]}
          onChange={(value) => setValues((held) => ({ ...held, [name]: value }))}
          problem={found.fields[name]}
        />
      ))}
      <Button type="submit" look="primary" busy={make.isPending} className="mt-1">
        Make the team
      </Button>
    </form>
  );
}

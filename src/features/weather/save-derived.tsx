import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type FormEvent, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { deriveWeatherYear } from '../../contract/climate.ts';
import { getWeatherFile } from '../../contract/weather.ts';
import { listWeatherFiles } from '../../contract/weather-library.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey } from '../../lib/api-query.ts';
import { problemsOfIssues } from '../../lib/form-problems.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { ClimateChange } from './weather-queries.ts';

interface SaveDerivedProps {
  readonly fileId: string;
  /** Null while there is nothing to save. */
  readonly change: ClimateChange | null;
}

/** Names the derived year and saves it; its record page follows. */
export function SaveDerived({ fileId, change }: SaveDerivedProps) {
  const { teamId } = useTeam();
  const client = useQueryClient();
  const navigate = useNavigate();
  const input = useRef<HTMLInputElement>(null);
  const [name, setName] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const save = useMutation({
    mutationFn: (body: ClimateChange & { name: string }) =>
      call(deriveWeatherYear, { params: { teamId, fileId }, query: {}, body }),
    onSuccess: (file) => {
      for (const endpoint of [listWeatherFiles, getWeatherFile])
        client.invalidateQueries({ queryKey: apiKey(endpoint) });
      navigate(paths.weatherFile.to(teamId, file.id));
    },
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (change === null) return;
    const parsed = deriveWeatherYear.body.schema.safeParse({ ...change, name });
    setProblem(parsed.success ? undefined : problemsOfIssues(parsed.error.issues).fields.name);
    if (parsed.success) save.mutate({ ...change, name: parsed.data.name });
    else input.current?.focus();
  };
  return (
    <form noValidate onSubmit={submit} className="grid max-w-[30rem] gap-3 border-t border-ink pt-4">
      <TextField
        label="Name of the derived year"
        value={name}
        onChange={setName}
        problem={problem}
        hint="Say which climate it stands for, and where the change comes from."
        inputRef={input}
        maxLength={80}
      />
      {save.isError ? (
        <Notice tone="wrong" live>
          {errorSentence(save.error)}
        </Notice>
      ) : null}
      <div>
        <Button type="submit" look="primary" busy={save.isPending} disabled={change === null}>
          Save as a derived year
        </Button>
      </div>
    </form>
  );
}

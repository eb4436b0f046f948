import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useId, useState } from 'react';
import type { WeatherFile } from '../../contract/weather.ts';
import { Licence, setLicence } from '../../contract/weather-reading.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { problemsOfError } from '../../lib/form-problems.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useWeatherChanged } from './weather-queries.ts';

/** What each class lets the team do with the file. */
const licenceWords: Readonly<Record<Licence, { title: string; meaning: string }>> = {
  open: { title: 'Open', meaning: 'may be passed on as it is' },
  attribution: { title: 'With attribution', meaning: 'may be passed on where the source is named' },
  'non-commercial': { title: 'Non-commercial', meaning: 'may not be passed on in paid work' },
  'no redistribution': { title: 'No redistribution', meaning: 'its hours stay with the team' },
  unknown: { title: 'Not known', meaning: 'treated as if it may not be passed on' },
};

/** Under which licence the file may be passed on, and whom to name; engineers may change it. */
export function RecordLicence({ file, mayChange }: { file: WeatherFile; mayChange: boolean }) {
  const [isOpen, setIsOpen] = useState(false);
  const { title, meaning } = licenceWords[file.licence];
  if (isOpen) return <LicenceForm file={file} onClose={() => setIsOpen(false)} />;
  return (
    <div className="flex flex-wrap items-center gap-x-3">
      <span>
        {title}, {meaning}.{file.attribution ? ` Name: ${file.attribution}` : ''}
      </span>
      {mayChange ? (
        <Button look="quiet" className="no-print" onClick={() => setIsOpen(true)}>
          Change the licence
        </Button>
      ) : null}
    </div>
  );
}

function LicenceForm({ file, onClose }: { file: WeatherFile; onClose: () => void }) {
  const { teamId } = useTeam();
  const name = useId();
  const changed = useWeatherChanged();
  const [licence, setChosen] = useState<Licence>(file.licence);
  const [attribution, setAttribution] = useState(file.attribution ?? '');
  const save = useMutation({
    mutationFn: () =>
      call(setLicence, {
        params: { teamId, fileId: file.id },
        query: {},
        body: { licence, attribution: attribution.trim() === '' ? null : attribution },
      }),
    onSuccess: onClose,
    onSettled: changed,
  });
  const problem = save.isError ? problemsOfError(save.error)?.fields.attribution : undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    save.mutate();
  };
  return (
    <form noValidate onSubmit={submit} className="grid max-w-[34rem] gap-3">
      <fieldset>
        <legend className="sr-only">Licence</legend>
        {Licence.options.map((option) => (
          <label key={option} className="flex items-baseline gap-2 py-0.5">
            <input
              type="radio"
              name={name}
              checked={licence === option}
              onChange={() => setChosen(option)}
              className="size-4 translate-y-0.5 accent-indigo"
            />
            <span>
              {licenceWords[option].title}
              <span className="text-soft">, {licenceWords[option].meaning}</span>
            </span>
          </label>
        ))}
      </fieldset>
      <TextField
        label="Whom to name"
        value={attribution}
        onChange={setAttribution}
        problem={problem}
        hint="Printed beside every figure that rests on the file."
      />
      {save.isError && !problem ? (
        <Notice tone="wrong" live>
          {errorSentence(save.error)}
        </Notice>
      ) : null}
      <div className="flex gap-2">
        <Button type="submit" look="primary" busy={save.isPending}>
          Save the licence
        </Button>
        <Button onClick={onClose}>Leave it</Button>
      </div>
    </form>
  );
}

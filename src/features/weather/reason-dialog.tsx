import { type FormEvent, useRef, useState } from 'react';
import type { WeatherFile } from '../../contract/weather.ts';
import { actOnWeatherFiles } from '../../contract/weather-acts.ts';
import { problemsOfIssues } from '../../lib/form-problems.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { TextField } from '../../ui/text-field.tsx';

interface ReasonDialogProps {
  readonly act: 'refuse' | 'withdraw';
  readonly files: readonly WeatherFile[];
  readonly isBusy: boolean;
  readonly onClose: () => void;
  readonly onReason: (reason: string) => void;
}

const words = {
  refuse: {
    title: 'Refuse',
    follows:
      'Nothing of what is refused is used. Records and originals are kept. A file that is accepted cannot be refused; withdraw it.',
  },
  withdraw: {
    title: 'Withdraw',
    follows:
      'What is withdrawn no longer counts in any score of the team. Records, originals and the results made from them are kept.',
  },
} as const;

/** Asks why many files are refused or withdrawn, and says what follows. */
export function ReasonDialog({ act, files, isBusy, onClose, onReason }: ReasonDialogProps) {
  const input = useRef<HTMLInputElement>(null);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = actOnWeatherFiles.body.schema.safeParse({ act, fileIds: files.map(({ id }) => id), reason });
    setProblem(parsed.success ? undefined : problemsOfIssues(parsed.error.issues).fields.reason);
    if (parsed.success) onReason(reason.trim());
    else input.current?.focus();
  };
  const { title, follows } = words[act];
  return (
    <Dialog isOpen onClose={onClose} title={`${title} ${plural(files.length, 'weather file')}`}>
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>{follows}</p>
        <TextField
          label="Reason"
          value={reason}
          onChange={setReason}
          problem={problem}
          hint="Kept with each file for those who ask later."
          inputRef={input}
          autoFocus
        />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave them</Button>
          <Button type="submit" look="primary" busy={isBusy}>
            {title} {plural(files.length, 'file')}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useRef, useState } from 'react';
import type { WeatherFile } from '../../contract/weather.ts';
import { withdrawWeatherFile } from '../../contract/weather-acts.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';

interface WithdrawDialogProps {
  readonly file: WeatherFile;
  readonly isOpen: boolean;
  readonly onClose: () => void;
  readonly onChanged: () => void;
}

/** Asks why a file is withdrawn, and says what follows. */
export function WithdrawDialog({ file, isOpen, onClose, onChanged }: WithdrawDialogProps) {
  const { teamId } = useTeam();
  const input = useRef<HTMLInputElement>(null);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const withdraw = useMutation({
    mutationFn: (body: { reason: string }) =>
      call(withdrawWeatherFile, { params: { teamId, fileId: file.id }, query: {}, body }),
    onSuccess: onClose,
    onError: (error) => setProblem(problemsOfError(error)?.fields.reason),
    onSettled: onChanged,
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = withdrawWeatherFile.body.schema.safeParse({ reason });
    setProblem(parsed.success ? undefined : problemsOfIssues(parsed.error.issues).fields.reason);
    if (parsed.success) withdraw.mutate(parsed.data);
    else input.current?.focus();
  };
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="Withdraw this weather file">
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>
          {file.parent !== null
            ? 'It no longer stands beside its parent. Its record and the results made from it are kept.'
            : file.status === 'accepted'
              ? 'Its year no longer counts in any score of the team. Its record, its original and the results made from it are kept.'
              : 'It leaves the review and is not used. Its record and its original are kept.'}
        </p>
        {withdraw.isError && !problem ? (
          <Notice tone="wrong" live>
            {errorSentence(withdraw.error)}
          </Notice>
        ) : null}
        <TextField
          label="Reason"
          value={reason}
          onChange={setReason}
          problem={problem}
          hint="Kept with the file for those who ask later."
          inputRef={input}
          autoFocus
        />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep it</Button>
          <Button type="submit" look="primary" busy={withdraw.isPending}>
            Withdraw the file
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

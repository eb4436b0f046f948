import { type FormEvent, type ReactNode, useRef, useState } from 'react';
import { Reason } from '../contract/reason.ts';
import { errorSentence } from '../lib/api-error.ts';
import { problemsOfError } from '../lib/form-problems.ts';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';
import { Notice } from './notice.tsx';
import { TextField } from './text-field.tsx';

interface ReasonDialogProps {
  readonly title: string;
  /** What follows from the act. */
  readonly children: ReactNode;
  readonly hint: string;
  /** Words of the buttons: to leave things as they are, and to act. */
  readonly leave: string;
  readonly act: string;
  readonly isBusy: boolean;
  /** Why the server did not act. */
  readonly error?: unknown;
  readonly onClose: () => void;
  readonly onReason: (reason: string) => void;
}

/** Says what follows from an act and asks why it is done. Shown while it is asked; gone with what was typed when it is closed. */
export function ReasonDialog(props: ReasonDialogProps) {
  const { title, children, hint, leave, act, isBusy, error, onClose, onReason } = props;
  const input = useRef<HTMLInputElement>(null);
  const [reason, setReason] = useState('');
  const [ownProblem, setOwnProblem] = useState<string | undefined>();
  const problem = ownProblem ?? problemsOfError(error)?.fields.reason;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = Reason.safeParse(reason);
    setOwnProblem(parsed.error?.issues[0]?.message);
    if (parsed.success) onReason(parsed.data);
    else input.current?.focus();
  };
  return (
    <Dialog isOpen onClose={onClose} title={title}>
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>{children}</p>
        {error && !problem ? (
          <Notice tone="wrong" live>
            {errorSentence(error)}
          </Notice>
        ) : null}
        <TextField
          label="Reason"
          value={reason}
          onChange={setReason}
          problem={problem}
          hint={hint}
          inputRef={input}
          autoFocus
        />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>{leave}</Button>
          <Button type="submit" look="primary" busy={isBusy}>
            {act}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

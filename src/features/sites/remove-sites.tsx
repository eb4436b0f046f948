import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { removeSites, type Site } from '../../contract/sites.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { problemsOfIssues } from '../../lib/form-problems.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { type ProgrammeKey, useSiteActs } from './site-queries.ts';

const MOST_AT_ONCE = 500;

interface RemoveDialogProps {
  readonly programme: ProgrammeKey;
  readonly sites: readonly Pick<Site, 'id' | 'name'>[];
  readonly onClose: () => void;
  readonly onRemoved: () => void;
}

/** Asks why sites are removed, and says what follows. */
export function RemoveDialog({ programme, sites, onClose, onRemoved }: RemoveDialogProps) {
  const acts = useSiteActs(programme);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const siteIds = sites.map(({ id }) => id);
  const remove = useMutation({
    mutationFn: () => acts.remove({ siteIds, reason: reason.trim() }),
    onSuccess: onRemoved,
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = removeSites.body.schema.safeParse({ siteIds, reason });
    setProblem(parsed.success ? undefined : problemsOfIssues(parsed.error.issues).fields.reason);
    if (parsed.success) remove.mutate();
  };
  const what = sites.length === 1 ? `“${sites[0]?.name ?? ''}”` : plural(sites.length, 'site');
  return (
    <Dialog isOpen onClose={onClose} title={`Remove ${what}`}>
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>
          What is removed leaves the table and the map. Its letters are not given again, and what sheets say of it
          stands.
        </p>
        <TextField
          label="Reason"
          value={reason}
          onChange={setReason}
          problem={problem}
          hint="Kept in the audit trail for those who ask later."
          autoFocus
        />
        {remove.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(remove.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave {sites.length === 1 ? 'it' : 'them'}</Button>
          <Button type="submit" look="primary" busy={remove.isPending}>
            Remove {plural(sites.length, 'site')}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

interface ChosenBarProps {
  readonly programme: ProgrammeKey;
  readonly chosen: ReadonlyMap<string, Site>;
  readonly onChosen: (chosen: ReadonlyMap<string, Site>) => void;
}

/** The chosen sites and what may be done to all of them. */
export function ChosenBar({ programme, chosen, onChosen }: ChosenBarProps) {
  const [isAsking, setAsking] = useState(false);
  const none = () => onChosen(new Map());
  if (chosen.size === 0) return null;
  return (
    <div className="sticky top-0 z-10 -mx-2 mb-2 flex flex-wrap items-center gap-x-3 gap-y-1.5 border-y border-line bg-paper px-2 py-2">
      <p className="mr-auto font-medium" role="status">
        {plural(chosen.size, 'site')} chosen{chosen.size > MOST_AT_ONCE ? `. At most ${MOST_AT_ONCE} at once.` : ''}
      </p>
      <Button disabled={chosen.size > MOST_AT_ONCE} onClick={() => setAsking(true)}>
        Remove
      </Button>
      <Button look="quiet" onClick={none}>
        Choose none
      </Button>
      {isAsking ? (
        <RemoveDialog
          programme={programme}
          sites={[...chosen.values()]}
          onClose={() => setAsking(false)}
          onRemoved={() => {
            setAsking(false);
            none();
          }}
        />
      ) : null}
    </div>
  );
}

import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { Site } from '../../contract/sites.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { ReasonDialog } from '../../ui/reason-dialog.tsx';
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
  const siteIds = sites.map(({ id }) => id);
  const remove = useMutation({
    mutationFn: (reason: string) => acts.remove({ siteIds, reason }),
    onSuccess: onRemoved,
  });
  const what = sites.length === 1 ? `“${sites[0]?.name ?? ''}”` : plural(sites.length, 'site');
  return (
    <ReasonDialog
      title={`Remove ${what}`}
      hint="Kept in the audit trail for those who ask later."
      leave={`Leave ${sites.length === 1 ? 'it' : 'them'}`}
      act={`Remove ${plural(sites.length, 'site')}`}
      isBusy={remove.isPending}
      error={remove.error}
      onClose={onClose}
      onReason={(reason) => remove.mutate(reason)}
    >
      What is removed leaves the table and the map. Its letters are not given again, and what sheets say of it stands.
    </ReasonDialog>
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

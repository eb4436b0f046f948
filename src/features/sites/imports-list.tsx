import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { listSiteImports, type SiteImport, undoSiteImport } from '../../contract/site-imports.ts';
import { getSite } from '../../contract/site-record.ts';
import { listSites } from '../../contract/sites.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { moment, plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Notice } from '../../ui/notice.tsx';
import type { ProgrammeKey } from './site-queries.ts';

/** The tables that were imported, newest first, each of which can be undone whole. */
export function ImportsList({ programme, mayChange }: { programme: ProgrammeKey; mayChange: boolean }) {
  const imports = useQuery(apiQuery(listSiteImports, { params: { ...programme }, query: {} }));
  const [undoing, setUndoing] = useState<SiteImport | null>(null);
  if (!imports.data || imports.data.items.length === 0) return null;
  return (
    <section aria-labelledby="imports" className="mt-10 max-w-[52rem]">
      <h2 id="imports" className="mb-1 text-name">
        Imported tables
      </h2>
      <ul>
        {imports.data.items.map((each) => (
          <li key={each.id} className="flex flex-wrap items-baseline gap-x-4 gap-y-1 border-t border-line py-2">
            <span className="font-medium break-all">{each.name}</span>
            <span className="mr-auto text-fine text-soft">
              {plural(each.sites, 'site')}, {each.madeBy}, {moment(each.madeAt)}
              {each.undoneAt === null ? '' : `; undone by ${each.undoneBy ?? 'somebody'}, ${moment(each.undoneAt)}`}
            </span>
            {each.status === 'done' ? (
              <span className="no-print flex gap-4">
                <Link
                  to={`${paths.sites.to(programme)}?${new URLSearchParams({ importId: each.id })}`}
                  className="py-1.5"
                >
                  Show its sites
                </Link>
                {mayChange ? (
                  <Button look="quiet" onClick={() => setUndoing(each)}>
                    Undo this import
                  </Button>
                ) : null}
              </span>
            ) : null}
          </li>
        ))}
      </ul>
      {undoing ? <UndoDialog programme={programme} undoing={undoing} onClose={() => setUndoing(null)} /> : null}
    </section>
  );
}

interface UndoDialogProps {
  readonly programme: ProgrammeKey;
  readonly undoing: SiteImport;
  readonly onClose: () => void;
}

function UndoDialog({ programme, undoing, onClose }: UndoDialogProps) {
  const client = useQueryClient();
  const undo = useMutation({
    mutationFn: () => call(undoSiteImport, { params: { ...programme, importId: undoing.id }, query: {} }),
    onSuccess: onClose,
    onSettled: () => {
      for (const endpoint of [listSites, getSite, listSiteImports])
        client.invalidateQueries({ queryKey: apiKey(endpoint) });
    },
  });
  return (
    <Dialog isOpen onClose={onClose} title="Undo this import">
      <div className="grid gap-4">
        <p>
          {plural(undoing.sites, 'site')} of {undoing.name} will leave the programme
          {undoing.changed > 0 ? `, among them ${undoing.changed} that somebody has changed since` : ''}. Their letters
          are not given again.
        </p>
        {undo.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(undo.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep them</Button>
          <Button look="primary" busy={undo.isPending} onClick={() => undo.mutate()}>
            Undo the import
          </Button>
        </div>
      </div>
    </Dialog>
  );
}

import { useState } from 'react';
import type { SiteImportCheck } from '../../contract/site-imports.ts';
import { number, plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { FaultTable } from './fault-table.tsx';

interface ImportCheckProps {
  readonly check: SiteImportCheck;
  readonly isBusy: boolean;
  readonly onFinish: (duplicates: 'skip' | 'keep') => void;
  readonly onBack: () => void;
}

/** What the server found in the whole table, and the last word before the rows become sites. */
export function ImportCheck({ check, isBusy, onFinish, onBack }: ImportCheckProps) {
  const { rows, faults, doubts, duplicates, seemsSwapped } = check;
  const [keepsDoubles, setKeepsDoubles] = useState(false);
  const taken = rows - (keepsDoubles ? 0 : duplicates.count);
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-6">
      <p role="status">
        {plural(rows, 'row')} checked:{' '}
        {faults.count + doubts.count + duplicates.count === 0
          ? 'no fault, no doubt, no duplicate.'
          : `${plural(faults.count, 'fault')}, ${plural(doubts.count, 'doubt')}, ${plural(duplicates.count, 'duplicate')}.`}
      </p>
      {seemsSwapped ? (
        <Notice tone="attention" title="Latitude and longitude seem swapped">
          Most of these places lie in the sea, and would stand on land the other way round. Go back and exchange the two
          columns.
        </Notice>
      ) : null}
      {faults.count > 0 ? (
        <section aria-labelledby="faults">
          <h2 id="faults" className="mb-1 text-name">
            {plural(faults.count, 'fault')}
          </h2>
          <FaultTable what="Faults" count={faults.count} told={faults.told} />
        </section>
      ) : null}
      {doubts.count > 0 ? (
        <section aria-labelledby="doubts">
          <h2 id="doubts" className="mb-1 text-name">
            {plural(doubts.count, 'doubt')}
          </h2>
          <p className="mb-2 text-soft">These rows are imported, and flagged.</p>
          <FaultTable what="Doubts" count={doubts.count} told={doubts.told} />
        </section>
      ) : null}
      {duplicates.count > 0 ? (
        <section aria-labelledby="duplicates">
          <h2 id="duplicates" className="mb-1 text-name">
            {plural(duplicates.count, 'duplicate')}
          </h2>
          <FaultTable
            what="Duplicates"
            count={duplicates.count}
            told={duplicates.told.map(({ line, name, by, of }) => ({
              line,
              column: by === 'name' ? 'name' : 'position',
              message: `“${name}” ${by === 'name' ? 'has the name of' : 'lies within 10 m of'} ${of}.`,
            }))}
          />
          <label className="mt-3 flex items-center gap-2">
            <input
              type="checkbox"
              className="size-5 accent-indigo"
              checked={keepsDoubles}
              onChange={({ currentTarget }) => setKeepsDoubles(currentTarget.checked)}
            />
            Import them all the same
          </label>
        </section>
      ) : null}
      <div className="flex flex-wrap gap-3">
        <Button
          look="primary"
          busy={isBusy}
          disabled={faults.count > 0 || taken === 0}
          onClick={() => onFinish(keepsDoubles ? 'keep' : 'skip')}
        >
          Import {number(taken)} {taken === 1 ? 'site' : 'sites'}
        </Button>
        <Button disabled={isBusy} onClick={onBack}>
          Back to the columns
        </Button>
      </div>
    </div>
  );
}

import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import type { WeatherFile } from '../../contract/weather.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { moment, plural, share } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Loading } from '../../ui/loading.tsx';
import { acceptedAtQuery } from './weather-queries.ts';
import { yearWords } from './weather-words.ts';

interface SupersedeDialogProps {
  readonly files: readonly WeatherFile[];
  readonly isBusy: boolean;
  readonly onClose: () => void;
  readonly onBetter: (fileId: string) => void;
}

/** Asks which file of the same station takes the place of those that are chosen. */
export function SupersedeDialog({ files, isBusy, onClose, onBetter }: SupersedeDialogProps) {
  const stations = new Set(files.map(({ stationId }) => stationId));
  const [stationId = null] = stations;
  const isAtOne = stations.size === 1 && stationId !== null;
  return (
    <Dialog isOpen onClose={onClose} title={`Supersede ${plural(files.length, 'weather file')}`}>
      {isAtOne ? (
        <BetterFileForm files={files} stationId={stationId} isBusy={isBusy} onClose={onClose} onBetter={onBetter} />
      ) : (
        <>
          <p className="mb-4">
            A better file stands in for accepted files of its own station. Choose accepted files of one station alone.
          </p>
          <div className="flex justify-end">
            <Button onClick={onClose}>Close</Button>
          </div>
        </>
      )}
    </Dialog>
  );
}

function BetterFileForm({ files, stationId, isBusy, onClose, onBetter }: SupersedeDialogProps & { stationId: string }) {
  const { teamId } = useTeam();
  const accepted = useQuery(acceptedAtQuery(teamId, stationId));
  const [better, setBetter] = useState<string | null>(null);
  const [isMissing, setMissing] = useState(false);
  const others = accepted.data?.items.filter((file) => file.parent === null && !files.some(({ id }) => id === file.id));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (better === null) setMissing(true);
    else onBetter(better);
  };
  return (
    <form onSubmit={submit} className="grid gap-4">
      <p>
        The chosen {files.length === 1 ? 'file counts' : 'files count'} no longer once a better file stands in. Results
        that rest on {files.length === 1 ? 'it' : 'them'} are kept.
      </p>
      {accepted.isPending ? <Loading what="the files of the station" /> : null}
      {accepted.isError ? <p className="text-madder">{errorSentence(accepted.error)}</p> : null}
      {others?.length === 0 ? <p>The station has no other accepted file. Accept the better one first.</p> : null}
      {others && others.length > 0 ? (
        <fieldset aria-describedby={isMissing && better === null ? 'better-problem' : undefined}>
          <legend className="mb-1 text-fine font-semibold text-soft">The better file</legend>
          <ul className="max-h-72 overflow-y-auto">
            {others.map((file) => (
              <li key={file.id} className="border-t border-line">
                <label className="flex items-start gap-3 py-1.5">
                  <input
                    type="radio"
                    name="better"
                    className="mt-0.5 size-5 flex-none accent-indigo"
                    checked={better === file.id}
                    onChange={() => setBetter(file.id)}
                  />
                  <span className="min-w-0">
                    <span className="break-all">{file.name}</span>
                    <span className="block text-fine text-soft">
                      {yearWords(file)}, {file.completePct === null ? '' : `complete ${share(file.completePct)}, `}
                      uploaded {moment(file.uploadedAt)}
                    </span>
                  </span>
                </label>
              </li>
            ))}
          </ul>
          {isMissing && better === null ? (
            <p id="better-problem" role="alert" className="text-fine font-medium text-madder">
              Choose the file that stands in.
            </p>
          ) : null}
        </fieldset>
      ) : null}
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>Leave them</Button>
        <Button type="submit" look="primary" busy={isBusy} disabled={!others || others.length === 0}>
          Supersede {plural(files.length, 'file')}
        </Button>
      </div>
    </form>
  );
}

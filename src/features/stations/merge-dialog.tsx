import { useMutation, useQuery } from '@tanstack/react-query';
import { type FormEvent, useId, useState } from 'react';
import { mergeStations, type Station } from '../../contract/stations.ts';
import { greatCircleKm } from '../../engine/interpolation/great-circle-km.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { metres, number, plural } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { stationChoicesQuery, useStationChanged } from './station-queries.ts';

/** Choices shown at once: the nearest. */
const MOST_SHOWN = 8;

/** Takes the files of another station into this one; the other is chosen by name and distance. */
export function MergeDialog({ station, onClose }: { station: Station; onClose: () => void }) {
  const { teamId } = useTeam();
  const changed = useStationChanged();
  const [text, setText] = useState('');
  const [otherStationId, setOther] = useState<string | null>(null);
  const [reason, setReason] = useState('');
  const [problems, setProblems] = useState<Readonly<Record<string, string>>>({});
  const merge = useMutation({
    mutationFn: (body: { otherStationId: string; reason: string }) =>
      call(mergeStations, { params: { teamId, stationId: station.id }, query: {}, body }),
    onSuccess: onClose,
    onError: (error) => setProblems(problemsOfError(error)?.fields ?? {}),
    onSettled: changed,
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = mergeStations.body.schema.safeParse({ otherStationId, reason });
    const fields = parsed.success ? {} : problemsOfIssues(parsed.error.issues).fields;
    setProblems(otherStationId === null ? { ...fields, otherStationId: 'Choose the other station.' } : fields);
    if (parsed.success) merge.mutate(parsed.data);
  };
  return (
    <Dialog isOpen onClose={onClose} title={`Merge another station into ${station.name}`}>
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>Its files come here and its years are judged anew at this place. The other station is gone afterwards.</p>
        <TextField
          label="Name or WMO number of the other"
          type="search"
          value={text}
          onChange={setText}
          maxLength={100}
        />
        <Choices station={station} text={text.trim()} chosen={otherStationId} onChoose={setOther} />
        {problems.otherStationId ? (
          <p className="text-fine font-medium text-madder">{problems.otherStationId}</p>
        ) : null}
        <TextField
          label="Reason"
          value={reason}
          onChange={setReason}
          problem={problems.reason}
          hint="Kept for those who ask later."
        />
        {merge.isError && Object.keys(problems).length === 0 ? (
          <Notice tone="wrong" live>
            {errorSentence(merge.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave both</Button>
          <Button type="submit" look="primary" busy={merge.isPending}>
            Merge the stations
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

interface ChoicesProps {
  readonly station: Station;
  readonly text: string;
  readonly chosen: string | null;
  readonly onChoose: (stationId: string) => void;
}

function Choices({ station, text, chosen, onChoose }: ChoicesProps) {
  const { teamId } = useTeam();
  const name = useId();
  const stations = useQuery(stationChoicesQuery(teamId, text));
  if (stations.isPending) return <Loading what="the stations" />;
  if (stations.isError) return <Notice tone="wrong">{errorSentence(stations.error)}</Notice>;
  const others = stations.data.items
    .filter(({ id }) => id !== station.id)
    .map((other) => ({ other, km: greatCircleKm(station, other) }))
    .sort((one, two) => one.km - two.km);
  if (others.length === 0) return <p className="text-soft">No other station has that in its name or number.</p>;
  return (
    <fieldset>
      <legend className="mb-1 text-fine font-semibold text-soft">The other station, nearest first</legend>
      {others.slice(0, MOST_SHOWN).map(({ other, km }) => (
        <label key={other.id} className="flex items-baseline gap-2 border-t border-line py-1">
          <input
            type="radio"
            name={name}
            checked={chosen === other.id}
            onChange={() => onChoose(other.id)}
            className="size-4 flex-none translate-y-0.5 accent-indigo"
          />
          <span>
            {other.name}
            <span className="text-fine text-soft">
              , {number(km, km < 10 ? 1 : 0)}&nbsp;km away, {heightWords(other.elevationM - station.elevationM)},{' '}
              {plural(other.files, 'file')}
            </span>
          </span>
        </label>
      ))}
      {others.length > MOST_SHOWN ? (
        <p className="border-t border-line pt-1 text-fine text-soft">
          {plural(others.length - MOST_SHOWN, 'more station')} further away; type a part of the name.
        </p>
      ) : null}
    </fieldset>
  );
}

function heightWords(differenceM: number): string {
  return `${metres(Math.abs(differenceM))} ${differenceM < 0 ? 'lower' : 'higher'}`;
}

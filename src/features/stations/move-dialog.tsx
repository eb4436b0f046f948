import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { moveStation, type Station } from '../../contract/stations.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useStationChanged } from './station-queries.ts';

const fields = [
  { name: 'name', label: 'Name', wide: true },
  { name: 'latitude', label: 'Latitude, °', wide: false },
  { name: 'longitude', label: 'Longitude, °', wide: false },
  { name: 'elevationM', label: 'Elevation, m', wide: false },
  { name: 'zone', label: 'Time zone', wide: false },
  { name: 'reason', label: 'Reason', wide: true },
] as const;
type FieldName = (typeof fields)[number]['name'];
type Draft = Readonly<Record<FieldName, string>>;

const hints: Readonly<Partial<Record<FieldName, string>>> = {
  latitude: 'North positive',
  longitude: 'East positive',
  zone: 'Such as Africa/Johannesburg',
  reason: 'Kept for those who ask later.',
};

/** Corrects where a station stands; its years are judged anew. */
export function MoveDialog({ station, onClose }: { station: Station; onClose: () => void }) {
  const { teamId } = useTeam();
  const changed = useStationChanged();
  const [draft, setDraft] = useState<Draft>(() => draftOf(station));
  const [found, setFound] = useState<FormProblems>(noProblems);
  const move = useMutation({
    mutationFn: (body: MoveBody) => call(moveStation, { params: { teamId, stationId: station.id }, query: {}, body }),
    onSuccess: onClose,
    onError: (error) => setFound(problemsOfError(error) ?? noProblems),
    onSettled: changed,
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = moveStation.body.schema.safeParse(bodyOf(draft));
    setFound(parsed.success ? noProblems : withNumbers(problemsOfIssues(parsed.error.issues), draft));
    if (parsed.success) move.mutate(parsed.data);
  };
  return (
    <Dialog isOpen onClose={onClose} title="Correct the place of this station">
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>Its years are judged anew, at the new height and by the new clock. What was signed before is kept.</p>
        <div className="grid grid-cols-2 items-start gap-3">
          {fields.map(({ name, label, wide }) => (
            <TextField
              key={name}
              label={label}
              value={draft[name]}
              onChange={(value) => setDraft({ ...draft, [name]: value })}
              problem={found.fields[name]}
              autoComplete="off"
              className={wide ? 'col-span-2' : ''}
              {...(hints[name] === undefined ? {} : { hint: hints[name] })}
            />
          ))}
        </div>
        {move.isError && Object.keys(found.fields).length === 0 ? (
          <Notice tone="wrong" live>
            {errorSentence(move.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" look="primary" busy={move.isPending}>
            Correct the place
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

interface MoveBody {
  name: string;
  latitude: number;
  longitude: number;
  elevationM: number;
  zone: string;
  reason: string;
}

function draftOf({ name, latitude, longitude, elevationM, zone }: Station): Draft {
  return {
    name,
    latitude: String(latitude),
    longitude: String(longitude),
    elevationM: String(elevationM),
    zone,
    reason: '',
  };
}

/** Numbers as they were typed; what is none is refused by the contract, field by field. */
function bodyOf(draft: Draft): unknown {
  return {
    name: draft.name,
    latitude: typedNumber(draft.latitude),
    longitude: typedNumber(draft.longitude),
    elevationM: typedNumber(draft.elevationM),
    zone: draft.zone,
    reason: draft.reason,
  };
}

/** What is no number at all is said so, not by the range that it misses. */
function withNumbers(found: FormProblems, draft: Draft): FormProblems {
  const isNumber = (name: FieldName) => Number.isFinite(typedNumber(draft[name]));
  const wrong = (['latitude', 'longitude', 'elevationM'] as const).filter((name) => !isNumber(name));
  return {
    ...found,
    fields: { ...found.fields, ...Object.fromEntries(wrong.map((name) => [name, 'Type a number.'])) },
  };
}

function typedNumber(text: string): number {
  const plain = text.trim().replace('−', '-');
  return plain === '' ? Number.NaN : Number(plain);
}

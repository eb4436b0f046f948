import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useEffect, useState } from 'react';
import type { SiteRecord, StationCandidate } from '../../contract/site-record.ts';
import { type ApiError, errorSentence, isApiError } from '../../lib/api-error.ts';
import { metres, number } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { heightDifference, kilometres } from './site-words.ts';
import { StationDrawing } from './station-drawing.tsx';
import type { SiteDesk } from './use-site-desk.ts';

const DRAWN = 4;
const PANEL = 'station';

interface StationPanelProps {
  readonly record: SiteRecord;
  readonly desk: SiteDesk;
  readonly mayChange: boolean;
  /** Told once a station is chosen. */
  readonly onChosen?: () => void;
}

/** The stations that may stand for a site, ranked, with the choice among them; any but the first asks for a reason. */
export function StationPanel({ record, desk, mayChange, onChosen }: StationPanelProps) {
  const { candidates, site } = record;
  const chosenId = site.station?.chosen === true ? site.station.id : null;
  const [wanted, setWanted] = useState<string | null>(chosenId);
  const [reason, setReason] = useState(site.station?.reason ?? '');
  const [problem, setProblem] = useState<string | undefined>();
  const isTyping = wanted !== chosenId || reason !== (site.station?.reason ?? '');
  const { setTyping } = desk;
  useEffect(() => setTyping(PANEL, isTyping), [setTyping, isTyping]);
  const save = useMutation({
    mutationFn: () =>
      desk.save({
        station: wanted === null ? null : { id: wanted, reason: reason.trim() === '' ? null : reason.trim() },
      }),
    onSuccess: () => onChosen?.(),
    onError: (error) => setProblem(isApiError(error, 'invalid_input') ? reasonProblem(error) : undefined),
  });
  const first = candidates[0];
  const asksReason = wanted !== null && wanted !== first?.id;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const lacks = asksReason && reason.trim() === '';
    setProblem(lacks ? `${first?.name ?? 'Another station'} stands first. Say why another is chosen.` : undefined);
    if (!lacks) save.mutate();
  };
  if (first === undefined) {
    return (
      <section aria-labelledby="station">
        <h2 id="station" className="mb-2 text-name">
          Weather station
        </h2>
        <p>The team has no station with an accepted weather year yet. An engineer uploads weather files.</p>
      </section>
    );
  }
  return (
    <section aria-labelledby="station">
      <h2 id="station" className="text-name">
        Weather station
      </h2>
      <p className="mb-3 max-w-[70ch] text-soft">
        Ranked by distance / 100 km + height difference / 300 m, the least first. The grade here rests on distance,
        height and years.
      </p>
      <form noValidate onSubmit={submit} className="grid gap-x-8 gap-y-4 lg:grid-cols-[minmax(0,1fr)_18rem]">
        <div className="min-w-0">
          <CandidateTable candidates={candidates} wanted={wanted} {...(mayChange ? { onWanted: setWanted } : {})} />
        </div>
        <StationDrawing
          record={record}
          markedId={wanted ?? first.id}
          shown={candidates.filter(({ id }, rank) => rank < DRAWN || id === wanted)}
        />
        {mayChange ? (
          <div className="grid max-w-[36rem] gap-3">
            {wanted === null ? null : (
              <TextField
                label={asksReason ? 'Reason for this station' : 'Reason, if there is one'}
                value={reason}
                onChange={setReason}
                problem={problem}
                maxLength={500}
                hint="Stands beside the station wherever it is shown."
              />
            )}
            {save.isError && problem === undefined && !isApiError(save.error, 'conflict') ? (
              <Notice tone="wrong" live title="Not saved">
                {errorSentence(save.error)}
              </Notice>
            ) : null}
            <div className="flex flex-wrap items-center gap-3">
              <Button type="submit" look="primary" busy={save.isPending} disabled={!isTyping}>
                {wanted === null ? 'Use the default' : 'Save this choice'}
              </Button>
              <span role="status" className="text-fine text-soft">
                {save.isSuccess && !isTyping ? 'Saved.' : ''}
              </span>
            </div>
          </div>
        ) : null}
      </form>
    </section>
  );
}

function reasonProblem(error: ApiError): string | undefined {
  return error.problems.find(({ path }) => path?.startsWith('body.station'))?.message;
}

interface CandidateTableProps {
  readonly candidates: readonly StationCandidate[];
  readonly wanted: string | null;
  readonly onWanted?: (id: string | null) => void;
}

function CandidateTable({ candidates, wanted, onWanted }: CandidateTableProps) {
  return (
    <ScrollInside label="Stations, scrolls sideways">
      <table className="ruled min-w-[34rem]">
        <caption className="sr-only">Stations that may stand for this site, the best first</caption>
        <thead>
          <tr>
            <th scope="col">Station</th>
            <th scope="col" className="figure">
              Distance
            </th>
            <th scope="col" className="figure">
              Elevation
            </th>
            <th scope="col" className="figure">
              Height diff.
            </th>
            <th scope="col" className="figure">
              Figure
            </th>
            <th scope="col" className="pl-4">
              Years
            </th>
            <th scope="col">Grade</th>
          </tr>
        </thead>
        <tbody>
          {onWanted ? (
            <tr>
              <th scope="row" colSpan={7}>
                <label className="flex min-h-6 items-center gap-2">
                  <input
                    type="radio"
                    name="station"
                    className="size-4 accent-indigo"
                    checked={wanted === null}
                    onChange={() => onWanted(null)}
                  />
                  The default: whichever stands first, also when stations come or move
                </label>
              </th>
            </tr>
          ) : null}
          {candidates.map((station) => (
            <tr key={station.id} className={station.id === wanted ? 'bg-shade' : ''}>
              <th scope="row">
                {onWanted ? (
                  <label className="flex min-h-6 items-center gap-2 font-medium">
                    <input
                      type="radio"
                      name="station"
                      className="size-4 flex-none accent-indigo"
                      checked={station.id === wanted}
                      onChange={() => onWanted(station.id)}
                    />
                    {station.name}
                  </label>
                ) : (
                  <span className="font-medium">{station.name}</span>
                )}
              </th>
              <td className="figure">{kilometres(station.distanceKm)}</td>
              <td className="figure">{metres(station.elevationM)}</td>
              <td className="figure">{heightDifference(station.heightDifferenceM)}</td>
              <td className="figure">{number(station.figure, 2)}</td>
              <td className="pl-4 whitespace-nowrap">{yearsOf(station)}</td>
              <td>{station.grade}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function yearsOf({ actualYears, typicalYears }: StationCandidate): string {
  const parts = [
    ...(actualYears > 0 ? [`${actualYears} actual`] : []),
    ...(typicalYears > 0 ? [`${typicalYears} typical`] : []),
  ];
  return parts.length === 0 ? 'none' : parts.join(', ');
}

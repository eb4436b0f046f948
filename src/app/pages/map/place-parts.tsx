import { keepPreviousData, useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import type { Place } from '../../../contract/runs.ts';
import { DerivedYears } from '../../../features/runs/derived-years.tsx';
import { LedgerPanel } from '../../../features/runs/ledger-panel.tsx';
import { PlaceHeading, ScoreBlock } from '../../../features/runs/place-heading.tsx';
import {
  CautionsNote,
  GradeNote,
  SpellNote,
  VerdictNote,
  WaterElectricityNote,
} from '../../../features/runs/place-notes.tsx';
import { type ProgrammeIds, placeQuery } from '../../../features/runs/run-queries.ts';
import { mayExportRuns } from '../../../features/runs/run-words.ts';
import { ScoreArithmetic } from '../../../features/runs/score-arithmetic.tsx';
import { YearStrip } from '../../../features/runs/year-strip.tsx';
import { errorSentence, isApiError } from '../../../lib/api-error.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';

interface PlacePartProps {
  readonly ids: ProgrammeIds;
  readonly stationId: string | null;
}

/** The chosen place beside the map: name, basis, score, verdict, ledger. */
export function PlaceMargin({ ids, stationId }: PlacePartProps) {
  if (stationId === null) return <p className="text-soft">Choose a station on the map or in the list.</p>;
  return <ChosenMargin ids={ids} stationId={stationId} />;
}

/** The chosen place beneath the map: its year cloth, then how its figures come about. */
export function PlaceFoot({ ids, stationId }: PlacePartProps) {
  return stationId === null ? null : <ChosenFoot ids={ids} stationId={stationId} />;
}

interface ChosenProps {
  readonly ids: ProgrammeIds;
  readonly stationId: string;
}

/** The place before stays in view, pale, until the next one comes: choosing along the list moves nothing on the page. */
function usePlace({ ids, stationId }: ChosenProps) {
  return useQuery({ ...placeQuery(ids, stationId), placeholderData: keepPreviousData });
}

function ChosenMargin({ ids, stationId }: ChosenProps) {
  const place = usePlace({ ids, stationId });
  if (place.data) {
    return (
      <section
        aria-label="Chosen place"
        aria-busy={place.isPlaceholderData}
        className={`grid content-start gap-3 ${place.isPlaceholderData ? 'opacity-50' : ''}`}
      >
        <PlaceHeading place={place.data} teamId={ids.teamId} />
        <ScoreBlock place={place.data} />
        {place.data.shown ? <LedgerPanel ledger={place.data.shown.ledger} /> : null}
      </section>
    );
  }
  if (place.isPending) return <Loading what="the place" />;
  if (isApiError(place.error, 'not_found') || isApiError(place.error, 'invalid_input')) {
    return <p>This station is not on the map any more. Choose another one.</p>;
  }
  return (
    <Notice tone="wrong" live actions={<Button onClick={() => place.refetch()}>Try again</Button>}>
      {errorSentence(place.error)}
    </Notice>
  );
}

function ChosenFoot({ ids, stationId }: ChosenProps) {
  const { role } = useTeam();
  const { data: place, isPlaceholderData } = usePlace({ ids, stationId });
  if (!place || (place.shown === null && place.derived.length === 0)) return null;
  const { teamId } = ids;
  const mayExport = mayExportRuns(role);
  const derived = <DerivedYears derived={place.derived} teamId={teamId} mayExport={mayExport} />;
  return (
    <div aria-busy={isPlaceholderData} className={isPlaceholderData ? 'opacity-50' : ''}>
      {place.shown === null ? (
        <div className="lg:px-5 lg:pt-7 lg:pb-14">{derived}</div>
      ) : (
        <>
          <div className="border-line bg-paper max-lg:mb-5 lg:border-b lg:px-5 lg:pt-4 lg:pb-2">
            <YearStrip place={place} teamId={teamId} mayExport={mayExport} />
          </div>
          <PlaceNotes place={place} shown={place.shown} derived={derived} />
        </>
      )}
    </div>
  );
}

interface PlaceNotesProps {
  readonly place: Place;
  readonly shown: NonNullable<Place['shown']>;
  readonly derived: ReactNode;
}

function PlaceNotes({ place, shown, derived }: PlaceNotesProps) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-8 lg:grid-cols-3 lg:px-5 lg:pt-7 lg:pb-14">
      <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-x-10 gap-y-8 lg:col-span-2 lg:grid-cols-2">
        <div className="min-w-0 lg:col-span-2">
          <ScoreArithmetic shown={shown} />
        </div>
        <VerdictNote shown={shown} />
        <SpellNote shown={shown} />
      </div>
      <div className="grid min-w-0 content-start gap-8">
        <WaterElectricityNote shown={shown} />
        <GradeNote place={place} />
      </div>
      {place.derived.length > 0 ? <div className="min-w-0 lg:col-span-3">{derived}</div> : null}
      <div className="min-w-0 lg:col-span-3">
        <CautionsNote shown={shown} />
      </div>
    </div>
  );
}

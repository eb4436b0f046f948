import { useQuery } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import type { TurningChange } from '../../../contract/place-doubts.ts';
import type { Place } from '../../../contract/runs.ts';
import { hourClasses } from '../../../engine/hour-classes/hour-class.ts';
import { DerivedYears } from '../../../features/runs/derived-years.tsx';
import { Fold } from '../../../features/runs/fold.tsx';
import type { HourChoice } from '../../../features/runs/hour-choice.ts';
import { HoursDialog } from '../../../features/runs/hours-dialog.tsx';
import { LedgerPanel, type ShownLedger } from '../../../features/runs/ledger-panel.tsx';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import { MonthHourTable } from '../../../features/runs/month-hour-table.tsx';
import { draftAgainstSaved, PlaceHeading, ScoreBlock } from '../../../features/runs/place-heading.tsx';
import {
  CautionsNote,
  GradeNote,
  SpellNote,
  VerdictNote,
  WaterElectricityNote,
} from '../../../features/runs/place-notes.tsx';
import { RangeNote } from '../../../features/runs/range-note.tsx';
import { type PlaceAsked, type ProgrammeIds, placeQuery, runHoursQuery } from '../../../features/runs/run-queries.ts';
import { mayExportRuns, nameOfPlace, rangeWords } from '../../../features/runs/run-words.ts';
import { ScoreArithmetic } from '../../../features/runs/score-arithmetic.tsx';
import { TurningNote } from '../../../features/runs/turning-note.tsx';
import { YearStrip } from '../../../features/runs/year-strip.tsx';
import { errorSentence, isApiError } from '../../../lib/api-error.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';

/** The chosen place as the map has it, and what it is asked under. */
export interface ChosenPlace {
  readonly ids: ProgrammeIds;
  /** With the figures of the draft, where there is one. */
  readonly figures: MapPlace;
  readonly saved: MapPlace;
  readonly draft: PlaceAsked['draft'];
  /** What else can be done with it. */
  readonly actions: ReactNode;
  readonly onTry: (change: TurningChange) => (() => void) | null;
}

/** The place before stays in view, pale, until the next one comes: choosing along the list moves nothing on the page. */
function usePlace({ ids, figures }: Pick<ChosenPlace, 'ids' | 'figures'>) {
  return useQuery(placeQuery(ids, figures));
}

/** The chosen place beside the map: name, basis, score, verdict, ledger. */
export function PlaceMargin(chosen: ChosenPlace) {
  const { ids, figures, saved, draft, actions } = chosen;
  const place = usePlace(chosen);
  const [choice, setChoice] = useState<HourChoice | null>(null);
  if (place.data) {
    const { data, isPlaceholderData } = place;
    const ledger = draft === null ? (data.shown?.ledger ?? null) : draftLedger(figures);
    return (
      <section
        aria-label="Chosen place"
        aria-busy={isPlaceholderData}
        className={`grid content-start gap-3 ${isPlaceholderData ? 'opacity-50' : ''}`}
      >
        <PlaceHeading place={data} teamId={ids.teamId} />
        <ScoreBlock place={data} figures={figures} isDraft={draft !== null} />
        {draft === null ? null : <p className="text-fine text-soft">{draftAgainstSaved(figures.score, saved.score)}</p>}
        {ledger === null ? null : (
          <LedgerPanel
            ledger={ledger}
            {...(draft === null ? { onList: (hourClass) => setChoice({ hourClass }) } : {})}
          />
        )}
        {actions}
        <HourList place={data} ids={ids} choice={choice} onClose={() => setChoice(null)} />
      </section>
    );
  }
  if (place.isPending) return <Loading what="the place" />;
  if (isApiError(place.error, 'not_found') || isApiError(place.error, 'invalid_input')) {
    return <p>This place is not on the map any more. Choose another one.</p>;
  }
  return (
    <Notice tone="wrong" live actions={<Button onClick={() => place.refetch()}>Try again</Button>}>
      {errorSentence(place.error)}
    </Notice>
  );
}

/** What the map is told of a drafted year: every class, without the two reasons of damp hours. */
function draftLedger({ ledger }: MapPlace): ShownLedger | null {
  if (ledger === null) return null;
  const counts = hourClasses.map((hourClass, index) => [hourClass, ledger.classes[index] ?? 0] as const);
  const count = (wanted: string) => counts.find(([hourClass]) => hourClass === wanted)?.[1] ?? 0;
  const classes = {
    ...{ closed: count('closed'), missing: count('missing'), idle: count('idle'), frozen: count('frozen') },
    ...{ damp: count('damp'), air: count('air'), direct: count('direct'), indirect: count('indirect') },
    ...{ dewpoint: count('dewpoint'), twostage: count('twostage'), short: count('short'), beyond: count('beyond') },
  };
  const hours = ledger.classes.reduce((sum, each) => sum + each, 0);
  return { hours, classes, demand: ledger.demand, met: ledger.met, dampOutside: null, dampPlant: null };
}

interface HourListProps {
  readonly place: Place;
  readonly ids: ProgrammeIds;
  readonly choice: HourChoice | null;
  readonly onClose: () => void;
}

function HourList({ place, ids: { teamId }, choice, onClose }: HourListProps) {
  if (choice === null || place.shown === null) return null;
  return (
    <HoursDialog
      run={{ teamId, runId: place.shown.runId }}
      days={place.shown.ledger.hours / 24}
      choice={choice}
      placeName={nameOfPlace(place)}
      onClose={onClose}
    />
  );
}

/** The chosen place beneath the map: its year cloth, then how its figures come about. */
export function PlaceFoot(chosen: ChosenPlace) {
  const { ids, draft } = chosen;
  const { role } = useTeam();
  const { data: place, isPlaceholderData } = usePlace(chosen);
  const [choice, setChoice] = useState<HourChoice | null>(null);
  if (!place || (place.shown === null && place.derived.length === 0)) return null;
  const { teamId } = ids;
  const mayExport = mayExportRuns(role);
  const derived = <DerivedYears derived={place.derived} teamId={teamId} mayExport={mayExport} />;
  return (
    <div aria-busy={isPlaceholderData} className={isPlaceholderData ? 'opacity-50' : ''}>
      {draft === null ? null : (
        <p className="border-b border-line bg-paper py-1.5 text-fine text-soft lg:px-5">
          {`What follows is of version ${place.brief.version}. What would make it pass and the range are asked under the draft.`}
        </p>
      )}
      {place.shown === null ? (
        <div className="lg:px-5 lg:pt-7 lg:pb-14">{derived}</div>
      ) : (
        <>
          <div className="border-line bg-paper max-lg:mb-5 lg:border-b lg:px-5 lg:pt-4 lg:pb-2">
            <YearStrip place={place} teamId={teamId} mayExport={mayExport} onListDay={(day) => setChoice({ day })} />
          </div>
          <PlaceNotes {...chosen} place={place} shown={place.shown} derived={derived} onList={setChoice} />
        </>
      )}
      <HourList place={place} ids={ids} choice={choice} onClose={() => setChoice(null)} />
    </div>
  );
}

interface PlaceNotesProps extends ChosenPlace {
  readonly place: Place;
  readonly shown: NonNullable<Place['shown']>;
  readonly derived: ReactNode;
  readonly onList: (choice: HourChoice) => void;
}

function PlaceNotes({ place, shown, derived, ids, figures, draft, onTry, onList }: PlaceNotesProps) {
  const asked = {
    place: { kind: figures.kind, id: figures.id },
    draft,
    briefVersionId: place.brief.briefVersionId,
  };
  const years = rangeWords(figures);
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
        <WaterElectricityNote shown={shown} loadKw={place.site?.loadKw ?? null} />
        <GradeNote place={place} />
      </div>
      <div className="min-w-0 border-b border-line lg:col-span-3">
        <Fold title="What would make it pass" gist={turningGist(figures)}>
          {() => <TurningNote ids={ids} asked={asked} onTry={onTry} />}
        </Fold>
        <Fold title="Range of the score" gist={years === null ? 'by doubt' : `${years}, and by doubt`}>
          {() => <RangeNote ids={ids} asked={asked} />}
        </Fold>
        <Fold title="Unmet hours by month and hour" gist="each figure lists its hours">
          {() => <MonthHours run={{ teamId: ids.teamId, runId: shown.runId }} onList={onList} />}
        </Fold>
        {place.derived.length > 0 ? (
          <Fold title="Other climates" gist="derived years beside their parents" isOpenFirst>
            {() => derived}
          </Fold>
        ) : null}
        <Fold title="Before anyone builds" gist="cautions" isOpenFirst>
          {() => <CautionsNote shown={shown} />}
        </Fold>
      </div>
    </div>
  );
}

function turningGist({ verdict }: MapPlace): string {
  if (verdict === 'does not') return 'the least single change';
  return verdict === 'meets the brief' ? 'it does already' : 'no tolerance is set';
}

interface MonthHoursProps {
  readonly run: { readonly teamId: string; readonly runId: string };
  readonly onList: (choice: HourChoice) => void;
}

function MonthHours({ run, onList }: MonthHoursProps) {
  const codes = useQuery(runHoursQuery(run.teamId, run.runId));
  if (codes.data === undefined) return <Loading what="the hours" />;
  return <MonthHourTable codes={codes.data} onList={(month, hour) => onList({ month, hour, met: 'no' })} />;
}

import { useQuery } from '@tanstack/react-query';
import { lazy, type ReactNode, Suspense, useState } from 'react';
import type { Place } from '../../../contract/place.ts';
import { Fold } from '../../../features/runs/fold.tsx';
import type { HourChoice } from '../../../features/runs/hour-choice.ts';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import {
  CautionsNote,
  GradeNote,
  SpellNote,
  VerdictNote,
  WaterElectricityNote,
} from '../../../features/runs/place-notes.tsx';
import { runHoursQuery } from '../../../features/runs/run-queries.ts';
import { mayExportRuns, rangeWords } from '../../../features/runs/run-words.ts';
import { ScoreArithmetic } from '../../../features/runs/score-arithmetic.tsx';
import { YearStrip } from '../../../features/runs/year-strip.tsx';
import { useTeam } from '../../../lib/team-scope.ts';
import { Loading } from '../../../ui/loading.tsx';
import { HourList } from './hour-list.tsx';
import { type ChosenPlace, usePlace } from './place-margin.tsx';

// What is folded is fetched when it is opened.
const DerivedYears = lazy(async () => ({
  default: (await import('../../../features/runs/derived-years.tsx')).DerivedYears,
}));
const DesignPointsNote = lazy(async () => ({
  default: (await import('../../../features/runs/design-points-note.tsx')).DesignPointsNote,
}));
const MonthHourTable = lazy(async () => ({
  default: (await import('../../../features/runs/month-hour-table.tsx')).MonthHourTable,
}));
const RangeNote = lazy(async () => ({ default: (await import('../../../features/runs/range-note.tsx')).RangeNote }));
const TurningNote = lazy(async () => ({
  default: (await import('../../../features/runs/turning-note.tsx')).TurningNote,
}));

/** The chosen place beneath the map: its year cloth, then how its figures come about. */
export function PlaceFoot(chosen: ChosenPlace) {
  const { ids, draft } = chosen;
  const { role } = useTeam();
  const { data: place, isPlaceholderData } = usePlace(chosen);
  const [choice, setChoice] = useState<HourChoice | null>(null);
  if (!place || (place.shown === null && place.derived.length === 0)) return null;
  const { teamId } = ids;
  const mayExport = mayExportRuns(role);
  const derived = (
    <Suspense fallback={<Loading what="other climates" />}>
      <DerivedYears derived={place.derived} teamId={teamId} mayExport={mayExport} />
    </Suspense>
  );
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
        <Fold title="At the design points" gist="airflow, capacity and back-up">
          {() => (
            <DesignPointsNote run={{ teamId: ids.teamId, runId: shown.runId }} loadKw={place.site?.loadKw ?? null} />
          )}
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

import { useQuery } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import type { TurningChange } from '../../../contract/place-doubts.ts';
import { hourClasses } from '../../../engine/hour-classes/hour-class.ts';
import type { HourChoice } from '../../../features/runs/hour-choice.ts';
import { LedgerPanel, type ShownLedger } from '../../../features/runs/ledger-panel.tsx';
import type { MapPlace } from '../../../features/runs/map-places.ts';
import { draftAgainstSaved, PlaceHeading, ScoreBlock } from '../../../features/runs/place-heading.tsx';
import { type PlaceAsked, type ProgrammeIds, placeQuery } from '../../../features/runs/run-queries.ts';
import { errorSentence, isApiError } from '../../../lib/api-error.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { HourList } from './hour-list.tsx';

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
export function usePlace({ ids, figures }: Pick<ChosenPlace, 'ids' | 'figures'>) {
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

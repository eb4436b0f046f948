import { lazy, Suspense } from 'react';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import { BriefNote } from '../../../features/runs/brief-note.tsx';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import type { LiveScores } from '../../../features/runs/use-live-scores.ts';
import { BriefChoice } from './brief-choice.tsx';
import { DraftNote } from './draft-note.tsx';
import type { LiveDraftState } from './use-live-draft.ts';

/** The sliders wait for the brief in any case; they are fetched beside it. */
const LiveBrief = lazy(async () => ({ default: (await import('../../../features/runs/live-brief.tsx')).LiveBrief }));
/** About the height of five sliders: what stands beneath does not jump. */
const FIVE_SLIDERS = 'min-h-60';

interface BriefMarginProps {
  readonly ids: ProgrammeIds;
  readonly map: ProgrammeMap;
  readonly live: LiveDraftState;
  readonly scores: LiveScores;
  readonly onBrief: (briefId: string) => void;
  readonly onSaved: (version: number) => void;
}

/** The brief with its main parameters, each to be tried out on the map. */
export function BriefMargin({ ids, map, live, scores, onBrief, onSaved }: BriefMarginProps) {
  return (
    <div className="grid gap-3">
      <BriefNote map={map} choice={<BriefChoice ids={ids} briefId={map.brief.briefId} onChoose={onBrief} />} />
      <section aria-label="Parameters of the brief" aria-busy={scores.isBehind}>
        <Suspense fallback={<div className={FIVE_SLIDERS} />}>
          {live.record === undefined ? (
            <div className={FIVE_SLIDERS} />
          ) : (
            <LiveBrief
              parameters={live.parameters}
              draft={live.draft}
              problems={live.problems}
              onChange={live.change}
            />
          )}
        </Suspense>
      </section>
      <DraftNote ids={ids} live={live} isBehind={scores.isBehind} error={scores.error} onSaved={onSaved} />
    </div>
  );
}

import { useEffect, useMemo, useRef, useState } from 'react';
import type { PlaceFigures } from '../../contract/place-figures.ts';
import { type RescoreAnswer, rescore } from '../../contract/rescore.ts';
import { call } from '../../lib/api-client.ts';
import { isApiError } from '../../lib/api-error.ts';
import type { SheetBox } from '../../map/use-tell-view.ts';
import type { MapPlaces } from './map-places.ts';
import { partByView, rescoreTurns } from './rescore-turns.ts';
import type { ProgrammeIds } from './run-queries.ts';

export interface LiveScores {
  /** Figures under the draft by place; empty without a draft. */
  readonly figures: ReadonlyMap<string, PlaceFigures>;
  /** Some places do not stand under the latest draft yet. */
  readonly isBehind: boolean;
  readonly error: unknown;
}

interface LiveScoresInput {
  readonly ids: Pick<ProgrammeIds, 'teamId' | 'programmeId'>;
  /** Saved places: which there are, and where. */
  readonly places: MapPlaces;
  /** The draft to be tried; null: the brief as it was saved, or a draft that has faults. */
  readonly draft: { readonly key: string; readonly body: Readonly<Record<string, unknown>> } | null;
  /** What the map shows; read when a draft comes. */
  readonly box: { readonly current: SheetBox | null };
}

type LiveAnswer = Pick<RescoreAnswer, 'stations' | 'sites'>;

/** Portions of what is not looked at are shown together: each showing goes over every place of the map. */
const TOGETHER_MS = 1500;

const NOTHING: LiveScores = { figures: new Map(), isBehind: false, error: null };

/** What every place comes to under a draft while it is being made. Nothing is stored. */
export function useLiveScores({ ids: { teamId, programmeId }, places, draft, box }: LiveScoresInput): LiveScores {
  const [scores, setScores] = useState(NOTHING);
  const turns = useMemo(() => {
    let waiting: LiveAnswer[] = [];
    let shownAt = Number.NEGATIVE_INFINITY;
    let waitingKey: string | null = null;
    return rescoreTurns({
      ask: ({ body, stationIds, siteIds }, signal) => {
        const asked = { body: { ...body }, stationIds: [...stationIds], siteIds: [...siteIds] };
        return call(rescore, { params: { teamId, programmeId }, query: {}, body: asked }, { signal });
      },
      onAnswer: (answer, { key, isView, isWhole }) => {
        waiting = key === waitingKey ? [...waiting, answer] : [answer];
        waitingKey = key;
        const now = performance.now();
        if (!isView && !isWhole && now - shownAt < TOGETHER_MS) return;
        const answers = waiting;
        waiting = [];
        shownAt = now;
        setScores((held) => ({ figures: withAnswers(held.figures, answers), isBehind: !isWhole, error: null }));
      },
      onFault: (error) => {
        const answers = waiting;
        waiting = [];
        if (!isAbort(error))
          setScores((held) => ({ figures: withAnswers(held.figures, answers), isBehind: true, error }));
      },
    });
  }, [teamId, programmeId]);
  useEffect(() => () => turns.leave(), [turns]);
  const latest = useRef(places);
  useEffect(() => {
    latest.current = places;
  });
  const key = draft?.key ?? null;
  const body = draft?.body;
  useEffect(() => {
    if (key === null || body === undefined) {
      turns.leave();
      setScores(NOTHING);
    } else {
      setScores((held) => (held.isBehind ? held : { ...held, isBehind: true }));
      turns.want({ key, body, ...partByView(latest.current, box.current) });
    }
  }, [turns, key, body, box]);
  return key === null ? NOTHING : scores;
}

function withAnswers(figures: LiveScores['figures'], answers: readonly LiveAnswer[]): LiveScores['figures'] {
  const next = new Map(figures);
  for (const { stations, sites } of answers) {
    for (const { stationId, ...found } of stations) next.set(stationId, found);
    for (const { siteId, ...found } of sites) next.set(siteId, found);
  }
  return next;
}

function isAbort(error: unknown): boolean {
  return !isApiError(error) && error instanceof DOMException && error.name === 'AbortError';
}

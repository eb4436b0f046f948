import { keepPreviousData, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import {
  getSurface,
  judgeSurface,
  type Surface,
  type SurfaceAnswer,
  type SurfaceCells,
} from '../../contract/surface.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey } from '../../lib/api-query.ts';
import { latestOnly } from './latest-only.ts';
import type { ProgrammeIds } from './run-queries.ts';

/** A surface that can be drawn. */
export interface ShownSurface {
  readonly cells: SurfaceCells;
  readonly scores: string;
  readonly error: Surface['error'];
}

export interface SurfaceState {
  readonly shown: ShownSurface | null;
  /** Why there is none. */
  readonly off: string | null;
  readonly fault: unknown;
  readonly isPending: boolean;
}

interface SurfaceAsked {
  readonly ids: ProgrammeIds;
  /** The version in view: another one is asked anew. */
  readonly briefVersionId: string;
  readonly draft: { readonly key: string; readonly body: Readonly<Record<string, unknown>> } | null;
  /** Whether it is to be seen; nothing is asked otherwise. */
  readonly isOn: boolean;
  /** Runs that are still to come: with each the surface may be another. */
  readonly pending: number;
}

interface DraftAnswer {
  readonly key: string;
  readonly answer: SurfaceAnswer;
}

/** The surface between the stations under the saved brief, or under a draft while it is being made. */
export function useSurface({ ids, briefVersionId, draft, isOn, pending }: SurfaceAsked): SurfaceState {
  const { teamId, programmeId, briefId } = ids;
  const held = useHeldCells();
  const input = { params: { teamId, programmeId }, query: briefId === null ? {} : { brief: briefId } };
  const saved = useQuery<SurfaceAnswer>({
    queryKey: [...apiKey(getSurface, input), briefVersionId, pending],
    queryFn: async ({ signal }) => {
      const query = { ...input.query, ...held.asked() };
      return held.keep(await call(getSurface, { params: input.params, query }, { signal }));
    },
    enabled: isOn,
    placeholderData: keepPreviousData,
  });
  const drafted = useDraftSurface({ teamId, programmeId, draft: isOn ? draft : null, held });
  const answer = isOn ? ((draft === null ? undefined : drafted.answer) ?? saved.data) : undefined;
  const surface = answer?.surface ?? null;
  const cells = surface === null ? null : held.cellsOf(surface);
  const shown = useMemo(
    () => (surface === null || cells === null ? null : { cells, scores: surface.scores, error: surface.error }),
    [surface, cells],
  );
  return {
    shown,
    off: answer?.off ?? null,
    fault: drafted.fault ?? saved.error,
    isPending: isOn && answer === undefined && saved.isFetching,
  };
}

type HeldCells = ReturnType<typeof useHeldCells>;

/** Cells by their key: they come once, and the same object draws the same mesh. */
function useHeldCells() {
  const client = useQueryClient();
  return useMemo(() => {
    const keyOf = (cellsKey: string) => ['surface cells', cellsKey];
    let latest: string | null = null;
    return {
      asked: (): { held?: string } =>
        latest !== null && client.getQueryData(keyOf(latest)) !== undefined ? { held: latest } : {},
      keep(answer: SurfaceAnswer): SurfaceAnswer {
        const { surface } = answer;
        if (surface === null) return answer;
        latest = surface.cellsKey;
        if (surface.cells === null) return answer;
        client.setQueryDefaults(['surface cells'], { gcTime: Number.POSITIVE_INFINITY });
        client.setQueryData(keyOf(surface.cellsKey), surface.cells);
        return { ...answer, surface: { ...surface, cells: null } };
      },
      cellsOf: ({ cellsKey }: Surface): SurfaceCells | null =>
        client.getQueryData<SurfaceCells>(keyOf(cellsKey)) ?? null,
    };
  }, [client]);
}

function useDraftSurface(on: {
  readonly teamId: string;
  readonly programmeId: string;
  readonly draft: SurfaceAsked['draft'];
  readonly held: HeldCells;
}): { answer: SurfaceAnswer | undefined; fault: unknown } {
  const { teamId, programmeId, draft, held } = on;
  const [found, setFound] = useState<DraftAnswer | null>(null);
  const [fault, setFault] = useState<unknown>(null);
  const turns = useMemo(
    () =>
      latestOnly<NonNullable<SurfaceAsked['draft']>, SurfaceAnswer>({
        ask: async ({ body }, signal) => {
          const asked = { params: { teamId, programmeId }, query: {}, body: { body: { ...body }, ...held.asked() } };
          return held.keep(await call(judgeSurface, asked, { signal }));
        },
        onAnswer: (answer, { key }) => {
          setFound({ key, answer });
          setFault(null);
        },
        onFault: setFault,
      }),
    [teamId, programmeId, held],
  );
  useEffect(() => () => turns.leave(), [turns]);
  const key = draft?.key ?? null;
  const body = draft?.body;
  useEffect(() => {
    if (key === null || body === undefined) {
      turns.leave();
      setFound(null);
      setFault(null);
    } else turns.want({ key, body });
  }, [turns, key, body]);
  return { answer: found?.answer, fault };
}

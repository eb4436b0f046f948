import { lazy, type ReactNode, Suspense, useMemo } from 'react';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { useSurface } from '../../../features/runs/use-surface.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { SurfaceLegend } from '../../../map/surface-legend.tsx';
import type { MapAddress } from './map-address.ts';
import type { ChangeAddress } from './use-map-address.ts';

/** Bands and cells are made while the marks are drawn already. */
const SurfaceLayer = lazy(async () => ({ default: (await import('../../../map/surface-layer.tsx')).SurfaceLayer }));

interface SurfaceOnMap {
  readonly layer: ReactNode;
  readonly legend: ReactNode;
}

/** The surface of the score with its line of the legend; other layers have none. */
export function useSurfaceOnMap(on: {
  readonly ids: ProgrammeIds;
  readonly map: ProgrammeMap;
  readonly draft: Parameters<typeof useSurface>[0]['draft'];
  readonly address: MapAddress;
  readonly changeAddress: ChangeAddress;
}): SurfaceOnMap {
  const { ids, map, draft, address, changeAddress } = on;
  const isScore = address.layer.kind === 'score';
  const isOn = address.surface && isScore;
  const { briefVersionId } = map.brief;
  const { shown, off, fault, isPending } = useSurface({ ids, briefVersionId, draft, isOn, pending: map.pending });
  const isShown = address.surface;
  const note = off ?? (fault === null ? null : errorSentence(fault));
  const layer = useMemo(
    () =>
      !isScore || shown === null ? null : (
        <Suspense>
          <SurfaceLayer cells={shown.cells} scores={shown.scores} />
        </Suspense>
      ),
    [isScore, shown],
  );
  const legend = useMemo(
    () =>
      isScore ? (
        <SurfaceLegend
          isOn={isShown}
          onSwitch={(surface) => changeAddress({ surface }, { replace: true })}
          note={note}
          error={shown?.error ?? null}
          isPending={isPending}
        />
      ) : null,
    [isScore, isShown, note, shown, isPending, changeAddress],
  );
  return { layer, legend };
}

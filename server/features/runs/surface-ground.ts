import { createHash } from 'node:crypto';
import { distanceWeights } from '#engine/interpolation/distance-weights.ts';
import type { SurfacePoints } from '#engine/interpolation/interpolate-score.ts';
import type { SurfaceGrid, SurfaceStation } from '../../jobs/web-task.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';

export type SurfaceThreads = Pick<WebThreads, 'surface'>;

/** The ground of a surface with the weights that were asked of it: what stays while a slider moves. */
export interface SurfaceGround {
  readonly key: string;
  readonly grid: SurfaceGrid;
  pointsOf(power: number): SurfacePoints;
}

/** Grounds kept, some 10 MB each for the largest. */
const MOST_KEPT = 12;
/** Raised when cells or neighbours are made otherwise. */
const LAYOUT = 'cells 1';

export interface SurfaceGrounds {
  take(stations: readonly SurfaceStation[], signal: AbortSignal): Promise<SurfaceGround>;
}

/** Makes each ground once, in a thread, whoever asks for it; the one that was asked for longest ago goes first. */
export function makeSurfaceGrounds(threads: SurfaceThreads): SurfaceGrounds {
  const kept = new Map<string, Promise<SurfaceGround>>();
  return {
    async take(stations, signal) {
      const key = keyOf(stations);
      const ground = kept.get(key) ?? threads.surface({ stations }).then((grid) => groundOf(key, grid));
      kept.delete(key);
      kept.set(key, ground);
      ground.catch(() => kept.delete(key));
      for (const oldest of kept.keys()) if (kept.size > MOST_KEPT) kept.delete(oldest);
      return untilGone(ground, signal);
    },
  };
}

/** Others may wait for the same ground, so that a client who goes ends his own waiting alone. */
function untilGone<T>(work: Promise<T>, signal: AbortSignal): Promise<T> {
  if (signal.aborted) return Promise.reject(signal.reason);
  return new Promise((resolve, reject) => {
    const stop = () => reject(signal.reason);
    signal.addEventListener('abort', stop, { once: true });
    work.then(resolve, reject).finally(() => signal.removeEventListener('abort', stop));
  });
}

function keyOf(stations: readonly SurfaceStation[]): string {
  const places = stations.map(({ latitude, longitude, elevationM }) => [latitude, longitude, elevationM]);
  return createHash('sha256')
    .update(JSON.stringify([LAYOUT, places]))
    .digest('base64url')
    .slice(0, 22);
}

function groundOf(key: string, grid: SurfaceGrid): SurfaceGround {
  const { neighbours, elevationsM, held } = grid;
  const weights = new Map<number, Float32Array>();
  return {
    key,
    grid,
    pointsOf(power) {
      const known = weights.get(power) ?? distanceWeights(neighbours, power);
      weights.set(power, known);
      return { neighbours, weights: known, elevationsM, held };
    },
  };
}

import type { WeatherArchive, WeatherBatch } from '#contract/weather-batches.ts';
import type { ArchiveView, BatchView } from './batch-read-model.ts';

export function presentBatch(view: BatchView): WeatherBatch {
  const {
    reading = 0,
    asks = 0,
    review = 0,
    accepted = 0,
    refused = 0,
    withdrawn = 0,
    superseded = 0,
  } = view.fileCounts;
  const archives = view.archives.map(presentArchive);
  const stoppedArchives = archives.filter(({ failure }) => failure !== null).length;
  const opening = archives.some(
    ({ status, failure }) => failure === null && (status === 'waiting' || status === 'opening'),
  );
  return {
    id: view.id,
    name: view.name,
    state: view.state,
    madeBy: view.madeBy,
    madeAt: view.madeAt.toISOString(),
    archives,
    files: { reading, asks, review, accepted, refused, withdrawn, superseded },
    stopped: view.stoppedFiles + stoppedArchives,
    ended: !opening && view.unreadFiles === 0,
  };
}

export function presentArchive(view: ArchiveView): WeatherArchive {
  return { ...view, leftOut: view.leftOut.map(({ path, why }) => ({ path, why })) };
}

import type { FileStatus } from '../../contract/weather.ts';
import type { WeatherArchive, WeatherBatch } from '../../contract/weather-batches.ts';
import { number, plural } from '../../lib/format.ts';

/** Files of a batch that are there, and those of them that are read. */
export function filesOf({ files }: Pick<WeatherBatch, 'files'>): { total: number; read: number } {
  const total = Object.values(files).reduce((sum, count) => sum + count, 0);
  return { total, read: total - files.reading };
}

/** How far a batch is, 0 to 1: files read of those that are known of; null while an archive has not said what it holds, or is on its way. */
export function batchShare(batch: WeatherBatch, sending: number): number | null {
  if (batch.ended && sending === 0) return 1;
  const opening = batch.archives.filter(isBeingOpened);
  if (opening.some(({ members }) => members === null)) return null;
  const unopened = opening.reduce((sum, archive) => sum + membersLeft(archive), 0);
  const { total, read } = filesOf(batch);
  return total + unopened === 0 ? null : read / (total + unopened + sending);
}

export function isBeingOpened({ status, failure }: WeatherArchive): boolean {
  return failure === null && (status === 'waiting' || status === 'opening');
}

function membersLeft({ members, membersOpened, leftOut }: WeatherArchive): number {
  return Math.max(0, (members ?? 0) - membersOpened - leftOut.length);
}

/** Where a batch stands, with so many files on their way to it: "Reading, 12 of 40 files read". */
export function batchWords(batch: WeatherBatch, sending: number): string {
  const { total, read } = filesOf(batch);
  const figures = `${number(read)} of ${plural(total, 'file')} read`;
  if (batch.state === 'cancelled') return 'Cancelled: what had not been read was withdrawn';
  if (batch.ended && sending === 0) return total === 0 ? 'Nothing to read' : `${plural(total, 'file')}, all read`;
  return batch.state === 'paused' ? `Paused, ${figures}` : `Reading, ${figures}`;
}

/** What became of an archive, in a sentence. */
export function archiveWords(archive: WeatherArchive): string {
  const { status, members, membersOpened, problem, failure } = archive;
  if (failure !== null) return `Opening stopped: ${failure}`;
  switch (status) {
    case 'refused':
      return `Refused. ${problem ?? ''}`.trim();
    case 'cancelled':
      return 'Cancelled before all of it was opened.';
    case 'waiting':
      return 'Waits to be opened.';
    case 'opening':
      return `Opening, ${number(membersOpened)} of ${members === null ? 'its' : number(members)} files taken out.`;
    case 'opened':
      return `${plural(membersOpened, 'file')} taken out of ${number(members ?? membersOpened)}.`;
  }
}

/** In which order a batch counts its files. */
export const countedStatuses: readonly FileStatus[] = [
  'asks',
  'review',
  'accepted',
  'refused',
  'reading',
  'withdrawn',
  'superseded',
];

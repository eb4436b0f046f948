import { useQueryClient } from '@tanstack/react-query';
import { useSyncExternalStore } from 'react';
import { uploadWeatherFile } from '../../contract/weather.ts';
import { listWeatherBatches, startWeatherBatch, uploadWeatherArchive } from '../../contract/weather-batches.ts';
import { listWeatherFiles } from '../../contract/weather-library.ts';
import { call, uploadFiles } from '../../lib/api-client.ts';
import { apiKey } from '../../lib/api-query.ts';
import { type Upload, UploadQueue } from './upload-queue.ts';

const progress = (onShare: (share: number) => void) => ({
  onProgress: ({ sentBytes, totalBytes }: { sentBytes: number; totalBytes: number }) =>
    onShare(totalBytes > 0 ? sentBytes / totalBytes : 0),
});

/** The queue of this page. */
export const pageUploads = new UploadQueue({
  async startBatch({ teamId, name }) {
    return (await call(startWeatherBatch, { params: { teamId }, query: {}, body: { name } })).id;
  },
  sendFile({ teamId, batchId, file, onShare, signal }) {
    const query = batchId === null ? {} : { batchId };
    return uploadFiles(
      uploadWeatherFile,
      { params: { teamId }, query, files: [file] },
      { ...progress(onShare), signal },
    );
  },
  async sendArchive({ teamId, batchId, file, onShare, signal }) {
    const input = { params: { teamId, batchId }, query: {}, files: [file] };
    await uploadFiles(uploadWeatherArchive, input, { ...progress(onShare), signal });
  },
});

if (typeof window !== 'undefined') {
  window.addEventListener('beforeunload', (event) => {
    if (pageUploads.isBusy()) event.preventDefault();
  });
}

/** Puts chosen or dropped files in line for a team. */
export function useUpload(teamId: string): (files: readonly File[]) => void {
  const client = useQueryClient();
  return (files) =>
    pageUploads.add(teamId, files, () => {
      for (const endpoint of [listWeatherFiles, listWeatherBatches])
        client.invalidateQueries({ queryKey: apiKey(endpoint) });
    });
}

/** What this page has sent or is sending for a team, newest first. */
export function useUploads(teamId: string): readonly Upload[] {
  const uploads = useSyncExternalStore(pageUploads.subscribe, pageUploads.snapshot);
  return uploads.filter((upload) => upload.teamId === teamId);
}

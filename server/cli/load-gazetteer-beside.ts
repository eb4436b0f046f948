import { setTimeout as sleep } from 'node:timers/promises';
import { loadGazetteer } from '../db/load-gazetteer.ts';
import type { Log } from '../log.ts';

const PAUSE_MS = 5_000;

/** Loads the gazetteer beside everything else, since names of places may be searched a little later; tried again until it is there. */
export function loadGazetteerBeside(load: { ownerUrl: string; file: string; log: Log }): { stop(): Promise<void> } {
  const stopping = new AbortController();
  const loading = loadPatiently(load, stopping.signal);
  return {
    async stop() {
      stopping.abort();
      await loading;
    },
  };
}

async function loadPatiently(load: { ownerUrl: string; file: string; log: Log }, signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    try {
      await loadGazetteer(load.ownerUrl, load.file);
      return;
    } catch (error) {
      load.log.error({ error }, 'loading the gazetteer failed; until the next try no names of places are found');
      // Ended early by whoever stops the program.
      await sleep(PAUSE_MS, undefined, { signal }).catch(() => undefined);
    }
  }
}

import type { RunRecord } from '#contract/runs.ts';
import { briefNotes } from '#engine/brief/brief-notes.ts';
import { presentResult } from './present-result.ts';
import type { RunRow } from './run-record-read-model.ts';

/** A run by itself: the score is its own year's. */
export function presentRun(row: RunRow): RunRecord {
  const { runId, clock, result, zone, kind, brief } = row;
  return {
    runId,
    station: { id: row.stationId, name: row.stationName },
    weatherFileId: row.weatherFileId,
    fileName: row.fileName,
    kind,
    year: row.year,
    heightM: row.heightM,
    heightAdjusted: row.adjustedFromM !== null,
    brief: { name: row.briefName, version: row.briefVersion },
    methodVersion: row.methodVersion,
    shown: presentResult(
      { runId, clock, result, zone, kind, notes: briefNotes(brief) },
      { ...result, siteGates: null },
    ),
    supplyCurve: result.supplyCurve.map((bin) => ({ ...bin })),
  };
}

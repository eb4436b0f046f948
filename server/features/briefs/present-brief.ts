import type { BriefVersionRecord, BriefVersionView, Preset } from '#contract/briefs.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { presetWords } from '#engine/brief/preset-words.ts';
import type { VersionRow, VersionStation } from './version-read-model.ts';

export function presentPreset(id: string, body: Brief): Preset {
  const { name, use } = presetWords(id);
  return { id, name, use, source: body.source, sentence: briefSentence(body), body };
}

export function presentVersion(row: VersionRow): BriefVersionView {
  const { briefId, name, versionId, version, newest, hash, body, madeBy, madeAt, stationsJudged } = row;
  return {
    briefId,
    name,
    versionId,
    version,
    hash,
    preset: body.preset,
    presetName: presetWords(body.preset).name,
    sentence: briefSentence(body),
    madeBy,
    madeAt: madeAt.toISOString(),
    stationsJudged,
    // Only the newest version is judged when weather comes; an older one waits for nothing.
    stationsPending: version === newest ? row.stationsPending : 0,
  };
}

export function presentVersionRecord(row: VersionRow, stations: readonly VersionStation[]): BriefVersionRecord {
  return {
    version: presentVersion(row),
    newest: row.newest,
    body: row.body,
    stations: stations.map((station) => ({ ...station })),
  };
}

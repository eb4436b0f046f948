import type { Knex } from 'knex';
import { type QualityOptions, type RuleName, ruleNames } from '#engine/weather-files/quality/quality-options.ts';
import type { ReadOptions, StationZone } from '#engine/weather-files/read-options.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import { findRulesOff } from '../stations/rules-off-read-model.ts';
import type { WeatherFileState } from './weather-file-store.ts';

/** What reading knows beside the file: handed in where the worker is wired. */
export interface ReadingKnowledge {
  zoneAt(latitude: number, longitude: number): StationZone | null;
  readonly relief: Relief;
}

/** How a file is read: by what people have answered, what is known of places, and which rules do not hold at its station. */
export async function readOptions(
  knowledge: ReadingKnowledge & { readonly db: Knex },
  { file, station }: { file: WeatherFileState; station: DeclaredStation | null },
): Promise<ReadOptions & QualityOptions & { readonly rulesOff: readonly RuleName[] }> {
  const { place, mapping, answers, keepSuspect, fillLongGaps, rulesOff = [] } = file.answers;
  const ofStation = station === null ? [] : await findRulesOff(knowledge.db, { teamId: file.teamId, station });
  const off = new Set([...rulesOff.map(({ rule }) => rule), ...ofStation]);
  return {
    ...(place === undefined ? {} : { place }),
    ...(mapping === undefined ? {} : { mapping }),
    ...(answers === undefined ? {} : { answers }),
    ...(keepSuspect === undefined ? {} : { keepSuspect }),
    ...(fillLongGaps === undefined ? {} : { fillLongGaps }),
    ...(file.part === '' ? {} : { part: file.part }),
    zoneAt: knowledge.zoneAt,
    relief: knowledge.relief,
    rulesOff: ruleNames.filter((rule) => off.has(rule)),
  };
}

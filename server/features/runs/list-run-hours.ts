import type { Knex } from 'knex';
import type { HourList, ListedHour } from '#contract/hour-list.ts';
import { HOURS_PER_DAY, METHOD_VERSION } from '#engine/conventions.ts';
import { type HourClass, hourClasses } from '#engine/hour-classes/hour-class.ts';
import { monthOfEachSlot } from '#engine/reduction/calendar.ts';
import type { HourRow } from '#engine/run/hours-table.ts';
import { AppError } from '../../http/app-error.ts';
import type { YearThread } from '../../jobs/year-thread.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { yearAtHeight } from './height-used.ts';
import type { LinesOfYears } from './lines-of-years.ts';
import { findRunToExport } from './run-to-export-read-model.ts';

export interface HourListParts {
  readonly db: Knex;
  readonly yearThread: Pick<YearThread, 'listHours'>;
  readonly lines: LinesOfYears;
}

export interface HoursAsked {
  readonly hourClass?: HourClass | undefined;
  readonly met?: 'yes' | 'no' | undefined;
  readonly month?: number | undefined;
  readonly hour?: number | undefined;
  readonly day?: number | undefined;
  readonly page: number;
  readonly limit: number;
}

/**
 * One page of the hours of a run that a filter leaves, each with its weather, its reason and its line of the file.
 * @throws AppError not_found; wrong_state for a run of another method
 */
export async function listRunHours(
  { db, yearThread, lines }: HourListParts,
  asked: HoursAsked & { teamId: string; runId: string; closed: readonly string[]; signal: AbortSignal },
): Promise<HourList> {
  const { teamId, signal } = asked;
  const run = await findRunToExport(db, asked);
  if (run === null) throw new AppError('not_found', 'There is no such run in this team.');
  if (run.methodVersion !== METHOD_VERSION)
    throw new AppError(
      'wrong_state',
      `This run was made under method ${run.methodVersion}; this release computes by ${METHOD_VERSION}. Its hours are listed by the release of that name.`,
    );
  const { weatherYearId, brief, heightM, clock, zone, hourClassCodes } = run;
  const stored = await readPackedYear(db, { teamId, weatherYearId });
  if (stored === null) throw new Error(`the weather year of the run ${asked.runId} has gone`);
  // Whether an hour is met shows in its row alone where it is frozen.
  const needsRows = asked.met !== undefined;
  const chosen = slotsOf(hourClassCodes, asked);
  const year = yearAtHeight(stored, run);
  const from = (asked.page - 1) * asked.limit;
  const slots = needsRows ? chosen : chosen.slice(from, from + asked.limit);
  const listed = await yearThread.listHours({ year, brief, heightM, clock, zone, slots }, signal);
  if (!hourClassCodes.equals(listed.hourClassCodes))
    throw new Error(`the hours of the run ${asked.runId} no longer come to the classes that it holds`);
  const kept = needsRows ? listed.rows.filter(({ met }) => met === (asked.met === 'yes')) : listed.rows;
  const total = needsRows ? kept.length : chosen.length;
  const rows = needsRows ? kept.slice(from, from + asked.limit) : kept;
  const { weatherFileId, contentHash } = run;
  const lineOf = await lines.of({ teamId, fileId: weatherFileId, contentHash, year: stored, zone, signal });
  return {
    items: rows.map((row) => presentHour(row, lineOf?.[row.slot] ?? 0)),
    total,
    page: asked.page,
    pages: Math.max(1, Math.ceil(total / asked.limit)),
    limitUnit: listed.limitUnit,
    weatherFileId,
    fileName: run.fileName,
    adjusted: run.adjustedFromM !== null,
  };
}

function slotsOf(codes: Uint8Array, { hourClass, month, hour, day }: HoursAsked): readonly number[] {
  const months = monthOfEachSlot(codes.length);
  const code = hourClass === undefined ? null : hourClasses.indexOf(hourClass);
  const slots: number[] = [];
  for (const [slot, found] of codes.entries()) {
    if (code !== null && found !== code) continue;
    if (month !== undefined && months[slot] !== month) continue;
    if (hour !== undefined && (slot % HOURS_PER_DAY) + 1 !== hour) continue;
    if (day !== undefined && Math.floor(slot / HOURS_PER_DAY) + 1 !== day) continue;
    slots.push(slot);
  }
  return slots;
}

function presentHour(row: HourRow, line: number): ListedHour {
  const { humidityRatio: _ratio, supplyHumidityRatio: _supply, loadFraction: _load, ...hour } = row;
  const { standardMs, civilMs, line: _line, ...shown } = hour;
  return {
    ...shown,
    standardEnd: localText(standardMs),
    civilEnd: localText(civilMs),
    line: line === 0 ? null : line,
  };
}

/** Local time as if it were UTC. */
function localText(localMs: number): string {
  return new Date(localMs).toISOString().slice(0, 16);
}

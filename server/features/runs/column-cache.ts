import type { Knex } from 'knex';
import { bytesOfYear, copyColumns, type YearToRescore } from './rescore-read-model.ts';
import { shareColumns } from './shared-columns.ts';

/** Packed columns of weather years in memory that every thread sees, by team, up to a number of bytes. */
export interface ColumnCache {
  readonly maxBytes: number;
  /** What is held now; columns that left while a request works with them are not counted. */
  heldBytes(): number;
  /**
   * The columns of some years of a team, by weather year. Those that are not held, or whose content is another, are loaded in
   * one go; those that are no longer accepted leave. @throws RangeError when the years together do not fit; the reason of `signal`
   */
  take(asked: AskedYears): Promise<ReadonlyMap<string, SharedArrayBuffer>>;
}

export interface AskedYears {
  readonly teamId: string;
  readonly years: readonly YearToRescore[];
  /** Content hash of every accepted year of the team, by weather year. */
  readonly accepted: ReadonlyMap<string, string>;
  readonly signal: AbortSignal;
}

interface HeldYear {
  readonly contentHash: string;
  readonly columns: SharedArrayBuffer;
}
type HeldTeam = Map<string, HeldYear>;

export function makeColumnCache(db: Knex, { maxBytes }: { maxBytes: number }): ColumnCache {
  // Maps keep the order in which their keys came: the team that was used longest ago stands first.
  const teams = new Map<string, HeldTeam>();
  let heldBytes = 0;
  let loading: Promise<unknown> = Promise.resolve();

  function hold(team: HeldTeam, [id, year]: [string, HeldYear]): void {
    letGo(team, id);
    team.set(id, year);
    heldBytes += year.columns.byteLength;
  }

  function letGo(team: HeldTeam, id: string): void {
    heldBytes -= team.get(id)?.columns.byteLength ?? 0;
    team.delete(id);
  }

  function makeLatest(teamId: string): HeldTeam {
    const team: HeldTeam = teams.get(teamId) ?? new Map();
    teams.delete(teamId);
    teams.set(teamId, team);
    return team;
  }

  /** Other teams leave first, the one used longest ago before all; then what of the team's own is not asked for. */
  function makeRoom(bytes: number, { teamId, asked }: { teamId: string; asked: ReadonlySet<string> }): void {
    for (const [otherId, other] of teams) {
      if (otherId === teamId) continue;
      if (heldBytes + bytes <= maxBytes) return;
      for (const id of other.keys()) letGo(other, id);
      teams.delete(otherId);
    }
    const own = makeLatest(teamId);
    for (const id of own.keys()) {
      if (heldBytes + bytes <= maxBytes) return;
      if (!asked.has(id)) letGo(own, id);
    }
  }

  async function load({ teamId, years, accepted, signal }: AskedYears): Promise<Map<string, SharedArrayBuffer>> {
    signal.throwIfAborted();
    const team = makeLatest(teamId);
    for (const [id, { contentHash }] of team) if (accepted.get(id) !== contentHash) letGo(team, id);
    const missing = years.filter(({ weatherYearId }) => !team.has(weatherYearId));
    const asked = new Set(years.map(({ weatherYearId }) => weatherYearId));
    makeRoom(sizeOf(missing), { teamId, asked });
    const weatherYearIds = missing.map(({ weatherYearId }) => weatherYearId);
    if (missing.length > 0) {
      for await (const { weatherYearId: id, columns } of copyColumns(db, { teamId, weatherYearIds, signal }))
        hold(team, [id, { contentHash: accepted.get(id) ?? '', columns: shareColumns(columns) }]);
    }
    const found = new Map<string, SharedArrayBuffer>();
    for (const [id, { columns }] of team) if (asked.has(id)) found.set(id, columns);
    return found;
  }

  return {
    maxBytes,
    heldBytes: () => heldBytes,
    async take(asked) {
      const bytes = sizeOf(asked.years);
      if (bytes > maxBytes) throw new RangeError(`${bytes} bytes of weather do not fit into ${maxBytes}`);
      // One load at a time: two requests never load the same years twice, nor make room against one another.
      const mine = loading.catch(() => undefined).then(() => load(asked));
      loading = mine;
      return mine;
    },
  };
}

function sizeOf(years: readonly YearToRescore[]): number {
  return years.reduce((sum, year) => sum + bytesOfYear(year), 0);
}

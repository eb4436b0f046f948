import type { Brief } from '#engine/brief/brief.ts';
import type { RescoredStation, StationToRescore } from '../../jobs/web-task.ts';

/** Drafts whose stations are remembered, the latest: a slider asks for the places and for the surface at once, and then moves on. */
const MOST_DRAFTS = 3;

export interface SharedJudging {
  /**
   * The stations under a draft; those that were judged under the same draft just before, or are being judged for another asker, are not
   * judged again. @param judge what judges the others
   */
  take(
    asked: { readonly brief: Brief; readonly stations: readonly StationToRescore[] },
    judge: (stations: readonly StationToRescore[]) => Promise<readonly RescoredStation[]>,
  ): Promise<readonly RescoredStation[]>;
}

interface Draft {
  readonly judged: Map<string, RescoredStation>;
  /** Askers of one draft go one after another: the second finds what the first has judged. */
  turn: Promise<unknown>;
}

export function makeSharedJudging(): SharedJudging {
  const drafts = new Map<string, Draft>();
  const draftOf = (brief: Brief): Draft => {
    const key = JSON.stringify(brief);
    const draft = drafts.get(key) ?? { judged: new Map(), turn: Promise.resolve() };
    drafts.delete(key);
    drafts.set(key, draft);
    for (const oldest of drafts.keys()) if (drafts.size > MOST_DRAFTS) drafts.delete(oldest);
    return draft;
  };
  return {
    async take({ brief, stations }, judge) {
      const draft = draftOf(brief);
      const mine = draft.turn.then(async () => {
        const missing = stations.filter((station) => !draft.judged.has(keyOf(station)));
        const found = missing.length === 0 ? [] : await judge(missing);
        const byPlace = new Map(found.map((each) => [placeOf(each), each]));
        for (const station of missing) {
          const judged = byPlace.get(placeOf(station));
          if (judged !== undefined) draft.judged.set(keyOf(station), judged);
        }
        return stations.flatMap((station) => draft.judged.get(keyOf(station)) ?? []);
      });
      // Whoever leaves in the middle, or fails, keeps nobody behind.
      draft.turn = mine.catch(() => undefined);
      return await mine;
    },
  };
}

function placeOf({ stationId, heightM }: { readonly stationId: string; readonly heightM: number }): string {
  return `${stationId} ${heightM}`;
}

/** All that a judging hangs on: other weather, another height or another place is another station. */
function keyOf({ years, position, zone, heightM, adjustedFromM, stationId }: StationToRescore): string {
  const weather = years.map(({ weatherYearId, contentHash, utcOffsetMin }) => [
    weatherYearId,
    contentHash,
    utcOffsetMin,
  ]);
  return JSON.stringify([stationId, heightM, adjustedFromM, zone, position.latitude, position.longitude, weather]);
}

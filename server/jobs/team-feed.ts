import type { Knex } from 'knex';
import { TeamEvent } from '#contract/team-events.ts';
import { createEventQueue, type EventQueue } from './event-queue.ts';
import { keepListening, type ListenerLog } from './listener.ts';

/** What happens in a team, as it happens. */
export interface TeamFeed {
  /**
   * Events from this call on, in the order of their commits. Ends with the signal, with `close`, and whenever events may
   * have been lost (connection cut, reader too slow): a reader that comes back looks at everything anew.
   */
  watch(teamId: string, signal: AbortSignal): AsyncIterable<TeamEvent>;
  close(): Promise<void>;
}

const CHANNEL = 'team_events';

/** Tells the team when, and only if, the caller's transaction commits. */
export async function notifyTeam(db: Knex, notice: { teamId: string; event: TeamEvent }): Promise<void> {
  await notifyTeamOfAll(db, { teamId: notice.teamId, events: [notice.event] });
}

/** The same with several events, in their order. */
export async function notifyTeamOfAll(
  db: Knex,
  notice: { teamId: string; events: readonly TeamEvent[] },
): Promise<void> {
  const teamId = notice.teamId.toLowerCase();
  const payloads = notice.events.map((event) => JSON.stringify({ teamId, event }));
  await db.raw('select pg_notify(?, payload) from unnest(?::text[]) as payload', [CHANNEL, payloads]);
}

/** The feed of one web process. Answers when it listens, or after the first try failed (it goes on trying). */
export async function openTeamFeed(options: { databaseUrl: string; log: ListenerLog }): Promise<TeamFeed> {
  const watchers = new Set<{ teamId: string; queue: EventQueue<TeamEvent> }>();
  const endAll = (): void => {
    for (const { queue } of watchers) queue.end();
  };
  let closed = false;

  const listener = await keepListening({
    databaseUrl: options.databaseUrl,
    channel: CHANNEL,
    log: options.log,
    onMessage(payload) {
      const notice = readNotice(payload);
      if (notice === null) options.log.error({ payload }, 'a team event could not be read');
      else for (const { teamId, queue } of watchers) if (teamId === notice.teamId) queue.push(notice.event);
    },
    // What was told while the connection was cut is lost to those who watched before.
    onListening: endAll,
  });

  return {
    watch(teamId, signal) {
      const queue = createEventQueue<TeamEvent>({ signal, onEnd: () => watchers.delete(watcher) });
      const watcher = { teamId: teamId.toLowerCase(), queue };
      watchers.add(watcher);
      if (closed || signal.aborted) queue.end();
      return queue;
    },
    async close() {
      closed = true;
      endAll();
      await listener.close();
    },
  };
}

function readNotice(payload: string): { teamId: string; event: TeamEvent } | null {
  try {
    const value: unknown = JSON.parse(payload);
    if (typeof value !== 'object' || value === null || !('teamId' in value) || !('event' in value)) return null;
    const event = TeamEvent.safeParse(value.event);
    return typeof value.teamId === 'string' && event.success ? { teamId: value.teamId, event: event.data } : null;
  } catch {
    return null;
  }
}

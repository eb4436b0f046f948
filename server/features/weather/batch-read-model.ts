import type { Knex } from 'knex';
import type { FileStatus } from '#contract/weather.ts';
import type { ArchiveStatus, BatchState } from '#contract/weather-batches.ts';

export interface ArchiveView {
  readonly id: string;
  readonly name: string;
  readonly bytes: number;
  readonly status: ArchiveStatus;
  readonly problem: string | null;
  readonly failure: string | null;
  readonly members: number | null;
  readonly membersOpened: number;
  readonly leftOut: readonly { readonly path: string; readonly why: string }[];
}

export interface BatchView {
  readonly id: string;
  readonly name: string;
  readonly state: BatchState;
  readonly madeBy: string;
  readonly madeAt: Date;
  readonly archives: readonly ArchiveView[];
  readonly fileCounts: Readonly<Partial<Record<FileStatus, number>>>;
  /** Files whose reading has not ended and has not stopped either. */
  readonly unreadFiles: number;
  /** Files whose reading or judging stopped for a fault of ours. */
  readonly stoppedFiles: number;
}

const ARCHIVE_OBJECT = `
  jsonb_build_object('id', weather_archives.id, 'name', weather_archives.name, 'bytes', weather_archives.bytes,
    'status', weather_archives.status, 'problem', weather_archives.problem, 'failure', weather_archives.failure,
    'members', weather_archives.members, 'membersOpened', weather_archives.members_opened,
    'leftOut', weather_archives.left_out)`;

const BATCH = `
  select weather_batches.id, weather_batches.name, weather_batches.state, people.name as "madeBy",
    weather_batches.made_at as "madeAt", coalesce(archives.list, '[]') as archives,
    coalesce(files.counts, '{}') as "fileCounts", coalesce(files.unread, 0) as "unreadFiles",
    coalesce(files.stopped, 0) as "stoppedFiles"
  from weather_batches
  join people on people.id = weather_batches.made_by
  left join lateral (
    select jsonb_agg(${ARCHIVE_OBJECT} order by weather_archives.name, weather_archives.id) as list
    from weather_archives where weather_archives.batch_id = weather_batches.id
  ) as archives on true
  left join lateral (
    select jsonb_object_agg(each.status, each.number) as counts, sum(each.unread)::integer as unread,
      sum(each.stopped)::integer as stopped
    from (
      select weather_files.status, count(*) as number, count(weather_files.failure) as stopped,
        count(*) filter (where weather_files.status = 'reading' and weather_files.failure is null) as unread
      from weather_files where weather_files.batch_id = weather_batches.id
      group by weather_files.status
    ) as each
  ) as files on true`;

/** `null` when the team has no such batch. */
export async function findBatchView(db: Knex, key: { teamId: string; batchId: string }): Promise<BatchView | null> {
  const { rows } = await db.raw<{ rows: BatchView[] }>(
    `${BATCH} where weather_batches.team_id = :teamId and weather_batches.id = :batchId`,
    key,
  );
  return rows[0] ?? null;
}

export async function listBatchViews(db: Knex, page: { teamId: string; limit: number }): Promise<readonly BatchView[]> {
  const { rows } = await db.raw<{ rows: BatchView[] }>(
    `${BATCH} where weather_batches.team_id = :teamId
     order by weather_batches.made_at desc, weather_batches.id desc limit :limit`,
    page,
  );
  return rows;
}

export async function findArchiveView(
  db: Knex,
  key: { teamId: string; archiveId: string },
): Promise<ArchiveView | null> {
  const { rows } = await db.raw<{ rows: { archive: ArchiveView }[] }>(
    `select ${ARCHIVE_OBJECT} as archive from weather_archives
     where weather_archives.team_id = :teamId and weather_archives.id = :archiveId`,
    key,
  );
  return rows[0]?.archive ?? null;
}

import type { Knex } from 'knex';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';

/** How the team reads tables of this shape; null when nobody has said yet. */
export async function findMapping(db: Knex, key: { teamId: string; shapeKey: string }): Promise<TableMapping | null> {
  const { rows } = await db.raw<{ rows: { mapping: TableMapping }[] }>(
    'select mapping from table_mappings where team_id = :teamId and shape_key = :shapeKey',
    { teamId: key.teamId, shapeKey: key.shapeKey },
  );
  return rows[0]?.mapping ?? null;
}

/** Remembers how tables of a shape are read; what was said last holds. */
export async function keepMapping(
  transaction: Knex.Transaction,
  mapping: { teamId: string; shapeKey: string; mapping: TableMapping; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    `insert into table_mappings (team_id, shape_key, mapping, made_by, made_at)
     values (:teamId, :shapeKey, cast(:mapping as jsonb), :personId, :at)
     on conflict (team_id, shape_key)
       do update set mapping = excluded.mapping, made_by = excluded.made_by, made_at = excluded.made_at`,
    { ...mapping, mapping: JSON.stringify(mapping.mapping) },
  );
}

/** Files of the team that wait for the mapping of this shape. */
export async function findFilesOfShape(
  db: Knex,
  key: { teamId: string; shapeKey: string },
): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select id from weather_files
     where team_id = :teamId and shape_key = :shapeKey and status = 'asks' and table_guess is not null
     order by id for no key update`,
    key,
  );
  return rows.map(({ id }) => id);
}

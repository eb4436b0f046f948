/**
 * A number for each team that grows with every change of what its map and its tables of sites show, so that an answer that was made
 * once can be told from one that is stale by a look at a row or two. It is a sum: each transaction adds one, in a slot that nobody else
 * holds just now or in a new one, so that it never waits for anybody and can stand in no deadlock. Whoever reads the number
 * before the rows can never take old rows for new.
 *
 * A later migration that changes rows of these tables and then the tables themselves says "set constraints all immediate" in between.
 */
import type { Knex } from 'knex';

const SHOWN = [
  ...['stations', 'weather_files', 'weather_years', 'programmes', 'briefs', 'brief_versions', 'runs', 'sites'],
  'findings',
];

export async function up(knex: Knex): Promise<void> {
  const triggers = [...SHOWN, 'teams'].map(
    (table) =>
      `create trigger ${table}_revision after insert or update or delete on ${table} for each row execute function note_team_change();`,
  );
  await knex.raw(`
    create table team_revisions (
      -- No reference, which would wait for whoever has locked the team.
      team_id uuid not null,
      slot uuid not null default gen_random_uuid(),
      revision bigint not null,
      primary key (team_id, slot)
    );
    grant select, insert, update on team_revisions to muslin_app;

    create function note_team_change() returns trigger language plpgsql as $body$
    declare
      changed uuid;
      free uuid;
    begin
      if tg_table_name = 'teams' then
        changed := case tg_op when 'DELETE' then old.id else new.id end;
      else
        changed := case tg_op when 'DELETE' then old.team_id else new.team_id end;
      end if;
      -- Once in a transaction, however many rows it changes.
      if current_setting('muslin.change_noted', true) = changed::text then
        return null;
      end if;
      perform set_config('muslin.change_noted', changed::text, true);
      if not exists (select 1 from public.teams where teams.id = changed and teams.ended_at is null) then
        return null;
      end if;
      select slot into free from public.team_revisions where team_id = changed limit 1 for update skip locked;
      if found then
        update public.team_revisions set revision = revision + 1 where team_id = changed and slot = free;
      else
        insert into public.team_revisions (team_id, revision) values (changed, 1);
      end if;
      return null;
    end
    $body$;
    grant execute on function note_team_change() to muslin_app;
    ${triggers.join('\n')}
  `);
}

export async function down(knex: Knex): Promise<void> {
  const triggers = [...SHOWN, 'teams'].map((table) => `drop trigger ${table}_revision on ${table};`);
  await knex.raw(`
    ${triggers.join('\n')}
    drop function note_team_change();
    drop table team_revisions;
  `);
}

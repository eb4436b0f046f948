/**
 * A number for each team that grows with every change of what its map and its tables of sites show, so that an answer that was made
 * once can be told from one that is stale by a look at one row. It grows as a transaction commits, once, so that nobody waits for it
 * while others work; whoever reads the number before the rows can never take old rows for new.
 *
 * What the transaction wrote into the audit trail is chained first, whichever of the two a commit comes to first: so everybody locks the
 * head of a chain before the number, and no two commits can wait for one another.
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
    (table) => `create constraint trigger ${table}_revision after insert or update or delete on ${table}
      deferrable initially deferred for each row execute function note_team_change();`,
  );
  await knex.raw(`
    create table team_revisions (
      team_id uuid primary key references teams (id),
      revision bigint not null
    );
    grant select on team_revisions to muslin_app;

    -- Where the events of the running transaction begin.
    create function note_first_event() returns trigger language plpgsql as $body$
    begin
      if coalesce(current_setting('muslin.first_event', true), '') = '' then
        perform set_config('muslin.first_event', new.id::text, true);
      end if;
      return new;
    end
    $body$;
    create trigger audit_events_first before insert on audit_events for each row execute function note_first_event();

    create function note_team_change() returns trigger language plpgsql security definer
      set search_path = public, pg_temp as $body$
    declare
      changed uuid;
      first_event text := current_setting('muslin.first_event', true);
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
      if coalesce(first_event, '') <> '' then
        perform chain_audit_events(first_event::bigint);
      end if;
      insert into public.team_revisions (team_id, revision)
      select teams.id, 1 from public.teams where teams.id = changed and teams.ended_at is null
      on conflict (team_id) do update set revision = team_revisions.revision + 1;
      return null;
    end
    $body$;
    revoke all on function note_first_event(), note_team_change() from public;
    ${triggers.join('\n')}
  `);
}

export async function down(knex: Knex): Promise<void> {
  const triggers = [...SHOWN, 'teams'].map((table) => `drop trigger ${table}_revision on ${table};`);
  await knex.raw(`
    ${triggers.join('\n')}
    drop trigger audit_events_first on audit_events;
    drop function note_team_change(), note_first_event();
    drop table team_revisions;
  `);
}

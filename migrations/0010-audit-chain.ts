/**
 * Chains the audit trail: each event keeps the hash of the one before it in its chain and its own. A team has one chain, and what
 * happens outside of teams has one. What is hashed is stated in server/features/audit/canonical-event.ts, which checks it.
 *
 * Events are chained when their transaction commits, by the owner and not by the application: until then nobody waits for anybody,
 * the head of a chain is the last thing that a transaction locks, and it locks several in one order, so that it can stand in no
 * deadlock. The application names what was done; place, hashes and time are not its to write.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table audit_events
      add column transaction_id xid8 not null default pg_current_xact_id(),
      add column position bigint check (position >= 1),
      add column previous_hash text check (previous_hash ~ '^[0-9a-f]{64}$'),
      add column hash text check (hash ~ '^[0-9a-f]{64}$'),
      add check ((hash is null) = (position is null) and (hash is null) = (previous_hash is null));
    create unique index audit_events_place on audit_events (team_id, position) nulls not distinct where position is not null;
    create index audit_events_waiting on audit_events (id) where hash is null;
    create index audit_events_person on audit_events (team_id, person_id, position);

    -- The head of each chain. "chain" is the team, or the nil UUID outside of teams.
    create table audit_chains (
      chain uuid primary key,
      team_id uuid references teams (id) on delete cascade,
      events bigint not null check (events >= 0),
      hash text not null check (hash ~ '^[0-9a-f]{64}$'),
      check (chain = coalesce(team_id, '00000000-0000-0000-0000-000000000000'))
    );

    create function audit_event_hash(event audit_events) returns text language sql stable as $$
      select encode(sha256(convert_to(cast(jsonb_build_array(
        event.previous_hash, event.position, event.team_id, event.person_id, event.act, event.subject, event.request_id,
        to_char(event.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')
      ) as text), 'UTF8')), 'hex')
    $$;

    -- Chains what the running transaction has written, from its first event on, so that no commit looks through those before it;
    -- whatever else may stand there without a hash was not written this way.
    create function chain_audit_events(first_id bigint) returns void language plpgsql security definer set search_path = public, pg_temp as $$
    declare
      the_chain uuid;
      head audit_chains;
      event audit_events;
    begin
      for the_chain in
        select distinct coalesce(team_id, '00000000-0000-0000-0000-000000000000') as chain from audit_events
        where id >= first_id and hash is null and transaction_id = pg_current_xact_id() order by chain
      loop
        insert into audit_chains (chain, team_id, events, hash)
        values (the_chain, nullif(the_chain, '00000000-0000-0000-0000-000000000000'), 0, repeat('0', 64))
        on conflict (chain) do nothing;
        select * into head from audit_chains where chain = the_chain for update;
        for event in
          select * from audit_events
          where id >= first_id and hash is null and transaction_id = pg_current_xact_id()
            and coalesce(team_id, '00000000-0000-0000-0000-000000000000') = the_chain
          order by id
        loop
          head.events := head.events + 1;
          event.position := head.events;
          event.previous_hash := head.hash;
          head.hash := audit_event_hash(event);
          update audit_events set position = head.events, previous_hash = event.previous_hash, hash = head.hash
          where id = event.id;
        end loop;
        update audit_chains set events = head.events, hash = head.hash where chain = the_chain;
      end loop;
    end
    $$;

    -- The first event of a transaction chains all of them; the others find that done.
    create function chain_new_audit_event() returns trigger language plpgsql security definer
      set search_path = public, pg_temp as $$
    begin
      if exists (select 1 from audit_events where id = new.id and hash is null) then
        perform chain_audit_events(new.id);
      end if;
      return null;
    end
    $$;

    revoke all on function audit_event_hash(audit_events), chain_audit_events(bigint), chain_new_audit_event() from public;

    -- What stands there already was given the number of this transaction above.
    select chain_audit_events(0);

    create constraint trigger audit_events_chain after insert on audit_events
      deferrable initially deferred for each row execute function chain_new_audit_event();

    revoke insert on audit_events from muslin_app;
    grant insert (team_id, person_id, act, subject, request_id) on audit_events to muslin_app;
    grant select on audit_chains to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop trigger audit_events_chain on audit_events;
    drop function chain_new_audit_event(), chain_audit_events(bigint), audit_event_hash(audit_events);
    drop table audit_chains;
    drop index audit_events_person;
    alter table audit_events drop column hash, drop column previous_hash, drop column position, drop column transaction_id;
    grant insert on audit_events to muslin_app;
  `);
}

/**
 * Accounts and teams in full: two-factor sign-in with recovery codes, keys sent by mail, sessions that a person can look through,
 * failed sign-ins, invitations, members from outside with an end date, programmes that are open to some, mails and notices.
 * A key is kept as its hash; the one copy in words stands in the mail that carries it, until that has gone out.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table people
      add column two_factor_secret text,
      add column two_factor_since timestamptz,
      add column two_factor_step bigint,
      add column notices_off text[] not null default '{}',
      add check (two_factor_since is null or two_factor_secret is not null);

    create table recovery_codes (
      person_id uuid not null references people (id),
      code_hash text not null check (code_hash ~ '^[0-9a-f]{64}$'),
      used_at timestamptz,
      primary key (person_id, code_hash)
    );

    create table account_keys (
      key_hash text primary key check (key_hash ~ '^[0-9a-f]{64}$'),
      person_id uuid not null references people (id),
      purpose text not null check (purpose in ('reset', 'email')),
      email text check ((purpose = 'email') = (email is not null)),
      made_at timestamptz not null,
      expires_at timestamptz not null check (expires_at > made_at),
      used_at timestamptz
    );
    create index account_keys_person on account_keys (person_id);

    alter table sessions
      add column id uuid not null unique default gen_random_uuid(),
      add column person_id uuid generated always as (cast(sess -> 'passport' ->> 'user' as uuid)) stored;
    create index sessions_person on sessions (person_id);

    create table sign_in_failures (
      account_hash text primary key check (account_hash ~ '^[0-9a-f]{64}$'),
      failures integer not null check (failures > 0),
      last_at timestamptz not null,
      rests_until timestamptz
    );

    alter table memberships
      add column ends_at timestamptz,
      add check (role <> 'lead' or ends_at is null);

    create table invitations (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      email text not null check (email = lower(email) and email <> ''),
      role text not null check (role in ('viewer', 'planner', 'engineer', 'lead')),
      membership_ends_at timestamptz,
      key_hash text not null unique check (key_hash ~ '^[0-9a-f]{64}$'),
      invited_by uuid not null references people (id),
      made_at timestamptz not null,
      expires_at timestamptz not null check (expires_at > made_at),
      accepted_by uuid references people (id),
      accepted_at timestamptz,
      revoked_by uuid references people (id),
      revoked_at timestamptz,
      unique (team_id, id),
      check (role <> 'lead' or membership_ends_at is null),
      check ((accepted_by is null) = (accepted_at is null)),
      check ((revoked_by is null) = (revoked_at is null)),
      check (accepted_at is null or revoked_at is null)
    );
    create unique index invitations_open on invitations (team_id, email) where accepted_at is null and revoked_at is null;
    create index invitations_email on invitations (email);

    alter table programmes add column restricted boolean not null default false;
    create table programme_members (
      team_id uuid not null,
      programme_id uuid not null,
      person_id uuid not null references people (id),
      primary key (programme_id, person_id),
      foreign key (team_id, programme_id) references programmes (team_id, id),
      foreign key (team_id, person_id) references memberships (team_id, person_id) on delete cascade
    );
    create index programme_members_person on programme_members (person_id);

    create table mails (
      id uuid primary key default gen_random_uuid(),
      team_id uuid references teams (id),
      recipient text not null check (recipient <> '' and recipient !~ '[[:cntrl:]]'),
      subject text not null check (subject <> '' and subject !~ '[[:cntrl:]]'),
      text text,
      html text,
      opens_account boolean not null,
      made_at timestamptz not null,
      sent_at timestamptz,
      failure text,
      check ((text is null) = (html is null))
    );
    create index mails_team on mails (team_id, made_at desc, id);
    create index mails_unsent on mails (made_at) where sent_at is null;

    create table notices (
      id uuid primary key default gen_random_uuid(),
      person_id uuid not null references people (id),
      team_id uuid references teams (id),
      kind text not null check (kind in ('invitation', 'reset', 'review asked', 'signed off', 'comment', 'import finished')),
      words text not null check (words <> ''),
      path text not null check (path ~ '^/'),
      made_at timestamptz not null,
      read_at timestamptz
    );
    create index notices_person on notices (person_id, made_at desc, id);

    alter table weather_batches add column told_at timestamptz;
    -- What was brought before anybody was told of anything is no news.
    update weather_batches set told_at = now();

    grant select, insert, update, delete on
      recovery_codes, account_keys, sign_in_failures, invitations, programme_members, mails, notices to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table weather_batches drop column told_at;
    drop table notices, mails, programme_members, invitations, sign_in_failures, account_keys, recovery_codes;
    alter table programmes drop column restricted;
    alter table memberships drop column ends_at;
    alter table sessions drop column person_id, drop column id;
    alter table people drop column notices_off, drop column two_factor_step, drop column two_factor_since,
      drop column two_factor_secret;
  `);
}

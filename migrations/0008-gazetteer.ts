/**
 * Names of places to search without asking anyone outside; the start program loads them from data/gazetteer and notes which. Trigrams
 * find a name that was not spelled as the gazetteer spells it.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create extension if not exists pg_trgm;

    create table gazetteer (
      name text not null,
      plain text not null,
      country text not null,
      kind text not null check (kind in ('capital', 'seat', 'place')),
      population integer not null,
      latitude double precision not null,
      longitude double precision not null
    );
    create index gazetteer_like on gazetteer using gin (plain gin_trgm_ops);
    create index gazetteer_prefix on gazetteer (plain text_pattern_ops);

    create table gazetteer_loads (
      fingerprint text primary key,
      places integer not null,
      loaded_at timestamptz not null default now()
    );

    grant select on gazetteer to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table gazetteer_loads, gazetteer; drop extension pg_trgm');
}

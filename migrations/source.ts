/** The static list of migrations: the same names under every runner. Add at the end; never edit one that has landed. */
import type { Knex } from 'knex';
import * as firstLight from './0001-first-light.ts';
import * as workerPools from './0002-worker-pools.ts';
import * as derivedYears from './0003-derived-years.ts';
import * as weatherRoom from './0004-weather-room.ts';
import * as depressionArray from './0005-depression-array.ts';
import * as sites from './0006-sites.ts';
import * as runFigures from './0007-run-figures.ts';
import * as gazetteer from './0008-gazetteer.ts';
import * as accounts from './0009-accounts.ts';
import * as auditChain from './0010-audit-chain.ts';
import * as teamData from './0012-team-data.ts';
import * as teamRevisions from './0013-team-revisions.ts';
import * as designValues from './0014-design-values.ts';

const migrations = {
  '0001-first-light': firstLight,
  '0002-worker-pools': workerPools,
  '0003-derived-years': derivedYears,
  '0004-weather-room': weatherRoom,
  '0005-depression-array': depressionArray,
  '0006-sites': sites,
  '0007-run-figures': runFigures,
  '0008-gazetteer': gazetteer,
  '0009-accounts': accounts,
  '0010-audit-chain': auditChain,
  '0012-team-data': teamData,
  '0013-team-revisions': teamRevisions,
  '0014-design-values': designValues,
} satisfies Record<string, Knex.Migration>;

type MigrationName = keyof typeof migrations;

export const migrationSource: Knex.MigrationSource<MigrationName> = {
  getMigrations: async () => Object.keys(migrations) as MigrationName[],
  getMigrationName: (name) => name,
  getMigration: async (name) => migrations[name],
};

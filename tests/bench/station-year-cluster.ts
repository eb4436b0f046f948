import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import knexPkg, { type Knex } from 'knex';
import { readingKnowledge } from '../../server/builders/reading-knowledge.ts';
import { acceptAs, receiveFromDisk } from '../../server/builders/weather-file-steps.ts';
import { connect } from '../../server/db/connection.ts';
import { inTransaction } from '../../server/db/in-transaction.ts';
import {
  APP_LOGIN,
  type DatabaseServer,
  databaseUrl,
  OWNER_LOGIN,
  prepareDatabase,
} from '../../server/db/prepare-database.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import { readStoredFile } from '../../server/features/weather/read-stored-file.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { demoEpw } from '../support/demo-epw.ts';
import { cloneStationYears } from '../support/station-years.ts';
import { startThrowawayCluster } from '../support/throwaway-cluster.ts';

const DATABASE = 'bench';
const CLIMATES = 6;

/** A team's accepted weather years in a database of the product's own schema. */
export interface StationYearCluster {
  /** The product's login, one connection. */
  readonly db: Knex;
  readonly ownerDb: Knex;
  readonly teamId: string;
}

/** A team without any file, in a database of the product's own schema. */
export interface EmptyTeam extends StationYearCluster {
  readonly personId: string;
  readonly databaseUrl: string;
  /** A folder that disappears with the cluster. */
  readonly home: string;
}

/** Works with a team of its own in a cluster of its own. */
export async function withEmptyTeam<T>(work: (team: EmptyTeam) => Promise<T>): Promise<T> {
  const home = await mkdtemp(path.join(tmpdir(), 'muslin-bench-'));
  const cluster = await startThrowawayCluster();
  try {
    return await withTeamIn(cluster.server, home, work);
  } finally {
    await cluster.stop();
    await rm(home, { recursive: true, force: true });
  }
}

/** Works with a team of its own in a cluster that runs. */
export async function withTeamIn<T>(
  server: DatabaseServer,
  home: string,
  work: (team: EmptyTeam) => Promise<T>,
): Promise<T> {
  const { port, ownerPassword, appPassword } = server;
  const urlOf = (name: string, password: string) =>
    databaseUrl({ login: { name, password }, port, database: DATABASE });
  let db: Knex | null = null;
  let ownerDb: Knex | null = null;
  try {
    await prepareDatabase(server, DATABASE);
    const appUrl = urlOf(APP_LOGIN, appPassword);
    db = connect({ databaseUrl: appUrl, maxConnections: 1 });
    ownerDb = knexPkg.knex({ client: 'pg', connection: urlOf(OWNER_LOGIN, ownerPassword) });
    const team = await makeBenchTeam(db);
    return await work({ db, ownerDb, home, databaseUrl: appUrl, ...team });
  } finally {
    await db?.destroy();
    await ownerDb?.destroy();
  }
}

/** Works with so many station-years in a cluster of their own: six invented typical years by the main road, the rest their clones. */
export async function withStationYears<T>(
  stations: number,
  work: (cluster: StationYearCluster) => Promise<T>,
): Promise<T> {
  return await withEmptyTeam(async (team) => {
    await fillWithClimates(team);
    await cloneStationYears(team.ownerDb, { teamId: team.teamId, stations: stations - CLIMATES });
    await team.ownerDb.raw('analyze');
    return await work(team);
  });
}

async function makeBenchTeam(db: Knex): Promise<{ teamId: string; personId: string }> {
  const person = { email: 'bench@example.org', password: 'a long pass phrase for tests', name: 'Bench' };
  const personId = await makePerson(db, person);
  const { teamId } = await inTransaction(db, (transaction) =>
    makeTeam({ transaction, startBrief }, { name: 'Bench', leadId: personId, invented: true, programmeName: 'Bench' }),
  );
  return { teamId, personId };
}

/** Invented typical years of a few climates, read and accepted by the main road. */
export async function fillWithClimates({
  db,
  home,
  teamId,
  personId,
}: Pick<EmptyTeam, 'db' | 'home' | 'teamId' | 'personId'>): Promise<void> {
  const deps = { db, storage: createFolderStore(path.join(home, 'originals')), now: () => new Date() };
  for (let nth = 0; nth < CLIMATES; nth++) {
    const { name, text } = demoEpw(nth);
    const file = path.join(home, name);
    await writeFile(file, text);
    const fileId = await receiveFromDisk(deps, { teamId, personId, file });
    await readStoredFile({ ...deps, ...readingKnowledge() }, { teamId, fileId });
    await acceptAs(deps, { teamId, personId, fileId });
  }
}

/** The place for a database that comes out of a backup: made empty beside the one in use, which it then takes the name of. */
import {
  APP_LOGIN,
  type DatabaseServer,
  databaseUrl,
  makeDatabase,
  makeLogin,
  OWNER_LOGIN,
  withClient,
} from './prepare-database.ts';

/** Makes the logins and an empty database of this name; one that an earlier try left is removed. @returns its address, for the owner */
export async function makeEmptyDatabase(server: DatabaseServer, database: string): Promise<string> {
  const { port, ownerPassword, appPassword } = server;
  await asAdmin(server, async (admin) => {
    await makeLogin(admin, { name: OWNER_LOGIN, password: ownerPassword });
    await makeLogin(admin, { name: APP_LOGIN, password: appPassword });
    await admin.query(`drop database if exists ${admin.escapeIdentifier(database)} with (force)`);
    await makeDatabase(admin, database);
  });
  return databaseUrl({ login: { name: OWNER_LOGIN, password: ownerPassword }, port, database });
}

/** The restored one takes the name, and the one that had it is gone. */
export async function takeName(server: DatabaseServer, { from, to }: { from: string; to: string }): Promise<void> {
  await asAdmin(server, async (admin) => {
    await admin.query(`drop database if exists ${admin.escapeIdentifier(to)} with (force)`);
    await admin.query(`alter database ${admin.escapeIdentifier(from)} rename to ${admin.escapeIdentifier(to)}`);
  });
}

export async function dropDatabase(server: DatabaseServer, database: string): Promise<void> {
  await asAdmin(server, (admin) =>
    admin.query(`drop database if exists ${admin.escapeIdentifier(database)} with (force)`),
  );
}

type Work<T> = Parameters<typeof withClient<T>>[1];

async function asAdmin<T>({ port, superuser }: DatabaseServer, work: Work<T>): Promise<T> {
  return await withClient(databaseUrl({ login: superuser, port, database: 'postgres' }), work);
}

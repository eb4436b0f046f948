/** `npm start`: everything that the product needs, started in order and stopped in the opposite one. */
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { seedDemo } from '../builders/seed-demo.ts';
import { type Config, ConfigError, isLoopback, readConfig } from '../config.ts';
import { connect } from '../db/connection.ts';
import { type PreparedDatabase, prepareDatabase } from '../db/prepare-database.ts';
import type { Deps } from '../deps.ts';
import { makeSetUpKey } from '../features/accounts/set-up-key.ts';
import { openTeamFeed } from '../jobs/team-feed.ts';
import { jsonLinesLog, type Log } from '../log.ts';
import { openStore } from '../storage/open-store.ts';
import { PortTakenError, startWeb } from '../web.ts';
import { requireClient } from './build-client.ts';
import { keepClusterRunning, SUPERUSER, startCluster, stopCluster } from './cluster.ts';
import type { Command, CommandContext } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { portIsFree } from './free-port.ts';
import { type Home, homePath, openHome } from './home.ts';
import { takeHome } from './home-lock.ts';
import { loadGazetteerBeside } from './load-gazetteer-beside.ts';
import { requirePackages } from './packages.ts';
import { makeStopStack, type StopStack } from './stop-stack.ts';
import { untilAborted } from './until-aborted.ts';
import { keepWorkerRunning } from './worker-process.ts';

interface Start {
  readonly context: CommandContext;
  readonly config: Config;
  readonly home: Home;
  readonly log: Log;
  readonly stops: StopStack;
}

function say(words: string): void {
  process.stdout.write(`${words}\n`);
}

/** Before anything is started: what would keep it from starting is said. */
async function takePlace(start: Start): Promise<(address: string) => void> {
  const { config, home, stops } = start;
  const { host, port } = config;
  const lock = takeHome({ dir: home.dir, lockFile: home.lockFile, address: 'it is just starting' });
  stops.push('The lock of the home', lock.giveBack);
  const free = port === 0 || (await portIsFree(port, host).catch((error: Error) => error));
  if (free === false) throw new PortTakenError({ host, port });
  if (free instanceof Error)
    throw new CouldNotRun(`Nothing can listen on HOST=${host}, PORT=${port}: ${free.message}.`);
  return lock.nameAddress;
}

async function startDatabase({ home, stops, log }: Start): Promise<PreparedDatabase> {
  const { superuserPassword, ownerPassword, appPassword } = home.secrets;
  const options = { homeDir: home.dir, superuserPassword };
  const cluster = await startCluster(options);
  stops.push('PostgreSQL', () => stopCluster(home.dir));
  const watch = keepClusterRunning(cluster, { ...options, onTrouble: (words) => log.error({}, words) });
  stops.push('The watch over PostgreSQL', watch.stop);
  const superuser = { name: SUPERUSER, password: superuserPassword };
  return prepareDatabase({ port: cluster.port, superuser, ownerPassword, appPassword }, 'muslin');
}

/** Both at once, and both to their end: what fails must not leave the other one half started. */
async function startDatabaseAndBuild(start: Start): Promise<{ database: PreparedDatabase; clientDir: string }> {
  const [database, client] = await Promise.allSettled([startDatabase(start), requireClient(start.context)]);
  if (database.status === 'rejected') throw database.reason;
  if (client.status === 'rejected') throw client.reason;
  return { database: database.value, clientDir: client.value };
}

async function makeDeps(start: Start, made: { database: PreparedDatabase; clientDir: string }): Promise<Deps> {
  const { home, log, stops } = start;
  const { clientDir } = made;
  const databaseUrl = made.database.appUrl;
  const db = connect({ databaseUrl, applicationName: 'muslin web' });
  stops.push('The database connections', () => db.destroy());
  const feed = await openTeamFeed({ databaseUrl, log });
  stops.push('The feed of events', () => feed.close());
  return {
    db,
    databaseUrl,
    now: () => new Date(),
    storage: await openStore({ objectStore: start.config.objectStore, originalsDir: home.originalsDir }),
    uploadsDir: home.uploadsDir,
    publicUrl: publicUrlOf(start.config),
    sendsMail: start.config.smtp !== null,
    sessionSecrets: home.secrets.sessionSecrets,
    trustProxy: start.config.trustProxy,
    clientDir,
    basemapPath: path.join(start.context.rootDir, 'data/basemap/basemap.pmtiles'),
    feed,
    log,
  };
}

/** Links lead to this machine where nobody has said how others reach it. */
function publicUrlOf({ publicUrl, host, port }: Config): string {
  const name = isLoopback(host) ? host : 'localhost';
  return publicUrl ?? `http://${name.includes(':') ? `[${name}]` : name}:${port}`;
}

/** Fills a home with the demo, or makes the link with which its first team is set up; answers what to say when ready. */
async function welcome({ home, config, context }: Start, deps: Deps): Promise<(url: string) => string[]> {
  const setUpPath = config.seed === 'none' ? await makeSetUpKey(deps.db) : null;
  if (setUpPath !== null) return (url) => [`Set up the first team here, once: ${config.publicUrl ?? url}${setUpPath}`];
  const accountsWereThere = existsSync(home.demoAccountsFile);
  if (config.seed === 'demo') {
    await seedDemo({ deps, demoAccountsPath: home.demoAccountsFile, log: say, signal: context.signal });
  }
  if (accountsWereThere) return () => [`The sign-ins of the demo: ${home.demoAccountsFile}`];
  if (!existsSync(home.demoAccountsFile)) return () => [];
  const accounts = readFileSync(home.demoAccountsFile, 'utf8').trimEnd();
  return () => ['', accounts, `They are kept in ${home.demoAccountsFile}`, ''];
}

async function serve(start: Start, nameAddress: (address: string) => void): Promise<void> {
  const { config, context, home, log, stops } = start;
  const made = await startDatabaseAndBuild(start);
  context.signal.throwIfAborted();
  const deps = await makeDeps(start, made);
  const settings = { databaseUrl: deps.databaseUrl, originalsDir: home.originalsDir, publicUrl: deps.publicUrl };
  const worker = keepWorkerRunning({ rootDir: context.rootDir, settings, log });
  stops.push('The job worker', worker.stop);
  const file = path.join(context.rootDir, 'data/gazetteer/gazetteer.tsv.gz');
  const gazetteer = loadGazetteerBeside({ ownerUrl: made.database.ownerUrl, file, log });
  stops.push('The loading of the gazetteer', gazetteer.stop);
  const words = await welcome(start, deps);
  context.signal.throwIfAborted();
  const web = await startWeb({ config, deps });
  stops.push('The web server', web.close);
  nameAddress(web.url);
  say([`Muslin is ready: ${web.url}`, ...words(web.url), 'Ctrl-C stops it.'].join('\n'));
  await untilAborted(context.signal);
}

function readEnvironment(): Config {
  const config = readConfig(process.env);
  if (config.seed === 'demo' && !isLoopback(config.host)) {
    process.stderr.write(
      `Warning: SEED=demo on HOST=${config.host}: the demo accounts can be reached by everyone who reaches this address.\n`,
    );
  }
  return config;
}

export const run: Command = async (context) => {
  const stops = makeStopStack((words) => void process.stderr.write(`${words}\n`));
  const log = jsonLinesLog(
    (line) => void process.stderr.write(line),
    () => new Date(),
  );
  process.env.NODE_ENV = 'production';
  try {
    const config = readEnvironment();
    await requirePackages(['postgresql'], context.signal);
    const named = config.home ?? '';
    const home = openHome(homePath({ ...context, named }));
    const start: Start = { context, config, home, log, stops };
    await serve(start, await takePlace(start));
    return 0;
  } catch (error) {
    if (context.signal.aborted) return 0;
    if (error instanceof ConfigError || error instanceof PortTakenError) throw new CouldNotRun(error.message);
    throw error;
  } finally {
    await stops.stopAll();
    if (context.signal.aborted) say('Stopped.');
  }
};

/**
 * Fifty people at once who never rest, each with a session of their own: `npx tsx tests/bench/load.ts [seconds]`, 30 unless given. The
 * map and the table of sites against a bare Express route with one indexed query, by turns in the same run, all of them over loopback.
 */
import { type ChildProcess, fork } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import autocannon from 'autocannon';
import { signInAll } from './load-sign-in.ts';
import { makeTeamUnderLoad } from './load-team.ts';
import { countProcessor, idleShare } from './machine-idle.ts';
import { withEmptyTeam } from './station-year-cluster.ts';

const PEOPLE = 50;
const [secondsText = '30'] = process.argv.slice(2);
const seconds = Number(secondsText);
const size = { stations: 26, sites: 200, people: PEOPLE };

interface Loaded {
  readonly perSecond: number;
  readonly p99Ms: number;
  readonly processorMs: number;
}

await withEmptyTeam(async (team) => {
  const { teamId, programmeId, stationId, emails } = await makeTeamUnderLoad(team, size);
  const child = fork(path.join(import.meta.dirname, 'load-server.ts'), [team.databaseUrl, team.home], {
    execArgv: ['--import', 'tsx'],
  });
  try {
    const [ports]: { product: number; plain: number }[] = await once(child, 'message');
    if (ports === undefined) throw new Error('the server said no ports');
    const product = `http://127.0.0.1:${ports.product}`;
    const cookies = await signInAll(product, emails);
    const programme = `${product}/api/teams/${teamId}/programmes/${programmeId}`;
    const plainly = () =>
      load(child, { what: 'bare route', url: `http://127.0.0.1:${ports.plain}/stations/${stationId}`, cookies });
    print(`${size.stations} stations, ${size.sites} sites, ${PEOPLE} people, ${seconds} s each`);
    const before = countProcessor();
    const plain = await plainly();
    const map = await load(child, { what: 'map', url: `${programme}/map`, cookies });
    const sites = await load(child, { what: 'table of sites', url: `${programme}/sites`, cookies });
    const again = await plainly();
    const bare = {
      perSecond: (plain.perSecond + again.perSecond) / 2,
      processorMs: (plain.processorMs + again.processorMs) / 2,
    };
    for (const [what, found] of [
      ['map', map],
      ['table of sites', sites],
    ] as const)
      print(
        `${what}: ${(found.perSecond / bare.perSecond).toFixed(2)} of the bare route's requests a second, ${(bare.processorMs / found.processorMs).toFixed(2)} by the server's processor time`,
      );
    print(`processors left idle by everybody: ${idleShare(before, countProcessor()).toFixed(2)}`);
  } finally {
    child.disconnect();
    await once(child, 'exit');
  }
});

async function load(
  child: ChildProcess,
  { what, url, cookies }: { what: string; url: string; cookies: readonly string[] },
): Promise<Loaded> {
  const used = await processorMs(child);
  let next = 0;
  const found = await autocannon({
    url,
    connections: PEOPLE,
    duration: seconds,
    headers: { 'accept-encoding': 'gzip' },
    setupClient: (client) => {
      client.setHeaders({ cookie: cookies[next++ % cookies.length], 'accept-encoding': 'gzip' });
    },
  });
  const each = ((await processorMs(child)) - used) / found.requests.total;
  const wrong = found.errors + found.timeouts + found.non2xx;
  print(
    `${what}: ${found.requests.average.toFixed(0)} requests a second, p99 ${found.latency.p99} ms, ${each.toFixed(2)} ms of the server's processor each, ${(found.throughput.total / found.requests.total / 1000).toFixed(1)} kB each, ${wrong} errors`,
  );
  if (wrong > 0) process.exitCode = 1;
  return { perSecond: found.requests.average, p99Ms: found.latency.p99, processorMs: each };
}

async function processorMs(child: ChildProcess): Promise<number> {
  child.send('how much');
  const [told]: { processorMs: number; errors: unknown[] }[] = await once(child, 'message');
  for (const error of told?.errors ?? []) print(JSON.stringify(error));
  return told?.processorMs ?? 0;
}

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}

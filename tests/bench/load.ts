/**
 * Fifty people at once who never rest, each with a session of their own: `npx tsx tests/bench/load.ts [seconds]`, 30 each unless given.
 * The map and the table of sites against a bare Express route with one indexed query, by turns in the same run, all over loopback. On a
 * machine where others work, requests a second say how much of it was left to us; the server's processor time says what a request takes.
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
/** A machine that is busy for a while is so for all of them. */
const TURNS = 6;
const [secondsText = '30'] = process.argv.slice(2);
const seconds = Number(secondsText);
const size = { stations: 26, sites: 200, people: PEOPLE };

interface Slice {
  readonly seconds: number;
  readonly requests: number;
  readonly processorMs: number;
  /** Of whoever asks: where it is the larger, requests a second say how fast that is. */
  readonly askingMs: number;
  readonly bytes: number;
  readonly p99Ms: number;
  readonly wrong: number;
}

await withEmptyTeam(async (team) => {
  const { teamId, programmeId, stationId, emails } = await makeTeamUnderLoad(team, size);
  const child = fork(path.join(import.meta.dirname, 'load-server.ts'), [team.databaseUrl, team.home], {
    execArgv: ['--import', 'tsx'],
  });
  try {
    const [ports]: { product: number; plain: number }[] = await once(child, 'message', { signal: gone(child) });
    if (ports === undefined) throw new Error('the server said no ports');
    const product = `http://127.0.0.1:${ports.product}`;
    const cookies = await signInAll(product, emails);
    const programme = `${product}/api/teams/${teamId}/programmes/${programmeId}`;
    const routes = [
      { what: 'bare route', url: `http://127.0.0.1:${ports.plain}/stations/${stationId}` },
      { what: 'map', url: `${programme}/map` },
      { what: 'table of sites', url: `${programme}/sites` },
    ];
    print(`${size.stations} stations, ${size.sites} sites, ${PEOPLE} people, ${seconds} s each in ${TURNS} turns`);
    for (const { url } of routes) await load(child, { url, cookies, duration: 1 });
    const before = countProcessor();
    const turns: Slice[][] = routes.map(() => []);
    for (let turn = 0; turn < TURNS; turn++)
      for (const [at, { url }] of routes.entries())
        turns[at]?.push(await load(child, { url, cookies, duration: Math.max(1, Math.round(seconds / TURNS)) }));
    const [bare, ...others] = turns.map((slices, at) => ({ what: routes[at]?.what ?? '', ...summed(slices) }));
    for (const found of [bare, ...others]) if (found !== undefined) tell(found);
    for (const { what, perSecond, processorMs } of others) {
      const shares = [perSecond / (bare?.perSecond ?? 0), (bare?.processorMs ?? 0) / processorMs] as const;
      print(
        `${what}: ${shares[0].toFixed(2)} of the bare route's requests a second, ${shares[1].toFixed(2)} by the server's processor time`,
      );
    }
    print(`processors left idle by everybody: ${idleShare(before, countProcessor()).toFixed(2)}`);
  } finally {
    child.disconnect();
    await once(child, 'exit');
  }
});

async function load(
  child: ChildProcess,
  { url, cookies, duration }: { url: string; cookies: readonly string[]; duration: number },
): Promise<Slice> {
  const used = await processorMs(child);
  const own = process.cpuUsage();
  let next = 0;
  const found = await autocannon({
    url,
    connections: PEOPLE,
    duration,
    setupClient: (client) => {
      client.setHeaders({ cookie: cookies[next++ % cookies.length], 'accept-encoding': 'gzip' });
    },
  });
  const asking = process.cpuUsage(own);
  return {
    askingMs: (asking.user + asking.system) / 1000,
    seconds: found.duration,
    requests: found.requests.total,
    processorMs: (await processorMs(child)) - used,
    bytes: found.throughput.total,
    p99Ms: found.latency.p99,
    wrong: found.errors + found.timeouts + found.non2xx,
  };
}

function summed(slices: readonly Slice[]) {
  const sum = (of: (slice: Slice) => number) => slices.reduce((total, slice) => total + of(slice), 0);
  const requests = sum((slice) => slice.requests);
  return {
    perSecond: requests / sum((slice) => slice.seconds),
    processorMs: sum((slice) => slice.processorMs) / requests,
    askingMs: sum((slice) => slice.askingMs) / requests,
    kilobytes: sum((slice) => slice.bytes) / requests / 1000,
    p99sMs: slices.map(({ p99Ms }) => p99Ms),
    wrong: sum((slice) => slice.wrong),
  };
}

function tell(found: ReturnType<typeof summed> & { what: string }): void {
  const { what, perSecond, processorMs, askingMs, kilobytes, p99sMs, wrong } = found;
  print(
    `${what}: ${perSecond.toFixed(0)} requests a second, p99 of each turn ${p99sMs.join(', ')} ms, ${processorMs.toFixed(2)} ms of the server's processor and ${askingMs.toFixed(2)} ms of the asking one each, ${kilobytes.toFixed(1)} kB each, ${wrong} errors`,
  );
  if (wrong > 0) process.exitCode = 1;
}

async function processorMs(child: ChildProcess): Promise<number> {
  child.send('how much');
  const [told]: { processorMs: number; errors: unknown[] }[] = await once(child, 'message');
  for (const error of told?.errors ?? []) print(JSON.stringify(error));
  return told?.processorMs ?? 0;
}

/** Aborts when the server has died, which would never say anything. */
function gone(child: ChildProcess): AbortSignal {
  const stop = new AbortController();
  child.once('exit', () => stop.abort());
  return stop.signal;
}

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}

import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { CouldNotRun } from './could-not-run.ts';
import { runTool } from './run-tool.ts';

/** What the built client is made of. */
const SOURCES = ['src', 'public', 'index.html', 'vite.config.ts', 'package.json', 'package-lock.json'];

function sourceFiles(rootDir: string): string[] {
  return SOURCES.flatMap((name) => {
    const place = path.join(rootDir, name);
    if (!existsSync(place)) return [];
    if (path.extname(name) !== '') return [name];
    return readdirSync(place, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => path.relative(rootDir, path.join(entry.parentPath, entry.name)));
  }).sort();
}

function stampOf(rootDir: string): string {
  const hash = createHash('sha256').update('production\0');
  for (const file of sourceFiles(rootDir)) {
    const bytes = readFileSync(path.join(rootDir, file));
    hash.update(`${file}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex');
}

interface ClientPlace {
  readonly dir: string;
  readonly stampFile: string;
  /** What the stamp says when the client is made of the sources as they are now. */
  readonly stamp: string;
}

function placeOf(rootDir: string): ClientPlace {
  const dist = path.join(rootDir, 'dist');
  return { dir: path.join(dist, 'client'), stampFile: path.join(dist, 'client.stamp'), stamp: stampOf(rootDir) };
}

function isCurrent({ dir, stampFile, stamp }: ClientPlace): boolean {
  return existsSync(path.join(dir, 'index.html')) && existsSync(stampFile) && readFileSync(stampFile, 'utf8') === stamp;
}

/**
 * Sees to it that the client is built from its sources as they are now. The building is a process of its own, as it takes half
 * a gigabyte that a server would never give back.
 * @returns the client's folder
 * @throws CouldNotRun with what the build said
 */
export async function requireClient({ rootDir, signal }: { rootDir: string; signal: AbortSignal }): Promise<string> {
  const place = placeOf(rootDir);
  if (isCurrent(place)) return place.dir;
  const script = path.join(rootDir, 'server/cli/run.mjs');
  const outcome = await runTool({ script, args: ['build'], cwd: rootDir, env: process.env, signal });
  signal.throwIfAborted();
  if (outcome.code !== 0) throw new CouldNotRun(`The client could not be built:\n${outcome.output.trim()}`);
  return place.dir;
}

function moveAside(folder: string, to: string): void {
  try {
    if (existsSync(folder)) renameSync(folder, to);
  } catch {
    // A folder that came with a container's image cannot be renamed, only removed.
    rmSync(folder, { recursive: true, force: true });
  }
}

/**
 * Builds the client, if need be. Made beside its place and moved there when complete: an interrupted build leaves what was
 * there, and a server that reads the old one never sees half of the new.
 */
export async function buildClient(rootDir: string): Promise<{ readonly dir: string }> {
  const place = placeOf(rootDir);
  if (isCurrent(place)) return { dir: place.dir };
  const fresh = `${place.dir}.${process.pid}.new`;
  const old = `${place.dir}.${process.pid}.old`;
  mkdirSync(path.dirname(place.dir), { recursive: true });
  const { build } = await import('vite');
  const callersMode = process.env.NODE_ENV;
  process.env.NODE_ENV = 'production'; // vite would take a test runner's word and pack React's slow, talkative build
  try {
    await build({ root: rootDir, logLevel: 'warn', build: { outDir: fresh, emptyOutDir: true } });
    rmSync(place.stampFile, { force: true });
    moveAside(place.dir, old);
    renameSync(fresh, place.dir);
    writeFileSync(place.stampFile, place.stamp);
    return { dir: place.dir };
  } finally {
    if (callersMode === undefined) delete process.env.NODE_ENV;
    else process.env.NODE_ENV = callersMode;
    rmSync(old, { recursive: true, force: true });
    rmSync(fresh, { recursive: true, force: true });
  }
}

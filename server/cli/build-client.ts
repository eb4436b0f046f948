import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';

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
  const hash = createHash('sha256');
  for (const file of sourceFiles(rootDir)) {
    const bytes = readFileSync(path.join(rootDir, file));
    hash.update(`${file}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex');
}

export interface BuiltClient {
  readonly dir: string;
  /** False when what was there came from the same sources. */
  readonly builtNow: boolean;
}

/**
 * Builds the client if its sources have changed. Built beside its place and moved there when complete, so that an interrupted
 * build, or a server that reads the old one, never sees half of it.
 */
export async function buildClient(rootDir: string): Promise<BuiltClient> {
  const dist = path.join(rootDir, 'dist');
  const dir = path.join(dist, 'client');
  const stampFile = path.join(dist, 'client.stamp');
  const stamp = stampOf(rootDir);
  const isCurrent = existsSync(path.join(dir, 'index.html')) && existsSync(stampFile);
  if (isCurrent && readFileSync(stampFile, 'utf8') === stamp) return { dir, builtNow: false };

  const fresh = path.join(dist, `client.${process.pid}.new`);
  const old = path.join(dist, `client.${process.pid}.old`);
  mkdirSync(dist, { recursive: true });
  const { build } = await import('vite');
  try {
    await build({ root: rootDir, logLevel: 'error', build: { outDir: fresh, emptyOutDir: true } });
    rmSync(stampFile, { force: true });
    if (existsSync(dir)) renameSync(dir, old);
    renameSync(fresh, dir);
    writeFileSync(stampFile, stamp);
  } finally {
    rmSync(old, { recursive: true, force: true });
    rmSync(fresh, { recursive: true, force: true });
  }
  return { dir, builtNow: true };
}

/** What a first visit fetches of the built client, by its manifest. */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { gzipSync } from 'node:zlib';

interface Chunk {
  readonly file: string;
  readonly imports?: readonly string[];
  readonly css?: readonly string[];
}

export interface FirstLoad {
  /** Scripts and styles of the shell, gzip, bytes. */
  readonly shell: number;
  /** What a route of these modules adds to the shell. */
  route(...modules: readonly string[]): number;
  /** One file that the browser starts by itself, such as a worker. */
  file(part: string): number;
}

export function firstLoad(clientDir: string): FirstLoad {
  const manifest: Readonly<Record<string, Chunk>> = JSON.parse(
    readFileSync(path.join(clientDir, '.vite/manifest.json'), 'utf8'),
  );
  const chunkOf = (key: string): Chunk => {
    const found = manifest[key];
    if (found === undefined) throw new Error(`the built client has no ${key}`);
    return found;
  };
  const sizeOf = (file: string): number => gzipSync(readFileSync(path.join(clientDir, file))).length;
  /** Everything that comes with a module: what it imports and is not fetched on demand. */
  const filesOf = (key: string, seen = new Set<string>()): ReadonlySet<string> => {
    const { file, imports = [], css = [] } = chunkOf(key);
    if (seen.has(file)) return seen;
    for (const each of [file, ...css]) seen.add(each);
    for (const each of imports) filesOf(each, seen);
    return seen;
  };
  const sum = (files: Iterable<string>): number => [...files].reduce((total, file) => total + sizeOf(file), 0);
  const shell = filesOf('index.html');
  return {
    shell: sum(shell),
    route: (...modules) => {
      const files = new Set(modules.flatMap((module) => [...filesOf(module)]));
      return sum([...files].filter((file) => !shell.has(file)));
    },
    file: (part) => sizeOf(chunkOf(Object.keys(manifest).find((key) => key.includes(part)) ?? part).file),
  };
}

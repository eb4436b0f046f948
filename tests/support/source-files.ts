import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';

export const rootDir = path.resolve(import.meta.dirname, '../..');

const CODE = /\.(ts|tsx|mts|mjs|js)$/;

/** Every code file under the folders, as paths from the root with forward slashes. */
export function codeFiles(...folders: readonly string[]): string[] {
  return folders.flatMap((folder) => {
    const entries = readdirSync(path.join(rootDir, folder), { recursive: true, withFileTypes: true });
    return entries
      .filter((entry) => entry.isFile() && CODE.test(entry.name))
      .map((entry) => path.relative(rootDir, path.join(entry.parentPath, entry.name)).split(path.sep).join('/'))
      .sort();
  });
}

export function readSource(file: string): string {
  return readFileSync(path.join(rootDir, file), 'utf8');
}

const COMMENT_OR_STRING = /\/\*[\s\S]*?\*\/|\/\/[^\n]*|'(?:\\.|[^'\\\n])*'|"(?:\\.|[^"\\\n])*"|`(?:\\.|[^`\\])*`/g;

/** The code without its comments, line by line as before; with `strings: 'emptied'` also without what its strings say. */
export function withoutComments(source: string, { strings }: { strings: 'kept' | 'emptied' }): string {
  return source.replace(COMMENT_OR_STRING, (found) => {
    const lines = found.replace(/[^\n]/g, '');
    if (found.startsWith('/')) return ` ${lines}`;
    return strings === 'kept' ? found : `''${lines}`;
  });
}

export interface Import {
  /** As it stands in the file. */
  readonly specifier: string;
  /** A path from the root, `node:…`, or the name of a package with what follows it. */
  readonly target: string;
  readonly typeOnly: boolean;
}

const IMPORTS =
  /\b(import|export)\s+(type\s+)?(?:[\w*{][^;'"]*?\s*from\s*)?'([^'\n]+)'|\bimport\s*\(\s*'([^'\n]+)'|\bnew URL\(\s*'(\.[^'\n]+)',\s*import\.meta\.url/g;

/** Everything that a file imports, statically, dynamically, or as an address beside itself. */
export function importsOf(file: string): Import[] {
  const code = withoutComments(readSource(file), { strings: 'kept' });
  return [...code.matchAll(IMPORTS)].map((match) => {
    const specifier = match[3] ?? match[4] ?? match[5] ?? '';
    return { specifier, target: targetOf(file, specifier), typeOnly: match[2] !== undefined };
  });
}

function targetOf(file: string, specifier: string): string {
  const bare = specifier.split('?')[0] ?? specifier;
  const throughHash = /^#(engine|contract|charts)\/(.*)$/.exec(bare);
  if (throughHash !== null) return `src/${throughHash[1]}/${throughHash[2]}`;
  return bare.startsWith('.') ? path.posix.join(path.posix.dirname(file), bare) : bare;
}

import { readdirSync } from 'node:fs';
import path from 'node:path';
import { expect, test } from 'vitest';
import { codeFiles, readSource, rootDir, withoutComments } from '../support/source-files.ts';

const product = codeFiles('src', 'server', 'migrations');
const everything = [...product, ...codeFiles('tests', 'data')];

interface Trespass {
  readonly file: string;
  readonly line: number;
  readonly text: string;
}

/** Where the expression occurs in code, that is outside comments and strings. */
function occurrences(files: readonly string[], expression: RegExp): Trespass[] {
  return files.flatMap((file) => {
    const lines = withoutComments(readSource(file), { strings: 'emptied' }).split('\n');
    return lines.flatMap((text, index) =>
      expression.test(text) ? [{ file, line: index + 1, text: text.trim() }] : [],
    );
  });
}

test('there is code to look at', () => {
  expect(product.length).toBeGreaterThan(100);
});

test('nothing is of type any', () => {
  expect(occurrences(everything, /(:\s*|<|\bas\s+|\|\s*)any\b(?!\w)/)).toEqual([]);
});

test('nothing is asserted to be there with an exclamation mark', () => {
  expect(occurrences(everything, /[\w)\]]!(?=[.;,)\]]|\s*$|\[)/)).toEqual([]);
});

test('nothing is cast but where a row, a request or JSON is given its type', () => {
  const places = [
    'server/http/mount.ts', // what a schema has parsed gets the schema's type
    'src/lib/api-client.ts', // the same on the other side of the wire
    'migrations/source.ts', // the keys of a literal
    'src/contract/errors.ts', // the keys of a literal
    'server/jobs/queue.ts', // the JSON of a job
  ];
  const casts = occurrences(product, /(?<!\*|\b(import|export)\b.*|\btype\s+\w+)\s+as\s+(?!const\b)[A-Za-z_{(["']/);
  const inImports = /^\s*(import|export|type\s)|^[\w\s,]+\bas\b[\w\s,]+,?$/;
  expect(casts.filter(({ file, text }) => !places.includes(file) && !inImports.test(text))).toEqual([]);
});

test('no HTML and no code is made out of text in the browser', () => {
  expect(
    occurrences(
      product,
      /dangerouslySetInnerHTML|\b(inner|outer)HTML\b|insertAdjacentHTML|document\.write|\beval\(|new Function\(/,
    ),
  ).toEqual([]);
});

test('exports have names', () => {
  // Vitest asks for a default of its global set-up; PsychroLib is a default, and its types say so.
  const asked = ['tests/support/database.ts', 'src/engine/psychrolib.d.ts'];
  expect(occurrences(everything, /\bexport\s+default\b/).filter(({ file }) => !asked.includes(file))).toEqual([]);
});

test('no file only hands on what stands elsewhere', () => {
  expect(everything.filter((file) => /(^|\/)index\.(ts|tsx|mjs)$/.test(file))).toEqual([]);
  expect(occurrences(everything, /\bexport\s*\*\s*from\b|\bexport\s+\{[^}]*\}\s*from\b/)).toEqual([]);
});

test('files are named after their one main thing, not as drawers', () => {
  expect(everything.filter((file) => /(^|[/-])(utils?|helpers?|misc|common)(-|\.|\/)/.test(file))).toEqual([]);
});

test('only types, never code, comes from TypeScript’s own inventions', () => {
  expect(
    occurrences(
      product,
      /^\s*(export\s+)?(declare\s+)?(const\s+)?enum\s|\bconstructor\(\s*(public|private|readonly)\b/,
    ),
  ).toEqual([]);
});

test('the top level holds the listed names and nothing else', () => {
  const listed = [
    ...['package.json', 'package-lock.json', '.npmrc', '.gitignore', 'biome.json', 'vite.config.ts', 'tsconfig.json'],
    ...['index.html', 'README.md', 'DEVELOPERS.md', 'CHANGELOG.md', 'LICENSE', '.ci', 'src', 'server', 'migrations'],
    ...['data', 'tests', 'public'],
  ];
  // What git does not keep: the clone itself, what npm, Vite and the program make.
  const made = ['.git', 'node_modules', 'dist', '.muslin', '.types', 'coverage'];
  const found = readdirSync(rootDir).filter((name) => !made.includes(name) && !name.endsWith('.tsbuildinfo'));
  expect(found.filter((name) => !listed.includes(name))).toEqual([]);
});

test('every test file has sentences for titles', () => {
  const titles = codeFiles('tests')
    .filter((file) => /\.test\.tsx?$/.test(file))
    .flatMap((file) => {
      const found = readSource(file).matchAll(/^\s*(?:test|it)(?:\.\w+)?(?:\([^'`"()]*\))?\(\s*['`"]([^\n]*?)['`"],/gm);
      return [...found].map((match) => ({ file: path.basename(file), title: match[1] ?? '' }));
    });
  expect(titles.length).toBeGreaterThan(20);
  expect(titles.filter(({ title }) => title.trim().split(/\s+/).length < 3)).toEqual([]);
});

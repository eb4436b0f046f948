import { describe, expect, test } from 'vitest';
import { codeFiles, type Import, importsOf, readSource, withoutComments } from '../support/source-files.ts';
import { type ImportRule, importRules, OWN_FEATURE } from './import-rules.ts';

const files = codeFiles('src', 'server', 'migrations');

function matches(pattern: string, path: string): boolean {
  const expression = pattern
    .split(/(\*\*|\*)/)
    .map((part) => (part === '**' ? '.*' : part === '*' ? '[^/]*' : part.replace(/[.+?^${}()|[\]\\]/g, '\\$&')))
    .join('');
  return new RegExp(`^${expression}$`).test(path);
}

function ruleOf(file: string): ImportRule | undefined {
  return importRules.find((rule) => matches(rule.from, file));
}

function ownFeatureOf(file: string): string {
  return file.split('/').slice(0, 3).join('/');
}

function allows(rule: ImportRule, { file, imported }: { file: string; imported: Import }): boolean {
  const patterns = [...rule.may, ...(imported.typeOnly ? (rule.mayTypes ?? []) : [])];
  return patterns.some((pattern) =>
    matches(pattern === OWN_FEATURE ? `${ownFeatureOf(file)}/**` : pattern, imported.target),
  );
}

describe('imports flow one way', () => {
  test('the files were found', () => {
    for (const folder of [
      'src/engine/',
      'src/contract/',
      'src/features/',
      'server/http/',
      'server/features/',
      'migrations/',
    ])
      expect(files.filter((file) => file.startsWith(folder)).length, folder).toBeGreaterThan(0);
  });

  test('every file has a row that says what its place in the tree may import', () => {
    expect(files.filter((file) => ruleOf(file) === undefined)).toEqual([]);
  });

  test('every file imports only what its row lists', () => {
    const refused = files.flatMap((file) => {
      const rule = ruleOf(file);
      if (rule === undefined) return [];
      const trespasses = importsOf(file).filter((imported) => !allows(rule, { file, imported }));
      return trespasses.map(({ specifier, typeOnly }) => `${file} -> ${typeOnly ? 'type ' : ''}${specifier}`);
    });
    expect(refused).toEqual([]);
  });

  test('the server reaches src only through #engine, #contract and #charts', () => {
    const trespasses = files
      .filter((file) => file.startsWith('server/'))
      .flatMap((file) => importsOf(file).map((imported) => ({ file, ...imported })))
      .filter(({ specifier, target }) => target.startsWith('src/') && !specifier.startsWith('#'));
    expect(trespasses).toEqual([]);
  });

  test('every import of the tree names a file that is there, with its ending', () => {
    const dangling = files
      .filter((file) => !file.startsWith('src/') || !file.endsWith('.d.ts'))
      .flatMap((file) => importsOf(file).map((imported) => ({ file, ...imported })))
      .filter(({ specifier }) => /^[.#]/.test(specifier))
      .filter(({ specifier }) => !/\.(ts|tsx|mjs|css|json|html|bin|pmtiles|woff2)(\?url)?$|\/$/.test(specifier));
    expect(dangling).toEqual([]);
  });

  test('no file of another row is let in by a pattern: a refused import is refused', () => {
    const engine = ruleOf('src/engine/run/judge-year.ts');
    const verb = ruleOf('server/features/accounts/sign-in.ts');
    const store = ruleOf('server/features/accounts/account-store.ts');
    const asImport = (target: string, typeOnly = false): Import => ({ specifier: target, target, typeOnly });
    const cases = [
      { rule: engine, file: 'src/engine/run/judge-year.ts', imported: asImport('node:fs') },
      { rule: engine, file: 'src/engine/run/judge-year.ts', imported: asImport('src/contract/runs.ts', true) },
      { rule: verb, file: 'server/features/accounts/sign-in.ts', imported: asImport('express') },
      { rule: verb, file: 'server/features/accounts/sign-in.ts', imported: asImport('knex') },
      {
        rule: verb,
        file: 'server/features/accounts/sign-in.ts',
        imported: asImport('server/features/teams/team-store.ts'),
      },
      { rule: store, file: 'server/features/accounts/account-store.ts', imported: asImport('server/http/mount.ts') },
    ];
    for (const { rule, file, imported } of cases) {
      expect(rule).toBeDefined();
      if (rule !== undefined) expect(allows(rule, { file, imported }), `${file} -> ${imported.target}`).toBe(false);
    }
    expect(ruleOf('src/somewhere/new.ts')).toBeUndefined();
    expect(ruleOf('server/new-folder/file.ts')).toBeUndefined();
  });
});

describe('what a place in the tree may reach without importing it', () => {
  const code = (file: string): string => withoutComments(readSource(file), { strings: 'emptied' });
  const under = (folder: string): string[] => files.filter((file) => file.startsWith(folder));

  const reaching = (folder: string, words: RegExp): string[] =>
    under(folder).flatMap((file) => {
      const found = words.exec(code(file));
      return found === null ? [] : [`${file}: ${found[0]}`];
    });

  test('the engine knows no clock, no chance, no browser and no process', () => {
    expect(reaching('src/engine/', /\bDate\.now\b|\bnew Date\(\s*\)|\bMath\.random\b|\bperformance\.now\b/)).toEqual(
      [],
    );
    const outside = /\b(window|document|navigator|process|globalThis|fetch|setTimeout|setInterval|console)\s*[.(]/;
    expect(reaching('src/engine/', outside)).toEqual([]);
  });

  test('charts draw from their props alone', () => {
    expect(reaching('src/charts/', /\buse[A-Z]\w*\(|\b(window|document|fetch|process)\s*[.(]/)).toEqual([]);
  });

  test('features ask the server through lib, never by themselves', () => {
    expect(reaching('src/features/', /\bfetch\s*\(|\bXMLHttpRequest\b|\bEventSource\b/)).toEqual([]);
  });

  test('SQL stands in stores and read models, in server/db and in the stores of the parts around it', () => {
    const statement = /\.raw(<|\()|\bdb\(|\btransaction\(\s*'/;
    const places = /^server\/(db|jobs)\/|-store\.ts$|read-model\.ts$|^server\/http\/session\.ts$/;
    const elsewhere = under('server/').filter((file) => !places.test(file) && statement.test(code(file)));
    expect(elsewhere).toEqual([]);
  });
});

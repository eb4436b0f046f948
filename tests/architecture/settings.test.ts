import { expect, test } from 'vitest';
import { readSource } from '../support/source-files.ts';

test('every setting that the program reads stands once in the table of README, and no other', () => {
  const config = readSource('server/config.ts');
  const [, declared = ''] = /const Environment = z\.object\(\{\n([\s\S]*?)\n\}\);/.exec(config) ?? [];
  const read = [...declared.matchAll(/^ {2}([A-Z0-9_]+):/gm)].map(([, name]) => name ?? '');
  expect(read.length).toBeGreaterThan(10);
  // The worker alone takes the address of a database.
  expect(readSource('server/cli/worker-settings.ts')).toContain('env.DATABASE_URL');
  const rows = readSource('README.md')
    .split('\n')
    .filter((line) => /^\| `[A-Z]/.test(line));
  const named = rows.flatMap((row) =>
    [...(row.split('|')[1] ?? '').matchAll(/`([A-Z0-9_]+)`/g)].map(([, name]) => name),
  );
  expect(named.toSorted()).toEqual([...read, 'DATABASE_URL'].toSorted());
});

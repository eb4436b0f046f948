import { mkdirSync, mkdtempSync, readdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { expect, test } from 'vitest';
import { removeStale } from '../../../server/storage/remove-stale.ts';

const NOW = new Date('2029-07-14T12:00:00Z');
const hoursAgo = (hours: number) => new Date(NOW.getTime() - hours * 3_600_000);

test('what a killed process left is removed, folders with all that they hold; what is new or not ours stays', async () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'muslin-stale-'));
  const make = (name: string, hours: number, isFolder = false) => {
    const at = path.join(folder, name);
    if (isFolder) {
      mkdirSync(at);
      writeFileSync(path.join(at, 'part'), 'x');
    } else writeFileSync(at, 'x');
    utimesSync(at, hoursAgo(hours), hoursAgo(hours));
  };
  make('upload-old', 25);
  make('upload-new', 1);
  make('archive-old', 25, true);
  make('archive-new', 1, true);
  make('of-others-old', 25, true);
  await removeStale(folder, ['upload-', 'archive-'], hoursAgo(24));
  expect(readdirSync(folder).sort()).toEqual(['archive-new', 'of-others-old', 'upload-new']);
  rmSync(folder, { recursive: true });
});

import { existsSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, test } from 'vitest';
import { readSource, rootDir } from '../support/source-files.ts';

const section = readSource('DEVELOPERS.md').split('## Security, point by point')[1] ?? '';
const rows = section
  .split('\n')
  .map((line) => line.split('|').map((cell) => cell.trim()))
  .filter(([, point = '']) => /^\d+\.\d+\.\d+\*?$/.test(point))
  .map(([, point = '', what = '', answer = '']) => ({ point, what, answer }));

describe('the table of security points', () => {
  test('names some forty points of ASVS 4.0.3, each once and in order', () => {
    expect(rows.length).toBeGreaterThanOrEqual(40);
    const order = rows.map(({ point }) => point.replace('*', '').split('.').map(Number));
    const sorted = order.toSorted(
      (a, b) => (a[0] ?? 0) - (b[0] ?? 0) || (a[1] ?? 0) - (b[1] ?? 0) || (a[2] ?? 0) - (b[2] ?? 0),
    );
    expect(order).toEqual(sorted);
    expect(new Set(rows.map(({ point }) => point)).size).toBe(rows.length);
  });

  test.each(rows)('$point ($what) is answered by files that are there', ({ answer }) => {
    const files = [...answer.matchAll(/`([^`]+)`/g)].map(([, file = '']) => file);
    expect(files.length).toBeGreaterThan(0);
    expect(files.filter((file) => !existsSync(path.join(rootDir, file)))).toEqual([]);
  });
});

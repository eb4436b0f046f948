import { readFileSync } from 'node:fs';
import { sharedFolder } from './shared.ts';

export type GroundTruth = ReadonlyMap<string, ReadonlyMap<string, string>>;

/** Columns of groundtruth.csv beside the real files, by file and name; empty where they are absent. */
export function readTruth(): GroundTruth {
  if (sharedFolder === null) return new Map();
  const [header = '', ...rows] = readFileSync(`${sharedFolder}real/groundtruth.csv`, 'utf8').trim().split(/\r?\n/);
  const names = header.split(',');
  return new Map(
    rows.map((row) => {
      const fields = row.split(',');
      return [fields[0] ?? '', new Map(names.map((name, index) => [name, fields[index] ?? '']))];
    }),
  );
}

export function truthOf(truth: GroundTruth, file: string, column: string): number {
  const value = Number(truth.get(file)?.get(column));
  if (Number.isNaN(value)) throw new Error(`no ${column} of ${file}`);
  return value;
}

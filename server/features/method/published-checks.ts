import { promises } from 'node:fs';
import { type MethodChecks, PublishedCheck } from '#contract/method.ts';

const FOLDER = new URL('../../../data/checks/', import.meta.url);
/** In the order in which a page shows them. */
const FILES = [
  'psychrometrics.json',
  'evaporative-cooling.json',
  'adaptive-comfort.json',
  'indoor-limits.json',
  'design-values.json',
  'climate.json',
  'money.json',
  'interpolation.json',
  'ranking.json',
];
const TABLES = ['golden-wetbulb.csv'];

/** Everything in data/checks that can be run. @throws when a file is not what such a file is */
export async function readPublishedChecks(): Promise<MethodChecks> {
  const files = await Promise.all(
    FILES.map(async (name): Promise<{ checks: unknown[] }> => JSON.parse(await read(name))),
  );
  const tables = await Promise.all(TABLES.map(async (name) => [name, await read(name)] as const));
  return {
    checks: files.flatMap(({ checks }) => checks.map((check) => PublishedCheck.parse(check))),
    tables: Object.fromEntries(tables),
  };
}

function read(name: string): Promise<string> {
  return promises.readFile(new URL(name, FOLDER), 'utf8');
}

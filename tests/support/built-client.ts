/** Builds the client before the first browser test, since several files that found it stale would build it over one another. */
import path from 'node:path';
import { buildClient } from '../../server/cli/build-client.ts';

export async function setup(): Promise<void> {
  await buildClient(path.resolve(import.meta.dirname, '../..'));
}

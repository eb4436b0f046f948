import { buildClient } from './build-client.ts';
import type { Command } from './command.ts';

/** The hidden command `build`: see `requireClient`. */
export const run: Command = async ({ rootDir }) => {
  await buildClient(rootDir);
  return 0;
};

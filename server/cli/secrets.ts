import { randomBytes } from 'node:crypto';
import { existsSync, linkSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import * as z from 'zod/mini';
import { CouldNotRun } from './could-not-run.ts';

const Secret = z.string().check(z.minLength(24));

const Secrets = z.strictObject({
  /** The first signs sessions; the others are still believed. */
  sessionSecrets: z.tuple([Secret], Secret),
  superuserPassword: Secret,
  ownerPassword: Secret,
  appPassword: Secret,
});
export type Secrets = z.infer<typeof Secrets>;

function newSecrets(): Secrets {
  const secret = () => randomBytes(32).toString('base64url');
  return {
    sessionSecrets: [secret()],
    superuserPassword: secret(),
    ownerPassword: secret(),
    appPassword: secret(),
  };
}

/** Reads the secrets of a home; makes them at random at its first start. There are no defaults. */
export function openSecrets(file: string): Secrets {
  if (!existsSync(file)) {
    const unfinished = `${file}.${process.pid}`;
    writeFileSync(unfinished, `${JSON.stringify(newSecrets(), null, 2)}\n`, { mode: 0o600, flag: 'wx' });
    try {
      linkSync(unfinished, file);
    } finally {
      rmSync(unfinished, { force: true });
    }
  }
  if ((statSync(file).mode & 0o077) !== 0) {
    throw new CouldNotRun(`Others can read the secrets in ${file}. Make the file private: chmod 600 ${file}`);
  }
  try {
    return z.parse(Secrets, JSON.parse(readFileSync(file, 'utf8')));
  } catch {
    throw new CouldNotRun(
      `The secrets in ${file} cannot be read. Put the file back as it was; without it the database stays shut.`,
    );
  }
}

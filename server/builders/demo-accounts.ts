import { randomBytes } from 'node:crypto';
import { readFile, rename, writeFile } from 'node:fs/promises';
import { Role } from '#contract/accounts.ts';

/** One sign-in of the demo: there is one for each role. */
export interface DemoAccount {
  readonly role: Role;
  readonly email: string;
  readonly name: string;
  readonly password: string;
}

const HEADING = [
  'Sign-ins of the demo (invented places and weather), one for each role.',
  'The passwords were made at random for this home; this file alone keeps them.',
];

/** Four accounts with new random passwords. The domain is one that can never receive mail (RFC 2606). */
export function newDemoAccounts(): readonly DemoAccount[] {
  return Role.options.map((role) => ({
    role,
    email: `${role}@veldway.example`,
    name: `Veldway ${role}`,
    password: randomBytes(12).toString('base64url'),
  }));
}

/** Writes them for the home's owner alone; whole or not at all. */
export async function writeDemoAccounts(file: string, accounts: readonly DemoAccount[]): Promise<void> {
  const lines = accounts.map(({ role, email, password }) => `${role.padEnd(10)}${email.padEnd(28)}${password}`);
  const unfinished = `${file}.unfinished`;
  await writeFile(unfinished, [...HEADING, '', ...lines, ''].join('\n'), { mode: 0o600 });
  await rename(unfinished, file);
}

/** The sign-ins of a demo-accounts.txt. */
export async function readDemoAccounts(file: string): Promise<readonly Omit<DemoAccount, 'name'>[]> {
  const text = await readFile(file, 'utf8');
  return text.split('\n').flatMap((line) => {
    const [word = '', email = '', password = '', ...more] = line.trim().split(/\s+/);
    const role = Role.safeParse(word);
    return role.success && email.includes('@') && password !== '' && more.length === 0
      ? [{ role: role.data, email, password }]
      : [];
  });
}

import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';

export const repositoryDir = path.resolve(import.meta.dirname, '../..');
export const runProgram = path.join(repositoryDir, 'server/cli/run.mjs');

export interface CommandOutcome {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

export interface RunningCommand {
  readonly child: ChildProcess;
  /** What it has said on standard output so far. */
  said(): string;
  /** Resolves when standard output contains the text; rejects with everything said if it ends without. */
  until(text: string): Promise<void>;
  readonly ended: Promise<CommandOutcome>;
}

/** Starts a command of run.mjs as a process of its own, as a person in `cwd` would. */
export function startCommand(
  args: readonly string[],
  options: {
    cwd?: string;
    env?: Readonly<Record<string, string>>;
    program?: string;
    programArgs?: readonly string[];
  } = {},
): RunningCommand {
  // What npm tells its scripts belongs to the run that we are in, not to the command under test.
  const inherited = Object.entries(process.env).filter(
    ([name]) => !/^(npm_|INIT_CWD$|MUSLIN_|PORT$|HOST$|SEED$)/i.test(name),
  );
  const child = spawn(options.program ?? process.execPath, [...(options.programArgs ?? [runProgram]), ...args], {
    cwd: options.cwd ?? repositoryDir,
    env: { ...Object.fromEntries(inherited), ...options.env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let stdout = '';
  let stderr = '';
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    stdout += text;
  });
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    stderr += text;
  });
  const ended = new Promise<CommandOutcome>((resolve, reject) => {
    child.once('error', reject);
    child.once('close', (code) => resolve({ code, stdout, stderr }));
  });
  return {
    child,
    said: () => stdout,
    until: (text) =>
      new Promise((resolve, reject) => {
        const look = () => {
          if (stdout.includes(text)) resolve();
        };
        child.stdout.on('data', look);
        child.once('close', () => reject(new Error(`It ended without saying "${text}":\n${stdout}\n${stderr}`)));
        look();
      }),
    ended,
  };
}

/** Runs a command to its end. */
export function runCommand(
  args: readonly string[],
  options: { cwd?: string; env?: Readonly<Record<string, string>> } = {},
): Promise<CommandOutcome> {
  return startCommand(args, options).ended;
}

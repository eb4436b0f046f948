import { spawn } from 'node:child_process';

export interface ProgramUser {
  readonly uid: number;
  readonly gid: number;
}

export interface ProgramOutcome {
  /** null when it was ended by a signal. */
  readonly code: number | null;
  /** What it said on both streams; empty when it was not kept. */
  readonly output: string;
}

export interface ProgramCall {
  readonly program: string;
  readonly args: readonly string[];
  readonly user?: ProgramUser | null;
  readonly env: Readonly<Record<string, string>>;
  /** Do not read its output: a program that leaves a server behind would keep the pipe open. */
  readonly silent?: boolean;
}

/**
 * Runs a program to its end in a process group of its own, so that a Ctrl-C in the terminal reaches only us and nothing
 * is left half made. Rejects when the program cannot be started at all.
 */
export function runProgram(call: ProgramCall): Promise<ProgramOutcome> {
  return new Promise((resolve, reject) => {
    const child = spawn(call.program, call.args, {
      ...(call.user ?? {}),
      cwd: '/',
      env: call.env,
      detached: true,
      stdio: call.silent ? 'ignore' : ['ignore', 'pipe', 'pipe'],
    });
    const chunks: Buffer[] = [];
    child.stdout?.on('data', (chunk: Buffer) => chunks.push(chunk));
    child.stderr?.on('data', (chunk: Buffer) => chunks.push(chunk));
    child.once('error', reject);
    child.once('close', (code) => resolve({ code, output: Buffer.concat(chunks).toString('utf8') }));
  });
}

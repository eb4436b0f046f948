import { spawn } from 'node:child_process';
import { once } from 'node:events';
import os from 'node:os';

const PATIENCE_MS = 15_000;

export interface ToolCall {
  /** JavaScript file of the tool, and its arguments. */
  readonly script: string;
  readonly args: readonly string[];
  readonly cwd: string;
  readonly env: NodeJS.ProcessEnv;
  readonly signal: AbortSignal;
  /** Gives way to everything else that wants a core. */
  readonly givesWay?: boolean;
}

/** How nice it is to others, by the scale of Unix (0 as any other, 19 last of all). */
const NICE = 5;

export interface ToolOutcome {
  /** null when it was ended by a signal. */
  readonly code: number | null;
  /** Both streams, in the order in which they came. */
  readonly output: string;
}

/** Signals a whole process group that may be gone already. */
function signalGroup(leaderPid: number, name: 'SIGTERM' | 'SIGKILL'): void {
  try {
    process.kill(-leaderPid, name);
  } catch {
    // all of it has ended
  }
}

/**
 * Runs a Node program in a process group of its own and keeps what it says. When we are to stop, the whole group is asked to
 * end, and made to after a while.
 */
export async function runTool(call: ToolCall): Promise<ToolOutcome> {
  const child = spawn(process.execPath, [call.script, ...call.args], {
    cwd: call.cwd,
    env: call.env,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const chunks: Buffer[] = [];
  child.stdout.on('data', (chunk: Buffer) => chunks.push(chunk));
  child.stderr.on('data', (chunk: Buffer) => chunks.push(chunk));

  const leaderPid = child.pid;
  // What it starts from now on is as nice as it is.
  if (call.givesWay && leaderPid !== undefined) os.setPriority(leaderPid, NICE);
  let insist: NodeJS.Timeout | undefined;
  const stop = () => {
    if (leaderPid === undefined) return;
    signalGroup(leaderPid, 'SIGTERM');
    insist = setTimeout(() => signalGroup(leaderPid, 'SIGKILL'), PATIENCE_MS);
  };
  call.signal.addEventListener('abort', stop, { once: true });
  if (call.signal.aborted) stop();
  try {
    const [code]: (number | null)[] = await once(child, 'close');
    return { code: code ?? null, output: Buffer.concat(chunks).toString('utf8') };
  } finally {
    clearTimeout(insist);
    call.signal.removeEventListener('abort', stop);
  }
}

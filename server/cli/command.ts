/** What run.mjs hands to a command. */
export interface CommandContext {
  readonly rootDir: string;
  /** Where the caller stands: relative paths count from here. */
  readonly callerDir: string;
  readonly args: readonly string[];
  /** Aborted when the command is to stop everything it started and return. */
  readonly signal: AbortSignal;
}

/** A command's exit code: 0 done, 1 something is wrong with what was looked at, 2 wrong use, 3 could not run. */
export type ExitCode = 0 | 1 | 2 | 3;

/** Every command module exports one of these as `run`. */
export type Command = (context: CommandContext) => Promise<ExitCode>;

import path from 'node:path';
import { pathToFileURL } from 'node:url';
import type { CommandContext, ExitCode } from '../command.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

/** What this command uses of the benchmarks, which stand beside the tests and are loaded only when they are asked for. */
interface Benchmarks<Bench> {
  readonly benches: readonly (Bench & { readonly name: string; readonly about: string })[];
  readonly runBench: (bench: Bench) => Promise<{
    readonly bench: { readonly compare: 'at least' | 'at most' };
    readonly finding: { readonly plain: string; readonly ours: string; readonly fault: string | null };
    readonly line: {
      readonly bench: string;
      readonly ratio: number;
      readonly gate: number;
      readonly ok: boolean | 'busy';
      readonly idleShare: number;
    };
  }>;
}

const WIDTHS = [12, 10, 14, 6, 6, 44];

/**
 * `muslin bench NAMES`: the product against the plain way of doing the same, both timed in this process by turns. A table on
 * standard error, a JSON line for each on standard output; ends with 1 when a gate is missed on a quiet machine.
 */
export async function bench({ args, rootDir }: CommandContext): Promise<ExitCode> {
  const { benches, runBench }: Benchmarks<unknown> = await import(
    pathToFileURL(path.join(rootDir, 'tests/bench/run-benches.ts')).href
  );
  const unknown = args.filter((name) => !benches.some((each) => each.name === name));
  if (args.length === 0 || unknown.length > 0) {
    const choice = benches.map(({ name, about }) => `  ${name.padEnd(WIDTHS[0] ?? 0)} ${about}`).join('\n');
    const wrong =
      unknown.length === 0 ? 'Name the benchmarks to run.' : `There is no benchmark "${unknown.join('", "')}".`;
    throw new WrongUse(`${wrong} There are:\n${choice}`);
  }
  sayRow(['bench', 'ratio', 'gate', 'ok', 'idle', 'plain / ours']);
  let missed = false;
  for (const each of benches.filter(({ name }) => args.includes(name))) {
    const report = await runBench(each);
    const { line, finding } = report;
    const { ratio, gate, ok, idleShare } = line;
    const sides = finding.fault ?? `${finding.plain} / ${finding.ours}`;
    sayRow([line.bench, String(ratio), `${report.bench.compare} ${gate}`, okWord(ok), idleShare.toFixed(2), sides]);
    printResult({ ...line });
    missed ||= ok === false;
  }
  return missed ? 1 : 0;
}

function okWord(ok: boolean | 'busy'): string {
  return ok === 'busy' ? 'busy' : ok ? 'yes' : 'no';
}

function sayRow(cells: readonly string[]): void {
  say(
    cells
      .map((cell, column) => cell.padEnd(WIDTHS[column] ?? 0))
      .join(' ')
      .trimEnd(),
  );
}

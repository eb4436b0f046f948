import type { Bench, BenchFinding } from './bench.ts';
import { batchBench } from './definitions/batch.ts';
import { growthReadBench, ingestBench } from './definitions/ingest.ts';
import { rankBench } from './definitions/rank.ts';
import { readBench } from './definitions/read.ts';
import { growthBench, rescoreBench, rescoreThreadsBench } from './definitions/rescore.ts';
import { loadBench, sizeBench } from './definitions/station-years.ts';
import {
  leaveOneOutBench,
  leaveOneOutGrowthBench,
  surfaceBuildBench,
  surfaceGrowthBench,
  surfaceSlideBench,
} from './definitions/surface.ts';
import { secondWetBulbBench, wetBulbBench } from './definitions/wet-bulb.ts';
import { countProcessor, idleShare } from './machine-idle.ts';

export const benches: readonly Bench[] = [
  wetBulbBench,
  secondWetBulbBench,
  ingestBench,
  growthReadBench,
  readBench,
  batchBench,
  rescoreBench,
  rescoreThreadsBench,
  growthBench,
  rankBench,
  surfaceBuildBench,
  surfaceSlideBench,
  surfaceGrowthBench,
  leaveOneOutBench,
  leaveOneOutGrowthBench,
  loadBench,
  sizeBench,
];

/** Less of the machine left idle by others than this, and a gate that is missed says nothing. */
const QUIET_SHARE = 0.9;

export interface BenchLine {
  readonly bench: string;
  readonly ratio: number;
  readonly gate: number;
  readonly ok: boolean | 'busy';
  readonly idleShare: number;
}

export interface BenchReport {
  readonly line: BenchLine;
  readonly bench: Bench;
  readonly finding: BenchFinding;
}

/** Runs one benchmark; a machine that others keep busy excuses a missed gate, never a wrong result. */
export async function runBench(bench: Bench): Promise<BenchReport> {
  const before = countProcessor();
  const finding = await bench.run();
  const share = idleShare(before, countProcessor());
  const passed = bench.compare === 'at least' ? finding.ratio >= bench.gate : finding.ratio <= bench.gate;
  const excused = finding.fault === null && share < QUIET_SHARE;
  const ok = passed && finding.fault === null ? true : excused ? 'busy' : false;
  return {
    bench,
    finding,
    line: {
      bench: bench.name,
      ratio: Number(finding.ratio.toPrecision(4)),
      gate: bench.gate,
      ok,
      idleShare: Number(share.toFixed(3)),
    },
  };
}

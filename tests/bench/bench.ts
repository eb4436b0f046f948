/** What a benchmark found: how many times faster the product is than the plain way, or how its cost grows. */
export interface BenchFinding {
  readonly ratio: number;
  /** Both sides in words for the table, with their unit. */
  readonly plain: string;
  readonly ours: string;
  /** What is wrong with the results that were timed; null when both sides agree. */
  readonly fault: string | null;
}

export interface Bench {
  readonly name: string;
  readonly about: string;
  /** The ratio must be at least this, or an exponent of growth at most. */
  readonly gate: number;
  readonly compare: 'at least' | 'at most';
  readonly run: () => BenchFinding | Promise<BenchFinding>;
}

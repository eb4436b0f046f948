/** Timing of two sides in one process, by turns: one warm-up each, then the best of several. */

const ROUNDS = 7;

/**
 * Processor time that a piece of work takes, ms. Not the clock's: on a machine that does other work too, time spent waiting for a
 * processor says nothing about either side.
 */
export function processorMs(work: () => unknown): number {
  const before = process.cpuUsage();
  work();
  const spent = process.cpuUsage(before);
  return (spent.user + spent.system) / 1000;
}

/** Best processor time of both sides, ms, each for one unit of what it is given. */
export function sideBySide(sides: {
  plain: () => unknown;
  plainUnits: number;
  ours: () => unknown;
  oursUnits: number;
}): { plainMs: number; oursMs: number } {
  processorMs(sides.plain);
  processorMs(sides.ours);
  let plainMs = Number.POSITIVE_INFINITY;
  let oursMs = Number.POSITIVE_INFINITY;
  for (let round = 0; round < ROUNDS; round++) {
    plainMs = Math.min(plainMs, processorMs(sides.plain) / sides.plainUnits);
    oursMs = Math.min(oursMs, processorMs(sides.ours) / sides.oursUnits);
  }
  return { plainMs, oursMs };
}

/** Slope of a straight line through the logarithms of sizes and times: 1 when twice the work takes twice the time. */
export function growthExponent(points: readonly { size: number; ms: number }[]): number {
  const xs = points.map(({ size }) => Math.log(size));
  const ys = points.map(({ ms }) => Math.log(ms));
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const [meanX, meanY] = [mean(xs), mean(ys)];
  const covariance = xs.reduce((sum, x, index) => sum + (x - meanX) * ((ys[index] ?? 0) - meanY), 0);
  return covariance / xs.reduce((sum, x) => sum + (x - meanX) ** 2, 0);
}

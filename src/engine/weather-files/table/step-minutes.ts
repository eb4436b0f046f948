/** Minutes between rows: the most frequent positive difference, and the share of the differences that have it. */
export function stepMinutes(minutes: readonly number[]): { readonly stepMin: number; readonly share: number } {
  const counts = new Map<number, number>();
  let differences = 0;
  for (let row = 1; row < minutes.length; row++) {
    const difference = (minutes[row] ?? 0) - (minutes[row - 1] ?? 0);
    if (difference <= 0) continue;
    differences++;
    counts.set(difference, (counts.get(difference) ?? 0) + 1);
  }
  let stepMin = 0;
  let most = 0;
  for (const [difference, count] of counts) {
    if (count > most || (count === most && difference < stepMin)) {
      stepMin = difference;
      most = count;
    }
  }
  return { stepMin, share: differences === 0 ? 0 : most / differences };
}

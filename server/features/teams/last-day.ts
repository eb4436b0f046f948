const DAY_MS = 24 * 3_600_000;

/** The moment at which a last day is over, in UTC; null for a member of the house. */
export function endOfDay(lastDay: string | null): Date | null {
  return lastDay === null ? null : new Date(Date.parse(`${lastDay}T00:00:00Z`) + DAY_MS);
}

/** The last day that ends at a moment. */
export function lastDayOf(endsAt: Date | null): string | null {
  return endsAt === null ? null : new Date(endsAt.getTime() - DAY_MS).toISOString().slice(0, 10);
}

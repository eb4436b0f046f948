/** How near a station has to be for an estimate to be shown, and shown in full (method 9). */
export type SupportClass = 'full' | 'pale' | 'none';

export const FULL_SUPPORT = { km: 50, m: 150 } as const;
export const PALE_SUPPORT = { km: 100, m: 300 } as const;

/** What one station lends a place. @param heightDifferenceM either sign */
export function supportClass(distanceKm: number, heightDifferenceM: number): SupportClass {
  const difference = Math.abs(heightDifferenceM);
  if (distanceKm <= FULL_SUPPORT.km && difference <= FULL_SUPPORT.m) return 'full';
  return distanceKm <= PALE_SUPPORT.km && difference <= PALE_SUPPORT.m ? 'pale' : 'none';
}

const BEST_FIRST: readonly SupportClass[] = ['full', 'pale', 'none'];

/** The best that any of some stations lends. */
export function bestSupport(classes: readonly SupportClass[]): SupportClass {
  return BEST_FIRST.find((each) => classes.includes(each)) ?? 'none';
}

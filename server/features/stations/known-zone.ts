import lookUpZone from '@photostructure/tz-lookup';

/** IANA zone of a position; null at sea and where the look-up, or this machine's tables, know none. */
export function knownZone(latitude: number, longitude: number): string | null {
  try {
    const zone = lookUpZone(latitude, longitude);
    // Answers Etc/GMT±h from the longitude alone at sea.
    if (zone.startsWith('Etc/')) return null;
    // Throws for a zone that this machine's tables do not have.
    return new Intl.DateTimeFormat('en', { timeZone: zone }).resolvedOptions().timeZone && zone;
  } catch {
    return null;
  }
}

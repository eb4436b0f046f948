/**
 * Provenance of the three values of an hour in one byte: bits 0-1 dry bulb, 2-3 humidity, 4-5 pressure; 6-7 are spare.
 */
export const provenances = ['measured', 'estimated', 'repaired', 'missing'] as const;

/**
 * `measured` as the source gives it; `estimated` by the source's own flags (for pressure: assumed from the standard
 * atmosphere); `repaired` by us under a named rule; `missing`.
 */
export type Provenance = (typeof provenances)[number];

const CODE: Record<Provenance, number> = { measured: 0, estimated: 1, repaired: 2, missing: 3 };

export function hourFlags(hour: { dryBulb: Provenance; humidity: Provenance; pressure: Provenance }): number {
  return CODE[hour.dryBulb] | (CODE[hour.humidity] << 2) | (CODE[hour.pressure] << 4);
}

function provenanceAt(flags: number, shift: number): Provenance {
  return provenances[(flags >> shift) & 3] ?? 'missing';
}

export function dryBulbProvenance(flags: number): Provenance {
  return provenanceAt(flags, 0);
}
export function humidityProvenance(flags: number): Provenance {
  return provenanceAt(flags, 2);
}
export function pressureProvenance(flags: number): Provenance {
  return provenanceAt(flags, 4);
}

/** Whether any of the three values was changed or filled by a rule of ours. */
export function hasRepair(flags: number): boolean {
  return (flags & 3) === CODE.repaired || ((flags >> 2) & 3) === CODE.repaired || ((flags >> 4) & 3) === CODE.repaired;
}

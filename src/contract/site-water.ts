import * as z from 'zod/mini';

const Concentration = z.number().check(z.gte(0, 'Give 0 or more.'), z.lte(100_000, 'Give at most 100,000 mg/L.'));

export const bleedDestinations = ['sewer', 'soakaway or soil', 'surface water', 'storage and reuse', 'none'] as const;

/** The water sheet; concentrations in mg/L, hardness and alkalinity as CaCO3; null is not known. */
export const SiteWater = z.strictObject({
  hardnessMgL: z._default(z.nullable(Concentration), null),
  alkalinityMgL: z._default(z.nullable(Concentration), null),
  silicaMgL: z._default(z.nullable(Concentration), null),
  dissolvedSolidsMgL: z._default(z.nullable(Concentration), null),
  bleedTo: z._default(z.nullable(z.enum(bleedDestinations)), null),
  /** What the utility allows on one day, m3. */
  peakDayLimitM3: z._default(z.nullable(z.number().check(z.gt(0, 'Give more than 0 m³.'), z.lte(1_000_000))), null),
  note: z._default(z.string().check(z.maxLength(1000, 'Use 1,000 characters or fewer.')), ''),
});
export type SiteWater = z.infer<typeof SiteWater>;

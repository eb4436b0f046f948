/** How often the water of a wetted plant may be concentrated before something in it passes a limit. */

export type WaterIon = 'hardness' | 'alkalinity' | 'silica' | 'dissolved solids';

export interface IonLimit {
  readonly ion: WaterIon;
  /** Most in the circulating water, mg/L; hardness and alkalinity as CaCO3. */
  readonly limitMgL: number;
  readonly source: string;
}

const MAKERS = 'a tower maker’s guideline for circulating water over galvanised steel; makers differ';

/** Customary limits of circulating water. The water treatment of the plant has its own, which go before these. */
export const ionLimits: readonly IonLimit[] = [
  { ion: 'hardness', limitMgL: 500, source: MAKERS },
  { ion: 'alkalinity', limitMgL: 500, source: MAKERS },
  { ion: 'silica', limitMgL: 150, source: 'common practice, from memory' },
  { ion: 'dissolved solids', limitMgL: 1000, source: MAKERS },
];

/** Cooling-water treatment guidance: not above 5, as little is saved beyond (M/E = 1.25 at 5, 1.2 at 6). */
export const MOST_CYCLES = 5;

export interface WaterCycles {
  /** Cycles of concentration; null when nothing is known of the water, or when it cannot be concentrated at all. */
  readonly cycles: number | null;
  /** What limits them; null where `MOST_CYCLES` does, or nothing is known. */
  readonly limiting: WaterIon | null;
  /** Those of the four that are not known, and might limit further. */
  readonly unknown: readonly WaterIon[];
  /** Bleed per evaporation, B/E = 1/(C - 1); null without cycles. */
  readonly bleedShare: number | null;
  /** Every known ion with the cycles that it would allow. */
  readonly allowed: readonly (IonLimit & { readonly makeUpMgL: number; readonly cycles: number })[];
}

/**
 * C = min over ions of limit / make-up, and at most 5. Make-up water that is over a limit as it comes cannot be concentrated.
 * @param makeUpMgL what the make-up water holds, mg/L; null is not known
 */
export function waterCycles(makeUpMgL: Readonly<Record<WaterIon, number | null>>): WaterCycles {
  const allowed = ionLimits.flatMap((limit) => {
    const held = makeUpMgL[limit.ion];
    return held === null || held <= 0 ? [] : [{ ...limit, makeUpMgL: held, cycles: limit.limitMgL / held }];
  });
  const unknown = ionLimits.flatMap(({ ion }) => (makeUpMgL[ion] === null ? [ion] : []));
  const least = allowed.reduce<(typeof allowed)[number] | null>(
    (lowest, each) => (lowest === null || each.cycles < lowest.cycles ? each : lowest),
    null,
  );
  if (unknown.length === ionLimits.length) return { cycles: null, limiting: null, unknown, bleedShare: null, allowed };
  const cycles = Math.min(MOST_CYCLES, least?.cycles ?? MOST_CYCLES);
  const limiting = least !== null && least.cycles < MOST_CYCLES ? least.ion : null;
  // At C = 1 the bleed would be endless.
  if (cycles <= 1) return { cycles: null, limiting, unknown, bleedShare: null, allowed };
  return { cycles, limiting, unknown, bleedShare: 1 / (cycles - 1), allowed };
}

import type { Limit } from '../brief/brief.ts';

type AdaptiveModel = Extract<Limit, { kind: 'adaptive' }>['model'];

/**
 * Upper limits of adaptive comfort: comfort temperature = slope x running mean + base, plus half the band. ASHRAE 55
 * section 5.4 (0.31, 17.8; 3.5 K for 80 %, 2.5 K for 90 %; 10 to 33.5 °C) and EN 16798-1 annex B (0.33, 18.8; 2, 3, 4 K for
 * categories I, II, III; 10 to 30 °C). Neither result is rounded.
 */
const ASHRAE_55 = { slope: 0.31, baseC: 17.8, leastC: 10, mostC: 33.5 };
const EN_16798 = { slope: 0.33, baseC: 18.8, leastC: 10, mostC: 30 };
const MODELS = {
  'ashrae55-80': { ...ASHRAE_55, aboveK: 3.5 },
  'ashrae55-90': { ...ASHRAE_55, aboveK: 2.5 },
  'en16798-i': { ...EN_16798, aboveK: 2 },
  'en16798-ii': { ...EN_16798, aboveK: 3 },
  'en16798-iii': { ...EN_16798, aboveK: 4 },
} as const;

export interface AdaptiveLimit {
  /** °C; of a running mean outside the model's range, that of the nearest end (method 4). */
  readonly upperC: number;
  readonly comfortC: number;
  readonly outsideRange: boolean;
}

/** @param runningMeanC running mean of the outdoor temperature, °C */
export function adaptiveLimit(model: AdaptiveModel, runningMeanC: number): AdaptiveLimit {
  const { slope, baseC, aboveK, leastC, mostC } = MODELS[model];
  const usedC = Math.min(Math.max(runningMeanC, leastC), mostC);
  const comfortC = slope * usedC + baseC;
  return { upperC: comfortC + aboveK, comfortC, outsideRange: usedC !== runningMeanC };
}

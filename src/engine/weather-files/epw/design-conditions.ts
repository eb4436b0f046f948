import type { PublishedDesign } from '../assembly/design-check.ts';
import { headerNumber } from './header-fields.ts';

/** Places after the word Cooling: hottest month, daily range, then dry bulb / coincident wet bulb and the reverse. */
const DRY_BULB_AT = [3, 5, 7] as const;
const WET_BULB_AT = [9, 11, 13] as const;

/** DESIGN CONDITIONS: the cooling group's dry and wet bulb at 0.4, 1 and 2 %; null without such a group. */
export function readDesignConditions(fields: readonly string[], line: number): PublishedDesign | null {
  const cooling = fields.findIndex((field) => field.toLowerCase() === 'cooling');
  if (cooling < 0) return null;
  const at = (places: readonly number[]) => places.map((place) => headerNumber(fields[cooling + place]));
  const published = { line, dryBulbC: at(DRY_BULB_AT), wetBulbC: at(WET_BULB_AT) };
  return [...published.dryBulbC, ...published.wetBulbC].every((value) => value === null) ? null : published;
}

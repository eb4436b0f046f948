/** What is compared, as the address of the page says it. */
import type { PlaceRef } from '../../../map/sheet-place.ts';

/** More do not stand beside one another. */
export const MOST_COMPARED = 6;
export const MOST_YEARS = 2;

export interface CompareAddress {
  readonly places: readonly PlaceRef[];
  readonly briefs: readonly string[];
  /** Weather files of the place’s years. */
  readonly years: readonly string[];
}

/** Several places under one brief, one place under several briefs, or two of its weather years. */
export type CompareKind = 'places' | 'briefs' | 'years';

const ID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

/** Reads the address; what is no id is passed over, what stands twice counts once. */
export function readCompare(search: URLSearchParams): CompareAddress {
  return {
    places: listOf(search, 'places').flatMap(placeOf).slice(0, MOST_COMPARED),
    briefs: listOf(search, 'briefs').filter(isId).slice(0, MOST_COMPARED),
    years: listOf(search, 'years').filter(isId).slice(0, MOST_YEARS),
  };
}

export function kindOfCompare({ briefs, years }: CompareAddress): CompareKind {
  if (years.length > 0) return 'years';
  return briefs.length > 1 ? 'briefs' : 'places';
}

function listOf(search: URLSearchParams, name: string): readonly string[] {
  return [...new Set((search.get(name) ?? '').split(',').filter((each) => each !== ''))];
}

function isId(text: string): boolean {
  return ID.test(text);
}

function placeOf(text: string): readonly PlaceRef[] {
  const [kind, id = ''] = text.split(':');
  return (kind === 'station' || kind === 'site') && isId(id) ? [{ kind, id }] : [];
}

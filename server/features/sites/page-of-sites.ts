import type { PlaceFigures } from '#contract/place-figures.ts';
import type { SiteFilter, SiteSort } from '#contract/sites.ts';
import type { ResolvedSite } from './resolved-sites-read-model.ts';

export interface SitePageAsked {
  readonly text?: string | undefined;
  readonly filter?: SiteFilter | undefined;
  readonly stationId?: string | undefined;
  readonly importId?: string | undefined;
  readonly sort: SiteSort;
  readonly order: 'asc' | 'desc';
  readonly page: number;
  readonly limit: number;
}

type SortValue = string | number | null;

/** What the sites come to under a brief, by site. */
export type FiguresBySite = ReadonlyMap<string, PlaceFigures>;

/** Sorts that look at figures. */
export const FIGURE_SORTS: readonly SiteSort[] = ['score', 'grade', 'verdict', 'water', 'saved'];

const VALUE: Readonly<
  Record<Exclude<SiteSort, 'letters'>, (site: ResolvedSite, figures: PlaceFigures | undefined) => SortValue>
> = {
  score: (_site, figures) => figures?.score ?? null,
  grade: (_site, figures) => figures?.grade ?? null,
  verdict: (_site, figures) => figures?.verdict ?? null,
  water: (_site, figures) => figures?.litresPerKwh ?? null,
  saved: (_site, figures) => figures?.savedPct ?? null,
  name: ({ name }) => name,
  load: ({ designLoadKw }) => designLoadKw,
  station: ({ station }) => station?.name ?? null,
  distance: ({ station }) => station?.distanceKm ?? null,
  height: ({ station }) => absolute(station?.heightDifferenceM ?? null),
  flags: ({ flags, toSettle }) => flags.length + (toSettle ? 100 : 0),
};

/** One page of the sites that the filter leaves. Sites come and stay in the order of their letters among equals. */
export function pageOfSites(
  sites: readonly ResolvedSite[],
  asked: SitePageAsked,
  figures: FiguresBySite = new Map(),
): { items: readonly ResolvedSite[]; total: number; pages: number } {
  const left = sites.filter((site) => fits(site, asked));
  const sorted = inOrder(left, asked, figures);
  const from = (asked.page - 1) * asked.limit;
  return {
    items: sorted.slice(from, from + asked.limit),
    total: left.length,
    pages: Math.max(1, Math.ceil(left.length / asked.limit)),
  };
}

function inOrder(
  sites: readonly ResolvedSite[],
  { sort, order }: SitePageAsked,
  figures: FiguresBySite,
): readonly ResolvedSite[] {
  if (sort === 'letters') return order === 'asc' ? sites : sites.toReversed();
  const valueFor = VALUE[sort];
  const names = new Intl.Collator('en', { numeric: true });
  const direction = order === 'asc' ? 1 : -1;
  // Taken out once: a comparison of names costs, and each is compared a dozen times.
  const keyed = sites.map((site) => ({ site, value: valueFor(site, figures.get(site.id)) }));
  keyed.sort((one, other) => {
    // What is not known comes last in either order.
    if (one.value === null || other.value === null) return Number(one.value === null) - Number(other.value === null);
    if (typeof one.value === 'string' && typeof other.value === 'string')
      return direction * names.compare(one.value, other.value);
    return direction * (Number(one.value) - Number(other.value));
  });
  return keyed.map(({ site }) => site);
}

function fits(site: ResolvedSite, { text, filter, stationId, importId }: SitePageAsked): boolean {
  if (filter !== undefined && !isOf(site, filter)) return false;
  if (stationId !== undefined && site.station?.id !== stationId) return false;
  if (importId !== undefined && site.importId !== importId) return false;
  if (!text) return true;
  const wanted = text.toLocaleLowerCase('en');
  const named = [site.name, site.station?.name ?? ''].some((each) => each.toLocaleLowerCase('en').includes(wanted));
  return named || site.letters === wanted;
}

/** Whether a site is one of those that a filter leaves. */
export function isOf(site: ResolvedSite, filter: SiteFilter): boolean {
  if (filter === 'to settle') return site.toSettle;
  if (filter === 'chosen') return site.station?.chosen ?? false;
  return site.flags.includes(filter);
}

function absolute(value: number | null): number | null {
  return value === null ? null : Math.abs(value);
}

import { type Site, type SiteChange, SiteWater } from '#contract/sites.ts';
import type { ResolvedSite } from './resolved-sites-read-model.ts';
import type { SiteChangeRow } from './site-read-model.ts';

export function presentSite(site: ResolvedSite): Site {
  return { ...site, flags: [...site.flags], gates: [...site.gates] };
}

export function presentSiteChange({ at, fields, ...change }: SiteChangeRow): SiteChange {
  return { ...change, at: at.toISOString(), fields: [...fields] };
}

/** A water sheet as it crosses the wire: what was never filled in is not known. */
export function presentWater(water: Partial<SiteWater>): SiteWater {
  return SiteWater.parse(water);
}

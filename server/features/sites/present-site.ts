import { MOST_TOLD, type SiteImport, type SiteImportCheck } from '#contract/site-imports.ts';
import type { SiteChange } from '#contract/site-record.ts';
import { SiteWater } from '#contract/site-water.ts';
import type { Site } from '#contract/sites.ts';
import type { JudgedImport } from './judge-import.ts';
import type { ResolvedSite } from './resolved-sites-read-model.ts';
import type { SiteImportView } from './site-import-read-model.ts';
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

export function presentImport({ madeAt, undoneAt, ...view }: SiteImportView): SiteImport {
  return { ...view, madeAt: madeAt.toISOString(), undoneAt: undoneAt?.toISOString() ?? null };
}

export function presentImportCheck(judged: JudgedImport): SiteImportCheck {
  const { rows, faults, doubts, duplicates, standing, ready, seemsSwapped } = judged;
  const wordsOf = ({ kind, index }: JudgedImport['duplicates'][number]['of']): string => {
    if (kind === 'row') return `line ${ready[index]?.line ?? ''}`;
    const site = standing[index];
    return site === undefined ? 'a site' : `site ${site.letters}, ${site.name}`;
  };
  return {
    rows,
    faults: { count: faults.length, told: faults.slice(0, MOST_TOLD) },
    doubts: { count: doubts.length, told: doubts.slice(0, MOST_TOLD) },
    duplicates: {
      count: duplicates.length,
      told: duplicates
        .slice(0, MOST_TOLD)
        .map(({ row: { line, name }, by, of }) => ({ line, name, by, of: wordsOf(of) })),
    },
    seemsSwapped,
  };
}

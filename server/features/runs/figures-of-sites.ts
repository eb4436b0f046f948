import type { Knex } from 'knex';
import type { PlaceFigures } from '#contract/place-figures.ts';
import { findProgrammeBrief } from '../briefs/brief-read-model.ts';
import type { ResolvedSite } from '../sites/resolved-sites-read-model.ts';
import { presentFigures } from './present-figures.ts';
import { sitesUnderBrief } from './programme-places.ts';

/**
 * The figures of sites under a brief of their programme, by site, for tables of other features; without an id, under the brief that was
 * saved last. Empty while the programme has no brief.
 */
export async function figuresOfSites(
  db: Knex,
  key: { teamId: string; programmeId: string; briefId?: string | undefined; sites: readonly ResolvedSite[] },
): Promise<ReadonlyMap<string, PlaceFigures>> {
  const brief = await findProgrammeBrief(db, key);
  if (brief === null) return new Map();
  const sites = await sitesUnderBrief(db, { ...key, brief });
  return new Map(sites.map(({ site, wire, grade }) => [site.id, presentFigures(wire, grade)]));
}

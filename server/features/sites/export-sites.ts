import type { Knex } from 'knex';
import type { SiteFilter } from '#contract/sites.ts';
import { recordDownload, type Taker } from '../../db/record-download.ts';
import { pageOfSites } from './page-of-sites.ts';
import { sitesOfProgramme } from './resolved-sites-read-model.ts';
import { listSiteNotes } from './site-import-read-model.ts';
import { siteTable } from './site-table.ts';

/** The sites of a programme as a table, by letters; that it was taken along is written down. */
export async function exportSites(
  db: Knex,
  asked: {
    teamId: string;
    programmeId: string;
    text?: string | undefined;
    filter?: SiteFilter | undefined;
    taker: Taker;
  },
): Promise<{ body: Buffer; fileName: string }> {
  const { teamId, programmeId, text, filter, taker } = asked;
  const key = { teamId, programmeId };
  const [sites, notes] = await Promise.all([sitesOfProgramme(db, key), listSiteNotes(db, key)]);
  const all = { sort: 'letters', order: 'asc', page: 1, limit: Math.max(1, sites.length) } as const;
  const { items } = pageOfSites(sites, { text, filter, ...all });
  const subject = { programmeId, sites: items.length, ...(text ? { text } : {}), ...(filter ? { filter } : {}) };
  await recordDownload(db, { teamId, act: 'sites downloaded', subject, taker });
  return { body: Buffer.from(siteTable(items, notes)), fileName: 'sites.csv' };
}

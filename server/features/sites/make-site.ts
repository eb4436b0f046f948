import type { Knex } from 'knex';
import type { PlaceFigures } from '#contract/place-figures.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { ResolvedSite } from './resolved-sites-read-model.ts';
import { elevationOf, groundAt } from './site-ground.ts';
import { siteLetters } from './site-letters.ts';
import { insertSite, takeSiteNumbers } from './site-store.ts';

export interface SiteParts {
  readonly relief: Relief;
  /** Queues the judging of years at the heights that the programme's sites have now. */
  queueSiteRuns(transaction: Knex.Transaction, programme: { teamId: string; programmeId: string }): Promise<void>;
}

/** What the table of sites shows of another feature. */
export interface SiteTableParts {
  /** Their figures under a brief of the programme, by site; empty while there is no brief. */
  figuresOfSites(of: {
    teamId: string;
    programmeId: string;
    briefId: string | undefined;
    sites: readonly ResolvedSite[];
  }): Promise<ReadonlyMap<string, PlaceFigures>>;
}

export interface SiteDeps extends SiteParts {
  readonly db: Knex;
}

export interface SiteAct {
  readonly teamId: string;
  readonly programmeId: string;
  readonly personId: string;
  readonly requestId: string | null;
  readonly at: Date;
}

export interface NewSite {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  /** null takes the height of the relief. */
  readonly elevationM: number | null;
  readonly designLoadKw: number | null;
  readonly notes: string;
}

/** Makes a site with the next letters of its programme. */
export async function makeSite({ db, relief, queueSiteRuns }: SiteDeps, making: SiteAct & NewSite): Promise<string> {
  const { teamId, programmeId, personId, requestId, name, latitude, longitude } = making;
  const ground = groundAt(relief, making);
  return await inTransaction(db, async (transaction) => {
    const number = await takeSiteNumbers(transaction, { teamId, programmeId, count: 1 });
    if (number === null) throw new AppError('not_found', 'There is no such programme in this team.');
    const letters = siteLetters(number);
    const siteId = await insertSite(transaction, {
      ...{ teamId, programmeId, personId, letters, name, latitude, longitude },
      ...ground,
      ...elevationOf(making.elevationM, ground, 'person'),
      ...{ designLoadKw: making.designLoadKw, notes: making.notes },
      ...{ stationId: null, stationReason: null, gates: [], water: {} },
    });
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: 'site made' },
      subject: { programmeId, siteId, letters, name, latitude, longitude },
    });
    await queueSiteRuns(transaction, { teamId, programmeId });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
    return siteId;
  });
}

import { tmpdir } from 'node:os';
import type { Relief } from '#engine/weather-files/relief.ts';
import { connect } from './db/connection.ts';
import { judgeStoredYear } from './features/runs/judge-year.ts';
import { queueMissingRuns } from './features/runs/queue-runs.ts';
import { queueMissingSiteRuns } from './features/runs/queue-site-runs.ts';
import { standardZoneAt } from './features/stations/standard-zone-at.ts';
import { endTeam, queueDueDeletions } from './features/teams/end-team.ts';
import { setExportFailed } from './features/teams/export-store.ts';
import { EXPORT_PREFIX, makeExport } from './features/teams/make-export.ts';
import { removeExpiredExports } from './features/teams/remove-expired-exports.ts';
import {
  clearJudgingFailure,
  noteJudgingFailure,
  noteOpeningFailure,
  noteReadingFailure,
  noteStrandedFiles,
} from './features/weather/note-failure.ts';
import { OPENED_PREFIX, openArchive } from './features/weather/open-archive.ts';
import { readStoredFile } from './features/weather/read-stored-file.ts';
import { tellFinishedImports } from './features/weather/tell-finished-imports.ts';
import { repeat } from './jobs/repeat.ts';
import { runJobs } from './jobs/run-jobs.ts';
import type { Log } from './log.ts';
import type { Mailer } from './mail/mailer.ts';
import { queueWaitingMails, sendMail } from './mail/send-mail.ts';
import type { OriginalStore } from './storage/original-store.ts';
import { removeStale } from './storage/remove-stale.ts';

export interface WorkerOptions {
  readonly databaseUrl: string;
  readonly storage: OriginalStore;
  readonly relief: Relief;
  readonly log: Log;
  /** Where links in mails lead. */
  readonly publicUrl: string;
  /** Null: mails wait to be read in the application. */
  readonly mailer?: Mailer | null;
}

const LOOK_FOR_STRANDED_EVERY_MS = 60_000;
const LOOK_FOR_FINISHED_EVERY_MS = 30_000;
const LOOK_FOR_ENDED_EVERY_MS = 300_000;
/** No job takes so long: what it opened is of a worker that was killed. */
const LEFT_BEHIND_MS = 24 * 60 * 60_000;

/** Starts what works in the background: reading weather files and judging years. The caller closes it, whatever the signal. */
export async function startWorker(options: WorkerOptions): Promise<{ close(): Promise<void> }> {
  const { databaseUrl, storage, relief, log, publicUrl, mailer = null } = options;
  const db = connect({ databaseUrl, applicationName: 'muslin worker', maxConnections: 4 });
  try {
    await queueMissingRuns(db);
    if (mailer !== null) await queueWaitingMails(db);
    const jobs = await runJobs({
      db,
      databaseUrl,
      log,
      tasks: {
        'read-weather-file': {
          run: (file) => readStoredFile({ db, storage, relief, zoneAt: standardZoneAt }, file),
          dead: (file, why) => noteReadingFailure(db, file, why),
        },
        'open-weather-archive': {
          run: (archive, progressed) => openArchive({ db, storage, progressed }, archive),
          dead: (archive, why) => noteOpeningFailure(db, archive, why),
        },
        'judge-year': {
          run: async (year) => {
            await judgeStoredYear(db, year);
            await clearJudgingFailure(db, year);
          },
          dead: (year, why) => noteJudgingFailure(db, year, why),
        },
        'queue-site-runs': {
          run: (programme) => queueMissingSiteRuns(db, programme),
          // The next change of a site, a station or a brief, and the next start, look again.
          dead: () => Promise.resolve(),
        },
        'send-mail': {
          run: (mail) => sendMail({ db, mailer }, mail),
          // The mail itself says what failed last.
          dead: async () => undefined,
        },
        'export-team': {
          run: (key) => makeExport({ db, storage, publicUrl }, key, new Date()),
          dead: (key) => setExportFailed(db, key),
        },
        'end-team': {
          run: (key) => endTeam({ db, storage, publicUrl }, key, new Date()),
          // It is due still, and queued again.
          dead: async () => undefined,
        },
      },
    });
    const looking = repeat({
      everyMs: LOOK_FOR_STRANDED_EVERY_MS,
      what: 'looking for files whose reading was given up',
      log,
      work: () => noteStrandedFiles(db),
    });
    const telling = repeat({
      everyMs: LOOK_FOR_FINISHED_EVERY_MS,
      what: 'telling of imports that have been read',
      log,
      work: () => tellFinishedImports({ db, publicUrl }, new Date()),
    });
    const ending = repeat({
      everyMs: LOOK_FOR_ENDED_EVERY_MS,
      what: 'looking for exports, teams and temporary folders whose time is over',
      log,
      work: async () => {
        await removeExpiredExports({ db, storage }, new Date());
        await queueDueDeletions(db);
        await removeStale(tmpdir(), [OPENED_PREFIX, EXPORT_PREFIX], new Date(Date.now() - LEFT_BEHIND_MS));
      },
    });
    return {
      async close() {
        await looking.stop();
        await ending.stop();
        await telling.stop();
        await jobs.close();
        mailer?.close();
        await db.destroy();
      },
    };
  } catch (error) {
    await db.destroy();
    throw error;
  }
}

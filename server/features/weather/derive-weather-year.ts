import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { changeWords } from '#engine/climate/change-words.ts';
import { READ_VERSION } from '#engine/conventions.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { type OriginalStore, originalKey } from '../../storage/original-store.ts';
import type { AcceptanceParts } from './accept-weather-file.ts';
import { contentHash } from './content-hash.ts';
import { derivationText } from './derivation-text.ts';
import {
  type AskedDerivation,
  type DerivedFromParent,
  type DerivingParts,
  deriveFromParent,
  usableParent,
} from './derive-from-parent.ts';
import { insertDerivation, insertDerivedFile } from './derived-year-store.ts';
import { measuredHours } from './measured-hours.ts';
import { findParentFile } from './parent-year-read-model.ts';
import { findStandingFile, lockWeatherFile } from './weather-file-store.ts';
import { insertWeatherYear, setYearStation } from './weather-year-store.ts';

export interface Derivation extends AskedDerivation {
  readonly name: string;
  readonly personId: string;
  readonly requestId: string | null;
  readonly at: Date;
}

interface Parts extends DerivingParts, Pick<AcceptanceParts, 'queueRuns'> {
  readonly storage: OriginalStore;
}

interface OwnBytes {
  readonly bytes: number;
  readonly fingerprint: string;
  readonly storageKey: string;
}

/**
 * Saves a changed climate as a weather year of its own at its parent's station and queues its judging by every brief. Its file
 * holds what it was made of. @returns the file's id @throws AppError wrong_state when the same stands already, or as `usableParent`
 */
export async function deriveWeatherYear(parts: Parts, derivation: Derivation): Promise<string> {
  const derived = await deriveFromParent(parts, derivation);
  const { humidityRule } = derivation.change;
  const text = derivationText({ parent: derived.parent, humidityRule, monthly: derived.monthly });
  const own = await keepText(parts, text);
  return inTransaction(parts.db, async (transaction) => {
    await holdParent(transaction, { ...derivation, contentHash: derived.parent.contentHash });
    const fileId = await insertDerivedFile(transaction, { ...derivation, ...own, parentFileId: derivation.fileId });
    if (fileId === null) throw await standsAlready(transaction, { ...derivation, ...own });
    const weatherYearId = await storeYear(transaction, { derivation, derived, fileId });
    await parts.queueRuns(transaction, { teamId: derivation.teamId, weatherYearId });
    await tell(transaction, { derivation, derived, fileId, own });
    return fileId;
  });
}

/** As with an upload the bytes go first, so that a row never stands without them. */
async function keepText({ storage }: Parts, text: string): Promise<OwnBytes> {
  const bytes = Buffer.from(text, 'utf8');
  const fingerprint = createHash('sha256').update(bytes).digest('hex');
  const storageKey = originalKey(fingerprint);
  await storage.put(storageKey, bytes);
  return { bytes: bytes.length, fingerprint, storageKey };
}

/** The parent may have been withdrawn, or read anew, while its change was computed. */
async function holdParent(
  transaction: Knex.Transaction,
  { teamId, fileId, contentHash: expected }: { teamId: string; fileId: string; contentHash: string },
): Promise<void> {
  await lockWeatherFile(transaction, { teamId, fileId });
  const now = usableParent(await findParentFile(transaction, { teamId, fileId }));
  if (now.contentHash !== expected)
    throw new AppError('wrong_state', 'The weather year was read anew meanwhile. Look at the preview again.');
}

async function standsAlready(
  transaction: Knex.Transaction,
  { teamId, fingerprint }: { teamId: string; fingerprint: string },
): Promise<AppError> {
  const file = await findStandingFile(transaction, { teamId, fingerprint });
  const name = file === null ? 'another name' : `the name “${file.name}”`;
  return new AppError('wrong_state', `The same change of the same weather is saved already, under ${name}.`);
}

async function storeYear(
  transaction: Knex.Transaction,
  { derivation, derived, fileId }: { derivation: Derivation; derived: DerivedFromParent; fileId: string },
): Promise<string> {
  const { teamId, change } = derivation;
  const { parent, reduced, cappedHours, difference, monthly } = derived;
  const weatherYearId = await insertWeatherYear(transaction, {
    teamId,
    fileId,
    reading: parent,
    reduced,
    measuredHours: measuredHours(reduced.year.packed.flags),
    readVersion: READ_VERSION,
    contentHash: contentHash(reduced.year),
  });
  await setYearStation(transaction, { teamId, fileId, stationId: parent.stationId });
  const { humidityRule } = change;
  const parentYearId = parent.weatherYearId;
  const made = { teamId, weatherYearId, parentYearId, humidityRule, monthly, cappedHours, difference };
  await insertDerivation(transaction, made);
  return weatherYearId;
}

async function tell(
  transaction: Knex.Transaction,
  told: { derivation: Derivation; derived: DerivedFromParent; fileId: string; own: OwnBytes },
): Promise<void> {
  const { derivation, derived, fileId, own } = told;
  const { teamId, personId, requestId, name, change } = derivation;
  await recordAuditEvent(transaction, {
    teamId,
    personId,
    act: 'weather year derived',
    subject: {
      fileId,
      name,
      fingerprint: own.fingerprint,
      parentFileId: derivation.fileId,
      change: changeWords(derived.monthly, change.humidityRule),
    },
    requestId,
  });
  await notifyTeam(transaction, { teamId, event: { kind: 'weather-file', fileId, status: 'accepted', step: null } });
}

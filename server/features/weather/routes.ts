import type { Router } from 'express';
import { deriveWeatherYear as deriveEndpoint, previewDerivedYear as previewEndpoint } from '#contract/climate.ts';
import { watchTeam } from '#contract/team-events.ts';
import { getOriginal, getWeatherFile, uploadWeatherFile } from '#contract/weather.ts';
import {
  acceptWeatherFile as acceptEndpoint,
  actOnWeatherFiles as actEndpoint,
  retryWeatherFile as retryWeatherFileEndpoint,
  withdrawWeatherFile as withdrawEndpoint,
} from '#contract/weather-acts.ts';
import {
  changeWeatherBatch,
  getWeatherBatch,
  listWeatherBatches,
  retryWeatherArchive,
  startWeatherBatch,
  uploadWeatherArchive,
  uploadWeatherFiles,
} from '#contract/weather-batches.ts';
import { listWeatherFiles } from '#contract/weather-library.ts';
import {
  answerWeatherFile as answerEndpoint,
  getWeatherFileLines,
  getWeatherYearColumns,
  setLicence as setLicenceEndpoint,
} from '#contract/weather-reading.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { RequestContext, UploadedFile } from '../../http/request-context.ts';
import { takerOf } from '../../http/taker-of.ts';
import { isZip } from '../../storage/zip-members.ts';
import { type AcceptanceParts, acceptWeatherFile } from './accept-weather-file.ts';
import { actOnWeatherFiles } from './act-on-weather-files.ts';
import { answerWeatherFile } from './answer-weather-file.ts';
import { findArchiveView, findBatchView, listBatchViews } from './batch-read-model.ts';
import { changeBatch } from './change-batch.ts';
import type { DerivingParts } from './derive-from-parent.ts';
import { deriveWeatherYear } from './derive-weather-year.ts';
import { downloadOriginal } from './download-original.ts';
import { findFileColumns } from './file-columns-read-model.ts';
import { countLibrary, listWeatherFileViews } from './library-read-model.ts';
import { originalLines } from './original-lines.ts';
import { presentArchive, presentBatch } from './present-batch.ts';
import { presentRecord, presentWeatherFile } from './present-weather-file.ts';
import { previewDerivedYear } from './preview-derived-year.ts';
import { receiveArchive } from './receive-archive.ts';
import { receiveWeatherFile } from './receive-weather-file.ts';
import { retryArchive } from './retry-archive.ts';
import { retryWeatherFile } from './retry-weather-file.ts';
import { setLicence } from './set-licence.ts';
import { startBatch } from './start-batch.ts';
import { findWeatherFileRecord, findWeatherFileView } from './weather-file-read-model.ts';
import { findWeatherFile } from './weather-file-store.ts';
import { type WithdrawalParts, withdrawWeatherFile } from './withdraw-weather-file.ts';

type FileKey = { readonly teamId: string; readonly fileId: string };

/** What the weather's routes need of the other parts, handed in where the server is wired. */
export type WeatherParts = AcceptanceParts & WithdrawalParts & Pick<DerivingParts, 'yearThread'>;

export function weatherRoutes(router: Router, deps: Deps, parts: WeatherParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    tokenId: request.actor.kind === 'token' ? request.actor.tokenId : null,
    requestId: request.requestId,
    at: deps.now(),
  });
  const presented = async (key: FileKey) => presentWeatherFile(found(await findWeatherFileView(db, key)));

  mount(router, deps, listWeatherFiles, async ({ params, query }) => {
    const [{ views, total }, { counts, formats }] = await Promise.all([
      listWeatherFileViews(db, { ...params, ...query }),
      countLibrary(db, params.teamId),
    ]);
    return {
      items: views.map(presentWeatherFile),
      total,
      page: query.page,
      pages: Math.max(1, Math.ceil(total / query.limit)),
      counts,
      formats: [...formats],
    };
  });

  mount(router, deps, uploadWeatherFile, async ({ params: { teamId }, query: { batchId = null } }, request) => {
    const upload = onlyUpload(request);
    await refuseArchive(upload);
    const { fileId, known } = await receiveWeatherFile(deps, { teamId, batchId, upload, ...act(request) });
    return { file: await presented({ teamId, fileId }), known };
  });

  mount(router, deps, getWeatherFile, async ({ params }) =>
    presentRecord(found(await findWeatherFileRecord(db, params))),
  );

  mount(router, deps, getOriginal, async ({ params }, request) =>
    downloadOriginal(deps, { ...params, taker: takerOf(request) }),
  );

  mount(router, deps, acceptEndpoint, async ({ params }, request) => {
    await acceptWeatherFile({ db, ...parts }, { ...params, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, withdrawEndpoint, async ({ params, body }, request) => {
    await withdrawWeatherFile({ db, ...parts }, { ...params, ...act(request), reason: body.reason });
    return await presented(params);
  });

  mount(router, deps, actEndpoint, async ({ params: { teamId }, body }, request) =>
    actOnWeatherFiles({ db, ...parts }, { teamId, fileIds: body.fileIds, act: body, by: act(request) }),
  );

  mount(router, deps, retryWeatherFileEndpoint, async ({ params }, request) => {
    await retryWeatherFile({ db, ...parts }, { ...params, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, answerEndpoint, async ({ params, body }, request) => {
    await answerWeatherFile(db, { ...params, answers: body, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, setLicenceEndpoint, async ({ params, body }, request) => {
    await setLicence(db, { ...params, ...body, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, getWeatherFileLines, async ({ params, query }) => {
    const { storageKey } = found(await findWeatherFile(db, params));
    const { lines, total } = await originalLines(deps.storage, { storageKey, ...query });
    return { lines: lines.map((line) => ({ ...line })), total };
  });

  mount(router, deps, getWeatherYearColumns, async ({ params }) => {
    const columns = found(await findFileColumns(db, params));
    return { body: Buffer.concat(columns) };
  });

  batchRoutes(router, deps, act);

  mount(router, deps, previewEndpoint, async ({ params, body }, { signal }) =>
    previewDerivedYear({ db, ...parts }, { ...params, change: body, signal }),
  );

  mount(router, deps, deriveEndpoint, async ({ params, body }, request) => {
    const { name, ...change } = body;
    const derivation = { ...params, ...act(request), name, change, signal: request.signal };
    const fileId = await deriveWeatherYear({ db, storage: deps.storage, ...parts }, derivation);
    return await presented({ teamId: params.teamId, fileId });
  });

  mount(router, deps, watchTeam, async ({ params }, request) => deps.feed.watch(params.teamId, request.signal));
}

type Act = (request: RequestContext) => { personId: string; tokenId: string | null; requestId: string; at: Date };

function batchRoutes(router: Router, deps: Deps, act: Act): void {
  const { db } = deps;
  const presented = async (key: { teamId: string; batchId: string }) =>
    presentBatch(foundBatch(await findBatchView(db, key)));

  mount(router, deps, listWeatherBatches, async ({ params: { teamId }, query: { limit } }) => ({
    items: (await listBatchViews(db, { teamId, limit })).map(presentBatch),
  }));
  mount(router, deps, getWeatherBatch, async ({ params }) => await presented(params));
  mount(router, deps, startWeatherBatch, async ({ params: { teamId }, body }, request) => {
    const batchId = await startBatch(db, { teamId, name: body.name, ...act(request) });
    return await presented({ teamId, batchId });
  });
  mount(router, deps, changeWeatherBatch, async ({ params, body }, request) => {
    await changeBatch(db, { ...params, state: body.state, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, uploadWeatherFiles, async ({ params: { teamId, batchId } }, request) => {
    for (const upload of request.uploads) await refuseArchive(upload);
    const files = [];
    for (const upload of request.uploads) {
      const { fileId, known } = await receiveWeatherFile(deps, { teamId, batchId, upload, ...act(request) });
      const view = found(await findWeatherFileView(db, { teamId, fileId }));
      files.push({ file: presentWeatherFile(view), known });
    }
    return { files };
  });
  mount(router, deps, uploadWeatherArchive, async ({ params }, request) => {
    const archiveId = await receiveArchive(deps, { ...params, upload: onlyUpload(request), ...act(request) });
    const view = foundBatch(await findArchiveView(db, { teamId: params.teamId, archiveId }));
    return { archive: presentArchive(view) };
  });
  mount(router, deps, retryWeatherArchive, async ({ params }, request) => {
    await retryArchive(db, { ...params, ...act(request) });
    return presentArchive(foundBatch(await findArchiveView(db, params)));
  });
}

function onlyUpload({ uploads: [upload] }: RequestContext): UploadedFile {
  if (upload === undefined) throw new AppError('invalid_input', 'Choose a file to upload.');
  return upload;
}

/** An archive has its own way in, where its files become weather files. */
async function refuseArchive({ temporaryPath, name }: UploadedFile): Promise<void> {
  if (!(await isZip(temporaryPath))) return;
  throw new AppError(
    'unsupported_format',
    `“${name}” is a zip archive. Upload it as an archive of a batch: POST …/weather-batches/BATCH/archives.`,
  );
}

function foundBatch<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such batch or archive in this team.');
  return thing;
}

function found<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such weather file in this team.');
  return thing;
}

/** The person who acts, or for whom a program does. */
function personOf({ actor }: RequestContext): string {
  if (actor.kind === 'signed-out') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}

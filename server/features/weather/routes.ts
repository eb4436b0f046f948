import type { Router } from 'express';
import { deriveWeatherYear as deriveEndpoint, previewDerivedYear as previewEndpoint } from '#contract/climate.ts';
import {
  acceptWeatherFile as acceptEndpoint,
  getOriginal,
  getWeatherFile,
  listWeatherFiles,
  uploadWeatherFile,
  watchTeam,
  withdrawWeatherFile as withdrawEndpoint,
} from '#contract/weather.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { type AcceptanceParts, acceptWeatherFile } from './accept-weather-file.ts';
import type { DerivingParts } from './derive-from-parent.ts';
import { deriveWeatherYear } from './derive-weather-year.ts';
import { DERIVED_FORMAT } from './derived-year-store.ts';
import { readCursor, writeCursor } from './page-cursor.ts';
import { presentRecord, presentWeatherFile } from './present-weather-file.ts';
import { previewDerivedYear } from './preview-derived-year.ts';
import { receiveWeatherFile } from './receive-weather-file.ts';
import { findWeatherFileRecord, findWeatherFileView, listWeatherFileViews } from './weather-file-read-model.ts';
import { findWeatherFile } from './weather-file-store.ts';
import { withdrawWeatherFile } from './withdraw-weather-file.ts';

type FileKey = { readonly teamId: string; readonly fileId: string };

/** What the weather's routes need of the other parts, handed in where the server is wired. */
export type WeatherParts = AcceptanceParts & Pick<DerivingParts, 'yearThread'>;

export function weatherRoutes(router: Router, deps: Deps, parts: WeatherParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    requestId: request.requestId,
    at: deps.now(),
  });
  const presented = async (key: FileKey) => presentWeatherFile(found(await findWeatherFileView(db, key)));

  mount(router, deps, listWeatherFiles, async ({ params, query }) => {
    const page = { teamId: params.teamId, after: readCursor(query.after), limit: query.limit };
    const { views, total, more } = await listWeatherFileViews(db, page);
    const last = views.at(-1);
    return { items: views.map(presentWeatherFile), total, next: more && last !== undefined ? writeCursor(last) : null };
  });

  mount(router, deps, uploadWeatherFile, async ({ params: { teamId } }, request) => {
    const [upload] = request.uploads;
    if (upload === undefined) throw new AppError('invalid_input', 'Choose a file to upload.');
    const { fileId, known } = await receiveWeatherFile(deps, { teamId, upload, ...act(request) });
    return { file: await presented({ teamId, fileId }), known };
  });

  mount(router, deps, getWeatherFile, async ({ params }) =>
    presentRecord(found(await findWeatherFileRecord(db, params))),
  );

  mount(router, deps, getOriginal, async ({ params }) => {
    const file = found(await findWeatherFile(db, params));
    const fileName = file.format === DERIVED_FORMAT ? `${file.name}.json` : file.name;
    return { body: await deps.storage.get(file.storageKey), fileName };
  });

  mount(router, deps, acceptEndpoint, async ({ params }, request) => {
    await acceptWeatherFile({ db, ...parts }, { ...params, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, withdrawEndpoint, async ({ params, body }, request) => {
    await withdrawWeatherFile(db, { ...params, ...act(request), reason: body.reason });
    return await presented(params);
  });

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

function found<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such weather file in this team.');
  return thing;
}

/** Every rule of this feature lets only people through. */
function personOf({ actor }: RequestContext): string {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}

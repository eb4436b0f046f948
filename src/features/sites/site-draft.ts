/** What a person types of a site, and how it becomes what is sent: read as a row of a table is. */
import type { FieldErrors, Resolver } from 'react-hook-form';
import type { InputOf } from '../../contract/endpoint.ts';
import { makeSite, type Site } from '../../contract/sites.ts';
import { readPosition } from '../../engine/interpolation/read-position.ts';
import { readSiteRow } from '../../engine/sites/read-site-row.ts';
import { exactPosition } from './site-words.ts';

export interface SiteDraft {
  name: string;
  /** In any usual form. */
  position: string;
  /** Empty: that of the relief. */
  elevation: string;
  load: string;
  notes: string;
}

export type SiteValues = Required<InputOf<typeof makeSite>['body']>;

export const emptyDraft: SiteDraft = { name: '', position: '', elevation: '', load: '', notes: '' };

export function draftOfSite(site: Site, notes: string): SiteDraft {
  const { elevationM, elevationSource, designLoadKw } = site;
  return {
    name: site.name,
    position: exactPosition(site),
    elevation: elevationM === null || elevationSource === 'relief' ? '' : String(elevationM),
    load: designLoadKw === null ? '' : String(designLoadKw),
    notes,
  };
}

/** Reads the form with every fault at its field; what is read is held to the contract. */
export const siteResolver: Resolver<SiteDraft, unknown, SiteValues> = (draft) => {
  const { site, faults } = readSiteRow({ ...draft });
  const errors: FieldErrors<SiteDraft> = {};
  for (const { column, message } of faults) {
    const field =
      column === 'elevation' || column === 'load' || column === 'name' || column === 'notes' ? column : 'position';
    errors[field] ??= { type: 'value', message };
  }
  if (draft.position.trim() === '') errors.position = { type: 'value', message: 'Type latitude and longitude.' };
  if (site === null || Object.keys(errors).length > 0) return { values: {}, errors };
  const { name: _unguarded, latitude, longitude, elevationM, designLoadKw, notes } = site;
  const parsed = makeSite.body.schema.safeParse({
    ...{ name: draft.name, latitude, longitude, elevationM, designLoadKw, notes },
  });
  if (parsed.success) return { values: parsed.data, errors: {} };
  return {
    values: {},
    errors: { name: { type: 'value', message: parsed.error.issues.map((each) => each.message).join(' ') } },
  };
};

/** What is to be changed: the fields that were typed in, so that a rounded position that nobody touched stays as it is. */
export function patchOf(values: SiteValues, touched: Readonly<Partial<Record<keyof SiteDraft, unknown>>>) {
  return {
    ...(touched.name ? { name: values.name } : {}),
    ...(touched.position ? { latitude: values.latitude, longitude: values.longitude } : {}),
    ...(touched.elevation ? { elevationM: values.elevationM } : {}),
    ...(touched.load ? { designLoadKw: values.designLoadKw } : {}),
    ...(touched.notes ? { notes: values.notes } : {}),
  };
}

/** The position of a draft as far as it can be read, and the same with its angles the other way round where that was meant. */
export function positionOfDraft(written: string) {
  const read = readPosition(written);
  return {
    position: read.kind === 'position' ? read.position : null,
    swapped: read.kind === 'fault' ? read.swapped : null,
  };
}

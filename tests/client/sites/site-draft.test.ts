import { describe, expect, it } from 'vitest';
import {
  emptyDraft,
  patchOf,
  positionOfDraft,
  type SiteDraft,
  siteResolver,
} from '../../../src/features/sites/site-draft.ts';
import { readSitesView, sitesSearch, sortedBy } from '../../../src/features/sites/sites-view.ts';

const options = { fields: {}, shouldUseNativeValidation: false };

async function read(draft: Partial<SiteDraft>) {
  return await siteResolver({ ...emptyDraft, ...draft }, undefined, options);
}

describe('the form of a site', () => {
  it('reads what was typed into what is sent', async () => {
    const { values } = await read({ name: "'=School", position: '24°30′ S, 25°30′ E', load: '350,5' });
    expect(values).toEqual({
      ...{ name: "'=School", latitude: -24.5, longitude: 25.5, elevationM: null, designLoadKw: 350.5, notes: '' },
    });
  });

  it('tells every fault at its field', async () => {
    const { errors } = await read({ position: '90.1, 10', elevation: 'high', load: '-5' });
    expect(Object.keys(errors).sort()).toEqual(['elevation', 'load', 'name', 'position']);
    expect((await read({ name: 'a' })).errors.position?.message).toBe('Type latitude and longitude.');
    expect(positionOfDraft('115, -36')).toEqual({ position: null, swapped: { latitude: -36, longitude: 115 } });
  });

  it('sends only what was touched', () => {
    const values = { name: 'a', latitude: 1, longitude: 2, elevationM: null, designLoadKw: 5, notes: '' };
    expect(patchOf(values, { load: true })).toEqual({ designLoadKw: 5 });
    expect(patchOf(values, { position: true, elevation: true })).toEqual({
      latitude: 1,
      longitude: 2,
      elevationM: null,
    });
  });
});

describe('the view of the sites in the address', () => {
  it('comes back as it was, without what no table could show', () => {
    const view = readSitesView(new URLSearchParams('filter=to+settle&sort=distance&order=desc&page=2&importId=x'));
    expect(view).toEqual({ filter: 'to settle', sort: 'distance', order: 'desc', page: 2 });
    expect(readSitesView(new URLSearchParams(sitesSearch(view)))).toEqual(view);
  });

  it('sorts names upwards first, what speaks against a site downwards, and turns round at the second press', () => {
    const first = sortedBy({ sort: 'letters', order: 'asc', page: 3 }, 'distance');
    expect(first).toEqual({ sort: 'distance', order: 'desc', page: 1 });
    expect(sortedBy(first, 'distance').order).toBe('asc');
    expect(sortedBy(first, 'name').order).toBe('asc');
  });
});

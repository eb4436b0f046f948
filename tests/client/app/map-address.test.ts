import { describe, expect, it } from 'vitest';
import { changedSearch, type MapAddress, readMapAddress } from '../../../src/app/pages/map/map-address.ts';

const SITE = '00000000-0000-4000-8000-000000000001';
const BRIEF = '00000000-0000-4000-8000-000000000002';

const read = (search: string) => readMapAddress(new URLSearchParams(search));
const written = (changes: Partial<MapAddress>, search = '') =>
  changedSearch(new URLSearchParams(search), changes).toString();

describe('the address of the map', () => {
  it('holds brief, draft, layer, place, filter, list and camera, and gives them back', () => {
    const state: MapAddress = {
      briefId: BRIEF,
      place: { kind: 'site', id: SITE },
      point: null,
      layer: { kind: 'depression', atLeastK: 12, months: [1, 2, 12] },
      draft: 'effDirect:0.7,hours:8-20',
      find: 'red pan',
      list: 'station',
      camera: { zoom: 4.25, latitude: -25.125, longitude: 21.5 },
      surface: false,
    };
    expect(read(written(state))).toEqual(state);
  });

  it('rounds the camera to what the eye tells apart', () => {
    expect(written({ camera: { zoom: 4.256789, latitude: -25.12345, longitude: 21.98765 } })).toBe(
      'view=4.26%2C-25.123%2C21.988',
    );
  });

  it('names one place at a time, and leaves out what is as usual', () => {
    expect(written({ place: { kind: 'station', id: 'x' } }, `site=${SITE}&at=1,2`)).toBe('at=1%2C2&place=x');
    expect(
      written({ place: null, draft: null, find: '', layer: { kind: 'score' } }, 'place=x&draft=a&find=b&layer=water'),
    ).toBe('');
    expect(written({ draft: null }, 'other=kept')).toBe('other=kept');
  });

  it('takes nothing that is not an address of the map', () => {
    const odd = read('view=9,120,0&at=1,2,3&layer=magic&list=all');
    expect(odd).toMatchObject({ camera: null, point: null, layer: { kind: 'score' }, list: null });
    expect(read('view=,,&at=x,y').camera).toBeNull();
    expect(read('layer=hours.sunny').layer).toEqual({ kind: 'hours', hourClass: 'damp' });
    expect(read('layer=depression.99.0-13').layer).toMatchObject({ atLeastK: 63, months: { length: 12 } });
  });
});

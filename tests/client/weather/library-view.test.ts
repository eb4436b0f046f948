import { describe, expect, it } from 'vitest';
import {
  changedView,
  isFiltered,
  librarySearch,
  readLibraryView,
  sortedBy,
  withoutFilter,
} from '../../../src/features/weather/library-view.ts';

const BATCH = '0190a3c2-7d1e-7c4b-8a52-3f60d1b2c9e4';
const viewOf = (search: string) => readLibraryView(new URLSearchParams(search));

describe('the view of the library in its address', () => {
  it('comes back from its address as it went in', () => {
    const view = viewOf(`?status=asks&text=mast&format=table&kind=actual&batch=${BATCH}&sort=name&order=asc&page=3`);
    expect(view).toEqual({
      ...{ status: 'asks', text: 'mast', format: 'table', kind: 'actual', batchId: BATCH },
      ...{ sort: 'name', order: 'asc', page: 3 },
    });
    expect(viewOf(librarySearch(view))).toEqual(view);
  });

  it('leaves out what is as usual, and what no library could show', () => {
    expect(librarySearch(viewOf(''))).toBe('?');
    expect(viewOf('?status=lost&batch=no-batch&page=0&sort=colour&text=%20')).toEqual(viewOf(''));
  });

  it('goes to its first page when the filter or the order changes', () => {
    const view = viewOf('?status=review&page=4');
    expect(changedView(view, { text: 'korrel' })).toMatchObject({ status: 'review', text: 'korrel', page: 1 });
    expect(changedView(view, { status: undefined })).toEqual(viewOf(''));
    expect(sortedBy(view, 'name')).toMatchObject({ sort: 'name', order: 'asc', page: 1 });
  });

  it('turns an order round when it is chosen again: names rise first, dates fall first', () => {
    const byName = sortedBy(viewOf(''), 'name');
    expect([byName.order, sortedBy(byName, 'name').order]).toEqual(['asc', 'desc']);
    expect(sortedBy(viewOf(''), 'uploaded').order).toBe('asc');
    expect(sortedBy(byName, 'complete').order).toBe('desc');
  });

  it('knows whether anything is narrowed, and keeps the order when it is not any more', () => {
    const view = viewOf('?status=asks&sort=name&order=asc');
    expect(isFiltered(view)).toBe(true);
    expect(isFiltered(withoutFilter(view))).toBe(false);
    expect(withoutFilter(view)).toEqual(viewOf('?sort=name&order=asc'));
  });
});

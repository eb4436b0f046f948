/** What of the library is in view, as it stands in the query of the page's address: it survives a reload and Back. */
import { LibraryQuery, type LibrarySort } from '../../contract/weather-library.ts';

/** Filter, order and page (counted from 1). */
export type LibraryView = Omit<ReturnType<typeof LibraryQuery.parse>, 'limit'>;

/** Names of the contract's query, and the shorter ones of the address. */
const PARAMS = {
  status: 'status',
  text: 'text',
  format: 'format',
  kind: 'kind',
  batchId: 'batch',
  stationId: 'station',
  sort: 'sort',
  order: 'order',
  page: 'page',
} as const;
type ViewField = keyof typeof PARAMS;
const FILTERS = ['status', 'text', 'format', 'kind', 'batchId', 'stationId'] as const;
const FIELDS: readonly ViewField[] = [...FILTERS, 'sort', 'order', 'page'];

export const newestFirst: LibraryView = { sort: 'uploaded', order: 'desc', page: 1 };

/** The view that an address asks for; what it says that no library could show is left out. */
export function readLibraryView(search: URLSearchParams): LibraryView {
  const asked = FIELDS.flatMap((field): [ViewField, string][] => {
    const value = search.get(PARAMS[field])?.trim() ?? '';
    return value !== '' && LibraryQuery.safeParse({ [field]: value }).success ? [[field, value]] : [];
  });
  const { limit: _limit, ...view } = LibraryQuery.parse(Object.fromEntries(asked));
  return view;
}

/** The address of a view, as the query after its path; what is as usual is left out. */
export function librarySearch(view: LibraryView): string {
  const search = new URLSearchParams();
  const usual: Partial<Record<ViewField, unknown>> = newestFirst;
  for (const field of FIELDS) {
    const value = view[field];
    if (value !== undefined && value !== '' && value !== usual[field]) search.set(PARAMS[field], String(value));
  }
  return `?${search}`;
}

/** The same view with another filter or order, from its first page on. */
export function changedView(view: LibraryView, change: Partial<Record<ViewField, string | undefined>>): LibraryView {
  const next = new URLSearchParams(librarySearch({ ...view, page: 1 }));
  for (const field of FIELDS) {
    if (!(field in change)) continue;
    const value = change[field];
    if (value === undefined || value === '') next.delete(PARAMS[field]);
    else next.set(PARAMS[field], value);
  }
  return readLibraryView(next);
}

/** Without any filter, in the order that it has. */
export function withoutFilter({ sort, order }: LibraryView): LibraryView {
  return { sort, order, page: 1 };
}

export function isFiltered(view: LibraryView): boolean {
  return FILTERS.some((field) => view[field] !== undefined);
}

/** Names rise first, dates and shares fall first; a second press turns the order round. */
export function sortedBy(view: LibraryView, sort: LibrarySort): LibraryView {
  const first = sort === 'name' || sort === 'station' ? 'asc' : 'desc';
  const order = view.sort !== sort ? first : view.order === 'asc' ? 'desc' : 'asc';
  return { ...view, sort, order, page: 1 };
}

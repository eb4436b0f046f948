/** What of the sites is in view, as it stands in the query of the page's address: it survives a reload and Back. */
import { listSites, type SiteSort } from '../../contract/sites.ts';

export type SitesView = Omit<ReturnType<typeof listSites.query.parse>, 'limit'>;

const FILTERS = ['text', 'filter', 'stationId', 'importId'] as const;
const FIELDS = [...FILTERS, 'sort', 'order', 'page'] as const;
type ViewField = (typeof FIELDS)[number];

const usual: SitesView = { sort: 'letters', order: 'asc', page: 1 };

/** The view that an address asks for; what it says that no table could show is left out. */
export function readSitesView(search: URLSearchParams): SitesView {
  const asked = FIELDS.flatMap((field): [ViewField, string][] => {
    const value = search.get(field)?.trim() ?? '';
    return value !== '' && listSites.query.safeParse({ [field]: value }).success ? [[field, value]] : [];
  });
  const { limit: _limit, ...view } = listSites.query.parse(Object.fromEntries(asked));
  return view;
}

/** The address of a view, as the query after its path; what is as usual is left out. */
export function sitesSearch(view: SitesView): string {
  const search = new URLSearchParams();
  for (const field of FIELDS) {
    const value = view[field];
    if (value !== undefined && value !== '' && value !== usual[field]) search.set(field, String(value));
  }
  return `?${search}`;
}

/** Without any filter, in the order that it has. */
export function withoutFilter({ sort, order }: SitesView): SitesView {
  return { sort, order, page: 1 };
}

export function isFiltered(view: SitesView): boolean {
  return FILTERS.some((field) => view[field] !== undefined);
}

/** Names rise first, what speaks against a site falls first; a second press turns the order round. */
export function sortedBy(view: SitesView, sort: SiteSort): SitesView {
  const first = sort === 'letters' || sort === 'name' || sort === 'station' ? 'asc' : 'desc';
  const order = view.sort !== sort ? first : view.order === 'asc' ? 'desc' : 'asc';
  return { ...view, sort, order, page: 1 };
}

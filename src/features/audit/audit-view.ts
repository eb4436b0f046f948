/** What of the trail is in view, as it stands in the query of the page's address. */
import { AuditFilter } from '../../contract/audit.ts';

export interface AuditView {
  readonly filter: AuditFilter;
  /** Events before this place in the chain; null shows the newest. */
  readonly before: number | null;
}

export const filterFields = ['from', 'until', 'personId', 'kind', 'object'] as const;
export type FilterField = (typeof filterFields)[number];

/** The view that an address asks for; what no trail could be narrowed to is left out. */
export function readAuditView(search: URLSearchParams): AuditView {
  const asked = filterFields.flatMap((field): [FilterField, string][] => {
    const value = search.get(field)?.trim() ?? '';
    return value !== '' && AuditFilter.safeParse({ [field]: value }).success ? [[field, value]] : [];
  });
  const before = Number(search.get('before') ?? '');
  return {
    filter: AuditFilter.parse(Object.fromEntries(asked)),
    before: Number.isInteger(before) && before >= 1 ? before : null,
  };
}

/** The address of a view, as the query after its path. */
export function auditSearch({ filter, before }: AuditView): string {
  const search = new URLSearchParams();
  for (const field of filterFields) {
    const value = filter[field];
    if (value !== undefined && value !== '') search.set(field, value);
  }
  if (before !== null) search.set('before', String(before));
  return `?${search}`;
}

/** The same view with another choice, from its newest event on. */
export function changedAuditView(view: AuditView, field: FilterField, value: string): AuditView {
  const search = new URLSearchParams(auditSearch({ ...view, before: null }));
  if (value === '') search.delete(field);
  else search.set(field, value);
  return readAuditView(search);
}

export function isNarrowed({ filter }: AuditView): boolean {
  return filterFields.some((field) => filter[field] !== undefined);
}

import { type ReactNode, useEffect, useRef } from 'react';
import { Link } from 'react-router-dom';
import type { ListedSite, Site, SiteSort } from '../../contract/sites.ts';
import { position } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { SiteFlags } from './site-flags.tsx';
import { SiteMark } from './site-mark.tsx';
import type { ProgrammeKey } from './site-queries.ts';
import { elevationWords, heightDifference, kilometres, loadWords, sortLabel } from './site-words.ts';
import { type SitesView, sitesSearch, sortedBy } from './sites-view.ts';

export type ChosenSites = ReadonlyMap<string, Site>;

export interface SiteChoice {
  readonly chosen: ChosenSites;
  readonly onChosen: (chosen: ChosenSites) => void;
}

interface Column {
  readonly label: string;
  readonly sort: SiteSort | null;
  readonly isFigure?: boolean;
  readonly cell: (site: ListedSite) => ReactNode;
}

/** Every column behind the name; one more is one more entry. */
const columns: readonly Column[] = [
  {
    label: sortLabel.score,
    sort: 'score',
    isFigure: true,
    cell: ({ figures }) => <span title={figures?.scoreNote ?? ''}>{figures?.score ?? '–'}</span>,
  },
  { label: sortLabel.grade, sort: 'grade', cell: ({ figures }) => figures?.grade ?? '–' },
  { label: sortLabel.verdict, sort: 'verdict', cell: ({ figures }) => figures?.verdict ?? '–' },
  { label: sortLabel.station, sort: 'station', cell: ({ station }) => <StationCell station={station} /> },
  {
    label: sortLabel.distance,
    sort: 'distance',
    isFigure: true,
    cell: ({ station }) => (station ? kilometres(station.distanceKm) : '–'),
  },
  {
    label: sortLabel.height,
    sort: 'height',
    isFigure: true,
    cell: ({ station }) => heightDifference(station?.heightDifferenceM ?? null),
  },
  { label: sortLabel.flags, sort: 'flags', cell: (site) => <SiteFlags {...site} /> },
  { label: sortLabel.load, sort: 'load', isFigure: true, cell: ({ designLoadKw }) => loadWords(designLoadKw) },
  { label: 'Elevation', sort: null, isFigure: true, cell: elevationWords },
  { label: 'Position', sort: null, cell: (site) => <span className="whitespace-nowrap">{position(site)}</span> },
];

interface SitesTableProps {
  readonly programme: ProgrammeKey;
  readonly items: readonly ListedSite[];
  readonly view: SitesView;
  /** With it rows can be chosen. */
  readonly choice?: SiteChoice;
}

export function SitesTable({ programme, items, view, choice }: SitesTableProps) {
  return (
    <ScrollInside label="Sites, scrolls sideways">
      <table className="ruled min-w-[62rem]">
        <caption className="sr-only">Sites of the programme</caption>
        <thead>
          <tr>
            {choice ? (
              <th scope="col" className="w-9">
                <ChooseAll items={items} choice={choice} />
              </th>
            ) : null}
            <th scope="col" aria-sort={sortOf(view, 'letters', 'name')}>
              <SortLink view={view} sort="letters" /> and <SortLink view={view} sort="name" label="name" />
            </th>
            {columns.map(({ label, sort, isFigure }) => (
              <th
                key={label}
                scope="col"
                className={isFigure ? 'figure' : 'pl-3'}
                {...(sort === null ? {} : { 'aria-sort': sortOf(view, sort) })}
              >
                {sort === null ? label : <SortLink view={view} sort={sort} />}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {items.map((site) => (
            <SiteRow key={site.id} programme={programme} site={site} {...(choice ? { choice } : {})} />
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function SiteRow({ programme, site, choice }: { programme: ProgrammeKey; site: ListedSite; choice?: SiteChoice }) {
  const isChosen = choice?.chosen.has(site.id) ?? false;
  return (
    <tr className={isChosen ? 'bg-shade' : ''}>
      {choice ? (
        <td>
          <input
            type="checkbox"
            className="size-5 align-middle accent-indigo"
            aria-label={`Choose ${site.letters}, ${site.name}`}
            checked={isChosen}
            onChange={() =>
              choice.onChosen(isChosen ? without(choice.chosen, [site]) : withSites(choice.chosen, [site]))
            }
          />
        </td>
      ) : null}
      <th scope="row" className="w-[24%] max-sm:w-48">
        <span className="flex items-start gap-2.5">
          <SiteMark letters={site.letters} />
          <Link
            to={paths.site.to({ ...programme, siteId: site.id })}
            className="pt-0.5 font-medium break-words"
            dir="auto"
          >
            {site.name}
          </Link>
        </span>
        {site.flags.length > 0 ? (
          // On a phone the column of flags is out of sight until the table is scrolled.
          <span aria-hidden="true" className="mt-1 block text-fine sm:hidden">
            <SiteFlags {...site} />
          </span>
        ) : null}
      </th>
      {columns.map(({ label, isFigure, cell }) => (
        <td key={label} className={isFigure ? 'figure' : 'pl-3'}>
          {cell(site)}
        </td>
      ))}
    </tr>
  );
}

function StationCell({ station }: Pick<Site, 'station'>) {
  if (station === null) return <>–</>;
  return (
    <>
      {station.name}
      {station.chosen ? (
        <span className="block text-fine text-soft">chosen{station.reason ? `: ${station.reason}` : ''}</span>
      ) : null}
    </>
  );
}

/** Chooses every site of the page, or none of them. */
function ChooseAll({ items, choice: { chosen, onChosen } }: { items: readonly Site[]; choice: SiteChoice }) {
  const box = useRef<HTMLInputElement>(null);
  const count = items.filter(({ id }) => chosen.has(id)).length;
  const isAll = items.length > 0 && count === items.length;
  useEffect(() => {
    if (box.current) box.current.indeterminate = count > 0 && !isAll;
  }, [count, isAll]);
  return (
    <input
      ref={box}
      type="checkbox"
      className="size-5 align-middle accent-indigo"
      aria-label="Choose all sites on this page"
      checked={isAll}
      onChange={() => onChosen(isAll ? without(chosen, items) : withSites(chosen, items))}
    />
  );
}

function withSites(chosen: ChosenSites, sites: readonly Site[]): ChosenSites {
  return new Map([...chosen, ...sites.map((site) => [site.id, site] as const)]);
}

function without(chosen: ChosenSites, sites: readonly Site[]): ChosenSites {
  const next = new Map(chosen);
  for (const { id } of sites) next.delete(id);
  return next;
}

function SortLink({ view, sort, label }: { view: SitesView; sort: SiteSort; label?: string }) {
  const isNow = view.sort === sort;
  return (
    <Link to={sitesSearch(sortedBy(view, sort))} className={`py-1 text-soft ${isNow ? 'font-semibold text-ink' : ''}`}>
      {label ?? sortLabel[sort]}
      {isNow ? <span aria-hidden="true"> {view.order === 'asc' ? '↑' : '↓'}</span> : null}
    </Link>
  );
}

function sortOf(view: SitesView, ...sorts: readonly SiteSort[]): 'ascending' | 'descending' | undefined {
  if (!sorts.includes(view.sort)) return undefined;
  return view.order === 'asc' ? 'ascending' : 'descending';
}

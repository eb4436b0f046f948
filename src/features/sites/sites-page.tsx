import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { exportSites } from '../../contract/site-imports.ts';
import type { Site, SitePage } from '../../contract/sites.ts';
import { urlOf } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { number, plural } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ImportsList } from './imports-list.tsx';
import { ChosenBar } from './remove-sites.tsx';
import { type ProgrammeKey, sitesQuery } from './site-queries.ts';
import { mayChangeSites } from './site-words.ts';
import { SitesFilter } from './sites-filter.tsx';
import { SitesTable } from './sites-table.tsx';
import { isFiltered, readSitesView, type SitesView, sitesSearch, withoutFilter } from './sites-view.ts';

/** Every site of the programme: filtered, sorted and paged by the server, with those that wait for a person said first. */
export function SitesPage() {
  const { teamId, role, programmes } = useTeam();
  const { programmeId = '' } = useParams();
  const programme = { teamId, programmeId };
  const [search] = useSearchParams();
  const view = readSitesView(search);
  const sites = useQuery({ ...sitesQuery(programme, view), placeholderData: keepPreviousData });
  const mayChange = mayChangeSites(role);
  const all = sites.data?.counts.all;
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Sites</PageTitle>
      <header className="mb-5 flex flex-wrap items-end justify-between gap-4">
        <div>
          <p className="text-fine text-soft">{programmes.find(({ id }) => id === programmeId)?.name}</p>
          <h1 className="text-title">Sites</h1>
          <p className="mt-1 text-soft" role="status">
            {sites.data ? countWords(view, sites.data) : 'Candidate places, each with the station that stands for it'}
          </p>
        </div>
        {mayChange && all !== 0 ? <HeadActs programme={programme} view={view} /> : null}
      </header>
      {sites.isPending ? <Loading what="the sites" /> : null}
      {sites.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => sites.refetch()}>Try again</Button>}>
          {errorSentence(sites.error)}
        </Notice>
      ) : null}
      {all === 0 ? <NoSites programme={programme} mayChange={mayChange} /> : null}
      {sites.data && all !== 0 ? (
        <>
          {mayChange ? <ToSettle programme={programme} count={sites.data.counts.filters['to settle']} /> : null}
          <SitesFilter view={view} counts={sites.data.counts} />
          <Sites
            programme={programme}
            view={view}
            page={sites.data}
            isBehind={sites.isPlaceholderData}
            mayChange={mayChange}
          />
        </>
      ) : null}
      <ImportsList programme={programme} mayChange={mayChange} />
    </div>
  );
}

function countWords(view: SitesView, { total, counts }: SitePage): string {
  if (isFiltered(view)) return `${number(total)} of ${plural(counts.all, 'site')}`;
  return counts.all === 0 ? 'Candidate places, each with the station that stands for it' : plural(total, 'site');
}

function HeadActs({ programme, view }: { programme: ProgrammeKey; view: SitesView }) {
  const { text, filter } = view;
  return (
    <div className="no-print flex flex-wrap items-center gap-3">
      <a
        href={urlOf(exportSites, { params: programme, query: { text, filter } })}
        download
        className={buttonLook('plain')}
      >
        Export as CSV
      </a>
      <Link to={paths.siteImport.to(programme)} className={buttonLook('plain')}>
        Import a table
      </Link>
      <Link to={paths.newSite.to(programme)} className={buttonLook('primary')}>
        New site
      </Link>
    </div>
  );
}

/** From here the flagged sites are gone through one after the other. */
function ToSettle({ programme, count }: { programme: ProgrammeKey; count: number }) {
  const first = useQuery({ ...sitesQuery(programme, { filter: 'to settle', limit: 1 }), enabled: count > 0 }).data
    ?.items[0];
  if (count === 0) return null;
  return (
    <div className="mb-5">
      <Notice
        tone="attention"
        title={`${plural(count, 'site')} ${count === 1 ? 'waits' : 'wait'} for a person to choose the station`}
        actions={
          first ? (
            <Link to={paths.site.to({ ...programme, siteId: first.id }, true)} className={buttonLook('primary')}>
              Go through {count === 1 ? 'it' : 'them'}
            </Link>
          ) : null
        }
      >
        The station that the method chooses is over 100 km away, or over 300 m higher or lower: grade D, drawn hatched
        and not ranked. Choose another, or keep it and say why.
      </Notice>
    </div>
  );
}

interface SitesProps {
  readonly programme: ProgrammeKey;
  readonly view: SitesView;
  readonly page: SitePage;
  /** What is shown is the answer to the question before. */
  readonly isBehind: boolean;
  readonly mayChange: boolean;
}

/** The table with what may be done about the sites that are chosen in it; the choice outlasts a change of page or filter. */
function Sites({ programme, view, page, isBehind, mayChange }: SitesProps) {
  const [chosen, setChosen] = useState<ReadonlyMap<string, Site>>(new Map());
  if (page.items.length === 0) {
    return (
      <p className="py-4">
        No site fits this filter. <Link to={sitesSearch(withoutFilter(view))}>Show every site</Link>.
      </p>
    );
  }
  return (
    <div className={isBehind ? 'opacity-60' : ''} aria-busy={isBehind}>
      {mayChange ? <ChosenBar programme={programme} chosen={chosen} onChosen={setChosen} /> : null}
      <SitesTable
        programme={programme}
        items={page.items}
        view={view}
        {...(mayChange ? { choice: { chosen, onChosen: setChosen } } : {})}
      />
      <Paging view={view} page={page} />
    </div>
  );
}

function Paging({ view, page: { items, total, page, pages } }: { view: SitesView; page: SitePage }) {
  if (pages === 1) return null;
  const to = (wanted: number) => sitesSearch({ ...view, page: wanted });
  return (
    <nav aria-label="Pages of sites" className="no-print mt-4 flex flex-wrap items-center gap-3">
      <p className="mr-auto text-fine text-soft">
        {number(items.length)} of {plural(total, 'site')} on page {number(page)} of {number(pages)}
      </p>
      {page === 1 ? null : (
        <Link to={to(page - 1)} className={buttonLook('plain')}>
          Page before
        </Link>
      )}
      {page >= pages ? null : (
        <Link to={to(page + 1)} className={buttonLook('plain')}>
          Next page
        </Link>
      )}
    </nav>
  );
}

function NoSites({ programme, mayChange }: { programme: ProgrammeKey; mayChange: boolean }) {
  return (
    <section className="mt-2 max-w-[38rem]">
      <h2 className="mb-2 text-name">No site yet</h2>
      <p className="mb-4">
        {mayChange
          ? 'A site is a candidate place: name, position, design load. Import the register that you hold as CSV, or type the first one. Each gets its height from the relief and the station that stands nearest in distance and height; those whose station is too far off are flagged for you.'
          : 'A planner of the team enters the candidate places here, or imports them from a table.'}
      </p>
      {mayChange ? (
        <p className="flex flex-wrap gap-3">
          <Link to={paths.siteImport.to(programme)} className={buttonLook('primary')}>
            Import a table
          </Link>
          <Link to={paths.newSite.to(programme)} className={buttonLook('plain')}>
            New site
          </Link>
        </p>
      ) : (
        <Link to={paths.map.to(programme)} className={buttonLook('plain')}>
          Go to the map
        </Link>
      )}
    </section>
  );
}

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { exportAuditCsv, exportAuditJson, listAuditEvents } from '../../contract/audit.ts';
import { urlOf } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { plural, shortFingerprint } from '../../lib/format.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { AuditEventList } from './audit-event-list.tsx';
import { AuditFilter } from './audit-filter.tsx';
import { type AuditView, auditSearch, isNarrowed, readAuditView } from './audit-view.ts';

const AT_ONCE = 50;

/** The trail of a team for its leads: narrowed, a page at a time, with the ways to take it along. */
export function AuditTrail({ teamId }: { teamId: string }) {
  const [search] = useSearchParams();
  const view = readAuditView(search);
  const { filter, before } = view;
  const query = { ...filter, ...(before === null ? {} : { before }), limit: AT_ONCE };
  const trail = useQuery({
    ...apiQuery(listAuditEvents, { params: { teamId }, query }),
    placeholderData: keepPreviousData,
  });
  if (trail.isPending) return <Loading what="the trail" />;
  if (trail.isError)
    return (
      <Notice tone="wrong" live actions={<Button onClick={() => trail.refetch()}>Try again</Button>}>
        {errorSentence(trail.error)}
      </Notice>
    );
  const { items, next, people, chain } = trail.data;
  return (
    <>
      <ChainState chain={chain} teamId={teamId} view={view} />
      <AuditFilter view={view} people={people} />
      <section aria-labelledby="events" aria-busy={trail.isPlaceholderData}>
        <h2 id="events" className="sr-only">
          Events, newest first
        </h2>
        {items.length === 0 ? <NothingHere view={view} /> : <AuditEventList items={items} teamId={teamId} />}
        <Pages view={view} next={next} />
      </section>
    </>
  );
}

function ChainState(props: { chain: { events: number; hash: string } | null; teamId: string; view: AuditView }) {
  const { chain, teamId, view } = props;
  const asked = { params: { teamId }, query: view.filter };
  return (
    <div className="flex flex-wrap items-end justify-between gap-4">
      <p className="max-w-[62ch]">
        {chain === null ? (
          'Nothing has been written down yet.'
        ) : (
          <>
            {plural(chain.events, 'event')}, each bound to the one before it. Whoever runs this server verifies that
            with “muslin audit verify”.
            <span className="block">
              Hash of the last event: <span className="font-mono text-fine">{shortFingerprint(chain.hash)}</span>{' '}
              <span className="no-print">
                <CopyButton text={chain.hash} what="the hash of the last event" />
              </span>
            </span>
          </>
        )}
      </p>
      <div className="no-print flex flex-wrap gap-3">
        <a href={urlOf(exportAuditCsv, asked)} download className={buttonLook('plain')}>
          Download as CSV
        </a>
        <a href={urlOf(exportAuditJson, asked)} download className={buttonLook('plain')}>
          Download as JSON, with every hash
        </a>
      </div>
    </div>
  );
}

function NothingHere({ view }: { view: AuditView }) {
  if (!isNarrowed(view)) return <p>Nothing older was written down.</p>;
  return (
    <p>
      Nothing fits this filter. <Link to="?">Show everything</Link>.
    </p>
  );
}

function Pages({ view, next }: { view: AuditView; next: number | null }) {
  if (next === null && view.before === null) return null;
  return (
    <nav aria-label="Pages of the trail" className="no-print mt-4 flex gap-5">
      {view.before === null ? null : <Link to={auditSearch({ ...view, before: null })}>Newest</Link>}
      {next === null ? null : <Link to={auditSearch({ ...view, before: next })}>Older events</Link>}
    </nav>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import type { SiteRecord } from '../../contract/site-record.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { position } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ChangesPanel } from './changes-panel.tsx';
import { ConflictNotice } from './conflict-notice.tsx';
import { DutiesPanel } from './duties-panel.tsx';
import { GatesPanel } from './gates-panel.tsx';
import { PlacePanel } from './place-panel.tsx';
import { RemoveDialog } from './remove-sites.tsx';
import { SettlingBar, useSettling } from './settling-bar.tsx';
import { SiteMark } from './site-mark.tsx';
import { type SiteKey, siteQuery } from './site-queries.ts';
import { elevationWords, flagMeaning, loadWords, mayChangeSites } from './site-words.ts';
import { StationPanel } from './station-panel.tsx';
import { useSiteDesk } from './use-site-desk.ts';
import { WaterPanel } from './water-panel.tsx';

/** One site: its station, place, constraints, water and duties, each saved by itself. */
export function SitePage() {
  const { teamId } = useTeam();
  const { programmeId = '', siteId = '' } = useParams();
  const [search] = useSearchParams();
  const isSettling = search.has('settling');
  const key = { teamId, programmeId, siteId };
  const record = useQuery(siteQuery(key));
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      {isSettling ? (
        <SettlingBar siteKey={key} />
      ) : (
        <Link to={paths.sites.to(key)} className="no-print mb-2 inline-block text-fine">
          All sites
        </Link>
      )}
      {record.isPending ? <Loading what="the site" /> : null}
      {record.isError ? <SiteProblem error={record.error} onRetry={() => record.refetch()} /> : null}
      {record.data ? <SiteView key={siteId} siteKey={key} record={record.data} isSettling={isSettling} /> : null}
    </div>
  );
}

interface SiteViewProps {
  readonly siteKey: SiteKey;
  readonly record: SiteRecord;
  readonly isSettling: boolean;
}

function SiteView({ siteKey, record, isSettling }: SiteViewProps) {
  const { role } = useTeam();
  const mayChange = mayChangeSites(role);
  const desk = useSiteDesk(siteKey, record);
  const navigate = useNavigate();
  const { nextId } = useSettling(siteKey);
  // Panels begin anew from what is stored.
  const [takes, setTakes] = useState(0);
  const chosen = record.site.station?.chosen ? record.site.station : null;
  const goOn = () =>
    navigate(nextId === null ? paths.sites.to(siteKey) : paths.site.to({ ...siteKey, siteId: nextId }, true));
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-9">
      <PageTitle>{record.site.name}</PageTitle>
      <Heading siteKey={siteKey} record={record} mayChange={mayChange} />
      <ConflictNotice desk={desk} onSettled={() => setTakes(takes + 1)} />
      <StationPanel
        key={`${takes} ${chosen?.id ?? ''} ${chosen?.reason ?? ''}`}
        record={record}
        desk={desk}
        mayChange={mayChange}
        {...(isSettling ? { onChosen: goOn } : {})}
      />
      {mayChange ? (
        <div className="max-w-[44rem]">
          <PlacePanel key={takes} programme={siteKey} record={record} desk={desk} />
        </div>
      ) : record.notes === '' ? null : (
        <p className="max-w-[70ch] whitespace-pre-wrap" dir="auto">
          {record.notes}
        </p>
      )}
      <GatesPanel key={`gates ${takes}`} record={record} desk={desk} mayChange={mayChange} />
      <WaterPanel key={`water ${takes}`} programme={siteKey} record={record} desk={desk} mayChange={mayChange} />
      <DutiesPanel programme={siteKey} record={record} mayChange={mayChange} />
      <ChangesPanel record={record} />
    </div>
  );
}

function Heading({
  siteKey,
  record: { site },
  mayChange,
}: {
  siteKey: SiteKey;
  record: SiteRecord;
  mayChange: boolean;
}) {
  const navigate = useNavigate();
  const [isRemoving, setRemoving] = useState(false);
  return (
    <header>
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <div className="min-w-0">
          <h1 className="flex items-center gap-3 text-title break-words" dir="auto">
            <SiteMark letters={site.letters} />
            {site.name}
          </h1>
          <p className="mt-1.5">
            {position(site)}, {elevationWords(site)}
            {site.designLoadKw === null
              ? '; design load not known yet'
              : `; design load ${loadWords(site.designLoadKw)}`}
            .
          </p>
        </div>
        <div className="no-print flex flex-wrap gap-2">
          <Link
            className={buttonLook('plain')}
            to={`${paths.map.to(siteKey)}?${new URLSearchParams({ site: site.id })}`}
          >
            Show on the map
          </Link>
          {mayChange ? <Button onClick={() => setRemoving(true)}>Remove</Button> : null}
        </div>
      </div>
      {site.flags.length > 0 ? (
        <div className="mt-4">
          <Notice
            tone="attention"
            title={site.toSettle ? 'This site waits for a station to be chosen' : 'To know about this site'}
          >
            <ul>
              {site.flags.map((flag) => (
                <li key={flag}>{flagMeaning[flag]}</li>
              ))}
            </ul>
          </Notice>
        </div>
      ) : null}
      {isRemoving ? (
        <RemoveDialog
          programme={siteKey}
          sites={[site]}
          onClose={() => setRemoving(false)}
          onRemoved={() => navigate(paths.sites.to(siteKey))}
        />
      ) : null}
    </header>
  );
}

function SiteProblem({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const isGone = isApiError(error, 'not_found') || isApiError(error, 'invalid_input');
  return (
    <>
      <PageTitle>Site</PageTitle>
      <Notice tone="wrong" live actions={isGone ? null : <Button onClick={onRetry}>Try again</Button>}>
        {isGone
          ? 'There is no such site: it was removed, or it belongs to a team that you are not in.'
          : errorSentence(error)}
      </Notice>
    </>
  );
}

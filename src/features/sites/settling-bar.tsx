import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { buttonLook } from '../../ui/button.tsx';
import { type SiteKey, sitesQuery } from './site-queries.ts';

const MOST_AHEAD = 200;

/** The sites that wait for a person, and the one that comes after this: the next by letters, then from the first again. */
export function useSettling(key: SiteKey): { left: number; nextId: string | null } {
  const waiting = useQuery(sitesQuery(key, { filter: 'to settle', limit: MOST_AHEAD })).data;
  const ids = waiting?.items.map(({ id }) => id) ?? [];
  const at = ids.indexOf(key.siteId);
  const nextId = (at >= 0 ? [...ids.slice(at + 1), ...ids.slice(0, at)] : ids)[0] ?? null;
  return { left: waiting?.total ?? 0, nextId };
}

/** On the way from one flagged site to the next: how many are left, and a way past this one. */
export function SettlingBar({ siteKey }: { siteKey: SiteKey }) {
  const { left, nextId } = useSettling(siteKey);
  return (
    <div className="no-print mb-4 flex flex-wrap items-center gap-x-4 gap-y-2 border-y border-line bg-paper px-3 py-2">
      <p className="mr-auto font-medium" role="status">
        {left === 0 ? 'Every station is settled.' : `${plural(left, 'site')} left to settle`}
      </p>
      {nextId === null ? null : (
        <Link to={paths.site.to({ ...siteKey, siteId: nextId }, true)} className={buttonLook('plain')}>
          Skip to the next
        </Link>
      )}
      <Link to={paths.sites.to(siteKey)} className="py-1.5">
        Back to the table
      </Link>
    </div>
  );
}

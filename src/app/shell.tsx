import { type ReactNode, useEffect, useState } from 'react';
import { Link } from 'react-router-dom';
import type { Membership } from '../contract/accounts.ts';
import type { StreamState } from '../lib/api-client.ts';
import { moment } from '../lib/format.ts';
import { paths } from '../lib/paths.ts';
import { TopBar, type TopBarProps } from './top-bar.tsx';

interface ShellProps extends TopBarProps {
  readonly stream: StreamState;
  readonly children: ReactNode;
}

/** The top bar and the page under it. */
export function Shell({ person, team, memberships, stream, children }: ShellProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:m-2 focus:rounded-md focus:bg-paper focus:p-2"
      >
        Skip to the page
      </a>
      <TopBar person={person} team={team} memberships={memberships} />
      {team.invented ? (
        <p className="hidden text-fine print:block">{team.teamName}, invented places and weather</p>
      ) : null}
      <StreamNote stream={stream} />
      <DeletionNote team={team} />
      <main id="page" tabIndex={-1} className="flex min-h-0 flex-1 flex-col outline-none">
        {children}
      </main>
    </div>
  );
}

/** On every page while the team waits for its end, so that nobody is taken by surprise. */
function DeletionNote({ team: { teamId, teamName, role, deletedAt } }: { team: Membership }) {
  if (deletedAt === undefined) return null;
  return (
    <p className="no-print border-b border-line border-l-3 border-l-weld bg-paper px-5 py-1.5 text-fine max-sm:px-4">
      {teamName} will be deleted on {moment(deletedAt)}.{' '}
      {role === 'lead' ? (
        <Link to={paths.teamData.to(teamId)}>Keep it, or make an export</Link>
      ) : (
        'Its leads can stop this.'
      )}
    </p>
  );
}

const SAY_AFTER_MS = 8_000;

/** Said only once the stream has been down for a while: a short break mends itself unseen. */
function StreamNote({ stream }: { stream: StreamState }) {
  const [isDown, setIsDown] = useState(false);
  useEffect(() => {
    if (stream === 'open') return setIsDown(false);
    const timer = setTimeout(() => setIsDown(true), SAY_AFTER_MS);
    return () => clearTimeout(timer);
  }, [stream]);
  return (
    <div role="status" className="no-print">
      {isDown ? (
        <p className="border-b border-line bg-paper px-5 py-1.5 text-fine text-soft">
          The connection to the server is down. What is shown may be behind; it catches up by itself.
        </p>
      ) : null}
    </div>
  );
}

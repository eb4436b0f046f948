import { useMutation, useQueryClient } from '@tanstack/react-query';
import { lazy, type ReactNode, Suspense, useEffect, useState } from 'react';
import { Link, NavLink, useLocation, useNavigate } from 'react-router-dom';
import { type Membership, type Role, type Session, signOut } from '../contract/accounts.ts';
import { call, type StreamState } from '../lib/api-client.ts';
import { errorSentence } from '../lib/api-error.ts';
import { paths } from '../lib/paths.ts';
import { sessionQuery } from '../lib/session-query.ts';
import type { MenuGroup } from '../ui/menu.tsx';
import { Wordmark } from '../ui/wordmark.tsx';

/** The menu's parts weigh as much as half the shell; the page does not wait for them. */
const Menu = lazy(async () => ({ default: (await import('../ui/menu.tsx')).Menu }));

const roleWords: Readonly<Record<Role, string>> = {
  viewer: 'Viewer',
  planner: 'Planner',
  engineer: 'Engineer',
  lead: 'Lead',
};

interface ShellProps {
  readonly person: NonNullable<Session['person']>;
  readonly team: Membership;
  readonly memberships: readonly Membership[];
  readonly stream: StreamState;
  readonly children: ReactNode;
}

/** The top bar and the page under it. */
export function Shell({ person, team, memberships, stream, children }: ShellProps) {
  const programme = team.programmes[0];
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:m-2 focus:rounded-md focus:bg-paper focus:p-2"
      >
        Skip to the page
      </a>
      <header className="no-print flex min-h-13 flex-wrap items-stretch gap-x-6 border-b border-line px-5 max-sm:gap-x-4 max-sm:px-4">
        <Link to={paths.home} className="flex items-center no-underline" aria-label="Muslin, go to the map">
          <Wordmark />
        </Link>
        <nav aria-label="Main" className="flex items-stretch gap-5 max-sm:gap-4">
          {programme ? (
            <>
              <TopLink to={paths.map.to({ teamId: team.teamId, programmeId: programme.id })}>Map</TopLink>
              <TopLink to={paths.briefs.to({ teamId: team.teamId, programmeId: programme.id })}>Briefs</TopLink>
            </>
          ) : null}
          <TopLink to={paths.weather.to(team.teamId)}>Weather</TopLink>
          <TopLink to={paths.method.to(team.teamId)}>Method</TopLink>
        </nav>
        <p className="ml-auto flex items-center text-body text-soft max-md:order-last max-md:ml-0 max-md:w-full max-md:pb-2 max-md:text-fine">
          <span>
            {team.teamName}
            {team.invented ? ', invented places and weather' : ''}
          </span>
        </p>
        <div className="flex items-center max-md:ml-auto">
          <AccountMenu person={person} team={team} memberships={memberships} />
        </div>
      </header>
      {team.invented ? (
        <p className="hidden text-fine print:block">{team.teamName}, invented places and weather</p>
      ) : null}
      <StreamNote stream={stream} />
      <main id="page" tabIndex={-1} className="flex min-h-0 flex-1 flex-col outline-none">
        {children}
      </main>
    </div>
  );
}

function TopLink({ to, children }: { to: string; children: string }) {
  return (
    <NavLink
      to={to}
      className={({ isActive }) =>
        `flex items-center border-b-2 pt-0.5 text-body no-underline ${
          isActive ? 'border-indigo font-semibold text-ink' : 'border-transparent text-soft hover:text-ink'
        }`
      }
    >
      {children}
    </NavLink>
  );
}

function AccountMenu({ person, team, memberships }: Pick<ShellProps, 'person' | 'team' | 'memberships'>) {
  const navigate = useNavigate();
  const location = useLocation();
  const client = useQueryClient();
  const leave = useMutation({
    mutationFn: () => call(signOut, { params: {}, query: {} }),
    onSuccess: () => {
      client.clear();
      client.setQueryData(sessionQuery.queryKey, { person: null, memberships: [] });
      navigate(paths.signIn.to());
    },
  });
  const programmes = memberships.flatMap((membership) =>
    membership.programmes.map((programme) => ({
      to: paths.map.to({ teamId: membership.teamId, programmeId: programme.id }),
      label: memberships.length > 1 ? `${membership.teamName}: ${programme.name}` : programme.name,
    })),
  );
  const groups: MenuGroup[] = [
    ...(programmes.length > 1
      ? [
          {
            title: 'Programmes',
            entries: programmes.map(({ to, label }) => ({ id: to, label, current: location.pathname === to })),
          },
        ]
      : []),
    {
      title: `${person.email}, ${roleWords[team.role].toLowerCase()}`,
      entries: [{ id: 'sign-out', label: 'Sign out' }],
    },
  ];
  return (
    <>
      {leave.isError ? (
        <p role="alert" className="mr-3 text-fine text-madder">
          {errorSentence(leave.error)}
        </p>
      ) : null}
      <Suspense fallback={<span className="max-w-40 truncate max-sm:max-w-26">{person.name}</span>}>
        <Menu
          label={`Account of ${person.name}, ${roleWords[team.role].toLowerCase()}`}
          groups={groups}
          onChoose={(id) => (id === 'sign-out' ? leave.mutate() : navigate(id))}
        >
          <span className="max-w-40 truncate max-sm:max-w-26">{person.name}</span>
        </Menu>
      </Suspense>
    </>
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

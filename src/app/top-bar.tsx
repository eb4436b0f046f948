import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense } from 'react';
import { Link, NavLink, useLocation, useNavigate } from 'react-router-dom';
import type { Membership, Session } from '../contract/accounts.ts';
import { listNotices } from '../contract/notices.ts';
import { errorSentence } from '../lib/api-error.ts';
import { apiQuery } from '../lib/api-query.ts';
import { plural } from '../lib/format.ts';
import { paths } from '../lib/paths.ts';
import { useMedia } from '../lib/use-media.ts';
import type { MenuGroup } from '../ui/menu.tsx';
import { Wordmark } from '../ui/wordmark.tsx';
import { NarrowMenu } from './narrow-menu.tsx';
import { accountWords, type ProgrammeLink, pageLinks, programmeLinks } from './top-links.ts';
import { useSignOut } from './use-sign-out.ts';

/** The menu's parts weigh as much as half the shell; the page does not wait for them. */
const Menu = lazy(async () => ({ default: (await import('../ui/menu.tsx')).Menu }));

/** From here on every page has its place in the bar; narrower, they stand in one menu. */
const ROOMY = '(min-width: 48rem)';

export interface TopBarProps {
  readonly person: NonNullable<Session['person']>;
  readonly team: Membership;
  readonly memberships: readonly Membership[];
}

/** One line over every page: where one is, where one can go, and whose account it is. */
export function TopBar({ person, team, memberships }: TopBarProps) {
  const isRoomy = useMedia(ROOMY);
  const programmes = programmeLinks(memberships);
  return (
    <header className="no-print relative flex h-13 items-stretch gap-x-6 border-b border-line px-5 max-md:gap-x-3 max-md:px-4">
      <Link to={paths.home} className="flex items-center no-underline" aria-label="Muslin, go to the map">
        <Wordmark />
      </Link>
      {isRoomy ? (
        <>
          <nav aria-label="Main" className="flex items-stretch gap-5">
            {pageLinks(team).map(({ to, label }) => (
              <TopLink key={to} to={to}>
                {label}
              </TopLink>
            ))}
          </nav>
          <TeamNote team={team} />
          <div className="flex items-center">
            <AccountMenu person={person} team={team} programmes={programmes} />
          </div>
        </>
      ) : (
        <>
          <TeamNote team={team} />
          <NarrowMenu person={person} team={team} programmes={programmes} />
        </>
      )}
    </header>
  );
}

/** The team in view; that its places are invented is never cut off. */
function TeamNote({ team }: Pick<TopBarProps, 'team'>) {
  return (
    <p className="ml-auto flex min-w-0 flex-wrap content-center text-soft max-md:flex-1 max-md:justify-end max-md:text-right max-md:text-fine max-md:leading-4">
      <span className="max-w-full truncate">
        {team.teamName}
        {team.invented ? ', ' : ''}
      </span>
      {team.invented ? <span className="ml-1 max-md:w-full">invented places and weather</span> : null}
    </p>
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

interface AccountMenuProps extends Pick<TopBarProps, 'person' | 'team'> {
  readonly programmes: readonly ProgrammeLink[];
}

function AccountMenu({ person, team, programmes }: AccountMenuProps) {
  const navigate = useNavigate();
  const location = useLocation();
  const leave = useSignOut();
  const unread = useQuery(apiQuery(listNotices, { params: {}, query: {} })).data?.unread ?? 0;
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
      title: accountWords(person, team),
      entries: [
        { id: paths.account, label: unread > 0 ? `Account, ${plural(unread, 'new notice')}` : 'Account and notices' },
        { id: 'sign-out', label: 'Sign out' },
      ],
    },
  ];
  const name = <span className="max-w-40 truncate">{person.name}</span>;
  return (
    <>
      {leave.isError ? (
        <p role="alert" className="mr-3 text-fine text-madder">
          {errorSentence(leave.error)}
        </p>
      ) : null}
      <Suspense fallback={name}>
        <Menu
          label={`Account of ${person.name}, ${team.role}`}
          groups={groups}
          onChoose={(id) => (id === 'sign-out' ? leave.mutate() : navigate(id))}
        >
          {name}
        </Menu>
      </Suspense>
    </>
  );
}

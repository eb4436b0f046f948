import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';

/** The head of every page about the team itself, with the way to the others; leads have more. */
export function TeamHeader({ title, children }: { title: string; children?: ReactNode }) {
  const { teamId, role } = useTeam();
  const links = [
    { to: paths.people.to(teamId), label: 'People' },
    { to: paths.programmes.to(teamId), label: 'Programmes' },
    ...(role === 'lead'
      ? [
          { to: paths.tokens.to(teamId), label: 'API tokens' },
          { to: paths.mails.to(teamId), label: 'Mails' },
          { to: paths.audit.to(teamId), label: 'Audit trail' },
          { to: paths.teamData.to(teamId), label: 'Export and deletion' },
        ]
      : []),
    { to: paths.api.to(teamId), label: 'API' },
  ];
  return (
    <header>
      <PageTitle>{title}</PageTitle>
      <nav aria-label="Team" className="no-print mb-4 flex flex-wrap gap-x-5 gap-y-1">
        {links.map(({ to, label }) => (
          <NavLink
            key={to}
            to={to}
            end
            className={({ isActive }) => (isActive ? 'font-semibold text-ink no-underline' : 'text-indigo')}
          >
            {label}
          </NavLink>
        ))}
      </nav>
      <h1 className="text-title">{title}</h1>
      {children ? <p className="mt-1 max-w-[70ch] text-soft">{children}</p> : null}
    </header>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Outlet, useParams } from 'react-router-dom';
import { sessionQuery } from '../lib/session-query.ts';
import { TeamScopeProvider } from '../lib/team-scope.ts';
import { rememberTeam } from './last-team.ts';
import { NotFoundPage } from './not-found-page.tsx';
import { Shell } from './shell.tsx';
import { useTeamEvents } from './use-team-events.ts';

/** The pages of one team, inside the shell; what happens in the team is followed live while any of them is open. */
export function TeamPages() {
  const { teamId } = useParams();
  const { data: session } = useQuery(sessionQuery);
  const team = session?.memberships.find((membership) => membership.teamId === teamId);
  const stream = useTeamEvents(team?.teamId);
  useEffect(() => {
    if (team) rememberTeam(team.teamId);
  }, [team]);
  if (!session?.person) return null;
  if (!team) return <NotFoundPage isAlone />;
  return (
    <TeamScopeProvider value={team}>
      <Shell person={session.person} team={team} memberships={session.memberships} stream={stream}>
        <Outlet />
      </Shell>
    </TeamScopeProvider>
  );
}

import { useQuery } from '@tanstack/react-query';
import { Link, Navigate, useParams } from 'react-router-dom';
import { paths } from '../lib/paths.ts';
import { sessionQuery } from '../lib/session-query.ts';
import { lastTeam } from './last-team.ts';

/** Leads to the map of the team that was last in view, or of the first. */
export function HomeRedirect() {
  const { teamId } = useParams();
  const { data: session } = useQuery(sessionQuery);
  const memberships = session?.memberships ?? [];
  const wanted = teamId ?? lastTeam();
  const team = memberships.find((membership) => membership.teamId === wanted) ?? memberships[0];
  if (!team) {
    return (
      <main className="mx-auto max-w-xl p-6 pt-16">
        <h1 className="mb-3 text-title">You are in no team yet</h1>
        <p>
          Ask the lead of your team to invite you, or make a team of your own:{' '}
          <Link to={paths.account}>your account</Link> shows invitations and makes teams.
        </p>
      </main>
    );
  }
  const programme = team.programmes[0];
  const to = programme
    ? paths.map.to({ teamId: team.teamId, programmeId: programme.id })
    : paths.weather.to(team.teamId);
  return <Navigate to={to} replace />;
}

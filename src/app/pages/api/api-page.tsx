import { Link } from 'react-router-dom';
import { ApiReference } from '../../../features/api/api-reference.tsx';
import { TeamHeader } from '../../../features/teams/team-header.tsx';
import { paths } from '../../../lib/paths.ts';
import { useTeam } from '../../../lib/team-scope.ts';

/** What programs may ask of the server, among the pages of the team. */
export function ApiPage() {
  const { teamId, role } = useTeam();
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-8 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="API">
        What programs may send to this server and what they are answered.{' '}
        {role === 'lead' ? (
          <>
            They need a token: <Link to={paths.tokens.to(teamId)}>API tokens</Link>.
          </>
        ) : (
          'They need a token, which a lead of the team makes.'
        )}
      </TeamHeader>
      <ApiReference />
    </div>
  );
}

import { AuditTrail } from '../../../features/audit/audit-trail.tsx';
import { TeamHeader } from '../../../features/teams/team-header.tsx';
import { useTeam } from '../../../lib/team-scope.ts';

/** The audit trail among the pages of the team, for its leads. */
export function AuditPage() {
  const { teamId, role } = useTeam();
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-6 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="Audit trail">
        Who changed what in this team, and what was taken out of it. Nothing here can be changed or removed unseen.
      </TeamHeader>
      {role === 'lead' ? <AuditTrail teamId={teamId} /> : <p>The leads of the team see its audit trail.</p>}
    </div>
  );
}

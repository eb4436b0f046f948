import { useTeam } from '../../../lib/team-scope.ts';
import { TeamHeader } from '../team-header.tsx';
import { DeletionSection } from './deletion-section.tsx';
import { ExportSection } from './export-section.tsx';

/** All that the team has, for its leads: to take it out, or to give it up. */
export function DataPage() {
  const { role, teamName } = useTeam();
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-8 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title="Export and deletion">What {teamName} has here belongs to the team.</TeamHeader>
      {role === 'lead' ? (
        <>
          <ExportSection />
          <DeletionSection />
        </>
      ) : (
        <p>The leads of the team take out what it has, and delete it.</p>
      )}
    </div>
  );
}

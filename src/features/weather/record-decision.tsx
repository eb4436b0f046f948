import { Link } from 'react-router-dom';
import type { FileStatus, WeatherFileRecord } from '../../contract/weather.ts';
import { moment, sentence } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';

const doneWord: Readonly<Partial<Record<FileStatus, string>>> = {
  refused: 'Refused',
  withdrawn: 'Withdrawn',
  superseded: 'Superseded',
};

/** Who decided on the file, when and why, and what stands in its place; nothing where no person did. */
export function RecordDecision({ record }: { record: WeatherFileRecord }) {
  const { teamId } = useTeam();
  const { decision, file } = record;
  if (decision === null) return null;
  return (
    <p className="mt-2">
      {doneWord[file.status] ?? 'Decided'} by {decision.by} on {moment(decision.at)}.
      {decision.reason ? ` Reason: ${sentence(decision.reason)}` : ''}{' '}
      {decision.otherFileId ? (
        <Link to={paths.weatherFile.to(teamId, decision.otherFileId)}>See the file that stands in its place</Link>
      ) : null}
    </p>
  );
}

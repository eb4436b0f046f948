import { Link } from 'react-router-dom';
import type { DeclaredStation, WeatherFileRecord } from '../../contract/weather.ts';
import { fileSize, metres, moment, position, share, shortFingerprint, utcOffset } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { recordTitle } from './weather-words.ts';

/** Name, place and provenance of a weather file. */
export function RecordHeading({ record }: { record: WeatherFileRecord }) {
  const { teamId } = useTeam();
  const { file, acceptedBy } = record;
  const { station } = file;
  return (
    <header>
      <h1 className="text-title break-words">{recordTitle(file)}</h1>
      {station ? (
        <p className="mt-1.5">
          {placeWords(station)}
          {file.completePct === null ? '' : ` Complete ${share(file.completePct)}.`}{' '}
          {file.stationId ? (
            <Link to={paths.station.to(teamId, file.stationId)} className="no-print">
              Its station and other years
            </Link>
          ) : null}
        </p>
      ) : null}
      <p className="mt-1 text-fine text-soft">
        <span className="break-all">
          {file.name}, {fileSize(file.bytes)}
          {file.format && !file.parent ? `, ${file.format}` : ''}.
        </span>{' '}
        {file.parent ? 'Derived' : 'Uploaded'} {moment(file.uploadedAt)} by {file.uploadedBy}
        {acceptedBy && !file.parent ? `, accepted by ${acceptedBy}` : ''}. Fingerprint{' '}
        <span title={file.fingerprint}>{shortFingerprint(file.fingerprint)}</span>
      </p>
    </header>
  );
}

/** What the file says of its place, and what it does not say. */
function placeWords({ latitude, longitude, elevationM, utcOffsetH, wmoNumber }: DeclaredStation): string {
  const words = [
    latitude === null || longitude === null ? 'position not given' : position({ latitude, longitude }),
    elevationM === null ? 'elevation not given' : metres(elevationM),
    utcOffsetH === null ? 'UTC offset not given' : utcOffset(utcOffsetH),
    ...(wmoNumber === null ? [] : [`WMO ${wmoNumber}`]),
  ].join(', ');
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
}

import { type DeclaredStation, getOriginal, type WeatherFileRecord } from '../../contract/weather.ts';
import { urlOf } from '../../lib/api-client.ts';
import { fileSize, metres, moment, position, share, shortFingerprint, utcOffset } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { buttonLook } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { mayChangeWeather, recordTitle } from './weather-words.ts';

/** Name, place and provenance of a weather file. */
export function RecordHeading({ record }: { record: WeatherFileRecord }) {
  const { teamId, role } = useTeam();
  const { file, acceptedBy } = record;
  const { station } = file;
  const original = urlOf(getOriginal, { params: { teamId, fileId: file.id }, query: {} });
  return (
    <header>
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <h1 className="text-title break-words">{recordTitle(file)}</h1>
        {mayChangeWeather(role) ? (
          <a className={buttonLook('plain')} href={original} download>
            {file.parent ? 'Download what it was made of' : 'Download original'}
          </a>
        ) : null}
      </div>
      {station ? (
        <p className="mt-1.5">
          {placeWords(station)}
          {file.completePct === null ? '' : ` Complete ${share(file.completePct)}.`}
        </p>
      ) : null}
      <p className="mt-1 flex flex-wrap items-center gap-x-1.5 text-fine text-soft">
        <span className="break-all">
          {file.name}, {fileSize(file.bytes)}
          {file.format && !file.parent ? `, ${file.format}` : ''}.
        </span>
        {file.parent ? (
          <span>
            Derived {moment(file.uploadedAt)} by {file.uploadedBy}.
          </span>
        ) : (
          <span>
            Uploaded {moment(file.uploadedAt)} by {file.uploadedBy}
            {acceptedBy ? `, accepted by ${acceptedBy}` : ''}.
          </span>
        )}
        <span className="inline-flex items-center gap-1.5">
          Fingerprint <span title={file.fingerprint}>{shortFingerprint(file.fingerprint)}</span>
          <CopyButton text={file.fingerprint} what="the whole fingerprint, SHA-256" />
        </span>
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

import { Link } from 'react-router-dom';
import { getOriginal, type WeatherFileRecord } from '../../contract/weather.ts';
import { urlOf } from '../../lib/api-client.ts';
import { capital, fileSize, moment } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { buttonLook } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';
import { mappingSentences } from './mapping-words.ts';
import { RecordLicence } from './record-licence.tsx';
import { mayChangeWeather, statusWord } from './weather-words.ts';

/** What was uploaded: the bytes, their fingerprint, their licence, and what else came in the same file. */
export function RecordOriginal({ record }: { record: WeatherFileRecord }) {
  const { teamId, role } = useTeam();
  const { file, answers, comments, parts } = record;
  const isDerived = file.parent !== null;
  const mayChange = mayChangeWeather(role);
  const original = urlOf(getOriginal, { params: { teamId, fileId: file.id }, query: {} });
  return (
    <section aria-labelledby="original">
      <div className="mb-2 flex flex-wrap items-center justify-between gap-3">
        <h2 id="original" className="text-name">
          {isDerived ? 'What it was made of' : 'The original'}
        </h2>
        {mayChange ? (
          <a
            className={`no-print ${buttonLook('plain')}`}
            href={original}
            download={isDerived ? `${file.name}.json` : file.name}
          >
            {isDerived ? 'Download what it was made of' : 'Download original'}
          </a>
        ) : null}
      </div>
      <dl className="ruled grid grid-cols-[10rem_minmax(0,1fr)] gap-x-4 max-sm:grid-cols-[minmax(0,1fr)] [&>dd]:pb-1.5 [&>dt]:border-t [&>dt]:border-line [&>dt]:pt-1.5 [&>dt]:text-soft sm:[&>dd]:border-t sm:[&>dd]:border-line sm:[&>dd]:pt-1.5">
        <dt>File</dt>
        <dd className="break-all">
          {file.name}, {fileSize(file.bytes)}
          {file.format && !isDerived ? `, ${file.format}` : ''}
          {file.part === '' ? '' : `, part ${file.part}`}
        </dd>
        <dt>Fingerprint, SHA-256</dt>
        <dd className="flex flex-wrap items-center gap-x-2">
          <span className="font-mono text-fine break-all">{file.fingerprint}</span>
          <span className="no-print">
            <CopyButton text={file.fingerprint} what="the fingerprint" />
          </span>
        </dd>
        <dt>{isDerived ? 'Derived' : 'Uploaded'}</dt>
        <dd>
          {moment(file.uploadedAt)} by {file.uploadedBy}
          {record.acceptedBy ? `, accepted by ${record.acceptedBy}` : ''}
        </dd>
        {answers.mapping === undefined ? null : (
          <>
            <dt>How the table was read</dt>
            <dd className="max-w-[80ch] break-words">
              {mappingSentences(answers.mapping).map((words) => (
                <p key={words}>{capital(words)}</p>
              ))}
            </dd>
          </>
        )}
        {comments ? (
          <>
            <dt>What the file says of its source</dt>
            <dd className="max-w-[80ch] break-words whitespace-pre-line">{comments}</dd>
          </>
        ) : null}
        <dt>Licence</dt>
        <dd>
          <RecordLicence file={file} mayChange={mayChange} />
        </dd>
        {parts.length > 0 ? (
          <>
            <dt>In the same upload</dt>
            <dd>
              <ul>
                {parts.map(({ fileId, part, status }) => (
                  <li key={fileId} className="flex items-center gap-2">
                    <StatusMark status={status} />
                    <Link to={paths.weatherFile.to(teamId, fileId)}>{part === '' ? 'The other part' : part}</Link>
                    <span className="text-soft">{statusWord[status].toLowerCase()}</span>
                  </li>
                ))}
              </ul>
            </dd>
          </>
        ) : null}
      </dl>
    </section>
  );
}

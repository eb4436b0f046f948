import { Link } from 'react-router-dom';
import type { StationRecord } from '../../contract/stations.ts';
import { statusWord, yearWords } from '../../lib/file-words.ts';
import { moment } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';

/** A station may have gathered very many files; the library has them all. */
const MOST_ROWS = 200;

/** The files of the station of every status, newest first. */
export function StationFiles({ files }: { files: StationRecord['files'] }) {
  const { teamId } = useTeam();
  return (
    <section aria-labelledby="files">
      <h2 id="files" className="mb-2 text-name">
        Its files
      </h2>
      <ScrollInside label="Files of the station, scrolls sideways">
        <table className="ruled min-w-[40rem]">
          <caption className="sr-only">Files of the station, newest first</caption>
          <thead>
            <tr>
              <th scope="col">File</th>
              <th scope="col">Year</th>
              <th scope="col">Format</th>
              <th scope="col">Status</th>
              <th scope="col">Uploaded</th>
            </tr>
          </thead>
          <tbody>
            {files.slice(0, MOST_ROWS).map(({ file }) => (
              <tr key={file.id}>
                <th scope="row" className="break-all">
                  <Link to={paths.weatherFile.to(teamId, file.id)}>{file.name}</Link>
                </th>
                <td className="whitespace-nowrap">{yearWords(file)}</td>
                <td>{file.format ?? '–'}</td>
                <td>
                  <span className="flex items-center gap-1.5">
                    <StatusMark status={file.status} failed={file.failure !== null} />
                    {file.failure === null ? statusWord[file.status] : 'Stopped, a fault of ours'}
                  </span>
                </td>
                <td className="whitespace-nowrap">{moment(file.uploadedAt)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
      {files.length > MOST_ROWS ? <p className="mt-1 text-fine text-soft">The newest {MOST_ROWS} of them.</p> : null}
    </section>
  );
}

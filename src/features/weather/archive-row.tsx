import type { WeatherArchive } from '../../contract/weather-batches.ts';
import { fileSize, plural } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { archiveWords } from './batch-words.ts';
import { RetryButton } from './retry-button.tsx';
import { mayChangeWeather } from './weather-words.ts';

/** A zip of a batch: how far it is opened, and what of it was left out and why. */
export function ArchiveRow({ archive }: { archive: WeatherArchive }) {
  const { role } = useTeam();
  const isWrong = archive.failure !== null || archive.status === 'refused';
  return (
    <li className="mt-1">
      <p>
        <span className="break-all">{archive.name}</span>{' '}
        <span className="text-fine text-soft">{fileSize(archive.bytes)}</span>{' '}
        <span className={isWrong ? 'font-medium text-madder' : 'text-soft'}>{archiveWords(archive)}</span>{' '}
        {archive.failure !== null && mayChangeWeather(role) ? (
          <RetryButton what="archive" id={archive.id} name={archive.name} />
        ) : null}
      </p>
      {archive.leftOut.length > 0 ? (
        <details className="text-fine">
          <summary className="cursor-pointer py-1 text-indigo">
            {plural(archive.leftOut.length, 'file')} of it left out, and why
          </summary>
          <table className="ruled">
            <caption className="sr-only">Left out of {archive.name}</caption>
            <thead className="sr-only">
              <tr>
                <th scope="col">File</th>
                <th scope="col">Why</th>
              </tr>
            </thead>
            <tbody>
              {archive.leftOut.map(({ path, why }, index) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: an archive may hold one path twice, and the list only grows
                <tr key={`${index} ${path}`}>
                  <th scope="row" className="w-1/3 break-all">
                    {path}
                  </th>
                  <td>{why}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </details>
      ) : null}
    </li>
  );
}

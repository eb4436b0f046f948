import { Link } from 'react-router-dom';
import type { WeatherFile } from '../../contract/weather.ts';
import { moment, share } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { StatusMark } from './status-mark.tsx';
import { parentWords, statusWords, yearWords } from './weather-words.ts';

export function WeatherTable({ teamId, items }: { teamId: string; items: readonly WeatherFile[] }) {
  return (
    <ScrollInside label="Weather files, scrolls sideways">
      <table className="ruled min-w-[54rem] max-sm:min-w-[46rem]">
        <caption className="sr-only">Weather files of the team, newest first</caption>
        <thead>
          <tr>
            <th scope="col">Station and file</th>
            <th scope="col">Status</th>
            <th scope="col">Year</th>
            <th scope="col">Format</th>
            <th scope="col" className="figure">
              Complete
            </th>
            <th scope="col" className="pl-6">
              Uploaded
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((file) => (
            <tr key={file.id}>
              <th scope="row" className="w-[34%] max-sm:w-44">
                <Link to={paths.weatherFile.to(teamId, file.id)} className="font-medium">
                  {file.station?.name ?? file.name}
                </Link>
                {file.station ? <span className="block text-fine break-all text-soft">{file.name}</span> : null}
              </th>
              <td>
                <span className="flex items-center gap-2">
                  <StatusMark status={file.status} failed={file.failure !== null} />
                  {statusWords(file)}
                </span>
              </td>
              <td className="min-w-14 sm:whitespace-nowrap">
                {yearWords(file)}
                {file.parent ? (
                  <span className="block text-fine text-soft">
                    <Link to={paths.weatherFile.to(teamId, file.parent.fileId)}>{parentWords(file.parent)}</Link>
                    {file.parent.status === 'accepted' ? '' : `, ${file.parent.status}`}
                  </span>
                ) : null}
              </td>
              <td>{file.format ?? '–'}</td>
              <td className="figure">{file.completePct === null ? '–' : share(file.completePct)}</td>
              <td className="pl-6">
                <span className="whitespace-nowrap">{moment(file.uploadedAt)}</span>
                <span className="block text-fine text-soft">{file.uploadedBy}</span>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

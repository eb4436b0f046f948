import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import type { Station } from '../../contract/stations.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { metres, number, plural, position, utcOffset } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { stationsQuery } from './station-queries.ts';

const TEXT_PARAM = 'text';
const PAGE_PARAM = 'page';

/** Every station of the team by name, searched and paged; what is asked stands in the address. */
export function StationsPage() {
  const { teamId } = useTeam();
  const [search, setSearch] = useSearchParams();
  const text = search.get(TEXT_PARAM) ?? '';
  const page = Math.max(1, Number.parseInt(search.get(PAGE_PARAM) ?? '1', 10) || 1);
  const stations = useQuery({ ...stationsQuery(teamId, { text, page }), placeholderData: keepPreviousData });
  const ask = (next: { text: string; page: number }) => {
    const asked = new URLSearchParams();
    if (next.text !== '') asked.set(TEXT_PARAM, next.text);
    if (next.page > 1) asked.set(PAGE_PARAM, String(next.page));
    setSearch(asked);
  };
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Stations</PageTitle>
      <Link to={paths.weather.to(teamId)} className="no-print mb-2 inline-block text-fine">
        All weather files
      </Link>
      <header className="mb-5 flex flex-wrap items-end justify-between gap-4">
        <div>
          <h1 className="text-title">Stations</h1>
          <p className="mt-1 text-soft" role="status">
            {stations.data
              ? `${plural(stations.data.total, 'station')}${text === '' ? '' : ` with "${text}"`}, by name`
              : ''}
          </p>
        </div>
        <SearchForm key={text} text={text} onSearch={(wanted) => ask({ text: wanted, page: 1 })} />
      </header>
      {stations.isPending ? <Loading what="the stations" /> : null}
      {stations.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => stations.refetch()}>Try again</Button>}>
          {errorSentence(stations.error)}
        </Notice>
      ) : null}
      {stations.data?.items.length === 0 ? (
        <NoStation teamId={teamId} isSearch={text !== ''} onClear={() => ask({ text: '', page: 1 })} />
      ) : null}
      {stations.data && stations.data.items.length > 0 ? (
        <>
          <StationTable teamId={teamId} items={stations.data.items} />
          <Pages page={page} pages={stations.data.pages} onGo={(wanted) => ask({ text, page: wanted })} />
        </>
      ) : null}
    </div>
  );
}

function SearchForm({ text, onSearch }: { text: string; onSearch: (text: string) => void }) {
  const [typed, setTyped] = useState(text);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onSearch(typed.trim());
  };
  return (
    <search className="no-print">
      <form onSubmit={submit} className="flex items-end gap-2">
        <TextField label="Name or WMO number" type="search" maxLength={100} value={typed} onChange={setTyped} />
        <Button type="submit" className="min-h-10">
          Search
        </Button>
      </form>
    </search>
  );
}

function StationTable({ teamId, items }: { teamId: string; items: readonly Station[] }) {
  return (
    <ScrollInside label="Stations, scrolls sideways">
      <table className="ruled min-w-[44rem]">
        <caption className="sr-only">Stations of the team by name</caption>
        <thead>
          <tr>
            <th scope="col">Station</th>
            <th scope="col">Position</th>
            <th scope="col" className="figure">
              Elevation
            </th>
            <th scope="col">Time zone</th>
            <th scope="col">WMO number</th>
            <th scope="col" className="figure">
              Accepted years
            </th>
            <th scope="col" className="figure">
              Files
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((station) => (
            <tr key={station.id}>
              <th scope="row">
                <Link to={paths.station.to(teamId, station.id)}>{station.name}</Link>
              </th>
              <td className="whitespace-nowrap">{position(station)}</td>
              <td className="figure">{metres(station.elevationM)}</td>
              <td>
                {station.zone}, {utcOffset(station.utcOffsetH)}
              </td>
              <td>{station.wmoNumber ?? '–'}</td>
              <td className="figure">{number(station.years)}</td>
              <td className="figure">{number(station.files)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function Pages({ page, pages, onGo }: { page: number; pages: number; onGo: (page: number) => void }) {
  if (pages <= 1) return null;
  return (
    <nav aria-label="Pages of stations" className="no-print mt-4 flex items-center justify-end gap-3">
      <span className="mr-auto text-fine text-soft">
        Page {number(page)} of {number(pages)}
      </span>
      <Button disabled={page <= 1} onClick={() => onGo(page - 1)}>
        Page before
      </Button>
      <Button disabled={page >= pages} onClick={() => onGo(page + 1)}>
        Next page
      </Button>
    </nav>
  );
}

function NoStation({ teamId, isSearch, onClear }: { teamId: string; isSearch: boolean; onClear: () => void }) {
  return isSearch ? (
    <p>
      No station has that in its name or number.{' '}
      <Button look="quiet" onClick={onClear}>
        Show every station
      </Button>
    </p>
  ) : (
    <section className="max-w-[36rem]">
      <h2 className="mb-2 text-name">No station yet</h2>
      <p className="mb-4">A station is made when the first weather file of its place is accepted.</p>
      <Link to={paths.weather.to(teamId)} className={buttonLook('plain')}>
        Go to the weather files
      </Link>
    </section>
  );
}

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classWords } from '../../charts/hour-class-words.ts';
import type { HourList } from '../../contract/hour-list.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { number, plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Loading } from '../../ui/loading.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { type HourChoice, hourChoiceWords } from './hour-choice.ts';
import { endWords, figure, shortfallWords } from './hour-words.ts';
import { hourListQuery } from './run-queries.ts';

interface HoursDialogProps {
  readonly run: { readonly teamId: string; readonly runId: string };
  /** Days of the year. */
  readonly days: number;
  readonly choice: HourChoice;
  readonly placeName: string;
  readonly onClose: () => void;
}

const PAGE = 50;

/** The hours behind a bar, a cell or a day, each with its line of the weather file. */
export function HoursDialog({ run, days, choice, placeName, onClose }: HoursDialogProps) {
  const [page, setPage] = useState(1);
  const found = useQuery({ ...hourListQuery(run, { choice, page, limit: PAGE }), placeholderData: keepPreviousData });
  const list = found.data;
  return (
    <Dialog isOpen wide onClose={onClose} title={`${hourChoiceWords(choice, days)}, ${placeName}`}>
      {found.isError ? (
        <p role="alert">
          {errorSentence(found.error)} <Button onClick={() => found.refetch()}>Try again</Button>
        </p>
      ) : null}
      {list === undefined && !found.isError ? <Loading what="the hours" /> : null}
      {list === undefined ? null : (
        <>
          <p className="mb-2 text-soft">
            {plural(list.total, 'hour')} of{' '}
            <Link to={paths.weatherFile.to(run.teamId, list.weatherFileId)}>{list.fileName}</Link>.
            {list.adjusted
              ? ' The weather was moved to the height of the site; the lines hold it as it was measured.'
              : ''}
          </p>
          {list.total === 0 ? null : <HourTable list={list} />}
          <div className="mt-3 flex flex-wrap items-center justify-between gap-3">
            {list.pages > 1 ? <Pages list={list} onPage={setPage} isBusy={found.isPlaceholderData} /> : <span />}
            <Button onClick={onClose}>Close</Button>
          </div>
        </>
      )}
    </Dialog>
  );
}

function HourTable({ list }: { list: HourList }) {
  const isIndex = list.limitUnit === 'points';
  return (
    <ScrollInside label="Hours one by one, scrolls">
      <table className="ruled min-w-[56rem]">
        <caption className="sr-only">Hours with their weather, class, reason and line</caption>
        <thead>
          <tr>
            <th scope="col">Hour ending, civil time</th>
            <th scope="col">Class</th>
            <th scope="col" className="figure">
              Dry bulb, °C
            </th>
            <th scope="col" className="figure">
              Wet bulb, °C
            </th>
            <th scope="col" className="figure">
              RH, %
            </th>
            <th scope="col" className="figure">
              Supply, °C
            </th>
            <th scope="col" className="figure">
              {isIndex ? 'Index' : 'Room, °C'}
            </th>
            <th scope="col" className="figure">
              Limit, {list.limitUnit}
            </th>
            <th scope="col" className="figure">
              Short
            </th>
            <th scope="col">Why</th>
            <th scope="col" className="figure">
              Line
            </th>
          </tr>
        </thead>
        <tbody>
          {list.items.map((hour) => (
            <tr key={hour.slot}>
              <th scope="row" className="whitespace-nowrap">
                {endWords(hour.civilEnd)}
              </th>
              <td>
                <span className="flex items-center gap-1.5">
                  <ClassSwatch hourClass={hour.hourClass} id={`hour-${hour.slot}`} />
                  {classWords[hour.hourClass]}
                </span>
              </td>
              <td className="figure">{figure(hour.dryBulbC)}</td>
              <td className="figure">{figure(hour.wetBulbC)}</td>
              <td className="figure">{figure(hour.relativeHumidityPct, 0)}</td>
              <td className="figure">{figure(hour.supplyC)}</td>
              <td className="figure">{figure(isIndex ? hour.roomIndex : hour.roomC)}</td>
              <td className="figure">{figure(hour.limit)}</td>
              <td className="figure">{shortfallWords(hour, list)}</td>
              <td className="min-w-44">{hour.reason}</td>
              <td className="figure">{hour.line === null ? '–' : number(hour.line)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

interface PagesProps {
  readonly list: HourList;
  readonly onPage: (page: number) => void;
  readonly isBusy: boolean;
}

function Pages({ list: { page, pages }, onPage, isBusy }: PagesProps) {
  return (
    <nav aria-label="Pages of hours" className="flex items-center gap-3">
      <Button disabled={page <= 1} busy={isBusy} onClick={() => onPage(page - 1)}>
        Earlier
      </Button>
      <span>
        Page {number(page)} of {number(pages)}
      </span>
      <Button disabled={page >= pages} busy={isBusy} onClick={() => onPage(page + 1)}>
        Later
      </Button>
    </nav>
  );
}

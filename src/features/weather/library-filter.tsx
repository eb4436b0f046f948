import { useQuery } from '@tanstack/react-query';
import { type FormEvent, type ReactNode, useEffect, useId, useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { LibraryStatus } from '../../contract/weather-library.ts';
import { moment, number } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { StatusMark } from '../../ui/status-mark.tsx';
import { changedView, isFiltered, type LibraryView, librarySearch, withoutFilter } from './library-view.ts';
import { batchesQuery, stationChoiceQuery } from './weather-queries.ts';
import { formatWord, statusWord } from './weather-words.ts';

interface LibraryFilterProps {
  readonly view: LibraryView;
  readonly counts: Readonly<Record<LibraryStatus, number>>;
  readonly formats: readonly string[];
}

type Change = Parameters<typeof changedView>[1];

/** What the library is narrowed to. Each choice is a step that Back takes back. */
export function LibraryFilter({ view, counts, formats }: LibraryFilterProps) {
  const navigate = useNavigate();
  const change = (next: Change) => navigate(librarySearch(changedView(view, next)), { preventScrollReset: true });
  return (
    <section aria-label="Filter of the library" className="mb-3 grid grid-cols-[minmax(0,1fr)] gap-2.5">
      <StatusFilter view={view} counts={counts} />
      <div className="grid grid-cols-2 items-end gap-x-3 gap-y-2 sm:flex sm:flex-wrap">
        <TextFilter text={view.text ?? ''} onText={(text) => change({ text })} />
        <Choice label="Format" value={view.format} onChange={(format) => change({ format })}>
          {formats.map((format) => (
            <option key={format} value={format}>
              {formatWord(format)}
            </option>
          ))}
        </Choice>
        <Choice label="Kind of year" value={view.kind} onChange={(kind) => change({ kind })}>
          <option value="typical">Typical</option>
          <option value="actual">Actual</option>
          <option value="derived">Derived</option>
        </Choice>
        <BatchChoice value={view.batchId} onChange={(batchId) => change({ batchId })} />
        <StationChoice value={view.stationId} onChange={(stationId) => change({ stationId })} />
        {isFiltered(view) ? (
          <Link to={librarySearch(withoutFilter(view))} className="py-2 text-fine">
            Show every file
          </Link>
        ) : null}
      </div>
    </section>
  );
}

function StatusFilter({ view, counts }: Pick<LibraryFilterProps, 'view' | 'counts'>) {
  const shown = LibraryStatus.options.filter((status) => counts[status] > 0 || view.status === status);
  const { stopped: _stopped, ...statuses } = counts;
  const all = Object.values(statuses).reduce((sum, count) => sum + count, 0);
  const look =
    'inline-flex min-h-8 items-center gap-1.5 border-b-2 border-transparent text-ink no-underline hover:border-line aria-[current]:border-indigo aria-[current]:font-semibold';
  return (
    <nav aria-label="Status">
      <ul className="flex flex-wrap gap-x-5 gap-y-1">
        <li>
          <Link
            to={librarySearch(changedView(view, { status: undefined }))}
            aria-current={view.status === undefined ? 'true' : undefined}
            className={look}
          >
            Every status <span className="font-normal text-soft">{number(all)}</span>
          </Link>
        </li>
        {shown.map((status) => (
          <li key={status}>
            <Link
              to={librarySearch(changedView(view, { status }))}
              aria-current={view.status === status ? 'true' : undefined}
              className={look}
            >
              <StatusMark status={status === 'stopped' ? 'refused' : status} />
              {status === 'stopped' ? 'Stopped' : statusWord[status]}{' '}
              <span className="font-normal text-soft">{number(counts[status])}</span>
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}

const WAIT_MS = 400;
const input = 'min-h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body';

/** Searches a moment after the last letter, or at once on Enter; what Back brings shows in it, and typing is never overwritten. */
function TextFilter({ text, onText }: { text: string; onText: (text: string) => void }) {
  const id = useId();
  const [typed, setTyped] = useState(text);
  const [known, setKnown] = useState(text);
  const [sent, setSent] = useState(text);
  if (text !== known) {
    setKnown(text);
    if (text !== sent) {
      setTyped(text);
      setSent(text);
    }
  }
  const send = () => {
    const wanted = typed.trim();
    if (wanted === text) return;
    setSent(wanted);
    onText(wanted);
  };
  useEffect(() => {
    if (typed.trim() === text) return;
    const timer = setTimeout(send, WAIT_MS);
    return () => clearTimeout(timer);
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    send();
  };
  return (
    <search className="col-span-2 sm:w-60">
      <form onSubmit={submit}>
        <label htmlFor={id} className="block text-fine font-semibold text-soft">
          File, station or WMO number
        </label>
        <input
          id={id}
          type="search"
          maxLength={100}
          value={typed}
          onChange={({ currentTarget }) => setTyped(currentTarget.value)}
          className={input}
        />
      </form>
    </search>
  );
}

interface ChoiceProps {
  readonly label: string;
  readonly value: string | undefined;
  readonly onChange: (value: string | undefined) => void;
  readonly children: ReactNode;
}

function Choice({ label, value, onChange, children }: ChoiceProps) {
  const id = useId();
  return (
    <div className="min-w-0 sm:max-w-48">
      <label htmlFor={id} className="block text-fine font-semibold text-soft">
        {label}
      </label>
      <select
        id={id}
        value={value ?? ''}
        onChange={({ currentTarget }) => onChange(currentTarget.value || undefined)}
        className={input}
      >
        <option value="">Any</option>
        {children}
      </select>
    </div>
  );
}

type IdChoiceProps = Pick<ChoiceProps, 'value' | 'onChange'>;

function BatchChoice({ value, onChange }: IdChoiceProps) {
  const { teamId } = useTeam();
  const batches = useQuery(batchesQuery(teamId)).data?.items ?? [];
  if (batches.length === 0 && value === undefined) return null;
  return (
    <Choice label="Batch" value={value} onChange={onChange}>
      {batches.map(({ id, name, madeAt }) => (
        <option key={id} value={id}>
          {name}, {moment(madeAt)}
        </option>
      ))}
      {value && !batches.some(({ id }) => id === value) ? <option value={value}>An earlier batch</option> : null}
    </Choice>
  );
}

function StationChoice({ value, onChange }: IdChoiceProps) {
  const { teamId } = useTeam();
  const stations = useQuery(stationChoiceQuery(teamId)).data?.items ?? [];
  return (
    <Choice label="Station" value={value} onChange={onChange}>
      {stations.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
      {value && !stations.some(({ id }) => id === value) ? (
        <option value={value}>The station that was chosen</option>
      ) : null}
    </Choice>
  );
}

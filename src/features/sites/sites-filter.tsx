import { type FormEvent, useEffect, useId, useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { SiteFilter, type SitePage } from '../../contract/sites.ts';
import { number } from '../../lib/format.ts';
import { filterWord } from './site-words.ts';
import { isFiltered, type SitesView, sitesSearch, withoutFilter } from './sites-view.ts';

interface SitesFilterProps {
  readonly view: SitesView;
  readonly counts: SitePage['counts'];
}

/** What the table is narrowed to. Each choice is a step that Back takes back. */
export function SitesFilter({ view, counts }: SitesFilterProps) {
  const navigate = useNavigate();
  const shown = SiteFilter.options.filter((filter) => counts.filters[filter] > 0 || view.filter === filter);
  const { filter: _filter, ...rest } = view;
  const look =
    'inline-flex min-h-8 items-center gap-1.5 border-b-2 border-transparent text-ink no-underline hover:border-line aria-[current]:border-indigo aria-[current]:font-semibold';
  return (
    <section aria-label="Filter of the sites" className="mb-3 flex flex-wrap items-end gap-x-6 gap-y-2.5">
      <TextFilter
        key={view.text ?? ''}
        text={view.text ?? ''}
        onText={(text) => navigate(sitesSearch({ ...view, text: text === '' ? undefined : text, page: 1 }))}
      />
      <nav aria-label="Flags">
        <ul className="flex flex-wrap gap-x-5 gap-y-1">
          <li>
            <Link
              to={sitesSearch({ ...rest, page: 1 })}
              aria-current={view.filter === undefined ? 'true' : undefined}
              className={look}
            >
              Every site <span className="font-normal text-soft">{number(counts.all)}</span>
            </Link>
          </li>
          {shown.map((filter) => (
            <li key={filter}>
              <Link
                to={sitesSearch({ ...view, filter, page: 1 })}
                aria-current={view.filter === filter ? 'true' : undefined}
                className={look}
              >
                {filterWord[filter]} <span className="font-normal text-soft">{number(counts.filters[filter])}</span>
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      {isFiltered(view) ? (
        <Link to={sitesSearch(withoutFilter(view))} className="py-1.5 text-fine">
          Show every site
        </Link>
      ) : null}
    </section>
  );
}

const WAIT_MS = 400;

/** Searches a moment after the last letter, or at once on Enter. */
function TextFilter({ text, onText }: { text: string; onText: (text: string) => void }) {
  const id = useId();
  const [typed, setTyped] = useState(text);
  const send = () => {
    if (typed.trim() !== text) onText(typed.trim());
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
    <search className="w-60 max-sm:w-full">
      <form onSubmit={submit}>
        <label htmlFor={id} className="block text-fine font-semibold text-soft">
          Name, letters or station
        </label>
        <input
          id={id}
          type="search"
          maxLength={100}
          value={typed}
          onChange={({ currentTarget }) => setTyped(currentTarget.value)}
          className="min-h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
        />
      </form>
    </search>
  );
}

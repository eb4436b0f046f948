import { type UIEvent, useEffect, useMemo, useRef, useState } from 'react';
import { Input, ListBox, ListBoxItem, SearchField } from 'react-aria-components';
import { number, plural } from '../../lib/format.ts';
import type { PlaceKind } from '../../map/sheet-place.ts';
import type { MapPlace } from './map-places.ts';
import { filterByName, firstOfRanked, type RankedPlace, rankedPlaces } from './ranked-places.ts';
import { noScoreWords } from './run-words.ts';

interface PlaceListProps {
  readonly kind: PlaceKind;
  readonly places: readonly MapPlace[];
  readonly chosenId: string | null;
  readonly onChoose: (id: string) => void;
  /** What is typed over the list. */
  readonly typed: string;
  readonly onType: (typed: string) => void;
  /** The colour of a place on the map; null: hollow. */
  readonly colourOf: (id: string) => string | null;
  /** Scores are on their way: the order may change yet. */
  readonly isBehind: boolean;
}

/** Rows that stand in the list at first, and how many come when its end is near. */
const FIRST_ROWS = 60;
const MORE_ROWS = 200;
const NEAR_END_PX = 240;

/** Places by score: arrow keys go along the list, Enter chooses, the field above it looks for a name. */
export function PlaceList(props: PlaceListProps) {
  const { kind, places, chosenId, onChoose, typed, onType, colourOf, isBehind } = props;
  const ranked = useMemo(() => rankedPlaces(places), [places]);
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => bringIntoView(box.current, chosenId), [chosenId]);
  const found = useMemo(() => filterByName(ranked, typed), [ranked, typed]);
  // What is looked for anew begins at its first rows.
  const [read, setRead] = useState({ typed, count: FIRST_ROWS });
  const count = read.typed === typed ? read.count : FIRST_ROWS;
  const items = useMemo(
    () => firstOfRanked(found, { count, chosenId }).map((entry) => ({ ...entry, id: entry.place.id })),
    [found, count, chosenId],
  );
  const readOn = ({ currentTarget: { scrollHeight, scrollTop, clientHeight } }: UIEvent<HTMLElement>) => {
    if (count < found.length && scrollHeight - scrollTop - clientHeight < NEAR_END_PX)
      setRead({ typed, count: count + MORE_ROWS });
  };
  const list = (
    <ListBox
      onScroll={readOn}
      ref={box}
      aria-label={kind === 'site' ? 'Sites by score' : 'Stations by score'}
      items={items}
      dependencies={[colourOf]}
      selectionMode="single"
      disallowEmptySelection
      selectedKeys={chosenId === null ? [] : [chosenId]}
      onSelectionChange={(keys) => {
        const [key] = keys === 'all' ? [] : [...keys];
        if (key !== undefined) onChoose(String(key));
      }}
      renderEmptyState={() => <p className="py-2 text-soft">No {kind} has that name.</p>}
      className="-mx-2 min-h-0 flex-1 overflow-y-auto outline-none"
    >
      {(entry) => <PlaceRow entry={entry} colour={colourOf(entry.place.id)} />}
    </ListBox>
  );
  return (
    <section
      aria-label={kind === 'site' ? 'Ranking of sites' : 'Ranking of stations'}
      aria-busy={isBehind}
      className="flex min-h-0 flex-1 flex-col"
    >
      <SearchField aria-label={`Find a ${kind} by name`} value={typed} onChange={onType} className="mb-1.5">
        <Input
          placeholder="Find by name"
          className="h-8 w-full rounded-md border border-[#b9af9b] bg-paper/70 px-2 text-body [&::-webkit-search-cancel-button]:hidden"
        />
      </SearchField>
      <p role="status" className="sr-only">
        {typed === '' ? '' : `${plural(found.length, kind)} found`}
      </p>
      {list}
      {count < found.length ? (
        <p className="pt-1 text-fine text-soft">
          {`The first ${number(count)} of ${number(found.length)}; more come as you scroll.`}
        </p>
      ) : null}
    </section>
  );
}

/** Scrolls the list alone, never the page, so that a place chosen on the map is seen in the ranking. */
function bringIntoView(box: HTMLElement | null, id: string | null): void {
  const row = id === null ? null : box?.querySelector(`[data-key="${CSS.escape(id)}"]`);
  if (!box || !row) return;
  const view = box.getBoundingClientRect();
  const place = row.getBoundingClientRect();
  if (place.top < view.top) box.scrollTop -= view.top - place.top;
  else if (place.bottom > view.bottom) box.scrollTop += place.bottom - view.bottom;
}

function PlaceRow({ entry: { place, rank }, colour }: { entry: RankedPlace; colour: string | null }) {
  const note = noScoreWords(place);
  return (
    <ListBoxItem
      id={place.id}
      textValue={place.name}
      className="mx-2 grid min-h-8 cursor-pointer grid-cols-[1.5rem_minmax(0,1fr)_auto_1.5rem_0.75rem] items-center gap-x-1.5 border-t border-line px-1 last:border-b hover:bg-paper/80 data-focus-visible:outline-2 data-focus-visible:-outline-offset-2 data-selected:bg-shade"
    >
      <span className="text-fine text-soft">{place.letters ?? rank ?? '–'}</span>
      <span className="min-w-0" title={note === null ? undefined : `${place.name}: ${note}`}>
        <span className="block truncate">
          {place.name}
          {note === null ? null : <span className="text-fine text-soft">, {note.toLowerCase()}</span>}
        </span>
      </span>
      <Chip colour={colour} isHatched={place.grade === 'D'} />
      <span className="text-right font-semibold">{place.score ?? '–'}</span>
      <span className="text-center text-soft" title={`Grade ${place.grade}`}>
        <span className="sr-only">Grade </span>
        {place.grade}
      </span>
    </ListBoxItem>
  );
}

/** The colour of the mark; hatched in grade D, dashed where there is none. */
function Chip({ colour, isHatched }: { colour: string | null; isHatched: boolean }) {
  const hatching = 'repeating-linear-gradient(135deg, rgb(34 48 47 / 0.75) 0 1px, transparent 1px 3.5px)';
  return (
    <span
      aria-hidden="true"
      className={`size-3 border border-ink/50 ${colour === null ? 'border-dashed' : ''}`}
      style={{
        ...(colour === null ? {} : { backgroundColor: colour }),
        ...(isHatched ? { backgroundImage: hatching } : {}),
      }}
    />
  );
}

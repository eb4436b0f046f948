import { useEffect, useMemo, useRef, useState } from 'react';
import { Input, ListBox, ListBoxItem, SearchField } from 'react-aria-components';
import { rampColour } from '../../charts/ramp.ts';
import type { MapStation } from '../../contract/programme-map.ts';
import { plural } from '../../lib/format.ts';
import { filterByName, type RankedStation, rankedStations } from './ranked-stations.ts';
import { noScoreWords } from './run-words.ts';

interface StationListProps {
  readonly stations: readonly MapStation[];
  readonly chosenId: string | null;
  readonly onChoose: (stationId: string) => void;
}

/** Stations by score: arrow keys go along the list, Enter chooses, the field above it looks for a name. */
export function StationList({ stations, chosenId, onChoose }: StationListProps) {
  const [typed, setTyped] = useState('');
  const ranked = useMemo(() => rankedStations(stations), [stations]);
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => bringIntoView(box.current, chosenId), [chosenId]);
  const found = useMemo(() => filterByName(ranked, typed), [ranked, typed]);
  return (
    <section aria-labelledby="stations-by-score" className="flex min-h-0 flex-col">
      <h2 id="stations-by-score" className="mb-1.5 font-sans text-fine font-semibold text-soft">
        Stations by score
      </h2>
      <SearchField aria-label="Find a station by name" value={typed} onChange={setTyped} className="mb-1.5">
        <Input
          placeholder="Find by name"
          className="h-8 w-full rounded-md border border-[#b9af9b] bg-paper/70 px-2 text-body [&::-webkit-search-cancel-button]:hidden"
        />
      </SearchField>
      <p role="status" className="sr-only">
        {typed === '' ? '' : `${plural(found.length, 'station')} found`}
      </p>
      <ListBox
        ref={box}
        aria-labelledby="stations-by-score"
        items={found.map((entry) => ({ ...entry, id: entry.station.id }))}
        selectionMode="single"
        disallowEmptySelection
        selectedKeys={chosenId === null ? [] : [chosenId]}
        onSelectionChange={(keys) => {
          const [key] = keys === 'all' ? [] : [...keys];
          if (key !== undefined) onChoose(String(key));
        }}
        renderEmptyState={() => <p className="py-2 text-soft">No station has that name.</p>}
        className="-mx-2 min-h-0 flex-1 overflow-y-auto outline-none"
      >
        {(entry) => <StationRow entry={entry} />}
      </ListBox>
    </section>
  );
}

/** Scrolls the list alone, never the page, so that a station chosen on the map is seen in the ranking. */
function bringIntoView(box: HTMLElement | null, stationId: string | null): void {
  const row = stationId === null ? null : box?.querySelector(`[data-key="${CSS.escape(stationId)}"]`);
  if (!box || !row) return;
  const view = box.getBoundingClientRect();
  const place = row.getBoundingClientRect();
  if (place.top < view.top) box.scrollTop -= view.top - place.top;
  else if (place.bottom > view.bottom) box.scrollTop += place.bottom - view.bottom;
}

function StationRow({ entry: { station, rank } }: { entry: RankedStation }) {
  const note = noScoreWords(station);
  return (
    <ListBoxItem
      id={station.id}
      textValue={station.name}
      className="mx-2 grid min-h-8 cursor-pointer grid-cols-[1.25rem_minmax(0,1fr)_auto_1.5rem_0.75rem] items-center gap-x-1.5 border-t border-line px-1 last:border-b hover:bg-paper/80 data-focus-visible:outline-2 data-focus-visible:-outline-offset-2 data-selected:bg-shade"
    >
      <span className="text-fine text-soft">{rank ?? '–'}</span>
      <span className="min-w-0">
        <span className="block truncate">{station.name}</span>
        {note ? <span className="block truncate text-fine text-soft">{note}</span> : null}
      </span>
      <ScoreChip score={station.score} />
      <span className="text-right font-semibold">{station.score ?? '–'}</span>
      <span className="text-center text-soft" title={`Grade ${station.grade}`}>
        <span className="sr-only">Grade </span>
        {station.grade}
      </span>
    </ListBoxItem>
  );
}

function ScoreChip({ score }: { score: number | null }) {
  return (
    <span
      aria-hidden="true"
      className={`size-3 border border-ink/50 ${score === null ? 'border-dashed' : ''}`}
      style={score === null ? {} : { backgroundColor: rampColour(score / 100) }}
    />
  );
}

import { type KeyboardEvent, useId, useMemo, useState } from 'react';
import type { MapStation } from '../contract/programme-map.ts';
import { stationSentence } from './station-features.ts';

/** Neighbours of the cursor that are put into the page on either side; thousands of hidden lines would slow it. */
const WINDOW = 25;

type StationKeysProps = {
  readonly stations: readonly MapStation[];
  readonly chosenId: string | null;
  readonly onChoose: (id: string) => void;
  /** The keyboard's cursor came to a station, or left the list (null). */
  readonly onPoint: (station: MapStation | null) => void;
};

/**
 * The stations as a list for the keyboard and for readers who do not see the map: arrow keys, Home, End and the first
 * letter of a name move a cursor that the map shows; Enter or the space bar chooses.
 */
export function StationKeys({ stations, chosenId, onChoose, onPoint }: StationKeysProps) {
  const [cursor, setCursor] = useState(0);
  const listId = useId();
  const sorted = useMemo(
    () => [...stations].sort((a, b) => a.name.localeCompare(b.name, 'en') || (a.id < b.id ? -1 : 1)),
    [stations],
  );
  const at = Math.min(cursor, sorted.length - 1);
  const from = Math.max(0, at - WINDOW);

  const move = (to: number) => {
    const held = Math.min(sorted.length - 1, Math.max(0, to));
    setCursor(held);
    onPoint(sorted[held] ?? null);
  };
  const press = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const station = sorted[at];
    const target = targetOf(event.key, { at, sorted });
    if (target !== null) move(target);
    else if ((event.key === 'Enter' || event.key === ' ') && station !== undefined) onChoose(station.id);
    else return;
    event.preventDefault();
  };
  if (sorted.length === 0) return null;
  return (
    <>
      <div
        role="listbox"
        tabIndex={0}
        aria-label="Stations on the map"
        aria-activedescendant={`${listId}-${at}`}
        aria-describedby={`${listId}-help`}
        onKeyDown={press}
        onFocus={() => move(Math.max(0, chosenId === null ? at : sorted.findIndex(({ id }) => id === chosenId)))}
        onBlur={() => onPoint(null)}
        className="peer absolute inset-0 pointer-events-none focus-visible:-outline-offset-4"
      >
        {sorted.slice(from, at + WINDOW + 1).map((station, index) => (
          <div
            key={station.id}
            id={`${listId}-${from + index}`}
            role="option"
            tabIndex={-1}
            aria-selected={station.id === chosenId}
            aria-posinset={from + index + 1}
            aria-setsize={sorted.length}
            className="sr-only"
          >
            {stationSentence(station)}
          </div>
        ))}
      </div>
      <p
        id={`${listId}-help`}
        className="pointer-events-none absolute top-2 left-1/2 -translate-x-1/2 hidden peer-focus-visible:block bg-paper border border-line px-2 py-1 text-fine whitespace-nowrap"
      >
        Arrow keys go from station to station, Enter chooses
      </p>
    </>
  );
}

function targetOf(key: string, { at, sorted }: { at: number; sorted: readonly MapStation[] }): number | null {
  if (key === 'ArrowDown' || key === 'ArrowRight') return at + 1;
  if (key === 'ArrowUp' || key === 'ArrowLeft') return at - 1;
  if (key === 'Home') return 0;
  if (key === 'End') return sorted.length - 1;
  if (key.length !== 1 || key === ' ') return null;
  const starts = (station: MapStation) => station.name.toLowerCase().startsWith(key.toLowerCase());
  const after = sorted.findIndex((station, index) => index > at && starts(station));
  const found = after === -1 ? sorted.findIndex(starts) : after;
  return found === -1 ? null : found;
}

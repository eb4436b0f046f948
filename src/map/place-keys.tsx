import { type KeyboardEvent, useId, useMemo, useState } from 'react';
import type { SheetPlace } from './sheet-place.ts';

/** Neighbours of the cursor that are put into the page on either side; thousands of hidden lines would slow it. */
const WINDOW = 25;
/** One for all: ten thousand names are compared many times over. */
const collator = new Intl.Collator('en');

type PlaceKeysProps = {
  /** "Stations on the map". */
  readonly label: string;
  readonly places: readonly SheetPlace[];
  /** What a reader who does not see the map is told of a place. */
  readonly sentence: (place: SheetPlace) => string;
  readonly chosenId: string | null;
  readonly onChoose: (id: string) => void;
  /** The keyboard's cursor came to a place, or left the list (null). */
  readonly onPoint: (place: SheetPlace | null) => void;
};

/**
 * The places of one kind as a list for the keyboard and for readers who do not see the map: arrow keys, Home, End and the first
 * letter of a name move a cursor that the map shows; Enter or the space bar chooses.
 */
export function PlaceKeys({ label, places, sentence, chosenId, onChoose, onPoint }: PlaceKeysProps) {
  const [cursor, setCursor] = useState(0);
  const listId = useId();
  const sorted = useMemo(
    () => [...places].sort((a, b) => collator.compare(a.name, b.name) || (a.id < b.id ? -1 : 1)),
    [places],
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
    const place = sorted[at];
    const target = targetOf(event.key, { at, sorted });
    if (target !== null) move(target);
    else if ((event.key === 'Enter' || event.key === ' ') && place !== undefined) onChoose(place.id);
    else return;
    event.preventDefault();
  };
  if (sorted.length === 0) return null;
  return (
    <>
      <div
        role="listbox"
        tabIndex={0}
        aria-label={label}
        aria-activedescendant={`${listId}-${at}`}
        aria-describedby={`${listId}-help`}
        onKeyDown={press}
        onFocus={() => move(Math.max(0, chosenId === null ? at : sorted.findIndex(({ id }) => id === chosenId)))}
        onBlur={() => onPoint(null)}
        className="peer absolute inset-0 pointer-events-none focus-visible:-outline-offset-4"
      >
        {sorted.slice(from, at + WINDOW + 1).map((place, index) => (
          <div
            key={place.id}
            id={`${listId}-${from + index}`}
            role="option"
            tabIndex={-1}
            aria-selected={place.id === chosenId}
            aria-posinset={from + index + 1}
            aria-setsize={sorted.length}
            className="sr-only"
          >
            {sentence(place)}
          </div>
        ))}
      </div>
      <p
        id={`${listId}-help`}
        className="pointer-events-none absolute top-2 left-1/2 -translate-x-1/2 hidden peer-focus-visible:block bg-paper border border-line px-2 py-1 text-fine whitespace-nowrap"
      >
        {label}: arrow keys go from one to the next, Enter chooses
      </p>
    </>
  );
}

function targetOf(key: string, { at, sorted }: { at: number; sorted: readonly SheetPlace[] }): number | null {
  if (key === 'ArrowDown' || key === 'ArrowRight') return at + 1;
  if (key === 'ArrowUp' || key === 'ArrowLeft') return at - 1;
  if (key === 'Home') return 0;
  if (key === 'End') return sorted.length - 1;
  if (key.length !== 1 || key === ' ') return null;
  const starts = (place: SheetPlace) => place.name.toLowerCase().startsWith(key.toLowerCase());
  const after = sorted.findIndex((place, index) => index > at && starts(place));
  const found = after === -1 ? sorted.findIndex(starts) : after;
  return found === -1 ? null : found;
}

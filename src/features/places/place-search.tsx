import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { ComboBox, Input, Label, ListBox, ListBoxItem, Popover } from 'react-aria-components';
import { findPlaces } from '../../contract/places.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { foundSuggestions, isName, readTyped, type Suggestion } from './place-suggestions.ts';

interface PlaceSearchProps {
  readonly teamId: string;
  readonly onFind: (found: Suggestion) => void;
}

/** A name is looked up once typing pauses for so long. */
const PAUSE_MS = 180;

/** One box for names of places, stations and sites, and for coordinates in any usual form. */
export function PlaceSearch({ teamId, onFind }: PlaceSearchProps) {
  const [text, setText] = useState('');
  // What is chosen closes the list; what was typed stays in the box.
  const [chosenKey, setChosenKey] = useState<string | null>(null);
  const paused = usePaused(text);
  const typed = readTyped(text);
  const asked = apiQuery(findPlaces, { params: { teamId }, query: { text: paused.trim() } });
  const found = useQuery({ ...asked, enabled: isName(paused), placeholderData: keepPreviousData });
  const names = isName(text) && found.data !== undefined ? foundSuggestions(found.data.places) : [];
  const suggestions = typed.suggestions.length > 0 ? typed.suggestions : names;
  const isSearching = isName(text) && (found.isFetching || paused !== text);
  return (
    <ComboBox
      items={suggestions}
      inputValue={text}
      onInputChange={(typedText) => {
        setText(typedText);
        setChosenKey(null);
      }}
      selectedKey={chosenKey}
      onSelectionChange={(key) => {
        const chosen = suggestions.find((each) => each.key === key);
        setChosenKey(chosen?.key ?? null);
        if (chosen !== undefined) onFind(chosen);
      }}
      allowsEmptyCollection
      allowsCustomValue
      menuTrigger="input"
      isInvalid={typed.problem !== null}
      className="block shrink-0"
    >
      <Label className="sr-only">Find a place or a position</Label>
      <Input
        placeholder="Find a place or a position"
        className="h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 data-invalid:border-madder"
      />
      <Popover className="w-(--trigger-width) min-w-64 rounded-md border border-line bg-paper py-1 shadow-float">
        {typed.problem === null ? null : (
          <p role="alert" className="px-3 py-1.5 text-fine font-medium text-madder">
            {typed.problem}
          </p>
        )}
        <ListBox<Suggestion>
          className="max-h-80 overflow-y-auto outline-none"
          renderEmptyState={() => (
            <p className="px-3 py-1.5 text-fine text-soft empty:hidden">
              {typed.problem === null ? emptyWords({ text, isSearching }) : null}
            </p>
          )}
        >
          {(suggestion) => (
            <ListBoxItem
              id={suggestion.key}
              textValue={suggestion.name}
              className="flex min-h-9 cursor-pointer items-baseline justify-between gap-4 px-3 py-1.5 outline-none data-focused:bg-shade"
            >
              <span>{suggestion.name}</span>
              <span className="text-right text-fine text-soft">{suggestion.note}</span>
            </ListBoxItem>
          )}
        </ListBox>
      </Popover>
    </ComboBox>
  );
}

function emptyWords({ text, isSearching }: { text: string; isSearching: boolean }): string {
  if (text.trim().length < 2) return 'Type two letters, or a position such as -24.65, 25.91.';
  return isSearching ? 'Searching.' : 'No such place in the gazetteer, and no such station or site.';
}

function usePaused(text: string): string {
  const [paused, setPaused] = useState(text);
  useEffect(() => {
    const timer = setTimeout(() => setPaused(text), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text]);
  return paused;
}

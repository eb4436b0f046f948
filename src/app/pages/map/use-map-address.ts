import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { changedSearch, type MapAddress, readMapAddress } from './map-address.ts';

interface ChangeOptions {
  /** A choice makes a step that Back undoes; a movement does not. */
  readonly replace?: boolean;
}

export type ChangeAddress = (changes: Partial<MapAddress>, options?: ChangeOptions) => void;

/** The state of the map as its address has it, and the way to change it. */
export function useMapAddress(): [MapAddress, ChangeAddress] {
  const [search, setSearch] = useSearchParams();
  const address = useMemo(() => readMapAddress(search), [search]);
  const change = useCallback<ChangeAddress>(
    // The address itself, not its last rendering: two changes in a row are two changes.
    (changes, { replace = false } = {}) =>
      setSearch(changedSearch(new URLSearchParams(window.location.search), changes), { replace }),
    [setSearch],
  );
  return [address, change];
}

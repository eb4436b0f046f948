import { useCallback, useEffect, useMemo, useRef } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useSame } from '../../../lib/use-same.ts';
import { changedSearch, type MapAddress, readMapAddress } from './map-address.ts';

interface ChangeOptions {
  /** A choice makes a step that Back undoes; a movement does not. */
  readonly replace?: boolean;
}

export type ChangeAddress = (changes: Partial<MapAddress>, options?: ChangeOptions) => void;

/** The state of the map as its address has it, and the way to change it. */
export function useMapAddress(): [MapAddress, ChangeAddress] {
  const [search, setSearch] = useSearchParams();
  const address = useParts(useMemo(() => readMapAddress(search), [search]));
  const latest = useRef(setSearch);
  useEffect(() => {
    latest.current = setSearch;
  });
  const change = useCallback<ChangeAddress>((changes, { replace = false } = {}) => {
    // The address itself, not its last rendering: two changes in a row are two changes.
    latest.current(changedSearch(new URLSearchParams(window.location.search), changes), { replace });
  }, []);
  return [address, change];
}

/** Parts that say the same stay the same: a slider that changes the draft draws no map anew. */
function useParts(address: MapAddress): MapAddress {
  const place = useSame(address.place);
  const point = useSame(address.point);
  const layer = useSame(address.layer);
  const camera = useSame(address.camera);
  return useMemo(() => ({ ...address, place, point, layer, camera }), [address, place, point, layer, camera]);
}

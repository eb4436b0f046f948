import { memo, useCallback } from 'react';
import type { MapPlaces } from '../../../features/runs/map-places.ts';
import { PlaceList } from '../../../features/runs/place-list.tsx';
import { number } from '../../../lib/format.ts';
import type { MarkInks, PlaceKind, PlaceRef } from '../../../map/sheet-place.ts';
import type { MapAddress } from './map-address.ts';
import type { ChangeAddress } from './use-map-address.ts';

interface RankingProps {
  readonly places: MapPlaces;
  readonly address: MapAddress;
  readonly changeAddress: ChangeAddress;
  readonly chosen: PlaceRef | null;
  readonly onChoose: (place: PlaceRef) => void;
  readonly inks: MarkInks;
  readonly isBehind: boolean;
}

/** Sites by score, or stations where the programme has no sites yet; either can be asked for. */
export const Ranking = memo(function Ranking({
  places,
  address,
  changeAddress,
  chosen,
  onChoose,
  inks,
  isBehind,
}: RankingProps) {
  const { stations, sites } = places;
  // Unless one of them was asked for, the list is the one that holds the chosen place.
  const kind: PlaceKind = sites.length === 0 ? 'station' : (address.list ?? chosen?.kind ?? 'site');
  const colourOf = useCallback((id: string) => inks.get(id)?.colour ?? null, [inks]);
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <div className="mb-1.5 flex items-baseline gap-3">
        {(sites.length === 0 ? (['station'] as const) : (['site', 'station'] as const)).map((each) => (
          <Heading
            key={each}
            kind={each}
            count={each === 'site' ? sites.length : stations.length}
            isShown={each === kind}
            onShow={sites.length === 0 ? null : () => changeAddress({ list: each })}
          />
        ))}
      </div>
      <PlaceList
        key={kind}
        kind={kind}
        places={kind === 'site' ? sites : stations}
        chosenId={chosen?.kind === kind ? chosen.id : null}
        onChoose={(id) => onChoose({ kind, id })}
        typed={address.find}
        onType={(find) => changeAddress({ find }, { replace: true })}
        colourOf={colourOf}
        isBehind={isBehind}
      />
    </div>
  );
});

interface HeadingProps {
  readonly kind: PlaceKind;
  readonly count: number;
  readonly isShown: boolean;
  /** null: there is nothing else to show. */
  readonly onShow: (() => void) | null;
}

function Heading({ kind, count, isShown, onShow }: HeadingProps) {
  const words = isShown
    ? `${kind === 'site' ? 'Sites' : 'Stations'} by score`
    : `${kind === 'site' ? 'Sites' : 'Stations'}, ${number(count)}`;
  if (isShown || onShow === null) {
    return <h2 className="font-sans text-fine font-semibold text-soft">{words}</h2>;
  }
  return (
    <button
      type="button"
      onClick={onShow}
      className="min-h-6 text-fine text-indigo underline decoration-indigo/40 underline-offset-4"
    >
      {words}
    </button>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Place } from '../../../contract/place.ts';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import { briefsQuery } from '../../../features/briefs/brief-queries.ts';
import type { PlaceRef } from '../../../map/sheet-place.ts';
import { Button } from '../../../ui/button.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { type CompareAddress, type CompareKind, MOST_COMPARED, MOST_YEARS } from './compare-address.ts';
import { nameOfYear } from './use-compare-columns.ts';

const KINDS: readonly { readonly kind: CompareKind; readonly words: string }[] = [
  { kind: 'places', words: 'Places under one brief' },
  { kind: 'briefs', words: 'One place under several briefs' },
  { kind: 'years', words: 'Two weather years of one place' },
];

interface ChoiceProps {
  readonly ids: { readonly teamId: string; readonly programmeId: string };
  readonly map: ProgrammeMap;
  readonly address: CompareAddress;
  readonly kind: CompareKind;
  /** Where one place stands, with its years. */
  readonly place: Place | null;
  readonly onChange: (address: CompareAddress) => void;
}

/** What is compared; every choice is in the address. */
export function CompareChoice(props: ChoiceProps) {
  const { ids, address, kind, place, onChange } = props;
  const briefs = useQuery(briefsQuery(ids));
  const items = briefs.data?.items ?? [];
  const turned = (next: CompareKind): CompareAddress => {
    const one = address.places.slice(0, 1);
    const [first] = address.briefs;
    const brief = first === undefined ? [] : [first];
    if (next === 'places') return { places: address.places, briefs: brief, years: [] };
    if (next === 'years') {
      const years = (place?.judgedYears ?? []).slice(0, MOST_YEARS).map(({ weatherFileId }) => weatherFileId);
      return { places: one, briefs: brief, years };
    }
    const others = items.map(({ briefId }) => briefId).filter((id) => id !== first);
    return { places: one, briefs: [...brief, ...others].slice(0, 2), years: [] };
  };
  const possible = {
    places: true,
    briefs: address.places.length > 0 && items.length > 1,
    years: (place?.judgedYears.length ?? 0) > 1,
  };
  return (
    <div className="mb-6 grid gap-3 border-b border-line pb-4">
      <fieldset className="flex flex-wrap gap-x-6 gap-y-1">
        <legend className="sr-only">What is compared</legend>
        {KINDS.map((each) => (
          <label
            key={each.kind}
            className={`flex min-h-6 items-center gap-2 ${possible[each.kind] ? '' : 'text-soft'}`}
          >
            <input
              type="radio"
              name="compare-kind"
              checked={kind === each.kind}
              disabled={!possible[each.kind]}
              onChange={() => onChange(turned(each.kind))}
            />
            {each.words}
          </label>
        ))}
      </fieldset>
      <Briefs {...props} items={items} />
      {kind === 'places' || address.places.length === 0 ? <AddPlace {...props} /> : null}
      {kind === 'years' && place !== null ? <Years address={address} place={place} onChange={onChange} /> : null}
    </div>
  );
}

function Briefs({
  address,
  kind,
  items,
  onChange,
}: Pick<ChoiceProps, 'address' | 'kind' | 'onChange'> & { items: readonly { briefId: string; name: string }[] }) {
  if (items.length < 2) return null;
  if (kind !== 'briefs') {
    return (
      <label className="flex flex-wrap items-center gap-2">
        Brief
        <select
          className="min-h-9 max-w-full rounded-md border border-[#918a78] bg-paper px-2"
          value={address.briefs[0] ?? ''}
          onChange={(event) =>
            onChange({ ...address, briefs: event.currentTarget.value ? [event.currentTarget.value] : [] })
          }
        >
          <option value="">the one saved last</option>
          {items.map(({ briefId, name }) => (
            <option key={briefId} value={briefId}>
              {name}
            </option>
          ))}
        </select>
      </label>
    );
  }
  const toggled = (briefId: string): readonly string[] =>
    address.briefs.includes(briefId)
      ? address.briefs.filter((each) => each !== briefId)
      : [...address.briefs, briefId].slice(0, MOST_COMPARED);
  return (
    <fieldset className="flex flex-wrap gap-x-5 gap-y-1">
      <legend className="float-left mr-4">Briefs</legend>
      {items.map(({ briefId, name }) => (
        <label key={briefId} className="flex min-h-6 items-center gap-2">
          <input
            type="checkbox"
            checked={address.briefs.includes(briefId)}
            disabled={address.briefs.length >= MOST_COMPARED && !address.briefs.includes(briefId)}
            onChange={() => onChange({ ...address, briefs: toggled(briefId) })}
          />
          {name}
        </label>
      ))}
    </fieldset>
  );
}

function Years({
  address,
  place,
  onChange,
}: {
  address: CompareAddress;
  place: Place;
  onChange: ChoiceProps['onChange'];
}) {
  const choose = (at: number, fileId: string): void => {
    const years = [...address.years];
    years[at] = fileId;
    onChange({ ...address, years });
  };
  return (
    <div className="flex flex-wrap gap-x-5 gap-y-2">
      {[0, 1].map((at) => (
        <label key={at} className="flex flex-wrap items-center gap-2">
          {at === 0 ? 'Year' : 'beside'}
          <select
            className="min-h-9 max-w-full rounded-md border border-[#918a78] bg-paper px-2"
            value={address.years[at] ?? ''}
            onChange={(event) => choose(at, event.currentTarget.value)}
          >
            {address.years[at] === undefined ? <option value="">choose a year</option> : null}
            {place.judgedYears.map((year) => (
              <option key={year.runId} value={year.weatherFileId}>
                {nameOfYear(year)}
              </option>
            ))}
          </select>
        </label>
      ))}
    </div>
  );
}

const MOST_FOUND = 8;

interface Found extends PlaceRef {
  readonly name: string;
  readonly words: string;
}

function AddPlace({ map, address, onChange }: Pick<ChoiceProps, 'map' | 'address' | 'onChange'>) {
  const [typed, setTyped] = useState('');
  if (address.places.length >= MOST_COMPARED)
    return <p className="text-soft">{MOST_COMPARED} places stand side by side; take one out to add another.</p>;
  const found = findPlaces(map, { typed, taken: new Set(address.places.map(({ id }) => id)) });
  return (
    <div className="max-w-[34rem]">
      <TextField
        label="Add a place by its name"
        value={typed}
        onChange={setTyped}
        autoComplete="off"
        {...(address.places.length === 0 ? { hint: 'Stations and sites of this programme, up to six.' } : {})}
      />
      {found.length > 0 ? (
        <ul className="mt-1 grid gap-x-4 sm:grid-cols-2">
          {found.map(({ kind, id, name, words }) => (
            <li key={id}>
              <Button
                look="quiet"
                onClick={() => {
                  setTyped('');
                  onChange({ ...address, places: [...address.places, { kind, id }] });
                }}
              >
                {name}
              </Button>{' '}
              <span className="text-fine text-soft">{words}</span>
            </li>
          ))}
        </ul>
      ) : null}
      {typed.trim() !== '' && found.length === 0 ? (
        <p className="mt-1 text-soft">No other place has this name.</p>
      ) : null}
    </div>
  );
}

/** Sites first, those with the better score before the others; without a word typed the best of the programme. */
function findPlaces(
  map: ProgrammeMap,
  { typed, taken }: { typed: string; taken: ReadonlySet<string> },
): readonly Found[] {
  const words = typed.toLocaleLowerCase('en').split(/\s+/).filter(Boolean);
  const fits = ({ id, name }: { id: string; name: string }): boolean =>
    !taken.has(id) && words.every((word) => name.toLocaleLowerCase('en').includes(word));
  const byScore = (one: { score: number | null }, other: { score: number | null }): number =>
    (other.score ?? -1) - (one.score ?? -1);
  const sites = map.sites.filter(fits).toSorted(byScore);
  const stations = map.stations.filter(fits).toSorted(byScore);
  return [
    ...sites.map(({ id, name, score }) => ({ kind: 'site' as const, id, name, words: scoreWords('site', score) })),
    ...stations.map(({ id, name, score }) => ({
      kind: 'station' as const,
      id,
      name,
      words: scoreWords('station', score),
    })),
  ].slice(0, MOST_FOUND);
}

function scoreWords(kind: PlaceRef['kind'], score: number | null): string {
  return score === null ? `${kind}, no score` : `${kind}, score ${score}`;
}

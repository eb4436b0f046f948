import { useQueries } from '@tanstack/react-query';
import type { Place } from '../../../contract/place.ts';
import type { RunRecord, ShownRun } from '../../../contract/runs.ts';
import { placeQuery, runQuery } from '../../../features/runs/run-queries.ts';
import { nameOfPlace, placeYearWords } from '../../../features/runs/run-words.ts';
import type { PlaceRef } from '../../../map/sheet-place.ts';
import { type CompareAddress, kindOfCompare } from './compare-address.ts';

/** What stands beside the others. */
export interface CompareColumn {
  readonly key: string;
  readonly title: string;
  /** What the others share, or where the place is. */
  readonly note: string;
  readonly place: Place;
  /** With the score that the column is compared by: the place's, or the year's own. */
  readonly shown: ShownRun | null;
  readonly run: RunRecord | null;
  readonly yearWords: string;
  /** The weather file of the year that is shown; null: there is none. */
  readonly fileId: string | null;
  /** To take it out of the comparison. */
  readonly remove: CompareAddress;
}

export interface CompareColumns {
  readonly columns: readonly CompareColumn[];
  readonly isPending: boolean;
  readonly error: unknown;
}

interface Asked {
  readonly place: PlaceRef;
  readonly briefId: string | null;
  readonly fileId: string | null;
}

/** Fetches what the address names, in its order. */
export function useCompareColumns(
  ids: { teamId: string; programmeId: string },
  address: CompareAddress,
): CompareColumns {
  const asked = columnsAsked(address);
  const places = useQueries({
    queries: asked.map(({ place, briefId }) => {
      // Another place's figures never stand in for one that is still to come.
      const { placeholderData: _another, ...query } = placeQuery({ ...ids, briefId }, place);
      return query;
    }),
  });
  const runIds = asked.map(({ fileId }, at) => runIdOf(places[at]?.data, fileId));
  const runs = useQueries({
    queries: runIds.map((runId) => ({ ...runQuery(ids.teamId, runId ?? ''), enabled: runId !== null })),
  });
  const columns = asked.flatMap((each, at) => {
    const place = places[at]?.data;
    return place === undefined ? [] : [columnOf(each, { place, run: runs[at]?.data ?? null, address })];
  });
  return {
    columns,
    isPending: places.some(({ isPending }) => isPending),
    error: [...places, ...runs].find(({ isError }) => isError)?.error ?? null,
  };
}

function columnsAsked(address: CompareAddress): readonly Asked[] {
  const { places, briefs, years } = address;
  const [first] = places;
  const briefId = briefs[0] ?? null;
  if (first === undefined) return [];
  switch (kindOfCompare(address)) {
    case 'years':
      return years.map((fileId) => ({ place: first, briefId, fileId }));
    case 'briefs':
      return briefs.map((each) => ({ place: first, briefId: each, fileId: null }));
    case 'places':
      return places.map((place) => ({ place, briefId, fileId: null }));
  }
}

function runIdOf(place: Place | undefined, fileId: string | null): string | null {
  if (place === undefined) return null;
  if (fileId === null) return place.shown?.runId ?? null;
  return place.judgedYears.find(({ weatherFileId }) => weatherFileId === fileId)?.runId ?? null;
}

function columnOf(asked: Asked, on: { place: Place; run: RunRecord | null; address: CompareAddress }): CompareColumn {
  const { place, run, address } = on;
  const name = nameOfPlace(place);
  const brief = `${place.brief.name}, version ${place.brief.version}`;
  const year =
    asked.fileId === null ? place.years[0] : place.judgedYears.find((each) => each.weatherFileId === asked.fileId);
  const yearWords = year === undefined ? 'no weather year' : nameOfYear(year);
  const titles = {
    places: { title: name, note: whereWords(place) },
    briefs: { title: place.brief.name, note: `version ${place.brief.version}` },
    years: { title: yearWords, note: `${name}, ${brief}` },
  }[kindOfCompare(address)];
  return {
    ...titles,
    key: `${asked.place.kind}:${asked.place.id} ${asked.briefId} ${asked.fileId}`,
    place,
    shown: asked.fileId === null ? place.shown : (run?.shown ?? null),
    run,
    fileId: asked.fileId ?? place.judgedYears.find(({ runId }) => runId === place.shown?.runId)?.weatherFileId ?? null,
    yearWords: asked.fileId === null && place.years.length > 1 ? `${place.years.length} years` : yearWords,
    remove: without(address, asked),
  };
}

export function nameOfYear(
  year: Pick<Place['judgedYears'][number], 'kind' | 'year'> & { name?: string | null },
): string {
  return year.kind === 'derived' ? (year.name ?? 'derived year') : placeYearWords(year);
}

function whereWords({ site, station }: Place): string {
  return site === null ? `station, ${Math.round(station.elevationM)} m` : `site by ${station.name}`;
}

function without(address: CompareAddress, asked: Asked): CompareAddress {
  switch (kindOfCompare(address)) {
    case 'years':
      return { ...address, years: address.years.filter((each) => each !== asked.fileId) };
    case 'briefs':
      return { ...address, briefs: address.briefs.filter((each) => each !== asked.briefId) };
    case 'places':
      return { ...address, places: address.places.filter(({ id }) => id !== asked.place.id) };
  }
}

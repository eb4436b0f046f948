/**
 * The criteria of every place in every draw: what is not known for certain is drawn together with the weights (method 7.8).
 * A draw takes, for each doubt, one of the states that were judged (its lower end, as it stands, its upper end, equally
 * likely) and one of the years of a place's record; nothing between two judged states is made up. The changes of different
 * doubts are added and kept within 0..100. Plant, set-point and caps are those of one brief, so all places share that
 * draw; the reading of humidity and the year belong to each place.
 */
import type { RangeDoubt } from '../score/score-range.ts';
import type { PlaceToRank } from './place-to-rank.ts';
import { seededRandom } from './seeded-random.ts';

export interface PlaceStates {
  /** One column per criterion, one value per place; 0 where a criterion does not apply. */
  readonly columns: readonly Float64Array[];
  /** 1 where a criterion applies, in the same layout; null when all of them apply everywhere. */
  readonly applies: readonly Float64Array[] | null;
  /** Puts the next draw into the columns. */
  readonly draw: () => void;
}

/** Ends of a doubt: lower, as it stands, upper. */
type Side = -1 | 0 | 1;

const OWN_DOUBT: RangeDoubt = 'humidity reading';

export function placeStates(input: { places: readonly PlaceToRank[]; criteria: number; seed: number }): PlaceStates {
  const { places, criteria, seed } = input;
  const column = (asNumber: (value: number | null) => number): Float64Array[] =>
    Array.from({ length: criteria }, (_none, criterion) =>
      Float64Array.from(places, (place) => asNumber(place.criteria[criterion] ?? null)),
    );
  const columns = column((value) => value ?? 0);
  const applies = column((value) => (value === null ? 0 : 1));
  const everywhere = applies.every((each) => !each.includes(0));
  const uncertain = places.flatMap((place, at) =>
    place.doubts.length === 0 && place.years.length < 2 ? [] : [{ place, at, random: seededRandom(seed, place.id) }],
  );
  const shared = sharedSides(places, seed);
  return {
    columns,
    applies: everywhere ? null : applies,
    draw: () => {
      const sides = shared();
      for (const { place, at, random } of uncertain) {
        const state = drawnState(place, { sides, random });
        for (let criterion = 0; criterion < criteria; criterion++) {
          const into = columns[criterion];
          if (into !== undefined) into[at] = state(criterion);
        }
      }
    },
  };
}

/** Draws the side of each doubt that all places share, a stream per doubt. */
function sharedSides(places: readonly PlaceToRank[], seed: number): () => ReadonlyMap<RangeDoubt, Side> {
  const doubts = new Set(places.flatMap((place) => place.doubts.map(({ doubt }) => doubt)));
  doubts.delete(OWN_DOUBT);
  const streams = [...doubts].map((doubt) => ({ doubt, random: seededRandom(seed, `shared ${doubt}`) }));
  return () => new Map(streams.map(({ doubt, random }) => [doubt, sideOf(random())]));
}

/** The criteria of one place in one draw. */
function drawnState(
  { criteria, years, doubts }: PlaceToRank,
  { sides, random }: { sides: ReadonlyMap<RangeDoubt, Side>; random: () => number },
): (criterion: number) => number {
  const year = years.length < 2 ? criteria : (years[Math.floor(random() * years.length)] ?? criteria);
  const moves = doubts.flatMap(({ doubt, minus, plus }) => {
    const side = doubt === OWN_DOUBT ? sideOf(random()) : (sides.get(doubt) ?? 0);
    if (side === 0) return [];
    return [side < 0 ? minus : plus];
  });
  return (criterion) => {
    const asItStands = criteria[criterion] ?? null;
    if (asItStands === null) return 0;
    const moved = moves.reduce((sum, move) => sum + (move[criterion] ?? 0), year[criterion] ?? asItStands);
    return Math.min(Math.max(moved, 0), 100);
  };
}

function sideOf(uniform: number): Side {
  if (uniform < 1 / 3) return -1;
  return uniform < 2 / 3 ? 0 : 1;
}

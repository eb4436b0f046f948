import type { RescoreAnswer } from '../../contract/rescore.ts';

export interface RescoreIds {
  readonly stationIds: readonly string[];
  readonly siteIds: readonly string[];
}

/** A draft with the places that it is to be tried on. */
export interface RescoreWish {
  /** Equal drafts have equal keys. */
  readonly key: string;
  readonly body: Readonly<Record<string, unknown>>;
  /** What is looked at; asked first. */
  readonly inView: RescoreIds;
  /** Everything else; asked when the slider rests. */
  readonly others: RescoreIds;
}

export interface RescoreTurnsInput {
  readonly ask: (
    wish: Pick<RescoreWish, 'body'> & RescoreIds,
    signal: AbortSignal,
  ) => Promise<Pick<RescoreAnswer, 'stations' | 'sites'>>;
  /** `isView`: the first of what is looked at; `isWhole`: every place has been judged by the draft of this key. */
  readonly onAnswer: (
    answer: Pick<RescoreAnswer, 'stations' | 'sites'>,
    of: { readonly key: string; readonly isView: boolean; readonly isWhole: boolean },
  ) => void;
  readonly onFault: (error: unknown) => void;
}

/** The server takes 600 calls a minute; this many apart a slider never comes to that. */
const GAP_MS = 110;
/** A slider that has not moved for so long rests. */
const REST_MS = 350;
/** As many as one call may name. */
const MOST_NAMED = 2000;

/**
 * Asks for what a draft comes to, one call at a time and always for the latest draft: what comes in between is left out. Places in
 * view first; the others in portions once the slider rests, broken off when it moves again. An answer that comes after `leave` is
 * dropped.
 */
export function rescoreTurns({ ask, onAnswer, onFault }: RescoreTurnsInput) {
  let wish: RescoreWish | null = null;
  let wishedAt = 0;
  let sentAt = Number.NEGATIVE_INFINITY;
  /** Portions of the wish that are still to be asked; the first is what is in view. */
  let portions: readonly RescoreIds[] = [];
  let flight: { readonly stop: AbortController; readonly isView: boolean } | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let isViewDue = false;

  const next = (): void => {
    clearTimeout(timer);
    const portion = portions[0];
    if (flight !== null || wish === null || portion === undefined) return;
    const now = performance.now();
    const waitMs = Math.max(sentAt + GAP_MS - now, isViewDue ? 0 : wishedAt + REST_MS - now);
    if (waitMs > 0) timer = setTimeout(next, waitMs);
    else void send(wish, portion);
  };

  const send = async ({ key, body }: RescoreWish, portion: RescoreIds): Promise<void> => {
    const mine = { stop: new AbortController(), isView: isViewDue };
    flight = mine;
    sentAt = performance.now();
    isViewDue = false;
    portions = portions.slice(1);
    try {
      const answer = await ask({ body, ...portion }, mine.stop.signal);
      if (flight === mine) {
        const isWhole = key === wish?.key && portions.length === 0;
        onAnswer(answer, { key, isView: mine.isView, isWhole });
      }
    } catch (error) {
      if (flight === mine) {
        portions = [];
        onFault(error);
      }
    }
    if (flight !== mine) return;
    flight = null;
    next();
  };

  return {
    want(wanted: RescoreWish): void {
      if (wanted.key === wish?.key) return;
      wish = wanted;
      wishedAt = performance.now();
      const first = portionsOf(wanted.inView);
      portions = [...first, ...portionsOf(wanted.others)];
      isViewDue = first.length > 0;
      // A view is answered soon and its answer is worth showing; the rest of an older draft is not.
      if (flight !== null && !flight.isView) {
        flight.stop.abort();
        flight = null;
      }
      next();
    },
    leave(): void {
      clearTimeout(timer);
      flight?.stop.abort();
      flight = null;
      wish = null;
      portions = [];
    },
  };
}

function portionsOf({ stationIds, siteIds }: RescoreIds): RescoreIds[] {
  const count = Math.ceil(Math.max(stationIds.length, siteIds.length) / MOST_NAMED);
  return Array.from({ length: count }, (_, index) => {
    const from = index * MOST_NAMED;
    return { stationIds: stationIds.slice(from, from + MOST_NAMED), siteIds: siteIds.slice(from, from + MOST_NAMED) };
  });
}

/** Fewer places than this are asked for at once: parting them would only make two calls of one. */
const FEW = 400;

interface Boxed {
  readonly id: string;
  readonly latitude: number;
  readonly longitude: number;
}

interface Box {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
}

/** Parts the places into those in view and the others. Without a view, or with few places, all are in view. */
export function partByView(
  places: { readonly stations: readonly Boxed[]; readonly sites: readonly Boxed[] },
  box: Box | null,
): Pick<RescoreWish, 'inView' | 'others'> {
  const { stations, sites } = places;
  const whole = box === null || stations.length + sites.length <= FEW;
  const isIn = (place: Boxed) => whole || isWithin(place, box);
  const idsWhere = (asked: boolean): RescoreIds => ({
    stationIds: stations.filter((place) => isIn(place) === asked).map(({ id }) => id),
    siteIds: sites.filter((place) => isIn(place) === asked).map(({ id }) => id),
  });
  return { inView: idsWhere(true), others: idsWhere(false) };
}

/** The box may run on past 180°. */
function isWithin({ latitude, longitude }: Boxed, { west, south, east, north }: Box): boolean {
  if (latitude < south || latitude > north) return false;
  const turned = west + ((((longitude - west) % 360) + 360) % 360);
  return turned <= east;
}

/** What the web's threads are asked and answer. */
import type { Brief } from '#engine/brief/brief.ts';
import type { Neighbours } from '#engine/interpolation/nearest-stations.ts';
import type { PlaceToRank } from '#engine/ranking/place-to-rank.ts';
import type { Ranking, RankPlacesInput } from '#engine/ranking/rank-places.ts';
import type { WeatherYear, YearKind } from '#engine/reduction/weather-year.ts';
import type { RunResult, Verdict } from '#engine/run/run-result.ts';
import type { ScoreRange } from '#engine/score/score-range.ts';
import type { RawComponents } from '#engine/score/weighted-score.ts';

/** Some stations judged by one draft brief, at their own heights or at those of sites. */
export interface RescoreTask {
  readonly brief: Brief;
  readonly stations: readonly StationToRescore[];
  /** Whether the hash of every year's whole result is asked for, as a saved run carries it. */
  readonly withHashes: boolean;
}

export interface StationToRescore {
  readonly stationId: string;
  readonly zone: string;
  /** What the hours are judged at: its own, or a site's that the weather is moved to. */
  readonly heightM: number;
  /** The station's own height where the weather is moved; null where it is as measured. */
  readonly adjustedFromM: number | null;
  readonly position: { readonly latitude: number; readonly longitude: number };
  /** Newest file first. */
  readonly years: readonly {
    readonly weatherYearId: string;
    readonly contentHash: string;
    readonly kind: YearKind;
    readonly year: number | null;
    readonly utcOffsetMin: number;
    /** Packed columns in memory that the thread shares. */
    readonly columns: SharedArrayBuffer;
  }[];
}

export type ShownResult = Pick<RunResult, 'ledger' | 'severityKh' | 'worstSpell' | 'water' | 'electricity'>;

/** The figures of a station as a place, and of each of its years. */
export interface RescoredStation {
  readonly stationId: string;
  readonly heightM: number;
  readonly score: number | null;
  readonly scoreNote: string | null;
  readonly words: string | null;
  readonly verdict: Verdict | null;
  readonly yearsMeeting: number;
  readonly range: { readonly low: number; readonly high: number } | null;
  /** Of the year that stands for the station; null without a usable year. */
  readonly shown: ShownResult | null;
  readonly shownWeatherYearId: string | null;
  /** The years that the figures rest on. */
  readonly restsOn: readonly string[];
  /** Measured years with enough hours for the brief. */
  readonly usable: readonly string[];
  /** The raw components that the score is formed of. */
  readonly raw: RawComponents;
  /** By weather year; empty unless asked for. */
  readonly resultHashes: readonly { readonly weatherYearId: string; readonly resultHash: string }[];
}

/** One weather year judged by one draft brief, for whoever edits it. */
export interface PreviewTask {
  readonly brief: Brief;
  readonly year: WeatherYear;
  readonly zone: string;
  readonly heightM: number;
  readonly position: { readonly latitude: number; readonly longitude: number };
}

/** What the editor shows of a result. */
export type PreviewedYear = Pick<
  RunResult,
  'ledger' | 'verdict' | 'tolerances' | 'gates' | 'score' | 'scoreNote' | 'words' | 'parts' | 'hourClassCodes'
>;

/** How far the score of one place moves with what is not known for certain. */
export interface RangeTask {
  readonly brief: Brief;
  readonly station: StationToRescore;
  /** Which column of the file each year's humidity was read from. */
  readonly humidityFrom: ReadonlyMap<string, 'dew point' | 'relative humidity'>;
}

export interface JudgedRange {
  readonly year: Pick<WeatherYear, 'kind' | 'year'>;
  readonly scoreExact: number | null;
  /** Every usable actual year and those that the figures rest on. */
  readonly years: readonly (Pick<WeatherYear, 'kind' | 'year'> & { readonly score: number | null })[];
  readonly range: { readonly low: number; readonly high: number } | null;
  readonly pairs: ScoreRange['pairs'];
}

/** Some places of a ranking with their doubts. */
export interface DoubtsTask {
  readonly brief: Brief;
  readonly places: readonly {
    readonly id: string;
    readonly station: StationToRescore;
    readonly humidityFrom: ReadonlyMap<string, 'dew point' | 'relative humidity'>;
  }[];
}

/** The ranking itself: the draws over all places at once. */
export type RankTask = RankPlacesInput;

/** Whether a lever of a brief turns the verdict of one place; without a lever what the place comes to as it is. */
export interface TurningTask {
  readonly brief: Brief;
  readonly station: StationToRescore;
  /** Its place among the levers that the engine finds in the brief. */
  readonly lever: number | null;
}

export interface TurnedVerdict {
  readonly verdict: Verdict | null;
  readonly score: number | null;
  /** Names of the tolerances and hard limits that fail, over the years that the figures rest on. */
  readonly failed: readonly string[];
  /** The nearest value that turns the verdict; null without a lever, and where none does. */
  readonly turning: { readonly value: number | null } | null;
}

export interface SurfaceStation {
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
}

/** Where a surface may be drawn between these stations, and what each of its cells rests on. */
export interface SurfaceTask {
  readonly stations: readonly SurfaceStation[];
}

export interface SurfaceGrid {
  /** Between the middles of neighbouring cells, on average. */
  readonly spacingKm: number;
  /** Middles of the cells, degrees; longitudes run on past 180 where the stations lie about the date line. */
  readonly latitudes: Float32Array;
  readonly longitudes: Float32Array;
  /** 2 full, 1 pale, 0 none: a rim around the others. */
  readonly support: Uint8Array;
  /** Every three cells that touch one another. */
  readonly triangles: Uint32Array;
  readonly elevationsM: Float32Array;
  /** Station that a cell holds and shows, or -1. */
  readonly held: Int32Array;
  readonly neighbours: Neighbours;
  /** The nearest others of every station. */
  readonly others: Neighbours;
}

export type WebTask =
  | { readonly kind: 'surface'; readonly task: SurfaceTask }
  | { readonly kind: 'rescore'; readonly task: RescoreTask }
  | { readonly kind: 'range'; readonly task: RangeTask }
  | { readonly kind: 'turning'; readonly task: TurningTask }
  | { readonly kind: 'doubts'; readonly task: DoubtsTask }
  | { readonly kind: 'rank'; readonly task: RankTask }
  | { readonly kind: 'preview'; readonly task: PreviewTask };
export type WebAnswer =
  | { readonly kind: 'surface'; readonly answer: SurfaceGrid }
  | { readonly kind: 'rescore'; readonly answer: readonly RescoredStation[] }
  /** null without a usable year. */
  | { readonly kind: 'range'; readonly answer: JudgedRange | null }
  | { readonly kind: 'turning'; readonly answer: TurnedVerdict }
  | { readonly kind: 'doubts'; readonly answer: readonly PlaceToRank[] }
  | { readonly kind: 'rank'; readonly answer: Ranking }
  | { readonly kind: 'preview'; readonly answer: PreviewedYear };

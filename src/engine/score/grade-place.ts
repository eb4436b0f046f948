/** How far the weather can be trusted for a place: a letter beside the score, never in it (method 7.7). */

/** D is drawn hatched and not ranked. */
export type PlaceGrade = 'A' | 'B' | 'C' | 'D';

export interface GradeColumn {
  readonly column: 'distance' | 'height difference' | 'years' | 'measured share' | 'kind';
  readonly grade: PlaceGrade;
  readonly reason: string;
}

export interface GradeAnswer {
  /** The worst column. */
  readonly grade: PlaceGrade;
  readonly columns: readonly GradeColumn[];
}

export interface GradeInput {
  /** Between the place and its station. */
  readonly distanceKm: number;
  /** Either sign. */
  readonly heightDifferenceM: number;
  /** A height read from the relief grid is C at best (method 8). */
  readonly heightFromRelief?: boolean;
  /** Usable years at the station. */
  readonly years: { readonly actual: number; readonly typical: boolean };
  /** Share of hours whose temperature and humidity were measured, %; null when the file does not say. */
  readonly measuredSharePct: number | null;
  /** Whether the file's flags tell measured hours from others; without that B at best. */
  readonly flagsInformative: boolean;
  readonly kind: 'station' | 'reanalysis' | 'derived' | 'estimate';
}

const LETTERS = ['A', 'B', 'C', 'D'] as const;

/** Grades every column and takes the worst. */
export function gradePlace(input: GradeInput): GradeAnswer {
  const columns = [
    distanceColumn(input.distanceKm),
    heightColumn(input),
    yearsColumn(input.years),
    measuredColumn(input),
    kindColumn(input.kind),
  ];
  return { grade: worst(columns.map(({ grade }) => grade)), columns };
}

function distanceColumn(distanceKm: number): GradeColumn {
  const reason = distanceKm === 0 ? 'at the station' : `station ${round(distanceKm)} km away`;
  return { column: 'distance', grade: atMost(distanceKm, [25, 50, 100]), reason };
}

function heightColumn({ heightDifferenceM, heightFromRelief }: GradeInput): GradeColumn {
  const difference = Math.abs(heightDifferenceM);
  const byHeight = atMost(difference, [100, 150, 300]);
  const column = 'height difference';
  if (!heightFromRelief) return { column, grade: byHeight, reason: `${round(difference)} m between place and station` };
  const reason = `about ${round(difference)} m between place and station, height read from the relief grid`;
  return { column, grade: worst([byHeight, 'C']), reason };
}

function yearsColumn({ actual, typical }: GradeInput['years']): GradeColumn {
  const column = 'years';
  const years = actual === 1 ? '1 actual year' : `${actual} actual years`;
  const reason = !typical ? years : actual === 0 ? 'one typical year' : `one typical year and ${years}`;
  if (actual >= 10) return { column, grade: 'A', reason };
  if (actual >= 5 || (typical && actual >= 3)) return { column, grade: 'B', reason };
  return { column, grade: typical || actual >= 3 ? 'C' : 'D', reason };
}

function measuredColumn({ measuredSharePct, flagsInformative }: GradeInput): GradeColumn {
  const column = 'measured share';
  if (measuredSharePct === null)
    return { column, grade: 'B', reason: 'the file does not say which hours were measured' };
  const byShare = atLeast(measuredSharePct, [98, 95, 90]);
  const share = `${Math.floor(measuredSharePct * 10) / 10} % of temperature and humidity`;
  if (flagsInformative) return { column, grade: byShare, reason: `${share} measured` };
  return { column, grade: worst([byShare, 'B']), reason: `${share} present; the file does not say what was measured` };
}

function kindColumn(kind: GradeInput['kind']): GradeColumn {
  const column = 'kind';
  switch (kind) {
    case 'station':
      return { column, grade: 'A', reason: 'recorded at a station' };
    case 'reanalysis':
      return { column, grade: 'C', reason: 'reanalysis, not recorded at a station' };
    case 'derived':
      return { column, grade: 'C', reason: 'derived from another weather year' };
    case 'estimate':
      return { column, grade: 'D', reason: 'estimate between stations' };
  }
}

/** A, B, C up to each limit in turn, D beyond the last. */
function atMost(value: number, limits: readonly [number, number, number]): PlaceGrade {
  return LETTERS[limits.filter((limit) => value > limit).length] ?? 'D';
}

function atLeast(value: number, limits: readonly [number, number, number]): PlaceGrade {
  return LETTERS[limits.filter((limit) => value < limit).length] ?? 'D';
}

function worst(grades: readonly PlaceGrade[]): PlaceGrade {
  return LETTERS.findLast((letter) => grades.includes(letter)) ?? 'A';
}

function round(value: number): number {
  return value < 10 ? Math.round(value * 10) / 10 : Math.round(value);
}

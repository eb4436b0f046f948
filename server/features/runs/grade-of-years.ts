import type { YearKind } from '#engine/reduction/weather-year.ts';
import { type GradeAnswer, type GradeInput, gradePlace } from '#engine/score/grade-place.ts';

export interface YearToGrade {
  readonly kind: YearKind;
  readonly hours: number;
  /** Hours whose dry bulb and humidity are both as the source measured them. */
  readonly measuredHours: number;
  /** Every hour carries the same source flag, so the flags tell nothing. */
  readonly flagsUniform: boolean;
  /** Under the brief; a year that is still to be judged counts as one that is. */
  readonly usable: boolean;
}

export type WhereItStands = Pick<GradeInput, 'distanceKm' | 'heightDifferenceM' | 'heightFromRelief'>;

/** A station stands for itself. */
export const AT_THE_STATION: WhereItStands = { distanceKm: 0, heightDifferenceM: 0 };

/** What the years of a station bring to the grade of whatever place it stands for. */
export type YearsOfGrade = Pick<GradeInput, 'years' | 'measuredSharePct' | 'flagsInformative' | 'kind'>;

/** @param years every accepted year of the station */
export function yearsOfGrade(years: readonly YearToGrade[]): YearsOfGrade {
  const usable = years.filter((year) => year.kind !== 'derived' && year.usable);
  const slots = usable.reduce((sum, { hours }) => sum + hours, 0);
  const measured = usable.reduce((sum, year) => sum + year.measuredHours, 0);
  return {
    years: {
      actual: usable.filter(({ kind }) => kind === 'actual').length,
      typical: usable.some(({ kind }) => kind === 'typical'),
    },
    measuredSharePct: slots === 0 ? null : (100 * measured) / slots,
    flagsInformative: usable.every(({ flagsUniform }) => !flagsUniform),
    kind: years.every(({ kind }) => kind === 'derived') ? 'derived' : 'station',
  };
}

export function gradeOfYears(years: readonly YearToGrade[], at: WhereItStands): GradeAnswer {
  return gradePlace({ ...yearsOfGrade(years), ...at });
}

import type { RescoredSite as WireSite, RescoredStation as WireStation } from '#contract/rescore.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { siteGates, withSiteGates } from '#engine/score/site-gates.ts';
import type { RescoredStation } from '../../jobs/web-task.ts';
import type { ResolvedSite } from '../sites/resolved-sites-read-model.ts';
import { AT_THE_STATION, gradeOfYears, type WhereItStands } from './grade-of-years.ts';
import { type FiguresOfPlace, presentFigures, shownYearOf } from './present-figures.ts';
import { whereSiteStands, withoutWeather } from './programme-places.ts';
import type { YearToRescore } from './rescore-read-model.ts';

export interface SiteToRescore {
  readonly site: ResolvedSite;
  /** What it is judged at; null without a weather year. */
  readonly place: { readonly stationId: string; readonly heightM: number } | null;
}

/** @param years every accepted year of the station */
export function presentRescoredStation(station: RescoredStation, years: readonly YearToRescore[]): WireStation {
  const { stationId, shownWeatherYearId, restsOn } = station;
  const figures = presentFigures(figuresOf(station), gradeOf(station, years, AT_THE_STATION));
  return { stationId, shownWeatherYearId, restsOn: [...restsOn], ...figures };
}

/** @param on.judged what its station's weather comes to at its height */
export function presentRescoredSite(
  { site }: SiteToRescore,
  on: { brief: Brief; judged: RescoredStation | undefined; years: readonly YearToRescore[] },
): WireSite {
  const { brief, judged, years } = on;
  const gates = siteGates(brief, site.gates);
  if (judged === undefined)
    return { siteId: site.id, ...presentFigures(withSiteGates(withoutWeather(site), gates), 'D') };
  const grade = gradeOf(judged, years, whereSiteStands(site));
  return { siteId: site.id, ...presentFigures(withSiteGates(figuresOf(judged), gates), grade) };
}

function figuresOf({ restsOn, shown, ...figures }: RescoredStation): FiguresOfPlace {
  return { ...figures, yearsCounted: restsOn.length, shown: shown === null ? null : shownYearOf(shown) };
}

function gradeOf(judged: RescoredStation, years: readonly YearToRescore[], at: WhereItStands) {
  const usable = new Set(judged.usable);
  const graded = years.map((year) => ({ ...year, hours: year.slots, usable: usable.has(year.weatherYearId) }));
  return gradeOfYears(graded, at).grade;
}

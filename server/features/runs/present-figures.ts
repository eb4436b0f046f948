import type { PlaceFigures as WireFigures } from '#contract/place-figures.ts';
import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import type { RunResult } from '#engine/run/run-result.ts';
import type { PlaceGrade } from '#engine/score/grade-place.ts';
import type { PlaceFigures, PlaceRun } from '#engine/score/place-figures.ts';

/** What lists and the map tell of the year that stands for a place. */
export interface ShownYear {
  /** In the order of `hourClasses`. */
  readonly classes: readonly number[];
  readonly demand: number;
  readonly met: number;
  readonly litresPerKwh: number | null;
  readonly savedPct: number | null;
  readonly worstSpellHours: number;
  readonly severityKh: number;
}

export interface FiguresOfPlace
  extends Pick<PlaceFigures<PlaceRun>, 'score' | 'scoreNote' | 'words' | 'verdict' | 'yearsMeeting' | 'range'> {
  readonly yearsCounted: number;
  readonly shown: ShownYear | null;
}

export function shownYearOf(
  result: Pick<RunResult, 'ledger' | 'severityKh' | 'worstSpell' | 'water' | 'electricity'>,
): ShownYear {
  const { ledger, severityKh, worstSpell, water, electricity } = result;
  return {
    classes: hourClasses.map((hourClass) => ledger.classes[hourClass]),
    demand: ledger.demand,
    met: ledger.met,
    litresPerKwh: water.litresPerKwh,
    savedPct: electricity?.savedPct ?? null,
    worstSpellHours: worstSpell?.hours ?? 0,
    severityKh,
  };
}

export function presentFigures(figures: FiguresOfPlace, grade: PlaceGrade): WireFigures {
  const { score, scoreNote, words, verdict, yearsMeeting, yearsCounted, range, shown } = figures;
  return {
    score,
    scoreNote,
    words,
    verdict,
    yearsMeeting,
    yearsCounted,
    range,
    ledger: shown === null ? null : { classes: [...shown.classes], demand: shown.demand, met: shown.met },
    litresPerKwh: rounded(shown?.litresPerKwh, 1000),
    savedPct: rounded(shown?.savedPct, 100),
    worstSpellHours: shown?.worstSpellHours ?? null,
    severityKh: rounded(shown?.severityKh, 100),
    grade,
  };
}

/** Thousands of them cross the wire together. */
function rounded(value: number | null | undefined, steps: number): number | null {
  return value === null || value === undefined ? null : Math.round(value * steps) / steps;
}

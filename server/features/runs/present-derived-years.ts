import type { DerivedPlaceYear, YearFigures } from '#contract/runs.ts';
import { changeWords } from '#engine/climate/change-words.ts';
import type { JudgedYear } from './judge-station.ts';

/** The derived years of a place, each beside the year that it was made of. */
export function presentDerivedYears(judged: readonly JudgedYear[]): DerivedPlaceYear[] {
  return judged.flatMap((derived) => {
    const from = derived.weather.derivedFrom;
    if (from === null) return [];
    const parent = judged.find(({ weather }) => weather.weatherYearId === from.weatherYearId);
    const { weatherFileId, kind, year, status } = from;
    return {
      weatherFileId: derived.weather.weatherFileId,
      name: from.name,
      words: changeWords(from.monthly, from.humidityRule),
      figures: presentFigures(derived),
      parent: { weatherFileId, kind, year, status, figures: parent === undefined ? null : presentFigures(parent) },
    };
  });
}

function presentFigures({ run, result }: JudgedYear): YearFigures {
  const { ledger, score, verdict, severityKh, worstSpell, water } = result;
  return {
    runId: run.id,
    demand: ledger.demand,
    met: ledger.met,
    score,
    verdict,
    severityKh,
    worstSpellHours: worstSpell?.hours ?? 0,
    makeUpLitres: water.makeUpLitres,
  };
}

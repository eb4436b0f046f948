import type { Brief } from '#engine/brief/brief.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { placeFigures } from '#engine/score/place-figures.ts';
import { rawOfParts } from '#engine/score/raw-of-parts.ts';
import type { RescoredStation, RescoreTask, ShownResult, StationToRescore } from '../../jobs/web-task.ts';
import { keptYear } from './kept-years.ts';
import { runResultHash } from './run-key.ts';

/** Judges every year of some stations by a draft brief: the function and the columns that a saved run is made with. */
export function rescoreStations({ brief, stations, withHashes }: RescoreTask): readonly RescoredStation[] {
  return stations.map((station) => rescoreStation(station, { brief, withHashes }));
}

function rescoreStation(station: StationToRescore, on: { brief: Brief; withHashes: boolean }): RescoredStation {
  const { brief } = on;
  const { stationId, zone, heightM, adjustedFromM, position } = station;
  const runs = station.years.map(({ weatherYearId, contentHash, columns, ...facts }) => {
    const year: WeatherYear = {
      ...facts,
      packed: keptYear({ weatherYearId, contentHash, columns, heightM, adjustedFromM }),
    };
    const { hourClassCodes, ...result } = judgeYear({ year, brief, zone, heightM, position });
    const resultHash = on.withHashes ? runResultHash(result, hourClassCodes) : null;
    return { weatherYearId, kind: facts.kind, year: facts.year, result, resultHash };
  });
  const { score, scoreNote, words, verdict, yearsMeeting, range, shown, ...figures } = placeFigures({ brief, runs });
  return {
    stationId,
    heightM,
    score,
    scoreNote,
    words,
    verdict,
    yearsMeeting,
    range,
    shown: shown === null ? null : shownResultOf(shown.result),
    shownWeatherYearId: shown?.weatherYearId ?? null,
    restsOn: figures.runs.map(({ weatherYearId }) => weatherYearId),
    usable: runs.flatMap(({ weatherYearId, kind, result }) =>
      kind !== 'derived' && result.usable ? [weatherYearId] : [],
    ),
    raw: rawOfParts(figures.parts),
    resultHashes: runs.flatMap(({ weatherYearId, resultHash }) =>
      resultHash === null ? [] : [{ weatherYearId, resultHash }],
    ),
  };
}

/** Of a result what the map tells, so that no more is copied between threads. */
function shownResultOf({ ledger, severityKh, worstSpell, water, electricity }: ShownResult): ShownResult {
  return { ledger, severityKh, worstSpell, water, electricity };
}

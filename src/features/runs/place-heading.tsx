import { Link } from 'react-router-dom';
import type { Place } from '../../contract/runs.ts';
import { metres, position } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import {
  bandWords,
  costingColumns,
  costWords,
  noScoreWords,
  notJudgedWords,
  placeYearWords,
  verdictSentence,
} from './run-words.ts';

/** Name and basis of the chosen place: a number never stands without what it rests on. */
export function PlaceHeading({ place, teamId }: { place: Place; teamId: string }) {
  const { station, years, shown, brief } = place;
  const year = years.find(({ runId }) => runId === shown?.runId) ?? years[0];
  return (
    <header>
      <h2 className="text-title">{station.name}</h2>
      <p className="mt-1 text-soft">
        {metres(station.elevationM)}, {position(station)}
      </p>
      <p className="text-soft">
        {year ? (
          <>
            Weather of this station, 0&nbsp;km:{' '}
            <Link to={paths.weatherFile.to(teamId, year.weatherFileId)}>{placeYearWords(year)}</Link>.{' '}
          </>
        ) : (
          'No accepted measured year. '
        )}
        Brief version {brief.version}, method {brief.methodVersion}.
      </p>
    </header>
  );
}

/** The score, large, with verdict and grade beside it. */
export function ScoreBlock({ place }: { place: Place }) {
  const { shown } = place;
  if (!shown) {
    return <p className="border-y border-line py-3">{notJudgedWords(place)}</p>;
  }
  const note = noScoreWords(shown);
  const band = bandWords(shown.words);
  const costs = costingColumns(place.gradeColumns);
  return (
    <div className="grid grid-cols-[auto_minmax(0,1fr)] items-start gap-x-4 border-y border-line py-2.5">
      {note === null ? (
        <p className="flex flex-col">
          <span className="serif text-figure">{shown.score}</span>
          <span className="mt-1 text-fine text-soft">of 100</span>
        </p>
      ) : null}
      <div className={`grid gap-0.5 ${note === null ? '' : 'col-span-2'}`}>
        {note === null ? null : <p className="serif text-name">{note}.</p>}
        {note === null && band ? <p>{band}</p> : null}
        <p className={shown.verdict === 'does not' ? 'font-medium text-madder' : 'font-medium'}>
          {verdictSentence(shown)}
        </p>
        <p>
          <span className="font-medium">Grade {place.grade}</span>
          {costs.length === 0 ? ': nothing costs a letter.' : `: ${costWords(costs, place.grade)}.`}
        </p>
      </div>
    </div>
  );
}

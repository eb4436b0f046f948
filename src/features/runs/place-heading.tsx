import { Link } from 'react-router-dom';
import type { Place } from '../../contract/place.ts';
import type { PlaceFigures } from '../../contract/place-figures.ts';
import { metres, number, position, withUnit } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import {
  bandWords,
  costingColumns,
  costWords,
  noScoreWords,
  notJudgedWords,
  placeYearWords,
  rangeWords,
  verdictSentence,
} from './run-words.ts';

/** Name and basis of the chosen place: a number never stands without what it rests on. */
export function PlaceHeading({ place, teamId }: { place: Place; teamId: string }) {
  const { station, site, years, shown, brief } = place;
  const year = years.find(({ runId }) => runId === shown?.runId) ?? years[0];
  const where = site ?? station;
  return (
    <header>
      <h2 className="text-title">
        {site === null ? null : <span className="text-soft">{site.letters} </span>}
        {where.name}
      </h2>
      <p className="mt-1 text-soft">
        {where.elevationM === null ? 'Height not known' : metres(where.elevationM)}
        {site?.elevationSource === 'relief' ? ' (approximate, of the relief)' : ''}, {position(where)}
      </p>
      <p className="text-soft">
        {year ? (
          <>
            {site === null ? 'Weather of this station, 0\u00a0km: ' : `Weather: ${siteBasis(place)}, `}
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

/** "Korrel Pan, 84 km, 120 m higher, moved to 850 m". */
function siteBasis({ site, station }: Place): string {
  if (site === null) return station.name;
  const { distanceKm, heightDifferenceM, heightAdjusted, heightUsedM } = site;
  const height =
    heightDifferenceM === null || Math.round(heightDifferenceM) === 0
      ? []
      : [`${metres(Math.abs(heightDifferenceM))} ${heightDifferenceM > 0 ? 'higher' : 'lower'}`];
  return [
    station.name,
    withUnit(distanceKm, 'km', distanceKm < 10 ? 1 : 0),
    ...height,
    ...(heightAdjusted ? [`moved to ${metres(heightUsedM)}`] : []),
  ].join(', ');
}

interface ScoreBlockProps {
  readonly place: Place;
  /** Of the map, or under a draft: the score of the panel is that of the mark. */
  readonly figures: PlaceFigures;
  readonly isDraft: boolean;
}

/** The score, large, with its range, verdict and grade beside it. */
export function ScoreBlock({ place, figures, isDraft }: ScoreBlockProps) {
  const { shown } = place;
  if (!shown && !isDraft) return <p className="border-y border-line py-3">{notJudgedWords(place)}</p>;
  const note = noScoreWords(figures);
  const band = bandWords(figures.words);
  const costs = costingColumns(place.gradeColumns);
  const range = rangeWords(figures);
  return (
    <div className="grid grid-cols-[auto_minmax(0,1fr)] items-start gap-x-4 border-y border-line py-2.5">
      {note === null ? (
        <p className="flex flex-col">
          <span className="serif text-figure">{figures.score}</span>
          <span className="mt-1 text-fine text-soft">of 100</span>
        </p>
      ) : null}
      <div className={`grid gap-0.5 ${note === null ? '' : 'col-span-2'}`}>
        {note === null ? null : <p className="serif text-name">{note}.</p>}
        {note === null && band ? <p>{band}</p> : null}
        {note === null && range !== null ? <p className="text-soft">{range}.</p> : null}
        <p className={figures.verdict === 'does not' ? 'font-medium text-madder' : 'font-medium'}>
          {isDraft || shown === null ? draftVerdict(figures) : verdictSentence(shown)}
        </p>
        <p>
          <span className="font-medium">Grade {place.grade}</span>
          {costs.length === 0 ? ': nothing costs a letter.' : `: ${costWords(costs, place.grade)}.`}
        </p>
      </div>
    </div>
  );
}

/** A draft is told in whole: what each tolerance found is judged when it is saved. */
function draftVerdict({ verdict, yearsMeeting, yearsCounted, worstSpellHours }: PlaceFigures): string {
  if (verdict === null) return 'No verdict.';
  if (verdict === 'no tolerance set') return 'The brief sets no tolerance, so there is no verdict.';
  const years = yearsCounted > 1 ? ` in ${yearsMeeting} of ${yearsCounted} years` : '';
  if (verdict === 'meets the brief') return `Would meet the brief${years}.`;
  const spell = worstSpellHours === null ? '' : ` Worst spell ${withUnit(worstSpellHours, 'h')}.`;
  return `Would not meet the brief${years === '' ? '' : `: it does${years}`}.${spell}`;
}

/** "Draft: 61, saved: 55". */
export function draftAgainstSaved(drafted: number | null, saved: number | null): string {
  const word = (score: number | null) => (score === null ? 'no score' : number(score));
  return `Under the draft ${word(drafted)}, as saved ${word(saved)}.`;
}

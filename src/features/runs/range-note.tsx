import { useQuery } from '@tanstack/react-query';
import type { PlaceRange } from '../../contract/place-doubts.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { capital } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { type PlaceAsked, type ProgrammeIds, rangeQuery } from './run-queries.ts';
import { placeYearWords } from './run-words.ts';

const doubtWords: Readonly<Record<NonNullable<PlaceRange['largest']>, string>> = {
  years: 'Year to year',
  'humidity reading': 'Humidity reading',
  'plant tolerance': 'Plant tolerance',
  'set-point': 'Set-point',
  'humidity cap': 'Humidity cap',
};

/** How far the score moves with each doubt: its two ends side by side, never added up. */
export function RangeNote({ ids, asked }: { ids: ProgrammeIds; asked: PlaceAsked }) {
  const range = useQuery(rangeQuery(ids, asked));
  if (range.isError) {
    return (
      <p role="alert">
        {errorSentence(range.error)} <Button onClick={() => range.refetch()}>Try again</Button>
      </p>
    );
  }
  if (range.isPending) return <Loading what="the range" />;
  return <RangeTable range={range.data} />;
}

function RangeTable({ range: { score, year, years, pairs, largest } }: { range: PlaceRange }) {
  return (
    <>
      <p className="mb-1 max-w-[70ch] text-fine text-soft">
        {capital(placeYearWords(year))} judged again with one thing at a time a little lower and a little higher;
        unchanged it scores {score ?? 'nothing'}. The pairs are not added up.
      </p>
      <table className="ruled max-w-[44rem]">
        <caption className="sr-only">Range of the score by doubt</caption>
        <thead>
          <tr>
            <th scope="col">Doubt</th>
            <th scope="col" colSpan={2}>
              Lower end
            </th>
            <th scope="col" colSpan={2}>
              Upper end
            </th>
          </tr>
        </thead>
        <tbody>
          {years === null ? null : (
            <tr className={largest === 'years' ? 'font-semibold' : ''}>
              <th scope="row">{doubtWords.years}</th>
              <td className="text-soft">worst of {years.scores.length}</td>
              <td className="figure">{years.low}</td>
              <td className="text-soft">best</td>
              <td className="figure">{years.high}</td>
            </tr>
          )}
          {pairs.map(({ doubt, minus, plus }) => (
            <tr key={doubt} className={largest === doubt ? 'font-semibold' : ''}>
              <th scope="row">{doubtWords[doubt]}</th>
              <td className="text-soft">{minus.label.replace('-', '−')}</td>
              <td className="figure">{minus.score ?? '–'}</td>
              <td className="text-soft">{plus.label}</td>
              <td className="figure">{plus.score ?? '–'}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {largest === null ? null : (
        <p className="mt-1 text-fine text-soft">The largest doubt is: {doubtWords[largest].toLowerCase()}.</p>
      )}
    </>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { RankShares } from '../../../charts/rank-shares.tsx';
import type { Ranking, RankingView } from '../../../contract/ranking.ts';
import { type ProgrammeIds, rankingQuery } from '../../../features/runs/run-queries.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { number, share } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { ScrollInside } from '../../../ui/scroll-inside.tsx';

const VIEWS: readonly { readonly view: RankingView; readonly words: string }[] = [
  { view: 'near the brief', words: 'Weights of the brief, a quarter more or less' },
  { view: 'any weights', words: 'Any weights at all' },
];

/** How sure the order of the places is when weights and what is not known are drawn together. */
export function CompareRanking({ ids, placeIds }: { ids: ProgrammeIds; placeIds: readonly string[] }) {
  const [view, setView] = useState<RankingView>('near the brief');
  const ranking = useQuery(rankingQuery(ids, { view, placeIds: [...placeIds] }));
  return (
    <section aria-labelledby="ranking">
      <h2 id="ranking" className="mb-1 text-name">
        How sure the order is
      </h2>
      <fieldset className="mb-2 flex flex-wrap gap-x-5 gap-y-1">
        <legend className="sr-only">Weights that are drawn</legend>
        {VIEWS.map((each) => (
          <label key={each.view} className="flex min-h-6 items-center gap-2">
            <input type="radio" name="ranking-view" checked={view === each.view} onChange={() => setView(each.view)} />
            {each.words}
          </label>
        ))}
      </fieldset>
      {ranking.isPending ? <Loading what="the ranking" /> : null}
      {ranking.isError ? (
        <p role="alert">
          {errorSentence(ranking.error)} <Button onClick={() => ranking.refetch()}>Try again</Button>
        </p>
      ) : null}
      {ranking.data ? <RankingTable ranking={ranking.data} /> : null}
    </section>
  );
}

function RankingTable({ ranking }: { ranking: Ranking }) {
  const { places, neighbours, notRanked, draws } = ranking;
  return (
    <>
      {places.length > 1 ? (
        <>
          <RankShares
            rows={places.map(({ name, rankShares }) => ({ name, shares: rankShares }))}
            label={`Share of ${number(draws)} draws at each rank: ${places.map(({ name, rankShares }) => `${name} first in ${share(100 * (rankShares[0] ?? 0))}`).join(', ')}; the table below says the same.`}
          />
          <ScrollInside label="Shares of ranks, scrolls sideways">
            <table className="ruled mt-2" style={{ minWidth: `${22 + 5 * places.length}rem` }}>
              <caption className="sr-only">Share of the draws at each rank</caption>
              <thead>
                <tr>
                  <th scope="col">Place</th>
                  <th scope="col" className="figure">
                    Score
                  </th>
                  {places.map(({ id }, at) => (
                    <th key={id} scope="col" className="figure">
                      Rank {at + 1}
                    </th>
                  ))}
                  <th scope="col">Against the next</th>
                </tr>
              </thead>
              <tbody>
                {places.map(({ id, name, scoreExact, rankShares }) => {
                  const pair = neighbours.find(({ aheadId }) => aheadId === id);
                  return (
                    <tr key={id}>
                      <th scope="row">{name}</th>
                      <td className="figure">{number(scoreExact, 1)}</td>
                      {rankShares.map((each, rank) => (
                        // biome-ignore lint/suspicious/noArrayIndexKey: a rank is its place in the row
                        <td key={rank} className={`figure ${each === 0 ? 'text-soft' : ''}`}>
                          {share(100 * each)}
                        </td>
                      ))}
                      <td>{pair === undefined ? '' : pairWords(pair)}</td>
                    </tr>
                  );
                })}
              </tbody>
            </table>
          </ScrollInside>
        </>
      ) : (
        <p className="text-soft">Two places with a score and a grade of C or better are needed for an order.</p>
      )}
      {notRanked.length > 0 ? (
        <p className="mt-1 text-fine text-soft">
          Not ranked: {notRanked.map(({ name, reason }) => `${name} (${reason})`).join('; ')}.
        </p>
      ) : null}
      <p className="mt-1.5 max-w-[70ch] text-fine text-soft">
        {number(draws)} draws with the same seed: the weights together with year, humidity reading, plant tolerance,
        set-point and cap. Two places are called a tie when the better one is ahead in fewer than 95 % of them.
      </p>
    </>
  );
}

function pairWords({ aheadShare, tie, swap }: Ranking['neighbours'][number]): string {
  const ahead = `ahead in ${share(100 * aheadShare)}${tie ? ', a tie' : ''}`;
  if (swap === null) return `${ahead}; no single weight swaps them`;
  return `${ahead}; even when “${swap.label}” weighs ${number(swap.toWeight, 0)} instead of ${number(swap.fromWeight, 0)}`;
}

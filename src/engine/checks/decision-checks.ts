/** N01, N02: money; S01, S02: ranking. */
import { simplePayback } from '../money/simple-payback.ts';
import { rankPlaces } from '../ranking/rank-places.ts';
import { exactly, inputOf, within } from './check-answer.ts';
import { type CheckRunner, eachCase } from './check-runner.ts';
import { carnotCop } from './comparison-formulas.ts';
import { type CheckAnswer, numberOf, numbersOf, type PublishedCase, textOf } from './published-check.ts';

const SEED = 1;

const cop: CheckRunner = (cases) => {
  const found = cases.map((each) => ({
    each,
    outdoorC: numberOf(each, 'outdoorC'),
    cop: carnotCop({
      grade: numberOf(each, 'grade'),
      evaporatingC: numberOf(each, 'evaporatingC'),
      approachK: numberOf(each, 'approachK'),
      outdoorC: numberOf(each, 'outdoorC'),
      most: numberOf(each, 'most'),
    }),
  }));
  const answers = found.map((one) =>
    within(
      {
        input: inputOf(one.each),
        expected: numberOf(one.each, 'expected'),
        found: one.cop,
        tag: textOf(one.each, 'tag'),
      },
      numberOf(one.each, 'tolerance'),
    ),
  );
  const byOutdoor = found.toSorted((one, other) => one.outdoorC - other.outdoorC);
  const falls = byOutdoor.every((one, index) => index === 0 || one.cop < (byOutdoor[index - 1]?.cop ?? 0));
  const said = { input: 'the COP as it grows hotter outside', expected: 'falls', tag: 'definition' };
  return [...answers, exactly({ ...said, found: falls ? 'falls' : 'does not fall' })];
};

function payback(each: PublishedCase): readonly CheckAnswer[] {
  const given = { extraCapital: numberOf(each, 'extraCapital'), savingPerYear: numberOf(each, 'savingPerYear') };
  const found = String(simplePayback(given));
  return [exactly({ input: inputOf(each), expected: String(each.expected), found, tag: textOf(each, 'tag') })];
}

/** The engine's criteria run to 100. */
const placeOf = (id: string, criteria: readonly number[]) => ({
  id,
  criteria: criteria.map((value) => 100 * value),
  years: [],
  doubts: [],
});

const rankShares: CheckRunner = (cases) => {
  const places = cases.map((each) => placeOf(textOf(each, 'alternative'), numbersOf(each, 'criteria')));
  const draws = Math.max(...cases.map((each) => numberOf(each, 'draws')));
  const ranking = rankPlaces({ places, weights: [1, 1], view: 'any weights', seed: SEED, draws });
  const rows = cases.flatMap((each) => {
    const id = textOf(each, 'alternative');
    const [tag, tolerance] = [textOf(each, 'tag'), numberOf(each, 'tolerance')];
    const found = ranking.places.find((place) => place.id === id);
    const given = `${id} of criteria ${numbersOf(each, 'criteria').join(', ')}, ${draws} draws`;
    const shares = numbersOf(each, 'rankShares').map((expected, rank) => {
      const share = found?.rankShares[rank] ?? Number.NaN;
      return within({ input: `share of rank ${rank + 1}: ${given}`, expected, found: share, tag }, tolerance);
    });
    const central = found?.centralWeights?.[0] ?? Number.NaN;
    const weight = {
      input: `central weight: ${given}`,
      expected: numberOf(each, 'centralWeight1'),
      found: central,
      tag,
    };
    const sum = found?.rankShares.reduce((total, share) => total + share, 0) ?? Number.NaN;
    const row = { input: `sum over the ranks of ${id}`, expected: 1, found: sum, tag };
    return [...shares, within(weight, tolerance), within(row, numberOf(each, 'sumTolerance'))];
  });
  const sumTolerance = Math.min(...cases.map((each) => numberOf(each, 'sumTolerance')));
  const columns = places.map((_place, rank) => {
    const found = ranking.places.reduce((sum, place) => sum + (place.rankShares[rank] ?? 0), 0);
    return within(
      { input: `sum over the places at rank ${rank + 1}`, expected: 1, found, tag: 'definition' },
      sumTolerance,
    );
  });
  return [...rows, ...columns];
};

function scaledWeights(each: PublishedCase): readonly CheckAnswer[] {
  const places = [placeOf('ahead', numbersOf(each, 'ahead')), placeOf('behind', numbersOf(each, 'behind'))];
  const weights = numbersOf(each, 'weights');
  const tag = textOf(each, 'tag');
  const rank = (scaled: readonly number[]) =>
    rankPlaces({ places, weights: scaled, view: 'near the brief', seed: SEED, draws: 1000 });
  const orderOf = ({ places: ranked }: ReturnType<typeof rank>) => ranked.map(({ id }) => id).join(', then ');
  const swap = numberOf(each, 'swapWeight1');
  const found = rank(weights).neighbours[0]?.swap?.toWeight ?? Number.NaN;
  const tied = rank([swap, 1 - swap]).places.every((place) => place.tied);
  return [
    ...[1, ...numbersOf(each, 'scaledBy')].map((factor) =>
      exactly({
        input: `weights ${weights.join(' and ')} times ${factor}`,
        expected: 'ahead, then behind',
        found: orderOf(rank(weights.map((weight) => weight * factor))),
        tag,
      }),
    ),
    within({ input: 'weight at which the two swap', expected: 100 * swap, found, tag, unit: '%' }, 1e-9),
    exactly({ input: 'the two at that weight', expected: 'tie', found: tied ? 'tie' : 'do not tie', tag }),
  ];
}

export const decisionChecks: Readonly<Record<string, CheckRunner>> = {
  N01: cop,
  N02: eachCase(payback),
  S01: rankShares,
  S02: eachCase(scaledWeights),
};

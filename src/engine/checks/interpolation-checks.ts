/** I01: inverse distance and leave-one-out; I02: distance. */
import { estimateBetween } from '../interpolation/estimate-between.ts';
import { greatCircleKm } from '../interpolation/great-circle-km.ts';
import { leaveOneOutOfColumn } from '../interpolation/leave-one-out.ts';
import { nearestOthers } from '../interpolation/other-stations.ts';
import { unitVectors } from '../interpolation/sphere-vectors.ts';
import { stationFigures } from '../interpolation/station-figures.ts';
import type { RawComponents } from '../score/weighted-score.ts';
import { inputOf, within } from './check-answer.ts';
import { type CheckRunner, eachCase } from './check-runner.ts';
import { type CheckAnswer, groupOf, numberOf, numbersOf, type PublishedCase, textOf } from './published-check.ts';

const NOTHING: RawComponents = {
  served: null,
  severity: null,
  spell: null,
  damp: null,
  water: null,
  electricity: null,
  'worst-year': null,
};
/** The case is of a plain number along a line: a component that is its own score, on the equator, all at one height. */
const ANCHOR = { component: 'served', weight: 1, a0: 0, a100: 100 } as const;

function leaveOneOut(each: PublishedCase): readonly CheckAnswer[] {
  const [along, values, power] = [numbersOf(each, 'along'), numbersOf(each, 'values'), numberOf(each, 'power')];
  const tag = textOf(each, 'tag');
  const tolerance = numberOf(each, 'tolerance');
  const stations = values.map((served, index) => ({
    latitude: 0,
    longitude: along[index] ?? 0,
    elevationM: 0,
    raw: { ...NOTHING, served },
  }));
  const figures = stationFigures([ANCHOR], stations);
  const vectors = unitVectors({ latitudes: along.map(() => 0), longitudes: along });
  const [column] = figures.columns;
  if (column === undefined) throw new TypeError('a check has no values');
  const found = leaveOneOutOfColumn(column, { figures, others: nearestOthers(vectors, along.length - 1), power });
  const given = inputOf(each);
  const one = (what: string, expected: number, value: number) =>
    within({ input: `${what}: ${given}`, expected, found: value, tag }, tolerance);
  return [
    ...numbersOf(each, 'expectedErrors').map((error, station) =>
      one(`estimate less value at ${along[station]}`, error, found.errors[station] ?? Number.NaN),
    ),
    one('mean error', numberOf(each, 'expectedBias'), found.bias),
    one('mean absolute error', numberOf(each, 'expectedMeanAbsolute'), found.meanAbsolute),
    one('root mean square error', numberOf(each, 'expectedRootMeanSquare'), found.rootMeanSquare),
    ...stations.map((position, station) => {
      const asked = { stations, anchors: [ANCHOR], indexPoints: false, each: along.length, power, elevationM: 0 };
      const here = estimateBetween({ ...asked, position }).weighted.scoreExact ?? Number.NaN;
      return within(
        {
          input: `at the station at ${along[station]}: ${given}`,
          expected: values[station] ?? 0,
          found: here,
          tag: 'definition',
        },
        0,
      );
    }),
  ];
}

function distance(each: PublishedCase): readonly CheckAnswer[] {
  const placeOf = (name: string) => {
    const place = groupOf(each, name);
    return { latitude: numberOf(place, 'latitude'), longitude: numberOf(place, 'longitude') };
  };
  const [from, to] = [placeOf('from'), placeOf('to')];
  const measured = { expected: numberOf(each, 'km'), tag: textOf(each, 'tag'), unit: 'km' };
  const input = inputOf(each, ['km']);
  return [
    within({ ...measured, input, found: greatCircleKm(from, to) }, numberOf(each, 'tolerance')),
    within(
      { ...measured, input: `the way back, ${input}`, found: greatCircleKm(to, from) },
      numberOf(each, 'tolerance'),
    ),
  ];
}

export const interpolationChecks: Readonly<Record<string, CheckRunner>> = {
  I01: eachCase(leaveOneOut),
  I02: eachCase(distance),
};

/** The properties of method 5 for halls, process water, turbine inlets and index limits, on random hours under random briefs. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import { hundredths } from '#engine/conventions.ts';
import type { DemandHour, HourJudgement } from '#engine/hour-classes/demand-hour.ts';
import { setPoints } from '#engine/hour-classes/set-points.ts';
import { saturationHumidityRatio, volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { findUse } from '#engine/run/find-use.ts';
import { presetBrief } from '../../support/presets.ts';
import { propertySettings, samples } from '../../support/sample-size.ts';
import { anyBrief, HOURS_PER_BRIEF, hoursOfOutdoor, real } from './random-hours.ts';

/** Random hours of each use: 10,000 in `npm test`, 1,000,000 in `npm run soak`. */
const count = samples(10_000, 1_000_000);
const run = propertySettings(10_000 / HOURS_PER_BRIEF, 1_000_000 / HOURS_PER_BRIEF);
const TIMEOUT_MS = 120_000 + 2 * count;
const ROUNDING = 1e-9;

const control = fc.constantFrom<Brief['control'][]>('modulating', 'on-off');
const effectiveness = { effDirect: real(0.3, 0.98), effIndirect: real(0.3, 0.9), effExchanger: real(0.2, 0.9) };

const hall = presetBrief('hall-recommended');
const processWater = presetBrief('process-water');
const turbineInlet = presetBrief('turbine-inlet');

const anyHall = fc
  .record({ tempC: real(18, 34), dTitK: real(4, 20), control, ...effectiveness })
  .map(({ tempC, ...fields }): Brief => ({ ...hall, ...fields, limit: { kind: 'inlet', tempC } }));
const anyTower = fc
  .record({
    limit: fc.record({ coldC: real(12, 34), rangeK: real(1, 12), approachK: real(2, 8), exchangerK: real(0, 3) }),
    control,
    basinHeat: fc.boolean(),
  })
  .map(({ limit, ...fields }): Brief => ({ ...processWater, ...fields, limit: { kind: 'tower', ...limit } }));
const anyTurbine = fc
  .record({ floorC: real(2, 15), overK: real(0, 8), cutInDepressionK: real(0, 4), effDirect: real(0.3, 0.98) })
  .map(
    ({ floorC, overK, ...fields }): Brief => ({
      ...turbineInlet,
      ...fields,
      limit: { kind: 'turbine', floorC, targetC: floorC + overK },
    }),
  );
const anyIndexed = fc
  .record({ brief: anyBrief, limit: fc.oneof(real(60, 82).map(thi), real(18, 30).map(shadeHeat)) })
  .map(({ brief, limit }): Brief => ({ ...brief, limit }));

function thi(value: number): Brief['limit'] {
  return { kind: 'thi', value };
}

function shadeHeat(value: number): Brief['limit'] {
  return { kind: 'shade-heat', value };
}

const uses = { halls: anyHall, towers: anyTower, turbines: anyTurbine, 'index limits': anyIndexed };

/** Classes that a use has, with `frozen` met or not; every other must not come up. */
const classesOf: Readonly<Record<keyof typeof uses, readonly string[]>> = {
  halls: ['air', 'indirect', 'short', 'beyond', 'frozen'],
  towers: ['direct', 'short', 'beyond', 'frozen'],
  turbines: ['air', 'direct', 'short', 'beyond', 'frozen'],
  'index limits': ['air', 'direct', 'indirect', 'dewpoint', 'twostage', 'damp', 'short', 'beyond', 'frozen'],
};
const metClasses = ['air', 'direct', 'indirect', 'dewpoint', 'twostage'];

const setOfBrief = new WeakMap<Brief, number>();

/** The temperature or index that a brief asks for in every hour: none of these limits follows the weather. */
function setOf(brief: Brief): number {
  const found = setOfBrief.get(brief);
  if (found !== undefined) return found;
  const { setC } = setPoints({ brief, dryBulbC: new Float64Array(24), wrapped: true, heightM: 0 });
  const set = setC[0] ?? Number.NaN;
  setOfBrief.set(brief, set);
  return set;
}

function judge(brief: Brief, outdoor: DemandHour['outdoor']): { hour: DemandHour; judgement: HourJudgement } {
  const set = setOf(brief);
  const hour = { outdoor, setC: set, supplyAimC: set - brief.dTroomK, loadFraction: 1 };
  return { hour, judgement: findUse(brief).judgeHour(hour, brief) };
}

/** A slot without demand is judged by no use. */
function isIdle(brief: Brief, { dryBulbC }: DemandHour['outdoor']): boolean {
  const idleUpToC = findUse(brief).idleUpToC(brief);
  return idleUpToC !== null && hundredths(dryBulbC) <= hundredths(idleUpToC);
}

/** Thrown with what broke; `expect` a million times over would take longer than the engine. */
function check(holds: boolean, what: () => string): void {
  if (!holds) throw new Error(what());
}

function checkHour({ hour, judgement }: ReturnType<typeof judge>, brief: Brief): void {
  const { hourClass, met, shortfallK, carriedShare, waterC, running, supply } = judgement;
  check(hourClass === 'frozen' || met === metClasses.includes(hourClass), () => `${hourClass} met ${met}`);
  check(shortfallK >= 0 && (!met || shortfallK === 0), () => `${hourClass}: shortfall ${shortfallK}`);
  check((judgement.dampBy !== null) === (hourClass === 'damp'), () => `damp by ${judgement.dampBy}`);
  check(carriedShare >= 0 && carriedShare <= 1 && (!met || carriedShare === 1), () => `share ${carriedShare}`);
  check(
    Number.isFinite(supply.tempC) && supply.share >= 0 && supply.share <= 1,
    () => `supply ${JSON.stringify(supply)}`,
  );
  check((waterC === null) === (running === null || running === 'air'), () => `water ${waterC} with ${running}`);
  const plant = findUse(brief).plantHour(hour, judgement, brief);
  check(
    Object.values(plant).every((figure) => figure === null || figure >= -ROUNDING),
    () => `plant ${JSON.stringify(plant)}`,
  );
  check(waterC !== null || plant.makeUpLitres === 0, () => `${plant.makeUpLitres} L without water`);
}

describe.each(['halls', 'towers', 'turbines', 'index limits'] as const)('every hour of %s', (name) => {
  test(
    'has a class of its use, met or not as the class says, figures within their bounds, and no water where none runs',
    () => {
      const seen = new Set<string>();
      fc.assert(
        fc.property(uses[name], hoursOfOutdoor, (brief, hours) => {
          for (const outdoor of hours) {
            if (isIdle(brief, outdoor)) continue;
            const judged = judge(brief, outdoor);
            seen.add(judged.judgement.hourClass);
            checkHour(judged, brief);
          }
        }),
        run,
      );
      expect([...seen].toSorted()).toEqual(classesOf[name].toSorted());
    },
    TIMEOUT_MS,
  );
});

describe('saturated air', () => {
  // A fan that heats more than the air stage's dries the supply, which may then keep a cap on its relative humidity.
  const { air } = presetBrief('office').fanWPerLs;
  const fanWPerLs = { air, direct: air, indirect: air, dewpoint: air, twostage: air, returnAir: air };
  const equalFans = anyIndexed.map((brief): Brief => ({ ...brief, fanWPerLs }));

  test.each([
    ['turbines', anyTurbine],
    ['index limits', equalFans],
  ] as const)(
    'meets no hour of %s by a stage that outdoor air does not meet',
    (_name, briefs) => {
      let judged = 0;
      fc.assert(
        fc.property(briefs, hoursOfOutdoor, (brief, hours) => {
          for (const { dryBulbC, pressurePa } of hours) {
            const humidityRatio = saturationHumidityRatio(dryBulbC, pressurePa);
            const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
            const outdoor = { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume };
            const { met, airMeets } = judge(brief, outdoor).judgement;
            check(met === airMeets, () => `met ${met}, by air ${airMeets}`);
            judged += 1;
          }
        }),
        run,
      );
      expect(judged).toBe(run.numRuns * HOURS_PER_BRIEF);
    },
    TIMEOUT_MS,
  );
});

describe('better plant', () => {
  /** No hour that the plain brief meets is lost by the better one. Answers the hours that it won. */
  function hoursWon(pairs: fc.Arbitrary<{ plain: Brief; better: Brief }>): number {
    let won = 0;
    fc.assert(
      fc.property(pairs, hoursOfOutdoor, ({ plain, better }, hours) => {
        for (const outdoor of hours) {
          const before = judge(plain, outdoor).judgement;
          const after = judge(better, outdoor).judgement;
          check(after.met || !before.met, () => `${before.hourClass} became ${after.hourClass}`);
          if (after.met && !before.met) won += 1;
        }
      }),
      run,
    );
    return won;
  }

  test(
    'more effectiveness of either exchanger never loses an hour of a hall',
    () => {
      const pairs = fc.record({ plain: anyHall, by: real(0.02, 0.1), wet: fc.boolean() }).map(({ plain, by, wet }) => {
        const name = wet ? 'effIndirect' : 'effExchanger';
        return { plain, better: { ...plain, [name]: plain[name] + by } };
      });
      expect(hoursWon(pairs)).toBeGreaterThan(count / 200);
    },
    TIMEOUT_MS,
  );

  test(
    'a closer approach never loses an hour of process water',
    () => {
      const pairs = fc.record({ plain: anyTower, byK: real(0.1, 1.5) }).map(({ plain, byK }) => {
        const { limit } = plain;
        const approachK = limit.kind === 'tower' ? limit.approachK - byK : Number.NaN;
        return { plain, better: limit.kind === 'tower' ? { ...plain, limit: { ...limit, approachK } } : plain };
      });
      expect(hoursWon(pairs)).toBeGreaterThan(count / 200);
    },
    TIMEOUT_MS,
  );

  test(
    'more effectiveness never loses an hour of a turbine inlet',
    () => {
      const pairs = fc
        .record({ plain: anyTurbine, by: real(0.005, 0.02) })
        .map(({ plain, by }) => ({ plain, better: { ...plain, effDirect: plain.effDirect + by } }));
      expect(hoursWon(pairs)).toBeGreaterThan(0);
    },
    TIMEOUT_MS,
  );
});

describe('a stricter brief', () => {
  test.each([
    ['a hall', anyHall],
    ['process water', anyTower],
    ['a turbine inlet', anyTurbine],
  ] as const)(
    'never improves an hour of %s by a lower temperature',
    (_name, briefs) => {
      let worsened = 0;
      fc.assert(
        fc.property(briefs, hoursOfOutdoor, real(0.05, 2), (brief, hours, byK) => {
          const strict = cooler(brief, byK);
          for (const outdoor of hours) {
            const looser = judge(brief, outdoor).judgement;
            const tighter = judge(strict, outdoor).judgement;
            check(looser.met || !tighter.met, () => `${looser.hourClass} became ${tighter.hourClass}`);
            check(
              tighter.shortfallK >= looser.shortfallK - ROUNDING,
              () => `S ${tighter.shortfallK} from ${looser.shortfallK}`,
            );
            if (looser.met && !tighter.met) worsened += 1;
          }
        }),
        run,
      );
      expect(worsened).toBeGreaterThan(count / 200);
    },
    TIMEOUT_MS,
  );
});

/** The brief held this much cooler, K; the floor of a turbine stays where it is. */
function cooler(brief: Brief, byK: number): Brief {
  const { limit } = brief;
  if (limit.kind === 'inlet') return { ...brief, limit: { ...limit, tempC: limit.tempC - byK } };
  if (limit.kind === 'tower') return { ...brief, limit: { ...limit, coldC: limit.coldC - byK } };
  if (limit.kind === 'turbine') return { ...brief, limit: { ...limit, targetC: limit.targetC - byK } };
  throw new Error(`a limit of kind ${limit.kind} has no temperature`);
}

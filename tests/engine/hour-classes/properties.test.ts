/** The properties of method 5, on random hours under random briefs. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import type { DemandHour, HourJudgement } from '#engine/hour-classes/demand-hour.ts';
import { judgeSupplyAirHour } from '#engine/hour-classes/judge-supply-air-hour.ts';
import { saturationHumidityRatio, volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { fanRiseK } from '#engine/stages/stage-path.ts';
import { supplyAirPlantHour } from '#engine/water-energy/air-plant-hour.ts';
import { propertySettings, samples } from '../../support/sample-size.ts';
import { anyBrief, cooler, HOURS_PER_BRIEF, hoursOfOutdoor, hourUnder, real } from './random-hours.ts';

/** Random hours: 10,000 in `npm test`, 1,000,000 in `npm run soak`. */
const count = samples(10_000, 1_000_000);
const run = propertySettings(10_000 / HOURS_PER_BRIEF, 1_000_000 / HOURS_PER_BRIEF);
const TIMEOUT_MS = 60_000 + count;
/** A T* found by halving is good to far less than this, K. */
const ROUNDING_K = 1e-4;

const metClasses = ['air', 'direct', 'indirect', 'dewpoint', 'twostage'];

const demandClasses = [...metClasses, 'frozen', 'damp', 'short', 'beyond'];

/** Thrown with what broke; `expect` a million times over would take longer than the engine. */
function check(holds: boolean, what: () => string): void {
  if (!holds) throw new Error(what());
}

/** S of outdoor air alone, K: what S falls back to without any state within the caps. */
function airShortfallK({ airSupplyC }: HourJudgement, { supplyAimC }: DemandHour): number {
  return Math.max(0, airSupplyC - supplyAimC);
}

/** How much more the most driven stage's fan heats than the air stage's, K: a state in the caps may be that much warmer. */
function fanLeadK(brief: Brief, outdoor: DemandHour['outdoor']): number {
  const most = Math.max(...Object.values(brief.fanWPerLs));
  return fanRiseK(most - brief.fanWPerLs.air, outdoor.volumeM3PerKg) + ROUNDING_K;
}

/** The most that S may be, K, with more effectiveness or stages than `before`. */
function shortfallAllowedK(before: HourJudgement, hour: DemandHour, brief: Brief): number {
  const fellBack = before.shortfallK === airShortfallK(before, hour);
  return before.shortfallK + (fellBack ? fanLeadK(brief, hour.outdoor) : ROUNDING_K);
}

describe('every hour', () => {
  test(
    'has one class, met or not as its class says, a shortfall of at least 0, and 0 when met',
    () => {
      const seen = new Map<string, number>();
      fc.assert(
        fc.property(anyBrief, hoursOfOutdoor, real(0, 1), (brief, hours, load) => {
          for (const outdoor of hours) {
            const hour = hourUnder(brief, outdoor, load);
            const judgement = judgeSupplyAirHour(hour, brief);
            const { hourClass, met, shortfallK, uncappedShortfallK, dampBy } = judgement;
            seen.set(hourClass, (seen.get(hourClass) ?? 0) + 1);
            check(demandClasses.includes(hourClass), () => `class ${hourClass}`);
            check(hourClass === 'frozen' || met === metClasses.includes(hourClass), () => `${hourClass} met ${met}`);
            check(shortfallK >= 0 && (!met || shortfallK === 0), () => `shortfall ${shortfallK}`);
            check(
              uncappedShortfallK <= shortfallK + ROUNDING_K,
              () => `uncapped ${uncappedShortfallK} over ${shortfallK}`,
            );
            check((dampBy !== null) === (hourClass === 'damp'), () => `damp by ${dampBy}`);
            check(met === judgement.aloneMet.length > 0, () => `met ${met} alone ${judgement.aloneMet.join()}`);
            const plant = supplyAirPlantHour(hour, judgement, brief);
            check(
              Object.values(plant).every((figure) => figure !== null && figure >= 0),
              () => `plant ${JSON.stringify(plant)}`,
            );
            check(plant.coolingKwh <= load + 1e-12, () => `cooling ${plant.coolingKwh} of ${load}`);
            check(judgement.running !== 'air' || plant.makeUpLitres === 0, () => 'water while outdoor air runs');
          }
        }),
        run,
      );
      expect([...seen.keys()].toSorted()).toEqual(demandClasses.toSorted());
    },
    TIMEOUT_MS,
  );

  test(
    'that is saturated is met by no stage that outdoor air does not meet',
    () => {
      let judged = 0;
      fc.assert(
        fc.property(anyBrief, hoursOfOutdoor, (brief, hours) => {
          for (const { dryBulbC, pressurePa } of hours) {
            const humidityRatio = saturationHumidityRatio(dryBulbC, pressurePa);
            const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
            const outdoor = { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume };
            const { met, airMeets } = judgeSupplyAirHour(hourUnder(brief, outdoor), brief);
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

describe('with modulating control', () => {
  const modulating = anyBrief.map((brief): Brief => ({ ...brief, control: 'modulating' }));

  test(
    'more effectiveness never turns a met hour into an unmet one and never raises the shortfall',
    () => {
      let met = 0;
      fc.assert(
        fc.property(modulating, hoursOfOutdoor, real(0.02, 0.1), (brief, hours, by) => {
          for (const outdoor of hours) {
            const hour = hourUnder(brief, outdoor);
            const less = judgeSupplyAirHour(hour, brief);
            if (less.met) met += 1;
            for (const name of ['effDirect', 'effIndirect', 'effDewPoint'] as const) {
              const better = { ...brief, [name]: Math.min(brief[name] + by, 1) };
              const more = judgeSupplyAirHour(hour, better);
              check(more.met || !less.met, () => `unmet with ${name} ${better[name]}`);
              // What a better first exchanger saturates may break a supply cap that a lesser one kept: S then falls back.
              if (name === 'effIndirect' && more.hourClass === 'damp') continue;
              check(
                more.shortfallK <= shortfallAllowedK(less, hour, brief),
                () => `S ${more.shortfallK} from ${less.shortfallK}`,
              );
            }
          }
        }),
        run,
      );
      expect(met).toBeGreaterThan(count / 10);
    },
    TIMEOUT_MS,
  );

  test(
    'one more stage never turns a met hour into an unmet one and never raises the shortfall',
    () => {
      let helped = 0;
      fc.assert(
        fc.property(modulating, hoursOfOutdoor, (brief, hours) => {
          for (const outdoor of hours) {
            const hour = hourUnder(brief, outdoor);
            const fewer = judgeSupplyAirHour(hour, { ...brief, stages: brief.stages.slice(0, -1) });
            const all = judgeSupplyAirHour(hour, brief);
            check(all.met || !fewer.met, () => 'met with one stage less');
            check(
              all.shortfallK <= shortfallAllowedK(fewer, hour, brief),
              () => `S ${all.shortfallK} from ${fewer.shortfallK}`,
            );
            if (all.met && !fewer.met) helped += 1;
          }
        }),
        run,
      );
      expect(helped).toBeGreaterThan(count / 100);
    },
    TIMEOUT_MS,
  );
});

describe('a stricter brief', () => {
  function neverImproves(looser: HourJudgement, tighter: HourJudgement, tighterHour: DemandHour): void {
    check(looser.met || !tighter.met, () => `${looser.hourClass} became ${tighter.hourClass}`);
    const fellBack = tighter.shortfallK === airShortfallK(tighter, tighterHour);
    const least = looser.shortfallK - ROUNDING_K;
    check(fellBack || tighter.shortfallK >= least, () => `S ${tighter.shortfallK} from ${looser.shortfallK}`);
  }

  test(
    'never improves an hour by a tighter cap',
    () => {
      let worsened = 0;
      const anyCap = fc.constantFrom('roomRhPct', 'supplyRhPct');
      fc.assert(
        fc.property(anyBrief, hoursOfOutdoor, anyCap, real(30, 95), real(1, 20), (brief, hours, cap, pct, by) => {
          for (const outdoor of hours) {
            const withCap = (limitPct: number): Brief => ({ ...brief, caps: { ...brief.caps, [cap]: limitPct } });
            const hour = hourUnder(brief, outdoor);
            const looser = judgeSupplyAirHour(hour, withCap(pct));
            const tighter = judgeSupplyAirHour(hour, withCap(pct - by));
            neverImproves(looser, tighter, hour);
            if (looser.met && !tighter.met) worsened += 1;
          }
        }),
        run,
      );
      expect(worsened).toBeGreaterThan(count / 100);
    },
    TIMEOUT_MS,
  );

  // A room warmer over its supply starts its plant sooner and is drier at the same moisture: left out here.
  const withoutRoomState = anyBrief.map((brief): Brief => {
    const { roomRhPct: _room, ...caps } = brief.caps;
    return { ...brief, startRoomTempC: null, caps };
  });
  const wider = (brief: Brief, byK: number): Brief => ({ ...brief, dTroomK: brief.dTroomK + byK });

  test.each([
    { what: 'a lower set-point', briefs: anyBrief, stricter: cooler },
    { what: 'a greater difference between room and supply', briefs: withoutRoomState, stricter: wider },
  ])(
    'never improves an hour by $what',
    ({ briefs, stricter }) => {
      let worsened = 0;
      fc.assert(
        fc.property(briefs, hoursOfOutdoor, real(0.05, 4), (brief, hours, byK) => {
          const strict = stricter(brief, byK);
          for (const outdoor of hours) {
            const strictHour = hourUnder(strict, outdoor);
            const looser = judgeSupplyAirHour(hourUnder(brief, outdoor), brief);
            const tighter = judgeSupplyAirHour(strictHour, strict);
            neverImproves(looser, tighter, strictHour);
            if (looser.met && !tighter.met) worsened += 1;
          }
        }),
        run,
      );
      expect(worsened).toBeGreaterThan(count / 100);
    },
    TIMEOUT_MS,
  );
});

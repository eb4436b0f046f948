import fc from 'fast-check';
import type { Brief, HumidityCaps, Stage } from '#engine/brief/brief.ts';
import { briefFromPreset } from '#engine/brief/brief-from-preset.ts';
import type { DemandHour } from '#engine/hour-classes/demand-hour.ts';
import { saturationHumidityRatio, volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';

const STEPS = 1_000_000;

/** A real number spread evenly between two; fast-check's own doubles crowd at the ends. */
export function real(min: number, max: number): fc.Arbitrary<number> {
  return fc.noBias(fc.integer({ min: 0, max: STEPS })).map((step) => min + ((max - min) * step) / STEPS);
}

const optional = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined });

const caps: fc.Arbitrary<HumidityCaps> = fc
  .record({ room: optional(real(30, 95)), supply: optional(real(30, 100)), dewPoint: optional(real(5, 25)) })
  .map(({ room, supply, dewPoint }) => ({
    ...(room === undefined ? {} : { roomRhPct: room }),
    ...(supply === undefined ? {} : { supplyRhPct: supply }),
    ...(dewPoint === undefined ? {} : { supplyDewPointC: dewPoint }),
  }));

const stages = fc.shuffledSubarray<Stage>(['direct', 'indirect', 'dewpoint', 'twostage']);

const plainBrief = briefFromPreset({
  id: 'random',
  limit: { kind: 'fixed', tempC: 26 },
  balanceTempC: null,
  dTroomK: 5,
  stages: [],
});

/** Briefs of rooms held at a temperature, over the whole range that a brief may take. */
export const anyBrief: fc.Arbitrary<Brief> = fc
  .record({
    tempC: real(18, 34),
    dTroomK: real(1, 10),
    effDirect: real(0.3, 0.98),
    effIndirect: real(0.3, 0.9),
    effDewPoint: real(0.3, 0.9),
    cutInDepressionK: real(0, 4),
    dwRoomKgKg: real(0, 0.002),
    control: fc.constantFrom<Brief['control'][]>('modulating', 'on-off'),
    startRoomTempC: fc.option(real(15, 35)),
    maxOutdoorRhPct: fc.option(real(40, 100)),
    caps,
    stages,
  })
  .map(({ tempC, ...fields }) => ({ ...plainBrief, limit: { kind: 'fixed', tempC }, ...fields }));

/** Outdoor air from frost to desert and from sea level to high plateaus, saturated one time in ten. */
const anyOutdoor = fc
  .record({
    dryBulbC: real(-15, 50),
    saturation: fc.oneof({ weight: 9, arbitrary: real(0.02, 1) }, { weight: 1, arbitrary: fc.constant(1) }),
    pressurePa: real(60_000, 105_000),
  })
  .map(({ dryBulbC, saturation, pressurePa }) => {
    const humidityRatio = saturation * saturationHumidityRatio(dryBulbC, pressurePa);
    return { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volumeM3PerKg(dryBulbC, humidityRatio, pressurePa) };
  });

/** Hours that one random brief is tried on. */
export const HOURS_PER_BRIEF = 20;

export const hoursOfOutdoor = fc.array(anyOutdoor, { minLength: HOURS_PER_BRIEF, maxLength: HOURS_PER_BRIEF });

/** A random hour as the brief asks for it. */
export function hourUnder(brief: Brief, outdoor: DemandHour['outdoor'], loadFraction = 1): DemandHour {
  const setC = brief.limit.kind === 'fixed' ? brief.limit.tempC : Number.NaN;
  return { outdoor, setC, supplyAimC: setC - brief.dTroomK * loadFraction, loadFraction };
}

/** The brief held this much cooler, K. */
export function cooler(brief: Brief, byK: number): Brief {
  return brief.limit.kind === 'fixed' ? { ...brief, limit: { kind: 'fixed', tempC: brief.limit.tempC - byK } } : brief;
}

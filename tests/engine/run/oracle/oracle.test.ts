/**
 * The engine's hour classes against an oracle written apart from the method's text with PsychroLib (`oracle.ts`): ten made-up
 * climates under every preset. No hour may differ unless it stands within 0.02 K of temperature, 0.02 K of dew point or 0.1 % RH
 * of a threshold (0.03 points of an index, what 0.02 K is worth in one); those are counted and stay a handful.
 * `npm test` looks at every 37th slot, `npm run soak` at all.
 */
import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import { clockOfBrief } from '#engine/clock/clock-of-brief.ts';
import { openSlots } from '#engine/clock/open-slots.ts';
import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import type { HourColumns } from '#engine/run/hour-columns.ts';
import { judgeHours } from '#engine/run/judged-year.ts';
import { presetBrief, presetNames } from '../../../support/presets.ts';
import { samples } from '../../../support/sample-size.ts';
import { type Climate, climateHeightM, climates, climateYear } from '../../../support/synthetic-climates.ts';
import { judgeByOracle, type OracleAnswer, type OracleHour, type Threshold } from './oracle.ts';
import { limitOfEachSlot } from './oracle-limits.ts';

/** A prime, so that every hour of the day is looked at. */
const EVERY_SLOTS = samples(37, 1);
const POSITION = { latitude: 35, longitude: 10 };

const NEAR: readonly { threshold: Threshold; by: number }[] = [
  { threshold: 'temperature', by: 0.02 },
  { threshold: 'cut-in', by: 0.02 },
  { threshold: 'gain', by: 0.02 },
  { threshold: 'dew-point', by: 0.02 },
  { threshold: 'rh', by: 0.1 },
  { threshold: 'index', by: 0.03 },
];

function agree(found: OracleAnswer, engine: OracleAnswer): boolean {
  return found.hourClass === engine.hourClass && (engine.met === null || found.met === engine.met);
}

/** Whether moving one kind of threshold by its tolerance makes the oracle say what the engine says. */
function nearThreshold(hour: OracleHour, engine: OracleAnswer): boolean {
  return NEAR.flatMap(({ threshold, by }) => [
    { threshold, by },
    { threshold, by: -by },
  ]).some((moved) => agree(judgeByOracle({ ...hour, moved }), engine));
}

/** Whether each slot with demand is met. */
function metOfSlots({ count, slot, met }: HourColumns): ReadonlyMap<number, boolean> {
  return new Map(Array.from({ length: count }, (_none, at) => [slot[at] ?? 0, met[at] === 1]));
}

interface Comparison {
  readonly compared: number;
  readonly near: number;
  readonly wrong: readonly string[];
  readonly classes: ReadonlySet<string>;
}

function compare(climate: Climate, preset: string, changes: Partial<Brief> = {}): Comparison {
  const brief = presetBrief(preset, changes);
  const year = climateYear(climate);
  const heightM = climateHeightM(climate);
  const place = { year, brief, zone: climate.zone, position: POSITION };
  const judged = judgeHours({ ...place, heightM });
  const met = metOfSlots(judged.hours);
  const columns = unpackYear(year.packed);
  const limits = limitOfEachSlot({ brief, dryBulbC: columns.dryBulbC, wrapped: year.kind !== 'actual', heightM });
  const open = openSlots(brief, clockOfBrief(place));
  const wrong: string[] = [];
  const classes = new Set<string>();
  let compared = 0;
  let near = 0;
  for (let slot = presetNames.indexOf(preset) % EVERY_SLOTS; slot < judged.slots; slot += EVERY_SLOTS) {
    const hour: OracleHour = {
      brief,
      open: open[slot] === 1,
      dryBulbC: columns.dryBulbC[slot] ?? Number.NaN,
      humidityRatio: columns.humidityRatio[slot] ?? Number.NaN,
      pressurePa: columns.pressurePa[slot] ?? Number.NaN,
      limitC: limits[slot] ?? Number.NaN,
      moved: null,
    };
    const engine = { hourClass: hourClasses[judged.classCodes[slot] ?? 0] ?? '', met: met.get(slot) ?? null };
    const oracle = judgeByOracle(hour);
    compared++;
    classes.add(engine.hourClass);
    if (agree(oracle, engine)) continue;
    if (nearThreshold(hour, engine)) near++;
    else {
      const state = `${hour.dryBulbC} °C, ${hour.humidityRatio} kg/kg, ${hour.pressurePa} Pa`;
      wrong.push(
        `slot ${slot}, ${state}: oracle ${oracle.hourClass} ${oracle.met}, engine ${engine.hourClass} ${engine.met}`,
      );
    }
  }
  return { compared, near, wrong, classes };
}

describe('the oracle', () => {
  test.each(presetNames)(
    'agrees hour by hour on ten climates under %s',
    (preset) => {
      const comparisons = climates.map((climate) => compare(climate, preset));
      expect(comparisons.flatMap(({ wrong }) => wrong).slice(0, 10)).toEqual([]);
      const compared = comparisons.reduce((sum, each) => sum + each.compared, 0);
      const near = comparisons.reduce((sum, each) => sum + each.near, 0);
      const classes = new Set(comparisons.flatMap((each) => [...each.classes]));
      expect(compared).toBeGreaterThan((climates.length * 8700) / EVERY_SLOTS);
      expect(near, 'hours that differ close to a threshold').toBeLessThanOrEqual(compared / 1000);
      expect(classes.size).toBeGreaterThan(3);
    },
    600_000,
  );

  test('agrees with plant that is on or off, with supply caps in rooms and with every stage permitted', () => {
    const changed: Partial<Brief> = {
      control: 'on-off',
      caps: { roomRhPct: 60, supplyRhPct: 88, supplyDewPointC: 17 },
      stages: ['indirect', 'dewpoint', 'direct', 'twostage'],
      freezeLockoutC: 15,
    };
    for (const control of ['on-off', 'modulating'] as const) {
      const comparisons = climates.map((climate) => compare(climate, 'clinic', { ...changed, control }));
      expect(comparisons.flatMap(({ wrong }) => wrong).slice(0, 10)).toEqual([]);
      const classes = new Set(comparisons.flatMap((each) => [...each.classes]));
      expect(classes).toContain('frozen');
      expect(classes).toContain('damp');
    }
  }, 600_000);
});

/** Every field of a brief outside its range answers a located message; what cannot be known is "not applicable", never NaN. */
import { describe, expect, test } from 'vitest';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { canonicalJson } from '#engine/brief/canonical-json.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { presetBrief, presetNames, rawPreset } from '../../support/presets.ts';
import { type SyntheticHour, syntheticYear } from '../../support/synthetic-year.ts';

function faultsOf(raw: unknown): readonly { path: string; message: string }[] {
  const reading = readBrief(raw);
  return reading.ok ? [] : reading.faults;
}

function faultPaths(raw: unknown): string[] {
  return faultsOf(raw).map(({ path }) => path);
}

/** Paths of every number in a preset, such as `limit.tempC` or `hardLimits[0].hours`, each with a copy that holds another. */
function withEachNumber(value: unknown, other: number): { path: string; changed: unknown }[] {
  if (typeof value === 'number') return [{ path: '', changed: other }];
  if (Array.isArray(value)) {
    return value.flatMap((entry, index) =>
      withEachNumber(entry, other).map(({ path, changed }) => ({
        path: joined(`[${index}]`, path),
        changed: value.with(index, changed),
      })),
    );
  }
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([name, field]) =>
    withEachNumber(field, other).map(({ path, changed }) => ({
      path: joined(name, path),
      changed: { ...value, [name]: changed },
    })),
  );
}

function joined(outer: string, inner: string): string {
  return inner === '' || inner.startsWith('[') ? `${outer}${inner}` : `${outer}.${inner}`;
}

describe('a number that is none', () => {
  const priced = {
    prices: { currency: 'EUR', electricityPerKwh: 0.2, waterPerM3: 4, extraCapitalPerKw: 1, extraUpkeepPerKwYear: 1 },
    grid: { kgCo2PerKwh: 0.4, source: 'a table of 2024' },
  };

  test.each([Number.NaN, Number.POSITIVE_INFINITY, -1e12])(
    '%s is refused at its path in every field of every preset',
    (other) => {
      let fields = 0;
      for (const name of presetNames) {
        for (const { path, changed } of withEachNumber({ ...rawPreset(name), ...priced }, other)) {
          expect(faultPaths(changed), `${name} ${path}`).toContain(path);
          fields += 1;
        }
      }
      expect(fields).toBeGreaterThan(11 * 20);
    },
  );
});

describe('fields that contradict one another', () => {
  test.each([
    ['office', 'startRoomTempC', { startRoomTempC: 27 }],
    ['office', 'basinHeat', { basinHeat: true }],
    ['office', 'balanceTempC', { phi: 'linear', balanceTempC: null }],
    ['office', 'lowerLimits.roomRhPct', { lowerLimits: { roomRhPct: 65 } }],
    ['hall-recommended', 'dTroomK', { dTroomK: 3 }],
    ['hall-recommended', 'dwRoomKgKg', { dwRoomKgKg: 0.001 }],
    ['hall-recommended', 'phi', { phi: 'linear' }],
    ['hall-recommended', 'secondaryAir', { secondaryAir: 'exhaust' }],
    ['hall-recommended', 'stages', { stages: ['direct'] }],
    ['hall-recommended', 'dTitK', { dTitK: null }],
    ['process-water', 'phi', { phi: 'linear' }],
    ['process-water', 'stages', { stages: ['tower', 'direct'] }],
    ['turbine-inlet', 'limit.floorC', { limit: { kind: 'turbine', targetC: 10, floorC: 12 } }],
    ['turbine-inlet', 'stages', { stages: ['twostage'] }],
    ['dairy', 'hardLimits', { hardLimits: [{ tempC: 35, hours: 0 }] }],
    ['warehouse', 'secondaryAir', { secondaryAir: 'exhaust' }],
    ['clinic', 'stages', { stages: ['indirect', 'direct'] }],
    ['office', 'prices.currency', { prices: { electricityPerKwh: 0.2 } }],
    ['office', 'prices.gas', { prices: { currency: 'EUR', gas: 1 } }],
    ['office', 'grid.source', { grid: { kgCo2PerKwh: 0.4 } }],
    ['office', 'hours', { hours: '18-8' }],
    ['office', 'months', { months: [] }],
    ['office', 'cycles', { cycles: 1 }],
    ['office', 'score', { score: [{ component: 'served', weight: 99, a0: 70, a100: 99 }] }],
  ])('%s is refused at %s', (preset, path, change) => {
    const faults = faultsOf({ ...rawPreset(preset), ...change });
    expect(faults.map((fault) => fault.path)).toEqual([path]);
    expect(faults[0]?.message).not.toMatch(/undefined|NaN/);
  });

  test('a clinic gets direct stages for a written reason', () => {
    const stagesReason = 'Isolation ward closed; infection control agreed on 3 March.';
    expect(faultPaths({ ...rawPreset('clinic'), stages: ['direct', 'indirect'], stagesReason })).toEqual([]);
  });
});

describe('a brief that fits no hour', () => {
  /** Weather at the ends of what occurs, and a year of which nothing is known. */
  const weathers: Readonly<Record<string, (slot: number) => SyntheticHour>> = {
    saturated: () => ({ dryBulbC: 30, saturation: 1 }),
    frozen: () => ({ dryBulbC: -30, saturation: 0.8 }),
    'hot and dry': () => ({ dryBulbC: 50, saturation: 0.02, pressurePa: 70000 }),
    'not known': () => null,
  };
  const place = { zone: 'UTC', heightM: 4000, position: { latitude: 75, longitude: 10 } };

  test('is judged without a figure that is none, in any weather, under every preset', () => {
    let runs = 0;
    for (const [weather, at] of Object.entries(weathers)) {
      const year = syntheticYear({ at });
      for (const name of presetNames) {
        const { hourClassCodes, ...figures } = judgeYear({ year, brief: presetBrief(name), ...place });
        expect(() => canonicalJson(figures), `${name}, ${weather}`).not.toThrow();
        expect(hourClassCodes).toHaveLength(8760);
        runs += 1;
      }
    }
    expect(runs).toBe(44);
  });

  test('of a set-point under every wet bulb meets nothing and says so', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 30, saturation: 0.3 }) });
    const brief = presetBrief('office', { limit: { kind: 'fixed', tempC: 14 }, balanceTempC: 10 });
    const result = judgeYear({ year, brief, ...place });
    expect(result.ledger.met).toBe(0);
    expect(result.verdict).toBe('does not');
    expect(result.score).toBe(Math.round(result.scoreExact ?? Number.NaN));
  });

  test('of a schedule that never opens at its place has no demand and no score', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 30, saturation: 0.3 }) });
    const result = judgeYear({ year, brief: presetBrief('glasshouse', { months: [12] }), ...place });
    expect(result.ledger.classes.closed).toBe(8760);
    expect(result).toMatchObject({ score: null, scoreNote: 'not applicable: no demand' });
    expect(result.money).toBeNull();
  });
});

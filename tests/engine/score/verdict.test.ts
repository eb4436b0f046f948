import { describe, expect, test } from 'vitest';
import { countHardLimits } from '#engine/score/hard-limits.ts';
import { verdictOf } from '#engine/score/verdict.ts';
import { hoursLike } from '../../support/judged-hours.ts';
import { presetBrief } from '../../support/presets.ts';

const spell = { hours: 17, startSlot: 0, endSlot: 20, severityKh: 1, worstK: 1, cutAtJoint: false };

function verdict(met: number, input: Partial<Parameters<typeof verdictOf>[0]> = {}) {
  const brief = { tolerance: { sharePct: 3 } };
  return verdictOf({ brief, ledger: { demand: 1000, met }, worstSpell: null, hardLimits: [], ...input });
}

describe('the verdict', () => {
  test('holds at exactly 3 % unmet and fails one hour later', () => {
    expect(verdict(970)).toMatchObject({ verdict: 'meets the brief', failed: [] });
    const over = verdict(969);
    expect(over).toMatchObject({ verdict: 'does not', failed: ['unmet share of demand hours'] });
    expect(over.tolerances[0]).toMatchObject({ allowed: 3, unit: '%', holds: false });
    expect(over.tolerances[0]?.found).toBeCloseTo(3.1, 9);
  });

  test('names every tolerance that fails', () => {
    const brief = { tolerance: { sharePct: 3, hours: 40, spellH: 16 } };
    expect(verdict(950, { brief, worstSpell: spell }).failed).toEqual([
      'unmet share of demand hours',
      'unmet demand hours',
      'worst spell',
    ]);
  });

  test('is "no tolerance set" without a tolerance, but a hard limit can still fail it', () => {
    const brief = { tolerance: {} };
    const limit = { tempC: 33, derated: false, allowedHours: 0, foundHours: 0 };
    expect(verdict(10, { brief }).verdict).toBe('no tolerance set');
    expect(verdict(10, { brief, hardLimits: [limit] }).verdict).toBe('no tolerance set');
    const failing = verdict(10, { brief, hardLimits: [{ ...limit, foundHours: 2 }] });
    expect(failing).toMatchObject({ verdict: 'does not', failed: ['hours over 33 °C'] });
  });
});

describe('a hard limit', () => {
  const derate = '1 K per 300 m above 900 m';
  const hour = {
    outdoor: { dryBulbC: 40, humidityRatio: 0.01, pressurePa: 90000, volumeM3PerKg: 1 },
    setC: 27,
    supplyAimC: 27,
    loadFraction: 1,
  };
  const judgement = {
    hourClass: 'short',
    met: false,
    dampBy: null,
    shortfallK: 5,
    uncappedShortfallK: 3.5,
    airMeets: false,
    airSupplyC: 40,
    running: 'air',
    supply: { tempC: 40, humidityRatio: 0.01, evaporatedKgPerKg: 0, share: 0 },
    carriedShare: 0,
    waterC: null,
    aloneMet: [],
  } as const;

  function count(tempC: number, heightM: number, derated = true) {
    const limit = derated ? { tempC, hours: 0, derate } : { tempC, hours: 0 };
    const brief = presetBrief('office', { hardLimits: [limit] });
    return countHardLimits({ brief, heightM, hours: hoursLike([{ hour, judgement }]) })[0];
  }

  test('counts unmet hours whose room passes it without regard to caps, a tie not', () => {
    expect(count(30.5, 0)?.foundHours).toBe(0);
    expect(count(30.49, 0)?.foundHours).toBe(1);
  });

  test('is lowered by 1 K per 300 m above 900 m, continuously, where the preset says so', () => {
    expect(count(32, 900)).toMatchObject({ tempC: 32, derated: false, foundHours: 0 });
    expect(count(32, 1050)).toMatchObject({ tempC: 31.5, derated: true, foundHours: 0 });
    expect(count(32, 1500)).toMatchObject({ tempC: 30, derated: true, foundHours: 1 });
    expect(count(32, 1500, false)).toMatchObject({ tempC: 32, derated: false, foundHours: 0 });
  });
});

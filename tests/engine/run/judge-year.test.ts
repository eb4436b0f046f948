import { describe, expect, test } from 'vitest';
import { canonicalJson } from '#engine/brief/canonical-json.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { presetBrief } from '../../support/presets.ts';
import { type SyntheticHour, syntheticYear } from '../../support/synthetic-year.ts';

const office = presetBrief('office');
const place = { zone: 'UTC', heightM: 0 };

/** 2610 hours: 261 weekdays of 2029, 10 hours each. */
const OFFICE_HOURS = 2610;

/** A warm dry year with a daily wave of 4 K between 28 and 32 °C. */
function dryHour(slot: number): SyntheticHour {
  return { dryBulbC: 30 + 2 * Math.sin((2 * Math.PI * slot) / 24), humidityRatio: 0.005 };
}

describe('a year with one kind of weather', () => {
  test('saturated all year: no hour by direct cooling, every demand hour damp', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 28, saturation: 1 }) });
    const { ledger, aloneHours, verdict, score, parts, water } = judgeYear({ year, brief: office, ...place });
    expect(ledger).toMatchObject({ demand: OFFICE_HOURS, met: 0, dampOutside: OFFICE_HOURS, dampPlant: 0 });
    expect(ledger.classes).toMatchObject({ damp: OFFICE_HOURS, direct: 0, indirect: 0, twostage: 0, air: 0 });
    expect(aloneHours).toEqual({ air: 0, direct: 0, indirect: 0, twostage: 0 });
    expect(verdict).toBe('does not');
    expect(water).toMatchObject({ makeUpLitres: 0, litresPerKwh: null });
    expect(parts.find(({ component }) => component === 'served')?.points).toBe(0);
    expect(score).toBe(0);
  });

  test('saturated and cool: what is met is met by outdoor air, never by a stage', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 16, saturation: 1 }) });
    const { ledger } = judgeYear({ year, brief: office, ...place });
    expect(ledger.classes).toMatchObject({ air: OFFICE_HOURS, direct: 0, indirect: 0, twostage: 0 });
  });

  test('dry and between 28 and 32 °C: every demand hour direct', () => {
    const { ledger, verdict, worstSpell } = judgeYear({
      year: syntheticYear({ at: dryHour }),
      brief: office,
      ...place,
    });
    expect(ledger.classes).toMatchObject({ direct: OFFICE_HOURS, closed: 8760 - OFFICE_HOURS });
    expect(ledger).toMatchObject({ demand: OFFICE_HOURS, met: OFFICE_HOURS });
    expect(verdict).toBe('meets the brief');
    expect(worstSpell).toBeNull();
  });

  test('never over the balance temperature: idle, no score and no excuse for one', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 14, saturation: 0.5 }) });
    const result = judgeYear({ year, brief: office, ...place });
    expect(result.ledger.classes.idle).toBe(OFFICE_HOURS);
    expect(result).toMatchObject({
      score: null,
      scoreExact: null,
      scoreNote: 'not applicable: no demand',
      words: null,
    });
    expect(result.electricity?.savedPct).toBeNull();
    expect(result.parts.every(({ raw, points }) => raw === null && points === null)).toBe(true);
  });
});

describe('the ledger', () => {
  const gappy = syntheticYear({ at: (slot) => (slot % 10 === 0 ? null : dryHour(slot)), slots: 8784 });

  test('adds up to the hours of the year, of 8784 too, and so do the bytes of the year cloth', () => {
    const { ledger, hourClassCodes } = judgeYear({ year: gappy, brief: office, ...place });
    expect(ledger.hours).toBe(8784);
    expect(Object.values(ledger.classes).reduce((sum, hours) => sum + hours, 0)).toBe(8784);
    for (const [code, hourClass] of hourClasses.entries()) {
      expect(hourClassCodes.filter((each) => each === code)).toHaveLength(ledger.classes[hourClass]);
    }
  });

  test('counts missing hours of the schedule as missing, not as unmet', () => {
    const { ledger } = judgeYear({ year: gappy, brief: office, ...place });
    expect(ledger.classes.missing).toBeGreaterThan(200);
    expect(ledger.met).toBe(ledger.demand);
  });

  test('is scaled for missing hours by month and hour of day, beside the counts as read', () => {
    const july = (slot: number): SyntheticHour => (slot >= 4344 && slot < 4512 ? null : dryHour(slot));
    const { ledger, scaled } = judgeYear({ year: syntheticYear({ at: july }), brief: office, ...place });
    expect(ledger.demand).toBe(OFFICE_HOURS - 50);
    expect(scaled.demand).toBeCloseTo(OFFICE_HOURS, 9);
    expect(scaled.met).toBeCloseTo(OFFICE_HOURS, 9);
    const noNine = (slot: number): SyntheticHour => (slot % 24 === 8 && slot < 744 ? null : dryHour(slot));
    const without = judgeYear({ year: syntheticYear({ at: noNine }), brief: office, ...place });
    expect(without.scaled).toMatchObject({ unknown: 23, demand: OFFICE_HOURS - 23 });
  });

  test('agrees with its tables by month and hour and with the supply curve', () => {
    const { ledger, demandByMonthHour, metByMonthHour, supplyCurve } = judgeYear({
      year: gappy,
      brief: office,
      ...place,
    });
    expect([demandByMonthHour.length, demandByMonthHour[0]?.length]).toEqual([12, 24]);
    expect(demandByMonthHour.flat().reduce((sum, hours) => sum + hours)).toBe(ledger.demand);
    expect(metByMonthHour.flat().reduce((sum, hours) => sum + hours)).toBe(ledger.met);
    expect(supplyCurve.reduce((sum, { hours }) => sum + hours, 0)).toBe(ledger.demand);
  });
});

describe('the worst spell of a year', () => {
  /** Damp in the last week of January and the first of February, dry otherwise. */
  const turnOfMonth = (slot: number): SyntheticHour =>
    slot >= 24 * 24 && slot < 24 * 38 ? { dryBulbC: 28, saturation: 1 } : dryHour(slot);

  test('is cut at the joint of a typical year and runs on in an actual one', () => {
    const typical = judgeYear({ year: syntheticYear({ at: turnOfMonth }), brief: office, ...place });
    const actual = judgeYear({
      year: syntheticYear({ at: turnOfMonth, kind: 'actual', year: 2029 }),
      brief: office,
      ...place,
    });
    // 2029: 25 to 31 January has 5 weekdays (Thu, Fri, Mon, Tue, Wed), 1 to 7 February 5 (Thu, Fri, Mon, Tue, Wed).
    expect(typical.worstSpell).toMatchObject({ hours: 50, cutAtJoint: true });
    expect(actual.worstSpell).toMatchObject({ hours: 100, cutAtJoint: false, startSlot: 24 * 24 + 8 });
  });
});

describe('gates', () => {
  test('a hard limit that is passed excludes the place, fails the verdict and keeps the arithmetic', () => {
    const hot = syntheticYear({ at: (slot) => ({ dryBulbC: slot % 24 === 14 ? 46 : 30, humidityRatio: 0.012 }) });
    const brief = presetBrief('office', { hardLimits: [{ tempC: 28, hours: 0 }], tolerance: { sharePct: 100 } });
    const result = judgeYear({ year: hot, brief, ...place });
    expect(result.score).toBeNull();
    expect(result.words).toBeNull();
    expect(result.scoreExact).toBeGreaterThan(0);
    expect(result.scoreNote).toMatch(/^excluded: \d+ h over 28 °C; 0 h allowed$/);
    expect(result.verdict).toBe('does not');
    expect(result.failed).toEqual(['hours over 28 °C']);
  });

  test('coverage under 90 % of the schedule excludes, at 90 % it does not', () => {
    const missing = (every: number) => syntheticYear({ at: (slot) => (slot % 24 < every ? null : dryHour(slot)) });
    const night = judgeYear({ year: missing(8), brief: office, ...place });
    expect(night.gates[0]).toMatchObject({ gate: 'coverage', answer: 'pass' });
    expect(night.score).not.toBeNull();
    expect(night.usable).toBe(false);
    const tenth = judgeYear({ year: missing(9), brief: office, ...place });
    expect(tenth.gates[0]).toMatchObject({ answer: 'pass', note: 'weather for 2349 of 2610 hours in schedule, 90 %' });
    const fifth = judgeYear({ year: missing(10), brief: office, ...place });
    expect(fifth.gates[0]?.answer).toBe('fail');
    expect(fifth.scoreNote).toMatch(/^excluded: weather for 2088 of 2610 hours/);
  });

  test('a month without a known hour is not taken for a month without demand', () => {
    const noJuly = syntheticYear({ at: (slot) => (slot >= 4344 && slot < 5088 ? null : dryHour(slot)) });
    const result = judgeYear({ year: noJuly, brief: office, ...place });
    expect(result.monthsShort).toEqual([7]);
    expect(result.usable).toBe(false);
    expect(result.ledger.classes.missing).toBe(220);
    expect(result.gates[0]?.note).toBe('weather for 2390 of 2610 hours in schedule, 91.5 %');
  });

  test('what only a person can answer is not known, the preset’s own gates too', () => {
    const { gates } = judgeYear({ year: syntheticYear({ at: dryHour }), brief: presetBrief('clinic'), ...place });
    const asked = gates.filter(({ answer }) => answer === 'not known').map(({ gate }) => gate);
    expect(asked).toEqual(['water available', 'exclusions of use', 'hygiene', 'infection-control sign-off']);
  });
});

describe('a run', () => {
  test('names its method, and the same inputs give the same bytes', () => {
    const input = { year: syntheticYear({ at: dryHour }), brief: office, ...place };
    const [one, other] = [judgeYear(input), judgeYear(input)].map(({ hourClassCodes, ...figures }) => ({
      text: canonicalJson(figures),
      hourClassCodes,
    }));
    expect(one).toEqual(other);
    expect(judgeYear(input).methodVersion).toBe(METHOD_VERSION);
  });

  test('survives being stored as JSON', () => {
    const { hourClassCodes, ...figures } = judgeYear({ year: syntheticYear({ at: dryHour }), brief: office, ...place });
    expect(hourClassCodes).toHaveLength(8760);
    expect(JSON.parse(canonicalJson(figures))).toEqual(figures);
  });

  test('of a schedule of daylight hours is refused in words where the position is not known', () => {
    const input = { year: syntheticYear({ at: dryHour }), brief: presetBrief('glasshouse'), ...place };
    expect(() => judgeYear(input)).toThrow(
      'a schedule of daylight hours needs the position of the place, its latitude and longitude',
    );
    const { clock } = judgeYear({ ...input, position: { latitude: 45, longitude: 0 } });
    expect(clock.daylightAt).toEqual({ latitude: 45, longitude: 0 });
  });
});

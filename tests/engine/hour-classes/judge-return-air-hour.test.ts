import { describe, expect, test } from 'vitest';
import { judgedAt } from '../../support/hour-at.ts';
import { presetBrief } from '../../support/presets.ts';

/** Inlet at 27 °C, 12 K over the equipment: return at 39 °C; both exchangers 0.65, so that 20.54 °C is what they need. */
const hall = presetBrief('hall-recommended');

// Every expected figure is worked out by hand from method 3.1, 4 and 6.
describe('the hall’s own air', () => {
  test('is cooled dry as long as the dry exchanger reaches the inlet limit: 39 - 0.65 (39 - 20) is under 27', () => {
    const met = judgedAt(hall, { dryBulbC: 20, wetBulbC: 20 });
    expect(met).toMatchObject({ hourClass: 'air', met: true, running: 'air', airMeets: true, waterC: null });
    // The bypass opens: no supply under what is asked.
    expect(met.supply).toMatchObject({ tempC: 27, humidityRatio: null, share: 0 });
    expect(met.aloneMet).toEqual(['air', 'indirect']);
    expect(judgedAt(hall, { dryBulbC: 20.53, wetBulbC: 15 }).hourClass).toBe('air');
    expect(judgedAt(hall, { dryBulbC: 20.56, wetBulbC: 15 }).hourClass).toBe('indirect');
  });

  test('is cooled wet at the x that just reaches it, and water is sensible heat over 2,430 kJ/kg times k', () => {
    const met = judgedAt(hall, { dryBulbC: 35, wetBulbC: 18 });
    expect(met).toMatchObject({ hourClass: 'indirect', met: true, running: 'indirect', airMeets: false });
    expect(met.supply.tempC).toBeCloseTo(27, 9);
    expect(met.supply.share).toBeCloseTo(12 / (0.65 * 21), 4);
    expect(met.waterC).toBeCloseTo(18, 3);
    expect(met.plant.evaporatedLitres).toBeCloseTo((3600 * 1.05) / 2430, 9);
    expect(met.plant.makeUpLitres).toBeCloseTo((3600 * 1.05 * 4) / 3 / 2430, 9);
    const fanKw = (0.8 * met.hour.outdoor.volumeM3PerKg) / (1.006 * 12);
    expect(met.plant.kwh).toBeCloseTo(fanKw + 0.02, 9);
    expect(met.plant.referenceKwh).toBeCloseTo(fanKw + 1 / 3, 9);
  });

  test('is short when the wet exchanger is at least 1 K under the dry one, and the back-up trims what is left', () => {
    const short = judgedAt(hall, { dryBulbC: 38, wetBulbC: 26 });
    const suppliedC = 39 - 0.65 * (39 - 26);
    expect(short).toMatchObject({ hourClass: 'short', met: false, dampBy: null, running: 'indirect' });
    expect(short.supply.tempC).toBeCloseTo(suppliedC, 3);
    expect(short.shortfallK).toBeCloseTo(suppliedC - 27, 3);
    expect(short.plant.coolingKwh).toBeCloseTo((39 - suppliedC) / 12, 3);
    expect(short.plant.backUpKw).toBeCloseTo((suppliedC - 27) / 12, 3);
    expect(short.plant.evaporatedLitres).toBeCloseTo((3600 * 1.05 * (39 - suppliedC)) / 12 / 2430, 3);
  });

  test('is beyond when wetting gains less than 1 K: no water, the dry exchanger carries what it can', () => {
    const beyond = judgedAt(hall, { dryBulbC: 28, wetBulbC: 27 });
    const dryC = 39 - 0.65 * 11;
    expect(beyond).toMatchObject({ hourClass: 'beyond', running: 'air', waterC: null });
    // S is that of the lowest supply all the same: T* does not ask whether it is worth its water.
    expect(beyond.shortfallK).toBeCloseTo(39 - 0.65 * 12 - 27, 3);
    expect(beyond.plant.makeUpLitres).toBe(0);
    expect(beyond.plant.coolingKwh).toBeCloseTo((39 - dryC) / 12, 9);
    expect(beyond.plant.backUpKw).toBeCloseTo((dryC - 27) / 12, 9);
  });

  test('is drained at 2 °C and below: met by the dry exchanger as frozen', () => {
    expect(judgedAt(hall, { dryBulbC: 2, wetBulbC: 1 })).toMatchObject({
      hourClass: 'frozen',
      met: true,
      airMeets: true,
    });
    const poor = presetBrief('hall-recommended', { effExchanger: 0.2 });
    const drained = judgedAt(poor, { dryBulbC: 2, wetBulbC: 1 });
    expect(drained).toMatchObject({ hourClass: 'frozen', met: false, running: 'air', waterC: null });
    expect(drained.plant.coolingKwh).toBeCloseTo((0.2 * 37) / 12, 9);
    expect(judgedAt(poor, { dryBulbC: 2.02, wetBulbC: 1 }).hourClass).toBe('indirect');
  });

  test('is never damp, whatever the moisture outside and the caps', () => {
    const damp = judgedAt(hall, { dryBulbC: 20, wetBulbC: 20 });
    expect(damp.hourClass).toBe('air');
    const tight = presetBrief('hall-recommended', { caps: { supplyRhPct: 1, supplyDewPointC: -20 } });
    expect(judgedAt(tight, { dryBulbC: 20, wetBulbC: 20 }).hourClass).toBe('air');
  });

  test('is wetted without regard to cut-in, start temperature and outdoor humidity', () => {
    const bound = presetBrief('hall-recommended', { cutInDepressionK: 10, startRoomTempC: 40, maxOutdoorRhPct: 10 });
    expect(judgedAt(bound, { dryBulbC: 21, wetBulbC: 19 }).hourClass).toBe('indirect');
  });

  test('is held at a lower inlet where its limit is derated for height', () => {
    const allowable = presetBrief('hall-allowable');
    const air = { dryBulbC: 24.5, wetBulbC: 24.5 };
    expect(judgedAt(allowable, air).hourClass).toBe('air');
    const high = judgedAt(allowable, { ...air, heightM: 3000 });
    expect(high.hour.setC).toBe(25);
    // Return at 37 °C, dry and wet alike 37 - 0.65 x 12.5.
    expect(high).toMatchObject({ hourClass: 'beyond' });
    expect(high.shortfallK).toBeCloseTo(37 - 0.65 * 12.5 - 25, 2);
  });

  test('has no wet exchanger in a brief without stages', () => {
    const dry = presetBrief('hall-recommended', { stages: [] });
    expect(judgedAt(dry, { dryBulbC: 35, wetBulbC: 18 })).toMatchObject({ hourClass: 'beyond', aloneMet: [] });
    expect(judgedAt(dry, { dryBulbC: 15, wetBulbC: 12 }).aloneMet).toEqual(['air']);
  });
});

/** Every number of a brief, one by one: below, above, none, a text, empty. What is taken is judged without a figure that is none. */
import { describe, expect, test } from 'vitest';
import { fieldsOfLimit } from '#engine/brief/brief-fields.ts';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { canonicalJson } from '#engine/brief/canonical-json.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { numberRanges, pricedPreset, withValue } from '../../support/brief-ranges.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const dotted = (path: string): string => path.replaceAll(/\[(\d+)\]/g, '.$1');

function faultsOf(body: unknown): readonly { path: string; message: string }[] {
  const reading = readBrief(body);
  return reading.ok ? [] : reading.faults.map(({ path, message }) => ({ path: dotted(path), message }));
}

/** Fields that may be left out; every other number is needed once its group is there. */
const mayBeEmpty = new Set(
  presetNames.flatMap((name) =>
    fieldsOfLimit(presetBrief(name).limit).flatMap(({ path, kind }) => (kind === 'optional' ? [path] : [])),
  ),
);
/** Of a grid factor the number is all there is. */
mayBeEmpty.delete('grid.kgCo2PerKwh');

describe('the table of ranges', () => {
  test('has a row for every number that the editor shows, for every use', () => {
    const shown = presetNames.flatMap((name) =>
      fieldsOfLimit(presetBrief(name).limit).filter(({ kind }) => kind === 'number' || kind === 'optional'),
    );
    const rows = new Set(numberRanges.map(({ path }) => path));
    const missing = shown.filter(({ path }) => !rows.has(path)).map(({ path }) => path);
    expect([...new Set(missing)]).toEqual([]);
    expect(rows.size).toBeGreaterThan(45);
  });
});

describe.each(numberRanges)('$path of $preset', ({ preset, path, below, least, most, above }) => {
  const body = pricedPreset(preset);
  const faultsWith = (value: unknown) => faultsOf(withValue(body, path, value));

  test('is refused at its place when it is out of range or no number', () => {
    for (const value of [below, above, Number.NaN, Number.POSITIVE_INFINITY, 'warm', '21', true, [], {}]) {
      const found = faultsWith(value);
      expect(
        found.map((fault) => fault.path),
        String(value),
      ).toContain(path);
      // Nothing but the sum of the weights follows from one number that is refused.
      expect(found.filter((fault) => fault.path !== path && fault.path !== 'score')).toEqual([]);
      for (const { message } of found) expect(message).toMatch(/is needed|must add up/);
    }
  });

  test('is taken at both ends of its range', () => {
    for (const value of [least, most]) {
      const said = faultsWith(value).filter((fault) => fault.path === path && /is needed/.test(fault.message));
      expect(said, String(value)).toEqual([]);
    }
  });

  test('when it is empty is left out or asked for, never read as a number', () => {
    const found = faultsWith(null);
    if (mayBeEmpty.has(path)) return expect(found).toEqual([]);
    expect(found.map((fault) => fault.path)).toContain(path);
    for (const { message } of found) expect(message).not.toMatch(/null|NaN|undefined/);
  });
});

describe('a brief with a number at the end of its range', () => {
  const place = { zone: 'UTC', heightM: 1500, position: { latitude: 45, longitude: 8 } };
  /** Days from frost to heat, dry and close to saturation by turns. */
  const year = syntheticYear({
    at: (slot) => ({
      dryBulbC: 14 + 20 * Math.sin((2 * Math.PI * slot) / 8760) + 6 * Math.sin((2 * Math.PI * slot) / 24),
      saturation: 0.5 + 0.45 * Math.sin(slot / 37),
      pressurePa: 84_500,
    }),
  });

  test('is judged without a figure that is none, or refused for what contradicts it', () => {
    let judged = 0;
    for (const { preset, path, least, most } of numberRanges) {
      for (const value of [least, most]) {
        const reading = readBrief(withValue(pricedPreset(preset), path, value));
        if (!reading.ok) {
          expect(reading.faults.length).toBeGreaterThan(0);
          continue;
        }
        const { hourClassCodes, ...figures } = judgeYear({ year, brief: reading.brief, ...place });
        expect(() => canonicalJson(figures), `${preset} ${path} ${value}`).not.toThrow();
        expect(hourClassCodes).toHaveLength(8760);
        judged += 1;
      }
    }
    expect(judged).toBeGreaterThan(80);
  });
});

describe('faults of different kinds', () => {
  test('are told at once: out of range, between fields, in lists', () => {
    const body = {
      ...pricedPreset('office'),
      cycles: 1,
      caps: { roomRhPct: 40 },
      lowerLimits: { roomRhPct: 50 },
      gates: ['a noise limit at the neighbour', 'A noise limit at the neighbour', ' '],
      reported: ['THI over warm', 'vapour pressure deficit below 1.4 and above 0.2 kPa', 'hours under a trade wind'],
      hardLimits: [
        { tempC: 32, hours: 0 },
        { tempC: 32, hours: 10 },
      ],
    };
    expect(faultsOf(body).map(({ path }) => path)).toEqual([
      'cycles',
      'reported.0',
      'reported.1',
      'gates.2',
      'lowerLimits.roomRhPct',
      'hardLimits.1.tempC',
      'gates.1',
    ]);
  });

  test('leave out a contradiction with a field that is refused itself', () => {
    const body = { ...pricedPreset('office'), limit: { kind: 'fixed', tempC: 'warm' }, balanceTempC: 30 };
    expect(faultsOf(body).map(({ path }) => path)).toEqual(['limit.tempC']);
  });

  test('hold an adaptive room to its ceiling', () => {
    const limit = { kind: 'adaptive', model: 'ashrae55-80', ceilingC: 30 };
    const body = { ...pricedPreset('school'), limit, balanceTempC: 31, startRoomTempC: 32 };
    expect(faultsOf(body).map(({ path }) => path)).toEqual(['balanceTempC', 'startRoomTempC']);
  });
});

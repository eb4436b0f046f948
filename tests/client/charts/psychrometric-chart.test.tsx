import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { densityGrey, hourDensity } from '../../../src/charts/hour-density.ts';
import { ProcessDrawing } from '../../../src/charts/process-drawing.tsx';
import { processLines } from '../../../src/charts/process-lines.ts';
import { PsychrometricChart } from '../../../src/charts/psychrometric-chart.tsx';
import { chartScale, rangeOf } from '../../../src/charts/psychrometric-scale.ts';
import type { DemandHour } from '../../../src/engine/hour-classes/demand-hour.ts';
import { unpackYear } from '../../../src/engine/reduction/packed-columns.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const PRESSURE_PA = 88_900;
const range = { minC: 0, maxC: 45, maxRatio: 0.02 };
const scale = chartScale(range);

/** 36 °C and 6 g/kg: dry inland air in the afternoon. */
const hour: DemandHour = {
  outdoor: { dryBulbC: 36, humidityRatio: 0.006, pressurePa: PRESSURE_PA, volumeM3PerKg: 1.009 },
  setC: 26,
  supplyAimC: 21,
  loadFraction: 1,
};
const brief = presetBrief('office', { stages: ['direct', 'indirect', 'dewpoint', 'twostage'] });

function chart(overlay?: Parameters<typeof PsychrometricChart>[0]['overlay']): string {
  return renderToStaticMarkup(
    <PsychrometricChart pressurePa={PRESSURE_PA} range={range} fields={[]} label="Chart." overlay={overlay} />,
  );
}

describe('the psychrometric chart', () => {
  it('draws saturation at the pressure of the station, as PsychroLib has it (ASHRAE Fundamentals 2017 ch. 1)', () => {
    const [saturation] = [...chart().matchAll(/d="([^"]+)" stroke="#22302f" stroke-width="1.75"/g)];
    const points = [...(saturation?.[1] ?? '').matchAll(/[ML]([\d.]+) ([\d.]+)/g)];
    expect(points.length).toBeGreaterThan(40);
    points.forEach(([, x, y], index) => {
      const tempC = index / 2;
      expect(Number(x)).toBeCloseTo(scale.x(tempC), 0);
      // A tenth of the picture's unit is 0.005 g/kg.
      expect(Math.abs(Number(y) - scale.y(psychrolib.GetSatHumRatio(tempC, PRESSURE_PA)))).toBeLessThan(0.11);
    });
  });

  it('says itself in a sentence and keeps every field of hours within its frame', () => {
    const year = syntheticYear({ at: (slot) => ({ dryBulbC: 5 + (slot % 30), saturation: 0.3 + (slot % 7) / 10 }) });
    const columns = unpackYear(year.packed);
    const found = rangeOf(columns);
    for (const { fromC, fromRatio } of hourDensity(columns)) {
      expect(fromC).toBeGreaterThanOrEqual(found.minC);
      expect(fromC + 1).toBeLessThanOrEqual(found.maxC);
      expect(fromRatio + 0.0005).toBeLessThanOrEqual(found.maxRatio + 1e-12);
    }
    expect(chart()).toContain('role="img" aria-label="Chart."');
  });

  it('counts every known hour into one field, and paints fields in greys alone, darker where more hours lie', () => {
    const year = syntheticYear({ at: (slot) => (slot < 100 ? null : { dryBulbC: (slot % 40) - 5, saturation: 0.5 }) });
    const fields = hourDensity(unpackYear(year.packed));
    expect(fields.reduce((sum, { hours }) => sum + hours, 0)).toBe(8660);
    const greys = [1, 4, 16, 100].map((hours) => densityGrey(hours, 100));
    const levels = greys.map((grey) => {
      const [red, green, blue] = (grey.match(/\d+/g) ?? []).map(Number);
      expect([green, blue]).toEqual([red, red]);
      return red ?? 0;
    });
    expect(levels).toEqual([...levels].sort((one, two) => two - one));
  });
});

describe('process lines', () => {
  const lines = processLines(hour, brief);
  const line = (stage: string) => lines.find((each) => each.stage === stage);

  it('starts every stage of the brief at outdoor air, in the order of the brief', () => {
    expect(lines.map(({ stage }) => stage)).toEqual(['air', 'direct', 'indirect', 'dewpoint', 'twostage']);
    for (const { points } of lines) expect(points[0]).toEqual({ tempC: 36, humidityRatio: 0.006 });
  });

  it('keeps direct cooling on the wet bulb of outdoor air, which PsychroLib finds anew at every point', () => {
    const wetBulbC = psychrolib.GetTWetBulbFromHumRatio(36, 0.006, PRESSURE_PA);
    const onLine = line('direct')?.points.slice(0, -1) ?? [];
    expect(onLine.length).toBeGreaterThan(4);
    for (const { tempC, humidityRatio } of onLine) {
      // PsychroLib stops its bisection at 0.001 K.
      expect(psychrolib.GetTWetBulbFromHumRatio(tempC, humidityRatio, PRESSURE_PA)).toBeCloseTo(wetBulbC, 2);
    }
    // Effectiveness e: t' = t - e (t - t_wb), method 4.
    expect(line('direct')?.after[0]?.tempC).toBeCloseTo(36 - brief.effDirect * (36 - wetBulbC), 2);
  });

  it('adds no moisture in indirect stages, and in two stages none before the second', () => {
    for (const stage of ['air', 'indirect', 'dewpoint']) {
      for (const { humidityRatio } of line(stage)?.points ?? []) expect(humidityRatio).toBe(0.006);
    }
    const [between, leaving] = line('twostage')?.after ?? [];
    expect(between).toEqual(line('indirect')?.after[0]);
    expect(leaving?.humidityRatio).toBeGreaterThan(0.006);
    expect(leaving?.tempC).toBeLessThan(line('direct')?.after[0]?.tempC ?? 0);
  });

  it('ends with what the fan adds: fan W per L/s x v / 1.006 (method 3.1)', () => {
    const direct = line('direct');
    const riseK = (direct?.supply.tempC ?? 0) - (direct?.after[0]?.tempC ?? 0);
    expect(riseK).toBeCloseTo((brief.fanWPerLs.direct * 1.009) / 1.006, 9);
    expect(direct?.supply.humidityRatio).toBe(direct?.after[0]?.humidityRatio);
  });

  it('leaves out wet stages that the brief keeps off in the hour', () => {
    const frosty = { ...hour, outdoor: { ...hour.outdoor, dryBulbC: brief.freezeLockoutC, humidityRatio: 0.001 } };
    expect(processLines(frosty, brief).map(({ stage }) => stage)).toEqual(['air']);
    const damp = { ...hour, outdoor: { ...hour.outdoor, dryBulbC: 22, humidityRatio: 0.0185 } };
    expect(processLines(damp, brief).map(({ stage }) => stage)).toEqual(['air']);
  });

  it('draws nothing for towers and for halls that cool their return air', () => {
    const tower = { kind: 'tower', coldC: 25, rangeK: 5, approachK: 4, exchangerK: 0 } as const;
    expect(processLines(hour, { ...brief, limit: tower })).toEqual([]);
    expect(processLines(hour, { ...brief, primaryAir: 'return' })).toEqual([]);
  });

  it('cools the inlet of a turbine no further than its floor, without a fan', () => {
    const turbine = { kind: 'turbine', targetC: 30, floorC: 25 } as const;
    const [drawn] = processLines(hour, { ...brief, stages: ['direct'], limit: turbine });
    expect(drawn?.supply.tempC).toBeCloseTo(25, 6);
    expect(drawn?.after[0]).toEqual(drawn?.supply);
  });

  it('stands on the chart with numbers, the room, both aims and the caps', () => {
    const markup = chart((drawnAt) => (
      <ProcessDrawing
        {...{ scale: drawnAt, range, pressurePa: PRESSURE_PA, lines }}
        outdoor={{ tempC: 36, humidityRatio: 0.006 }}
        setC={26}
        supplyAimC={21}
        room={{ tempC: 26, humidityRatio: 0.009 }}
        caps={{ roomRhPct: 65, supplyDewPointC: 15 }}
      />
    ));
    for (const mark of ['1', '2', '3', '4', '5', 'room', 'supply', 'room cap 65 %', 'supply dew point cap']) {
      expect(markup).toContain(`>${mark}</text>`);
    }
  });
});

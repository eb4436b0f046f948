import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { kindOfCompare, readCompare } from '../../../src/app/pages/compare/compare-address.ts';
import { rowOf } from '../../../src/app/pages/compare/figure-rows.ts';
import { countedCurve } from '../../../src/charts/depression-curve.ts';
import { RankShares } from '../../../src/charts/rank-shares.tsx';
import { hoursOver, SupplyCurves } from '../../../src/charts/supply-curves.tsx';
import { paths } from '../../../src/lib/paths.ts';

const id = (nth: number) => `00000000-0000-4000-8000-${String(nth).padStart(12, '0')}`;
const read = (query: string) => readCompare(new URLSearchParams(query));

describe('what is compared', () => {
  it('comes back from its own address', () => {
    const asked = {
      places: [
        { kind: 'station', id: id(1) },
        { kind: 'site', id: id(2) },
      ],
      briefs: [id(3)],
      years: [],
    } as const;
    const address = paths.compare.to({ teamId: 'team', programmeId: 'programme' }, asked);
    expect(read(address.split('?')[1] ?? '')).toEqual(asked);
  });

  it('passes over what is no id, what stands twice and what is too much', () => {
    const many = Array.from({ length: 9 }, (_none, nth) => `station:${id(nth)}`).join(',');
    expect(read(`places=${many},station:${id(0)}`).places).toHaveLength(6);
    expect(read(`places=station:1,town:${id(1)},site:${id(2)},site:${id(2)}`).places).toEqual([
      { kind: 'site', id: id(2) },
    ]);
    expect(read(`years=${id(1)},${id(2)},${id(3)}`).years).toHaveLength(2);
  });

  it('is places, several briefs or years, by what stands in the address', () => {
    expect(kindOfCompare(read(`places=station:${id(1)}&briefs=${id(2)}`))).toBe('places');
    expect(kindOfCompare(read(`places=station:${id(1)}&briefs=${id(2)},${id(3)}`))).toBe('briefs');
    expect(kindOfCompare(read(`places=station:${id(1)}&briefs=${id(2)}&years=${id(3)}`))).toBe('years');
  });
});

describe('the curve of depression', () => {
  it('begins at the hours that are known and ends at the first depression that none reaches', () => {
    const counts = [6000, 2000, 0, 0].map((hours, at) => ({ atLeastK: at + 1, hours }));
    expect(countedCurve(8700, counts)).toEqual([
      { atLeastK: 0, hours: 8700 },
      { atLeastK: 1, hours: 6000 },
      { atLeastK: 2, hours: 2000 },
      { atLeastK: 3, hours: 0 },
    ]);
    expect(countedCurve(8700, counts.slice(0, 2)).at(-1)).toEqual({ atLeastK: 2, hours: 2000 });
  });
});

describe('a row of figures', () => {
  it('marks what differs from the first by the printed figures', () => {
    const row = rowOf({ label: 'Met', unit: '%', decimals: 1, values: [71.24, 71.21, 64.96, null] });
    expect(row.cells.map(({ text, difference }) => [text, difference])).toEqual([
      ['71.2', null],
      ['71.2', null],
      ['65.0', '−6.2'],
      ['none', null],
    ]);
    expect(row.differs).toBe(true);
    expect(rowOf({ label: 'Verdict', unit: '', decimals: 0, values: ['does not', 'does not'] }).differs).toBe(false);
  });
});

describe('the pictures of a comparison', () => {
  it('count the hours at or over a supply temperature', () => {
    const bins = [
      { fromC: 17, hours: 40 },
      { fromC: 18, hours: 25 },
      { fromC: 19, hours: 5 },
    ];
    expect([16, 18, 19, 20].map((tempC) => hoursOver(bins, tempC))).toEqual([70, 30, 5, 0]);
    const curves = [{ name: 'Tallgrass', bins }];
    const svg = renderToStaticMarkup(<SupplyCurves curves={curves} label="Hours over supply temperatures" />);
    expect(svg).toContain('aria-label="Hours over supply temperatures"');
    expect(svg.match(/<path/g)).toHaveLength(1);
  });

  it('draw a share of the draws as an area: half the draws half the square', () => {
    const rows = [{ name: 'Tallgrass', shares: [0.5, 0.5] }];
    const svg = renderToStaticMarkup(<RankShares rows={rows} label="Shares of ranks" />);
    const sides = [...svg.matchAll(/width="([\d.]+)" height="([\d.]+)" fill/g)].map(([, width]) => Number(width));
    expect(sides).toHaveLength(2);
    for (const side of sides) expect(side ** 2).toBeCloseTo(22 ** 2 / 2, 6);
  });
});

import { describe, expect, test } from 'vitest';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import type { FindingCode } from '#engine/weather-files/finding.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { readTruth, truthOf } from '../../support/ground-truth.ts';
import { realFile, sharedFolder, WITHOUT_SHARED } from '../../support/shared.ts';

/**
 * Real files against groundtruth.csv beside them: an independent computation hour by hour on each file as it stands, with
 * exact arithmetic. Ours differs by the packed steps (2e-6 kg/kg, 2 Pa) alone. Tolerances: mean wet bulb 0.05 K, hours with a
 * depression of at least 4, 8 and 11 K 5 h, wet bulb and dry bulb of 0.4, 1 and 2 % of the hours 0.1 K.
 */
const MEAN_K = 0.05;
const HOURS = 5;
const DESIGN_K = 0.1;

const title = (text: string) => (sharedFolder === null ? `${text} (skipped: ${WITHOUT_SHARED})` : text);

const columns = ['WB_mean', 'h_dep_ge4', 'h_dep_ge8', 'h_dep_ge11', 'WB_0.4pct', 'WB_1pct', 'WB_2pct', 'T_0.4pct'];

const truth = readTruth();

function readUsable(file: string): { reading: UsableReading; reduced: ReducedYear } {
  const reading = readWeatherFile(realFile(file), file);
  if (reading.status === 'refused' || reading.hours === null) {
    throw new Error(`${file} is not read: ${reading.findings[0]?.message}`);
  }
  return { reading, reduced: reduceYear(reading) };
}

function found(reduced: ReducedYear, column: string): number {
  const { design, facts } = reduced;
  const atLeast = (kelvin: number) => facts.depressionHours.find(({ atLeastK }) => atLeastK === kelvin)?.hours ?? -1;
  const values: Record<string, number | undefined> = {
    WB_mean: facts.meanWetBulbC ?? Number.NaN,
    h_dep_ge4: atLeast(4),
    h_dep_ge8: atLeast(8),
    h_dep_ge11: atLeast(11),
    'WB_0.4pct': design.wetBulb[0]?.valueC,
    WB_1pct: design.wetBulb[1]?.valueC,
    WB_2pct: design.wetBulb[2]?.valueC,
    'T_0.4pct': design.dryBulb[0]?.valueC,
  };
  return values[column] ?? Number.NaN;
}

function toleranceOf(column: string): number {
  return column === 'WB_mean' ? MEAN_K : column.startsWith('h_') ? HOURS : DESIGN_K;
}

interface Expected {
  readonly file: string;
  readonly status: 'review' | 'asks';
  /** Findings that must be there; `line` and `count` where they are known. */
  readonly findings: readonly { code: FindingCode; severity: string; line?: number; count?: number }[];
  readonly kind: 'typical' | 'actual';
}

const UNIFORM = { code: 'source-flags-uniform', severity: 'note' } as const;

/** What the list of the files says of each, as far as it does not need the statistical tests. */
const files: readonly Expected[] = [
  { file: 'epw/phoenix-az-tmy3.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  { file: 'epw/thermal-ca-tmy3-below-sea-level.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  { file: 'epw/leadville-co-tmy3-3026m.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  { file: 'epw/miami-fl-tmy3.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  { file: 'epw/houston-tx-tmy3.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  {
    file: 'epw/piedmont-it-pvgis.epw',
    status: 'review',
    kind: 'typical',
    findings: [UNIFORM, { code: 'pressure-elevation', severity: 'note' }],
  },
  {
    file: 'epw/addisababa-swera-2355m.epw',
    status: 'review',
    kind: 'typical',
    findings: [
      // The ramp of lines 311 to 328: 12 hours of it lie more than 6 % from the median.
      { code: 'pressure-range', severity: 'repair', line: 315, count: 12 },
      // 6168 E9E9, 1902 B8B8 and 6 A7B8 of 8760 rows.
      { code: 'source-estimated', severity: 'doubt', count: 8076 },
    ],
  },
  {
    file: 'epw/hangzhou-swera.epw',
    status: 'review',
    kind: 'typical',
    findings: [{ code: 'source-estimated', severity: 'doubt', count: 4364 }],
  },
  { file: 'epw/seattle-wa-tmy3.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
  {
    file: 'odd/chicago-2012-8784-leap-yes.epw',
    status: 'review',
    kind: 'actual',
    findings: [UNIFORM, { code: 'below-zero-phase', severity: 'note' }],
  },
  {
    file: 'odd/chicago-2012-8760-no-feb29.epw',
    status: 'review',
    kind: 'actual',
    findings: [UNIFORM, { code: 'leap-day', severity: 'note' }],
  },
  {
    file: 'odd/denver-wrong-place.epw',
    status: 'review',
    kind: 'typical',
    findings: [UNIFORM, { code: 'place-zone', severity: 'doubt', line: 1 }],
  },
  {
    file: 'odd/greenriver-wrong-elevation.epw',
    status: 'asks',
    kind: 'typical',
    findings: [UNIFORM, { code: 'pressure-elevation', severity: 'ask' }],
  },
  {
    file: 'odd/presqueisle-pressure-spike.epw',
    status: 'review',
    kind: 'typical',
    findings: [303, 495, 3156, 3255].map((line) => ({
      code: 'pressure-range' as const,
      severity: 'repair',
      line,
      count: 1,
    })),
  },
  {
    file: 'odd/acajutla-pressure-range.epw',
    status: 'review',
    kind: 'typical',
    findings: [
      { code: 'pressure-range', severity: 'repair', line: 5483, count: 5 },
      // All but the 3159 rows of A7A7.
      { code: 'source-estimated', severity: 'doubt', count: 5601 },
    ],
  },
  { file: 'odd/mountshasta-stuck-54h.epw', status: 'review', kind: 'typical', findings: [UNIFORM] },
];

describe.skipIf(sharedFolder === null)(title('real EPW files against an independent computation'), () => {
  for (const expected of files) {
    test(`${expected.file}: wet bulb, depression hours and design values agree, and its findings are those listed`, () => {
      const { reading, reduced } = readUsable(expected.file);
      for (const column of columns) {
        const difference = Math.abs(found(reduced, column) - truthOf(truth, expected.file, column));
        expect(difference, column).toBeLessThanOrEqual(toleranceOf(column));
      }
      expect(reduced.facts.hours).toBe(truthOf(truth, expected.file, 'rows'));
      expect(reduced.facts.missing).toBe(0);
      expect(reading.status).toBe(expected.status);
      expect(reading.kind).toBe(expected.kind);
      expect(reading.humidityFrom).toBe('dew point');
      expect(truth.get(expected.file)?.get('below_zero')?.startsWith(reading.belowZero)).toBe(true);
      for (const finding of expected.findings) {
        expect(reading.findings).toContainEqual(expect.objectContaining(finding));
      }
      // Nothing else than notes, but what is listed.
      const listed = expected.findings.map(({ code }) => code);
      const others = reading.findings.filter(({ code, severity }) => severity !== 'note' && !listed.includes(code));
      expect(others).toEqual([]);
    });
  }

  test('phoenix keeps the genuine fall of 16.1 K in one hour at line 4826', () => {
    const { hours } = readUsable('epw/phoenix-az-tmy3.epw').reading;
    const slot = hours.lines.indexOf(4826);
    expect((hours.dryBulbC[slot - 1] ?? 0) - (hours.dryBulbC[slot] ?? 0)).toBeCloseTo(16.1, 6);
    expect(hours.flags[slot]).toBe(0);
  });

  test('santiago: the hours over 60 °C are never used, though the rest of the impossible ramp waits for the step test', () => {
    const { reading, reduced } = readUsable('odd/santiagodecuba-64C.epw');
    expect(reading.findings).toContainEqual(
      expect.objectContaining({ code: 'range', severity: 'doubt', line: 5211, lastLine: 5212 }),
    );
    expect(Math.max(...reading.hours.dryBulbC)).toBeLessThan(60);
    expect(reduced.facts.repaired).toBe(2);
    // The repaired hours differ from the file as it stands, all other figures agree with it.
    for (const column of ['h_dep_ge4', 'h_dep_ge8', 'h_dep_ge11', 'WB_mean']) {
      const difference = Math.abs(found(reduced, column) - truthOf(truth, 'odd/santiagodecuba-64C.epw', column));
      expect(difference, column).toBeLessThanOrEqual(toleranceOf(column));
    }
  });

  test('santa maria: dew points above the dry bulb in over 1 % of the year are refused, until stuck values are found first', () => {
    const reading = readWeatherFile(realFile('odd/santamaria-dew-above-drybulb.epw'), 'santamaria.epw');
    expect(reading.status).toBe('refused');
    expect(reading.findings).toContainEqual(
      expect.objectContaining({ code: 'dew-above-dry', severity: 'refuse', count: 163 }),
    );
    expect(reading.findings).toContainEqual(expect.objectContaining({ code: 'dew-above-dry', line: 1542 }));
  });

  test('an archive is not opened here, and says so', () => {
    for (const file of ['wrapped/addisababa-swera-epw-ddy-stat.zip', 'wrapped/725755-24101-2014.gz']) {
      const [finding] = readWeatherFile(realFile(file), file).findings;
      expect(finding?.code).toBe('binary');
      expect(finding?.message).toMatch(/Unpack it and bring what is inside/);
    }
  });
});

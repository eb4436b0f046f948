import { describe, expect, test } from 'vitest';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import type { FindingCode } from '#engine/weather-files/finding.ts';
import { ruleNames } from '#engine/weather-files/quality/quality-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { shippedRelief } from '../../../server/tiles/relief.ts';
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

const relief = shippedRelief();

/** The year of a file without any test of its hours but the range and the pressure. */
function asItStands(file: string): ReducedYear {
  const reading = readWeatherFile(realFile(file), file, {
    rulesOff: ruleNames.filter((rule) => rule !== 'pressure-range'),
  });
  if (reading.status === 'refused' || reading.hours === null) throw new Error(`${file} cannot be used`);
  return reduceYear(reading);
}

function readUsable(file: string): { reading: UsableReading; reduced: ReducedYear } {
  const reading = readWeatherFile(realFile(file), file, { relief });
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
  /** Hours that the tests have left out; none where it is not said. */
  readonly missing?: number;
}

const UNIFORM = { code: 'source-flags-uniform', severity: 'note' } as const;

/** What the list of the files says of each, with what else the tests of the hours find. */
const files: readonly Expected[] = [
  {
    file: 'epw/phoenix-az-tmy3.epw',
    status: 'review',
    kind: 'typical',
    findings: [
      UNIFORM,
      { code: 'spike', severity: 'repair', line: 557, count: 3 },
      { code: 'step', severity: 'note', line: 4826, count: 1 },
    ],
  },
  {
    file: 'epw/thermal-ca-tmy3-below-sea-level.epw',
    status: 'review',
    kind: 'typical',
    findings: [
      UNIFORM,
      { code: 'spike', severity: 'repair', line: 2115, count: 2 },
      { code: 'spike', severity: 'repair', line: 3576, count: 2 },
      { code: 'step', severity: 'note', line: 8603, count: 1 },
    ],
  },
  {
    file: 'epw/leadville-co-tmy3-3026m.epw',
    status: 'review',
    kind: 'typical',
    // Between the highest mountains of Colorado the relief shows their mean.
    findings: [UNIFORM, { code: 'elevation-relief', severity: 'note', line: 1 }],
  },
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
    missing: 67,
    findings: [
      { code: 'source-estimated', severity: 'doubt', count: 4322 },
      ...[
        { line: 52, count: 22 },
        { line: 4084, count: 13 },
        { line: 4198, count: 16 },
        { line: 6025, count: 16 },
      ].map((stuck) => ({ code: 'stuck' as const, severity: 'doubt', ...stuck })),
      ...[6094, 6669, 8635].map((line) => ({ code: 'spike' as const, severity: 'repair', line, count: 1 })),
    ],
  },
  {
    file: 'epw/seattle-wa-tmy3.epw',
    status: 'review',
    kind: 'typical',
    findings: [
      UNIFORM,
      // In a file of whole degrees 50 hours are told, and used.
      { code: 'stuck', severity: 'doubt', line: 161, count: 50 },
      { code: 'spike', severity: 'repair', line: 3096, count: 1 },
      { code: 'spike', severity: 'repair', line: 6275, count: 2 },
    ],
  },
  {
    file: 'odd/chicago-2012-8784-leap-yes.epw',
    status: 'review',
    kind: 'actual',
    findings: [
      UNIFORM,
      { code: 'below-zero-phase', severity: 'note' },
      { code: 'leap-day', severity: 'note', line: 1401, count: 48 },
    ],
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
    findings: [
      UNIFORM,
      { code: 'place-zone', severity: 'doubt', line: 1 },
      { code: 'place-sea', severity: 'doubt', line: 1 },
      { code: 'step', severity: 'note', line: 1324, count: 1 },
      { code: 'spike', severity: 'repair', line: 4055, count: 2 },
    ],
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
    missing: 12,
    findings: [
      ...[303, 495, 3156, 3255].map((line) => ({
        code: 'pressure-range' as const,
        severity: 'repair',
        line,
        count: 1,
      })),
      { code: 'step', severity: 'note', line: 7162, count: 1 },
      { code: 'stuck', severity: 'doubt', line: 8308, count: 12 },
    ],
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
  {
    file: 'odd/mountshasta-stuck-54h.epw',
    status: 'review',
    kind: 'typical',
    missing: 213,
    findings: [
      UNIFORM,
      { code: 'elevation-relief', severity: 'note', line: 1 },
      ...[
        { line: 69, count: 25 },
        { line: 2109, count: 54 },
        { line: 3285, count: 67 },
        { line: 4461, count: 67 },
      ].map((stuck) => ({ code: 'stuck' as const, severity: 'doubt', ...stuck })),
    ],
  },
];

describe.skipIf(sharedFolder === null)(title('real EPW files against an independent computation'), () => {
  for (const expected of files) {
    test(`${expected.file}: wet bulb, depression hours and design values agree, and its findings are those listed`, () => {
      const { reading, reduced } = readUsable(expected.file);
      // Where hours are left out, the file as it stands is held against the truth, which knows no tests.
      const compared = expected.missing === undefined ? reduced : asItStands(expected.file);
      for (const column of columns) {
        const difference = Math.abs(found(compared, column) - truthOf(truth, expected.file, column));
        expect(difference, column).toBeLessThanOrEqual(toleranceOf(column));
      }
      expect(reduced.facts.hours).toBe(truthOf(truth, expected.file, 'rows'));
      expect(reduced.facts.missing).toBe(expected.missing ?? 0);
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

  test('santiago: the ramp to 64 °C and the lines drawn from it are missing, and so are the lines from two other impossible values', () => {
    const file = 'odd/santiagodecuba-64C.epw';
    const { reading, reduced } = readUsable(file);
    const { dryBulbC, flags, lines } = reading.hours;
    const gone = [...lines].filter((_line, slot) => Number.isNaN(dryBulbC[slot]));
    const from = (first: number, last: number) => Array.from({ length: last - first + 1 }, (_none, at) => first + at);
    expect(gone).toEqual([...from(2320, 2333), ...from(5210, 5219), ...from(6316, 6324)]);
    expect(flags[lines.indexOf(5209)]).toBe(flags[lines.indexOf(5220)]);
    const told = ['range', 'step', 'straight-line'] as const;
    for (const code of told) {
      expect(reading.findings).toContainEqual(expect.objectContaining({ code, severity: 'doubt' }));
    }
    expect(reading.findings).toContainEqual(
      expect.objectContaining({ code: 'straight-line', severity: 'doubt', line: 5210, lastLine: 5219, count: 10 }),
    );
    expect(dryBulbC.some((value) => value >= 38)).toBe(false);
    expect(reduced.facts).toMatchObject({ missing: 33, repaired: 1 });
    // As it stands, but for the two hours over 60 °C, all other figures agree.
    const compared = asItStands(file);
    expect(compared.facts.repaired).toBe(2);
    for (const column of ['h_dep_ge4', 'h_dep_ge8', 'h_dep_ge11', 'WB_mean']) {
      const difference = Math.abs(found(compared, column) - truthOf(truth, file, column));
      expect(difference, column).toBeLessThanOrEqual(toleranceOf(column));
    }
  });

  test('santa maria: the dew point sticks four times and is missing there, which leaves March incomplete, and is above the dry bulb in 65 further hours', () => {
    const { reading, reduced } = readUsable('odd/santamaria-dew-above-drybulb.epw');
    expect(reading.status).toBe('review');
    expect(reading.humidityFrom).toBe('dew point');
    const stuck = reading.findings.filter(({ code, variable }) => code === 'stuck' && variable === 'dew point');
    expect(stuck.map(({ line, count }) => [line, count])).toEqual([
      [1535, 67],
      [1703, 64],
      [1871, 64],
      [2039, 64],
    ]);
    const above = reading.findings.filter(({ code }) => code === 'dew-above-dry');
    expect(above.reduce((hours, { count }) => hours + count, 0)).toBe(65);
    expect(reading.findings.find(({ code }) => code === 'coverage')?.message).toMatch(/^One month .* March/);
    expect(reduced.facts.monthCompletePct.filter((pct) => pct < 90)).toHaveLength(1);
  });

  test('an archive is not opened here, and says so', () => {
    for (const file of ['wrapped/addisababa-swera-epw-ddy-stat.zip', 'wrapped/725755-24101-2014.gz']) {
      const [finding] = readWeatherFile(realFile(file), file).findings;
      expect(finding?.code).toBe('binary');
      expect(finding?.message).toMatch(/Unpack it and bring what is inside/);
    }
  });
});

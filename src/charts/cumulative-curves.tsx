import type { CurvePoint } from './depression-curve.ts';

export interface NamedCurve {
  readonly name: string;
  readonly points: readonly CurvePoint[];
}

export interface CumulativeCurvesProps {
  readonly curves: readonly NamedCurve[];
  /** Hours of the year: the top of the picture. */
  readonly hoursOfYear: number;
  /** A depression that is read off, K; null: none. */
  readonly readAtK: number | null;
  /** The same as the picture, in a sentence. */
  readonly label: string;
}

const INK = '#22302f';
const SOFT = '#55625e';
const RULE = '#d5ccb9';
const MADDER = '#a8442f';
/** Curves differ by their strokes, so that grey printers keep them apart. */
export const CURVE_DASHES = ['', '7 3', '2 3', '9 3 2 3', '12 4', '4 2', '1 4', '9 2 2 2 2 2'] as const;
const BOX = { width: 440, height: 260, left: 42, right: 14, top: 10, bottom: 40 } as const;
const INNER = { width: BOX.width - BOX.left - BOX.right, height: BOX.height - BOX.top - BOX.bottom } as const;

/** Hours at or above a depression: depression across, hours upward, one line for each year. */
export function CumulativeCurves({ curves, hoursOfYear, readAtK, label }: CumulativeCurvesProps) {
  const highestK = Math.max(4, ...curves.map(({ points }) => endOf(points)));
  const endK = 2 * Math.ceil(highestK / 2);
  const x = (kelvin: number) => BOX.left + (INNER.width * kelvin) / endK;
  const y = (hours: number) => BOX.top + INNER.height * (1 - hours / hoursOfYear);
  return (
    <svg
      viewBox={`0 0 ${BOX.width} ${BOX.height}`}
      role="img"
      aria-label={label}
      style={{ display: 'block', width: '100%' }}
    >
      <Axes endK={endK} hoursOfYear={hoursOfYear} x={x} y={y} />
      {curves.map(({ name, points }, index) => (
        <path
          key={name}
          d={pathOf(points, x, y)}
          fill="none"
          stroke={INK}
          strokeWidth="1.75"
          strokeDasharray={CURVE_DASHES[index % CURVE_DASHES.length]}
        />
      ))}
      {readAtK === null || readAtK > endK ? null : (
        <line
          x1={x(readAtK)}
          x2={x(readAtK)}
          y1={BOX.top}
          y2={BOX.top + INNER.height}
          stroke={MADDER}
          strokeWidth="1.25"
        />
      )}
    </svg>
  );
}

interface AxesProps {
  readonly endK: number;
  readonly hoursOfYear: number;
  readonly x: (kelvin: number) => number;
  readonly y: (hours: number) => number;
}

function Axes({ endK, hoursOfYear, x, y }: AxesProps) {
  const stepK = endK > 24 ? 5 : endK > 12 ? 4 : 2;
  const kelvins = Array.from({ length: Math.floor(endK / stepK) + 1 }, (_, index) => index * stepK);
  const ticks = [0, 2000, 4000, 6000, 8000, hoursOfYear];
  return (
    <g fontSize="11" fill={SOFT}>
      {ticks.map((hours) => (
        <g key={hours}>
          <line
            x1={BOX.left}
            x2={BOX.width - BOX.right}
            y1={y(hours)}
            y2={y(hours)}
            stroke={hours === 0 ? INK : RULE}
          />
          {hours === hoursOfYear ? null : (
            <text x={BOX.left - 6} y={y(hours) + 4} textAnchor="end">
              {hours.toLocaleString('en')}
            </text>
          )}
        </g>
      ))}
      {kelvins.map((kelvin) => (
        <g key={kelvin}>
          <line x1={x(kelvin)} x2={x(kelvin)} y1={y(0)} y2={y(0) + 4} stroke={INK} />
          <text x={x(kelvin)} y={y(0) + 17} textAnchor="middle">
            {kelvin}
          </text>
        </g>
      ))}
      <text x={BOX.width - BOX.right} y={BOX.height - 4} textAnchor="end">
        Wet-bulb depression, K
      </text>
      <text x={BOX.width - BOX.right} y={BOX.top + 14} textAnchor="end">
        Hours at or above it
      </text>
    </g>
  );
}

/** Straight lines between the points that are counted. */
function pathOf(points: readonly CurvePoint[], x: AxesProps['x'], y: AxesProps['y']): string {
  return points
    .map(({ atLeastK, hours }, index) => `${index === 0 ? 'M' : 'L'}${x(atLeastK).toFixed(1)} ${y(hours).toFixed(1)}`)
    .join('');
}

/** The first depression that no hour reaches, or the last that is counted. */
function endOf(points: readonly CurvePoint[]): number {
  return (points.find(({ hours }) => hours === 0) ?? points.at(-1))?.atLeastK ?? 0;
}

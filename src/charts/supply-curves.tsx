import { CURVE_DASHES } from './cumulative-curves.tsx';

export interface SupplyBins {
  readonly name: string;
  /** Demand hours by supply temperature, ascending bins of 1 K without a gap. */
  readonly bins: readonly { readonly fromC: number; readonly hours: number }[];
}

export interface SupplyCurvesProps {
  readonly curves: readonly SupplyBins[];
  /** The same as the picture, in a sentence. */
  readonly label: string;
}

const INK = '#22302f';
const SOFT = '#55625e';
const RULE = '#d5ccb9';
const BOX = { width: 640, height: 260, left: 48, right: 14, top: 12, bottom: 40 } as const;
const INNER = { width: BOX.width - BOX.left - BOX.right, height: BOX.height - BOX.top - BOX.bottom } as const;
const STEP_C = 5;
const TICKS = 5;

/** Hours with demand at or over a supply temperature: temperature across, hours upward, one line for each that is compared. */
export function SupplyCurves({ curves, label }: SupplyCurvesProps) {
  const all = curves.flatMap(({ bins }) => bins);
  if (all.length === 0) return null;
  const fromC = STEP_C * Math.floor(Math.min(...all.map((bin) => bin.fromC)) / STEP_C);
  const toC = STEP_C * Math.ceil((Math.max(...all.map((bin) => bin.fromC)) + 1) / STEP_C);
  const most = Math.max(1, ...curves.map(({ bins }) => hoursOver(bins, fromC)));
  const step = tickStep(most);
  const top = step * Math.ceil(most / step);
  const x = (tempC: number) => BOX.left + (INNER.width * (tempC - fromC)) / (toC - fromC);
  const y = (hours: number) => BOX.top + INNER.height * (1 - hours / top);
  return (
    <svg
      viewBox={`0 0 ${BOX.width} ${BOX.height}`}
      role="img"
      aria-label={label}
      style={{ display: 'block', width: '100%' }}
    >
      <g fontSize="11" fill={SOFT}>
        {range(0, top, step).map((hours) => (
          <g key={hours}>
            <line
              x1={BOX.left}
              x2={BOX.width - BOX.right}
              y1={y(hours)}
              y2={y(hours)}
              stroke={hours === 0 ? INK : RULE}
            />
            <text x={BOX.left - 6} y={y(hours) + 4} textAnchor="end">
              {hours.toLocaleString('en')}
            </text>
          </g>
        ))}
        {range(fromC, toC, STEP_C).map((tempC) => (
          <g key={tempC}>
            <line x1={x(tempC)} x2={x(tempC)} y1={y(0)} y2={y(0) + 4} stroke={INK} />
            <text x={x(tempC)} y={y(0) + 17} textAnchor="middle">
              {tempC}
            </text>
          </g>
        ))}
        <text x={BOX.width - BOX.right} y={BOX.height - 4} textAnchor="end">
          Supply temperature, °C
        </text>
        <text x={BOX.width - BOX.right} y={BOX.top + 14} textAnchor="end">
          Hours with demand at or over it
        </text>
      </g>
      {curves.map(({ name, bins }, index) => (
        <path
          key={name}
          d={pathOf(bins, { fromC, toC, x, y })}
          fill="none"
          stroke={INK}
          strokeWidth="1.75"
          strokeDasharray={CURVE_DASHES[index % CURVE_DASHES.length]}
        />
      ))}
    </svg>
  );
}

/** Demand hours whose supply is at least so warm. */
export function hoursOver(bins: SupplyBins['bins'], tempC: number): number {
  return bins.reduce((sum, bin) => (bin.fromC >= tempC ? sum + bin.hours : sum), 0);
}

function pathOf(
  bins: SupplyBins['bins'],
  at: { fromC: number; toC: number; x: (tempC: number) => number; y: (hours: number) => number },
): string {
  return range(at.fromC, at.toC, 1)
    .map(
      (tempC, index) =>
        `${index === 0 ? 'M' : 'L'}${at.x(tempC).toFixed(1)} ${at.y(hoursOver(bins, tempC)).toFixed(1)}`,
    )
    .join('');
}

function range(from: number, to: number, step: number): readonly number[] {
  return Array.from({ length: Math.floor((to - from) / step) + 1 }, (_none, index) => from + index * step);
}

/** 1, 2 or 5 with noughts. */
function tickStep(most: number): number {
  const raw = most / TICKS;
  const power = 10 ** Math.floor(Math.log10(Math.max(raw, 1)));
  return power * ([1, 2, 5, 10].find((factor) => factor * power >= raw) ?? 10);
}

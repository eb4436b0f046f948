import type { ReactNode } from 'react';
import { saturationHumidityRatio, saturationPressurePa } from '../engine/psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '../engine/psychrometrics/wet-bulb-line.ts';
import { type DensityField, densityGrey, FIELD_C, FIELD_RATIO } from './hour-density.ts';
import type { AirPoint } from './process-lines.ts';
import { type ChartScale, chartBox, chartScale, type PsychrometricRange } from './psychrometric-scale.ts';

const INK = '#22302f';
const SOFT = '#55625e';
const RULE = '#c9c1b2';
const MASS_RATIO = 0.621945;

export interface PsychrometricChartProps {
  /** Pa: the station's mean, at which every curve is drawn. */
  readonly pressurePa: number;
  readonly range: PsychrometricRange;
  readonly fields: readonly DensityField[];
  /** The same as the picture, in a sentence. */
  readonly label: string;
  /** What is drawn over the hours. */
  readonly overlay?: ((scale: ChartScale) => ReactNode) | undefined;
}

/**
 * The psychrometric chart of a year: dry bulb across, humidity ratio upward; saturation, relative humidity 20 to 80 %, wet bulb
 * every 5 °C; the hours of the year in greys.
 */
export function PsychrometricChart({ pressurePa, range, fields, label, overlay }: PsychrometricChartProps) {
  const scale = chartScale(range);
  const most = fields.reduce((found, { hours }) => Math.max(found, hours), 1);
  return (
    <svg
      viewBox={`0 0 ${chartBox.width} ${chartBox.height}`}
      role="img"
      aria-label={label}
      style={{ display: 'block', width: '100%' }}
    >
      {fields.map(({ fromC, fromRatio, hours }) => (
        <rect
          key={`${fromC} ${fromRatio}`}
          x={scale.x(fromC)}
          y={scale.y(fromRatio + FIELD_RATIO)}
          width={scale.x(fromC + FIELD_C) - scale.x(fromC)}
          height={scale.y(fromRatio) - scale.y(fromRatio + FIELD_RATIO)}
          fill={densityGrey(hours, most)}
        />
      ))}
      <g fill="none" strokeWidth="1">
        {[20, 40, 60, 80].map((percent) => (
          <path key={percent} d={humidityPath({ percent, pressurePa, range }, scale)} stroke={RULE} />
        ))}
        {wetBulbs(range).map((wetBulbC) => (
          <path
            key={wetBulbC}
            d={wetBulbPath({ wetBulbC, pressurePa, range }, scale)}
            stroke={SOFT}
            strokeOpacity="0.65"
            strokeDasharray="1.5 4"
          />
        ))}
        <path d={humidityPath({ percent: 100, pressurePa, range }, scale)} stroke={INK} strokeWidth="1.75" />
      </g>
      <Axes range={range} scale={scale} pressurePa={pressurePa} />
      {overlay?.(scale)}
    </svg>
  );
}

function Axes({ range, scale, pressurePa }: { range: PsychrometricRange; scale: ChartScale; pressurePa: number }) {
  const { minC, maxC, maxRatio } = range;
  const temps = Array.from({ length: Math.floor((maxC - minC) / 5) + 1 }, (_, index) => minC + 5 * index);
  const grams = Array.from({ length: Math.floor(maxRatio * 200 + 1e-9) + 1 }, (_, index) => 5 * index);
  return (
    <g fontSize="11" fill={SOFT}>
      <path
        d={`M${scale.x(minC)} ${scale.y(0)}H${scale.x(maxC)}V${scale.y(maxRatio)}`}
        fill="none"
        stroke={INK}
        strokeWidth="1"
      />
      {temps.map((tempC) => (
        <text key={tempC} x={scale.x(tempC)} y={scale.y(0) + 15} textAnchor="middle">
          {String(tempC).replace('-', '−')}
        </text>
      ))}
      {grams.map((gram) => (
        <text key={gram} x={scale.x(maxC) + 6} y={scale.y(gram / 1000) + 4}>
          {gram}
        </text>
      ))}
      {wetBulbs(range).map((wetBulbC) => (
        <text
          key={wetBulbC}
          x={scale.x(wetBulbC) - 5}
          y={scale.y(saturationHumidityRatio(wetBulbC, pressurePa)) - 4}
          textAnchor="end"
        >
          {saturationHumidityRatio(wetBulbC, pressurePa) < maxRatio ? String(wetBulbC).replace('-', '−') : ''}
        </text>
      ))}
      {[20, 40, 60, 80].map((percent) => {
        const at = humidityAtHeight({ percent, pressurePa, range }, 0.97);
        return (
          <text
            key={percent}
            x={scale.x(at.tempC)}
            y={scale.y(at.humidityRatio) - 3}
            textAnchor="end"
            stroke="#fbf9f3"
            strokeWidth="3"
            paintOrder="stroke"
          >
            {percent} %
          </text>
        );
      })}
      <text x={scale.x(minC)} y={chartBox.height - 3}>
        Dry bulb, °C
      </text>
      <text x={chartBox.width - 2} y={11} textAnchor="end">
        Humidity ratio, g per kg of dry air
      </text>
    </g>
  );
}

function wetBulbs({ minC, maxC }: PsychrometricRange): number[] {
  const first = Math.max(0, Math.ceil(minC / 5) * 5);
  return Array.from({ length: Math.max(0, Math.floor((Math.min(maxC, 35) - first) / 5) + 1) }, (_, n) => first + 5 * n);
}

interface CurveInput {
  readonly pressurePa: number;
  readonly range: PsychrometricRange;
}

/** Humidity ratio, kg/kg, at a relative humidity (over ice below 0 °C). */
function ratioAtHumidity(tempC: number, percent: number, pressurePa: number): number {
  const vapourPa = (percent / 100) * saturationPressurePa(tempC);
  return (MASS_RATIO * vapourPa) / (pressurePa - vapourPa);
}

/** The curve of one relative humidity, as far as it stays within the chart. */
export function humidityPath({ percent, pressurePa, range }: CurveInput & { percent: number }, scale: ChartScale) {
  const points: AirPoint[] = [];
  for (let tempC = range.minC; tempC <= range.maxC + 1e-9; tempC += 0.5) {
    const humidityRatio = ratioAtHumidity(tempC, percent, pressurePa);
    if (humidityRatio > range.maxRatio) break;
    points.push({ tempC, humidityRatio });
  }
  return linePath(points, scale);
}

function wetBulbPath({ wetBulbC, pressurePa, range }: CurveInput & { wetBulbC: number }, scale: ChartScale): string {
  const points: AirPoint[] = [];
  for (let tempC = wetBulbC; tempC <= range.maxC + 1e-9; tempC += 1) {
    const humidityRatio = humidityRatioOnWetBulbLine(tempC, wetBulbC, pressurePa);
    if (humidityRatio <= range.maxRatio) points.push({ tempC, humidityRatio });
    if (humidityRatio <= 0) break;
  }
  return linePath(points, scale);
}

/** Where the curve of a relative humidity comes to a share of the chart's height, or to its right edge before that. */
export function humidityAtHeight(
  { percent, pressurePa, range }: CurveInput & { percent: number },
  share: number,
): AirPoint {
  let at: AirPoint = { tempC: range.minC, humidityRatio: 0 };
  for (let tempC = range.minC; tempC <= range.maxC - 0.5; tempC += 0.5) {
    const humidityRatio = ratioAtHumidity(tempC, percent, pressurePa);
    if (humidityRatio > range.maxRatio * share) break;
    at = { tempC, humidityRatio };
  }
  return at;
}

export function linePath(points: readonly AirPoint[], scale: ChartScale): string {
  return points
    .map(({ tempC, humidityRatio }, index) => {
      const at = `${scale.x(tempC).toFixed(1)} ${scale.y(humidityRatio).toFixed(1)}`;
      return `${index === 0 ? 'M' : 'L'}${at}`;
    })
    .join('');
}

import type { HumidityCaps } from '../engine/brief/brief.ts';
import { saturationHumidityRatio } from '../engine/psychrometrics/moist-air.ts';
import type { AirPoint, ProcessLine } from './process-lines.ts';
import { humidityAtHeight, humidityPath, linePath } from './psychrometric-chart.tsx';
import type { ChartScale, PsychrometricRange } from './psychrometric-scale.ts';

const INK = '#22302f';
const MADDER = '#a8442f';
const PAPER = '#fbf9f3';
/** Share of the chart's height at which a cap is named, under the names of the curves. */
const CAP_WORD_HEIGHT = 0.85;
/** Stages differ by their strokes; the table beside the chart names them by number. */
const DASHES = ['1 3', '', '7 3', '3 2', '10 3 2 3'] as const;

interface ProcessDrawingProps {
  readonly scale: ChartScale;
  readonly range: PsychrometricRange;
  readonly pressurePa: number;
  readonly lines: readonly ProcessLine[];
  readonly outdoor: AirPoint;
  /** Temperature at which the room is held and the one that the supply must reach, °C; null: none is set. */
  readonly setC: number | null;
  readonly supplyAimC: number | null;
  /** The room with what is supplied; null: nothing is. */
  readonly room: AirPoint | null;
  readonly caps: HumidityCaps;
}

/** One hour under a brief, drawn over the chart: outdoor air, what each stage makes of it, the aims and the caps. */
export function ProcessDrawing({ scale, range, lines, outdoor, room, ...asked }: ProcessDrawingProps) {
  return (
    <g fontSize="11">
      <Caps scale={scale} range={range} pressurePa={asked.pressurePa} caps={asked.caps} />
      <Aim scale={scale} range={range} tempC={asked.supplyAimC} word="supply" row={0} />
      <Aim scale={scale} range={range} tempC={asked.setC} word="room" row={1} />
      {lines.map(({ stage, points, after }, index) => (
        <g key={stage}>
          <path
            d={linePath(points, scale)}
            fill="none"
            stroke={MADDER}
            strokeWidth="2"
            strokeDasharray={DASHES[index % DASHES.length]}
          />
          {after.map((point) => (
            <circle
              key={`${point.tempC} ${point.humidityRatio}`}
              cx={scale.x(point.tempC)}
              cy={scale.y(point.humidityRatio)}
              r="2.5"
              fill={PAPER}
              stroke={MADDER}
            />
          ))}
        </g>
      ))}
      {lines.map(({ stage, supply }, index) => (
        <Numbered key={stage} at={supply} scale={scale} mark={String(index + 1)} />
      ))}
      {room === null ? null : (
        <rect
          x={scale.x(room.tempC) - 4}
          y={scale.y(room.humidityRatio) - 4}
          width="8"
          height="8"
          fill={PAPER}
          stroke={INK}
          strokeWidth="1.75"
        />
      )}
      <circle cx={scale.x(outdoor.tempC)} cy={scale.y(outdoor.humidityRatio)} r="5" fill={MADDER} stroke={PAPER} />
    </g>
  );
}

function Numbered({ at, scale, mark }: { at: AirPoint; scale: ChartScale; mark: string }) {
  return (
    <>
      <circle cx={scale.x(at.tempC)} cy={scale.y(at.humidityRatio)} r="7.5" fill={PAPER} stroke={MADDER} />
      <text x={scale.x(at.tempC)} y={scale.y(at.humidityRatio) + 4} textAnchor="middle" fontWeight="600" fill={MADDER}>
        {mark}
      </text>
    </>
  );
}

interface AimProps {
  readonly scale: ChartScale;
  readonly range: PsychrometricRange;
  readonly tempC: number | null;
  readonly word: string;
  /** Words of lines that stand near each other go to rows of their own. */
  readonly row: number;
}

function Aim({ scale, range, tempC, word, row }: AimProps) {
  if (tempC === null || tempC < range.minC || tempC > range.maxC) return null;
  const x = scale.x(tempC);
  return (
    <>
      <line x1={x} x2={x} y1={scale.y(0)} y2={scale.y(range.maxRatio)} stroke={INK} strokeDasharray="5 3" />
      <text x={x - 4} y={scale.y(0) - 6 - 13 * row} textAnchor="end" fill={INK}>
        {word}
      </text>
    </>
  );
}

type CapsProps = Pick<ProcessDrawingProps, 'scale' | 'range' | 'pressurePa' | 'caps'>;

function Caps({ scale, range, pressurePa, caps }: CapsProps) {
  const words = [
    { word: 'room cap', percent: caps.roomRhPct },
    { word: 'supply cap', percent: caps.supplyRhPct },
  ];
  const ratio = caps.supplyDewPointC === undefined ? null : saturationHumidityRatio(caps.supplyDewPointC, pressurePa);
  return (
    <g stroke={INK} strokeWidth="1.5" strokeDasharray="8 2 1 2">
      {words.map(({ word, percent }) =>
        percent === undefined ? null : (
          <g key={word}>
            <path d={humidityPath({ percent, pressurePa, range }, scale)} fill="none" />
            <CapWord
              at={humidityAtHeight({ percent, pressurePa, range }, CAP_WORD_HEIGHT)}
              scale={scale}
              word={`${word} ${percent} %`}
            />
          </g>
        ),
      )}
      {ratio === null || ratio > range.maxRatio || caps.supplyDewPointC === undefined ? null : (
        <>
          <path
            d={linePath(
              [
                { tempC: Math.max(range.minC, caps.supplyDewPointC), humidityRatio: ratio },
                { tempC: range.maxC, humidityRatio: ratio },
              ],
              scale,
            )}
            fill="none"
          />
          <CapWord at={{ tempC: range.maxC, humidityRatio: ratio }} scale={scale} word="supply dew point cap" />
        </>
      )}
    </g>
  );
}

function CapWord({ at, scale, word }: { at: AirPoint; scale: ChartScale; word: string }) {
  return (
    <text
      x={scale.x(at.tempC) - 8}
      y={scale.y(at.humidityRatio) - 4}
      textAnchor="end"
      fill={INK}
      stroke={PAPER}
      strokeWidth="3"
      strokeDasharray="none"
      paintOrder="stroke"
    >
      {word}
    </text>
  );
}

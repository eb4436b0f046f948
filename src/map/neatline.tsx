import type { Map as MapLibreMap } from 'maplibre-gl';
import { graticule, type Tick } from './graticule.ts';
import { useSheetView } from './sheet-view-store.ts';

/** Room that the double frame, its ticks and their figures take around the map, in pixels. */
export const MARGIN = { top: 9, right: 9, bottom: 27, left: 27 } as const;

/** Outwards from the map: the heavy line, a gap, strokes half a step long as on a ruler, a gap, the fine line, ticks. */
const INNER_PX = 2;
const RULER_PX = 3;
const STROKE_PX = 2;
const BAND_PX = 6;
const TICK_PX = 4;
/** A figure nearer to a corner than this would hang over the edge of the sheet. */
const CORNER_PX = 20;

type NeatlineProps = { readonly map: MapLibreMap | null };

/** The frame of the sheet: two lines, the scale between them, and degrees of latitude and longitude in the margin. */
export function Neatline({ map }: NeatlineProps) {
  const view = useSheetView(map);
  if (view === null) return null;
  const { widthPx: width, heightPx: height } = view;
  const { meridians, parallels } = graticule(view);
  return (
    <svg
      aria-hidden="true"
      className="pointer-events-none absolute inset-0 size-full overflow-hidden"
      fontFamily="var(--font-sans)"
    >
      <g transform={`translate(${MARGIN.left} ${MARGIN.top})`} className="text-ink" fill="currentColor">
        <rect
          {...around(BAND_PX + 0.5)}
          width={width + 2 * BAND_PX + 1}
          height={height + 2 * BAND_PX + 1}
          fill="none"
          stroke="currentColor"
          strokeWidth={1}
        />
        <rect
          {...around(INNER_PX / 2)}
          width={width + INNER_PX}
          height={height + INNER_PX}
          fill="none"
          stroke="currentColor"
          strokeWidth={INNER_PX}
        />
        {ruler(meridians, width).map(({ from, length }) => (
          <g key={from}>
            <rect x={from} width={length} y={-RULER_PX - STROKE_PX} height={STROKE_PX} />
            <rect x={from} width={length} y={height + RULER_PX} height={STROKE_PX} />
          </g>
        ))}
        {ruler(parallels, height).map(({ from, length }) => (
          <g key={from}>
            <rect y={from} height={length} x={-RULER_PX - STROKE_PX} width={STROKE_PX} />
            <rect y={from} height={length} x={width + RULER_PX} width={STROKE_PX} />
          </g>
        ))}
        <MeridianFigures ticks={meridians} width={width} height={height} />
        <ParallelFigures ticks={parallels} height={height} />
      </g>
    </svg>
  );
}

function MeridianFigures({ ticks, width, height }: { ticks: readonly Tick[]; width: number; height: number }) {
  return ticks.map((tick) => (
    <g key={tick.degrees} transform={`translate(${tick.px} ${height + BAND_PX})`}>
      <line y2={TICK_PX} stroke="currentColor" strokeWidth={0.75} />
      {tick.px > CORNER_PX && tick.px < width - CORNER_PX && (
        <text y={TICK_PX + 11} textAnchor="middle" fontSize={11} className="fill-soft">
          {tick.label}
        </text>
      )}
    </g>
  ));
}

function ParallelFigures({ ticks, height }: { ticks: readonly Tick[]; height: number }) {
  return ticks.map((tick) => (
    <g key={tick.degrees} transform={`translate(${-BAND_PX} ${tick.px})`}>
      <line x2={-TICK_PX} stroke="currentColor" strokeWidth={0.75} />
      {tick.px > CORNER_PX && tick.px < height - CORNER_PX && (
        <text
          transform={`translate(${-TICK_PX - 4} 0) rotate(-90)`}
          textAnchor="middle"
          fontSize={11}
          className="fill-soft"
        >
          {tick.label}
        </text>
      )}
    </g>
  ));
}

function around(distance: number): { x: number; y: number } {
  return { x: -distance, y: -distance };
}

/** Strokes from each line of the graticule half way to the next one, cut at the frame. */
function ruler(ticks: readonly Tick[], end: number): { from: number; length: number }[] {
  const first = ticks[0];
  const second = ticks[1];
  if (first === undefined || second === undefined) return [];
  const spacing = second.px - first.px;
  const before = { ...first, px: first.px - spacing };
  return [before, ...ticks].flatMap((tick, index, all) => {
    const next = all[index + 1]?.px ?? tick.px + spacing;
    const [from, to] = [tick.px, (tick.px + next) / 2].sort((a, b) => a - b);
    const start = Math.max(0, from ?? 0);
    const length = Math.min(end, to ?? 0) - start;
    return length > 0 ? [{ from: start, length }] : [];
  });
}

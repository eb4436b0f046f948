import type { Map as MapLibreMap } from 'maplibre-gl';
import type { ReactNode } from 'react';
import { scaleBar, type UnitSystem } from './scale-bar.ts';
import type { SheetView } from './sheet-view.ts';
import { useSheetView } from './sheet-view-store.ts';

/** What stands inside the frame on every sheet: zoom buttons, scale bar and sources. */

type ZoomButtonsProps = {
  readonly onIn: () => void;
  readonly onOut: () => void;
  /** Shows everything again; null where there is nothing to show. */
  readonly onAll: (() => void) | null;
};

export function ZoomButtons({ onIn, onOut, onAll }: ZoomButtonsProps) {
  return (
    <fieldset
      data-furniture=""
      className="absolute top-3 right-3 flex flex-col border border-ink/60 bg-paper divide-y divide-line"
    >
      <legend className="sr-only">Zoom</legend>
      <SheetButton label="Zoom in" onPress={onIn}>
        <path d="M2 8h12M8 2v12" />
      </SheetButton>
      <SheetButton label="Zoom out" onPress={onOut}>
        <path d="M2 8h12" />
      </SheetButton>
      {onAll !== null && (
        <SheetButton label="Show all" onPress={onAll}>
          <path d="M2 5.5V2h3.5M10.5 2H14v3.5M14 10.5V14h-3.5M5.5 14H2v-3.5" />
        </SheetButton>
      )}
    </fieldset>
  );
}

type SheetButtonProps = { readonly label: string; readonly onPress: () => void; readonly children: ReactNode };

function SheetButton({ label, onPress, children }: SheetButtonProps) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      onClick={onPress}
      className="grid size-8 place-items-center text-ink hover:bg-shade active:bg-line pointer-coarse:size-10"
    >
      <svg
        aria-hidden="true"
        viewBox="0 0 16 16"
        className="size-3.5"
        fill="none"
        stroke="currentColor"
        strokeWidth={1.4}
      >
        {children}
      </svg>
    </button>
  );
}

const LONGEST_SCALE_PX = 132;
/** Width of a digit at the size of the scale's figures, a little over. */
const DIGIT_PX = 6.5;

type ScaleProps = { readonly map: MapLibreMap | null; readonly units: UnitSystem };

export function Scale({ map, units }: ScaleProps) {
  const view = useSheetView(map);
  return view === null ? null : <ScaleOf view={view} units={units} />;
}

function ScaleOf({ view, units }: { readonly view: SheetView; readonly units: UnitSystem }) {
  const { widthPx, figures, unit } = scaleBar(view, { mostPx: LONGEST_SCALE_PX, units });
  const [start, middle, end] = figures;
  const endPx = end.length * DIGIT_PX;
  const roomForMiddle = widthPx / 2 > (middle.length * DIGIT_PX + endPx) / 2 + 4;
  const wholePx = Math.ceil(widthPx + endPx / 2 + 24);
  return (
    <svg
      role="img"
      aria-label={`Scale: the bar is ${end} ${unit} long`}
      width={wholePx + 12}
      height={27}
      viewBox={`-12 -4 ${wholePx + 12} 27`}
      fontSize={11}
      textAnchor="middle"
      className="block bg-paper/85 fill-ink"
    >
      <g stroke="#f4f0e6" strokeWidth={3} strokeLinejoin="round" paintOrder="stroke">
        <text y={10}>{start}</text>
        {roomForMiddle && (
          <text x={widthPx / 2} y={10}>
            {middle}
          </text>
        )}
        <text x={widthPx} y={10}>
          {end}
        </text>
        <text x={widthPx + endPx / 2 + 3} y={10} textAnchor="start">
          {unit}
        </text>
      </g>
      <g className="stroke-ink" strokeWidth={0.75}>
        <rect y={14} width={widthPx / 2} height={4} />
        <rect x={widthPx / 2} y={14} width={widthPx / 2} height={4} className="fill-paper" />
      </g>
    </svg>
  );
}

export function Sources() {
  return (
    <p className="bg-paper/85 px-2 py-0.5 text-right text-[0.6875rem] leading-snug text-soft [&_a]:text-soft [&_a]:underline">
      Made with <Away to="https://www.naturalearthdata.com/">Natural Earth</Away>. Places:{' '}
      <Away to="https://www.geonames.org/">GeoNames</Away>,{' '}
      <Away to="https://creativecommons.org/licenses/by/4.0/">CC BY 4.0</Away>. Relief: ETOPO5,{' '}
      <Away to="https://www.ncei.noaa.gov/">NOAA</Away>
    </p>
  );
}

function Away({ to, children }: { readonly to: string; readonly children: string }) {
  return (
    <a href={to} target="_blank" rel="noreferrer">
      {children}
    </a>
  );
}

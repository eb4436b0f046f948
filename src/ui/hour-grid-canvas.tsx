import { type KeyboardEvent, type RefObject, useEffect, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { monthNames, monthStarts } from '../charts/calendar.ts';
import type { YearCloth } from '../charts/year-cloth.ts';

const HOURS = 24;

/** How large a cloth is to be drawn, in pixels of the screen. */
export interface ClothSize {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly threadPx: number;
}

interface HourGridCanvasProps {
  /** Days of the year, 365 or 366. */
  readonly days: number;
  readonly heightPx: number;
  /** The same as the picture, in a sentence. */
  readonly label: string;
  /** Must stay the same function while the picture does. */
  readonly draw: (size: ClothSize) => YearCloth;
  /** What an hour is, in words. */
  readonly read: (slot: number) => string;
  /** The hour that is in view elsewhere; marked. */
  readonly chosen?: number | null;
  /** Told which hour is read, so that more of it can be fetched; null: none. */
  readonly onRead?: (slot: number | null) => void;
  /** Called when an hour is pressed, or Enter is. */
  readonly onChoose?: (slot: number) => void;
}

interface Cell {
  readonly day: number;
  readonly hour: number;
}

/**
 * A year of hours on a canvas, with its months. The pointer or the arrow keys read an hour: arrows go by the hour and the
 * day, Page Up and Page Down by four weeks, Home and End to the year's first and last day.
 */
export function HourGridCanvas({
  days,
  heightPx,
  label,
  draw,
  read,
  chosen = null,
  onRead,
  onChoose,
}: HourGridCanvasProps) {
  const frame = useRef<HTMLDivElement>(null);
  const { widthPx, ratio } = useWidth(frame);
  const [cell, setRead] = useState<Cell | null>(null);
  const setCell = (next: Cell | null) => {
    setRead(next);
    onRead?.(next === null ? null : next.day * HOURS + next.hour);
  };
  const said = cell ? read(cell.day * HOURS + cell.hour) : null;
  const choose = () => {
    if (cell) onChoose?.(cell.day * HOURS + cell.hour);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const next = moved(cell ?? { day: 0, hour: 0 }, event.key, days);
    if (event.key === 'Escape') setCell(null);
    else if (event.key === 'Enter' && cell && onChoose) choose();
    else if (next) setCell(cell === null ? { day: 0, hour: 12 } : next);
    else return;
    event.preventDefault();
  };

  return (
    <div className="min-w-0">
      <div className="overflow-x-auto pb-0.5">
        <div className="grid min-w-[46rem] print:min-w-0 grid-cols-[1.5rem_minmax(0,1fr)]">
          <HourAxis />
          <div ref={frame} className="relative">
            <div
              role="slider"
              aria-label={label}
              aria-orientation="horizontal"
              aria-valuemin={1}
              aria-valuemax={days * HOURS}
              aria-valuenow={cell ? cell.day * HOURS + cell.hour + 1 : 1}
              aria-valuetext={said ?? `Arrow keys read single hours${onChoose ? ', Enter chooses one' : ''}.`}
              tabIndex={0}
              className={`relative focus-visible:-outline-offset-2 ${onChoose ? 'cursor-crosshair' : ''}`}
              onClick={choose}
              onKeyDown={onKeyDown}
              onBlur={() => setCell(null)}
              onPointerLeave={() => setCell(null)}
              onPointerMove={(event) => {
                const box = event.currentTarget.getBoundingClientRect();
                const day = Math.floor(((event.clientX - box.left) / box.width) * days);
                const hour = Math.floor(((event.clientY - box.top) / box.height) * HOURS);
                if (day >= 0 && day < days && hour >= 0 && hour < HOURS) setCell({ day, hour });
              }}
            >
              <Cloth draw={draw} widthPx={widthPx} heightPx={heightPx} ratio={ratio} />
              {chosen === null ? null : (
                <CellMark cell={{ day: Math.floor(chosen / HOURS), hour: chosen % HOURS }} days={days} />
              )}
              {cell ? <CellMark cell={cell} days={days} /> : null}
            </div>
            <MonthAxis days={days} />
          </div>
        </div>
      </div>
      <p aria-hidden="true" className="no-print min-h-5 pl-6 text-fine text-soft">
        {said ?? 'Point at an hour, or use the arrow keys, to read it.'}
      </p>
    </div>
  );
}

interface ClothProps {
  readonly draw: HourGridCanvasProps['draw'];
  readonly widthPx: number;
  readonly heightPx: number;
  /** Device pixels of one CSS pixel. */
  readonly ratio: number;
}

/** One pixel of the buffer for one of the screen, so that no thread is blurred. */
function Cloth({ draw, widthPx, heightPx, ratio }: ClothProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const picture = useMemo(
    () =>
      widthPx === 0
        ? null
        : draw({
            widthPx: Math.round(widthPx * ratio),
            heightPx: Math.round(heightPx * ratio),
            threadPx: Math.max(1, Math.round(ratio)),
          }),
    [draw, widthPx, heightPx, ratio],
  );
  // Before the screen is painted: setting its size empties a canvas.
  useLayoutEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!context || !picture) return;
    context.putImageData(new ImageData(picture.pixels, picture.widthPx, picture.heightPx), 0, 0);
  }, [picture]);
  return (
    <canvas
      ref={canvas}
      width={picture?.widthPx ?? 1}
      height={picture?.heightPx ?? 1}
      className="block w-full [image-rendering:pixelated]"
      style={{ height: heightPx }}
    />
  );
}

function CellMark({ cell, days }: { cell: Cell; days: number }) {
  return (
    <span
      aria-hidden="true"
      className="pointer-events-none absolute box-content border border-ink outline outline-paper"
      style={{
        left: `calc(${(100 * cell.day) / days}% - 1px)`,
        top: `calc(${(100 * cell.hour) / HOURS}% - 1px)`,
        width: `${100 / days}%`,
        height: `${100 / HOURS}%`,
      }}
    />
  );
}

/** The clock at the left: quarters of the day. */
function HourAxis() {
  return (
    <div aria-hidden="true" className="relative mb-5 text-fine text-soft">
      {[6, 12, 18].map((hour) => (
        <span
          key={hour}
          className="absolute right-1 -translate-y-1/2 leading-none"
          style={{ top: `${(100 * hour) / HOURS}%` }}
        >
          {String(hour).padStart(2, '0')}
        </span>
      ))}
    </div>
  );
}

function MonthAxis({ days }: { days: number }) {
  return (
    <div aria-hidden="true" className="relative h-5 text-fine text-soft">
      {monthStarts(days).map((start, month) => (
        <span
          key={monthNames[month]}
          className="absolute top-0 border-l border-[#b9af9b] pl-1 leading-5"
          style={{ left: `${(100 * start) / days}%` }}
        >
          {monthNames[month]}
        </span>
      ))}
    </div>
  );
}

function moved(cell: Cell, key: string, days: number): Cell | null {
  const held = (day: number, hour: number): Cell => ({
    day: Math.min(days - 1, Math.max(0, day)),
    hour: Math.min(HOURS - 1, Math.max(0, hour)),
  });
  switch (key) {
    case 'ArrowLeft':
      return held(cell.day - 1, cell.hour);
    case 'ArrowRight':
      return held(cell.day + 1, cell.hour);
    case 'ArrowUp':
      return held(cell.day, cell.hour - 1);
    case 'ArrowDown':
      return held(cell.day, cell.hour + 1);
    case 'PageUp':
      return held(cell.day - 28, cell.hour);
    case 'PageDown':
      return held(cell.day + 28, cell.hour);
    case 'Home':
      return held(0, cell.hour);
    case 'End':
      return held(days - 1, cell.hour);
    default:
      return null;
  }
}

function useWidth(element: RefObject<HTMLElement | null>): { widthPx: number; ratio: number } {
  const [size, setSize] = useState({ widthPx: 0, ratio: 1 });
  useEffect(() => {
    const watched = element.current;
    if (!watched) return;
    const measure = () => setSize({ widthPx: watched.clientWidth, ratio: window.devicePixelRatio });
    const observer = new ResizeObserver(measure);
    observer.observe(watched);
    measure();
    return () => observer.disconnect();
  }, [element]);
  return size;
}

import { type PointerEvent, type ReactNode, useRef, useState } from 'react';

export const sheetSteps = ['peek', 'half', 'full'] as const;
export type SheetStep = (typeof sheetSteps)[number];

/** Share of the space above the sheet's foot that each step takes; `peek` is a fixed height, see PEEK_PX. */
const SHARES: Readonly<Record<SheetStep, number>> = { peek: 0, half: 0.5, full: 0.92 };
export const PEEK_PX = 116;
const TAP_PX = 6;

const stepWords: Readonly<Record<SheetStep, string>> = { peek: 'low', half: 'half open', full: 'fully open' };

interface BottomSheetProps {
  readonly label: string;
  readonly step: SheetStep;
  readonly onStep: (step: SheetStep) => void;
  readonly children: ReactNode;
}

/**
 * Panels over the foot of a narrow screen, in three steps. The handle is a button (a press goes one step further and
 * round) that can also be dragged; arrow keys step it up and down, Escape lets it down.
 */
export function BottomSheet({ label, step, onStep, children }: BottomSheetProps) {
  const sheet = useRef<HTMLElement>(null);
  const drag = useRef<{ startY: number; startPx: number; roomPx: number } | null>(null);
  const dragged = useRef(false);
  const [draggedPx, setDraggedPx] = useState<number | null>(null);

  const start = (event: PointerEvent<HTMLButtonElement>) => {
    const element = sheet.current;
    const room = element?.parentElement?.clientHeight;
    if (!element || !room) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    drag.current = { startY: event.clientY, startPx: element.offsetHeight, roomPx: room };
    dragged.current = false;
  };
  const move = (event: PointerEvent<HTMLButtonElement>) => {
    if (!drag.current) return;
    const up = drag.current.startY - event.clientY;
    if (Math.abs(up) > TAP_PX) dragged.current = true;
    if (dragged.current)
      setDraggedPx(Math.min(drag.current.roomPx * SHARES.full, Math.max(PEEK_PX, drag.current.startPx + up)));
  };
  const end = () => {
    if (drag.current && draggedPx !== null) onStep(nearestStep(draggedPx, drag.current.roomPx));
    drag.current = null;
    setDraggedPx(null);
  };
  const go = (by: number) => {
    const next = sheetSteps[sheetSteps.indexOf(step) + by];
    if (next) onStep(next);
  };

  const height = draggedPx === null ? (step === 'peek' ? `${PEEK_PX}px` : `${SHARES[step] * 100}%`) : `${draggedPx}px`;
  return (
    <section
      ref={sheet}
      aria-label={label}
      className={`absolute inset-x-0 bottom-0 z-10 flex flex-col rounded-t-md border-t border-line bg-paper shadow-float ${
        draggedPx === null ? 'transition-[height] duration-200' : ''
      }`}
      style={{ height }}
    >
      <button
        type="button"
        className="flex h-7 w-full flex-none touch-none items-center justify-center"
        aria-label={`${label}: ${stepWords[step]}. Press to change.`}
        onPointerDown={start}
        onPointerMove={move}
        onPointerUp={end}
        onPointerCancel={end}
        onClick={() => {
          if (!dragged.current) onStep(step === 'full' ? 'peek' : (sheetSteps[sheetSteps.indexOf(step) + 1] ?? 'peek'));
          dragged.current = false;
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowUp') go(1);
          else if (event.key === 'ArrowDown') go(-1);
          else if (event.key === 'Escape') onStep('peek');
          else return;
          event.preventDefault();
        }}
      >
        <span aria-hidden="true" className="h-1 w-10 rounded-full bg-[#b9af9b]" />
      </button>
      <div className="min-h-0 flex-1 overflow-y-auto overscroll-contain px-4 pb-6">{children}</div>
    </section>
  );
}

/** The step whose height is nearest to where the sheet was let go. */
export function nearestStep(heightPx: number, roomPx: number): SheetStep {
  const heights = sheetSteps.map((step) => (step === 'peek' ? PEEK_PX : SHARES[step] * roomPx));
  const distances = heights.map((height) => Math.abs(height - heightPx));
  return sheetSteps[distances.indexOf(Math.min(...distances))] ?? 'half';
}

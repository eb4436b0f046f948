import { useCallback } from 'react';
import { dayLabel, hourLabel } from '../charts/calendar.ts';
import { daysOf, yearCloth } from '../charts/year-cloth.ts';
import { type HourClass, hourClasses } from '../engine/hour-classes/hour-class.ts';
import { type ClothSize, HourGridCanvas } from './hour-grid-canvas.tsx';

const HOURS = 24;

interface YearClothCanvasProps {
  /** One position in `hourClasses` for every slot. */
  readonly codes: Uint8Array;
  readonly heightPx: number;
  /** The same as the picture, in a sentence. */
  readonly label: string;
  readonly words: (hourClass: HourClass) => string;
  /** More than its class of an hour; null while that is not known. */
  readonly more?: (slot: number) => string | null;
  readonly onRead?: (slot: number | null) => void;
  readonly onChoose?: (slot: number) => void;
}

/** The year cloth of hour classes on its canvas. */
export function YearClothCanvas({ codes, heightPx, label, words, more, ...told }: YearClothCanvasProps) {
  const days = daysOf(codes);
  const draw = useCallback((size: ClothSize) => yearCloth({ codes, ...size }), [codes]);
  const read = (slot: number) => {
    const hourClass = hourClasses[codes[slot] ?? -1];
    const when = `${dayLabel(Math.floor(slot / HOURS), days)}, ${hourLabel((slot % HOURS) + 1)}`;
    return `${when}: ${more?.(slot) ?? (hourClass ? words(hourClass) : 'No data')}`;
  };
  return <HourGridCanvas days={days} heightPx={heightPx} label={label} draw={draw} read={read} {...told} />;
}

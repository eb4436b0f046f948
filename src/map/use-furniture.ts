import { type RefObject, useCallback, useEffect, useState } from 'react';

/** A rectangle of the map's frame, px from its top left corner. */
export interface Furniture {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Where buttons, legend, scale and sources stand over the map (`data-furniture`): names are kept out from under them. */
export function useFurniture(frame: RefObject<HTMLElement | null>): readonly Furniture[] {
  const [found, setFound] = useState<readonly Furniture[]>([]);
  const measure = useCallback(() => {
    const next = frame.current === null ? [] : furnitureIn(frame.current);
    setFound((held) => (JSON.stringify(held) === JSON.stringify(next) ? held : next));
  }, [frame]);
  useEffect(() => {
    if (frame.current === null) return;
    const observer = new ResizeObserver(measure);
    observer.observe(frame.current);
    return () => observer.disconnect();
  }, [frame, measure]);
  // What stands there may have another size after any rendering.
  useEffect(measure);
  return found;
}

function furnitureIn(frame: HTMLElement): Furniture[] {
  const { left, top } = frame.getBoundingClientRect();
  return [...frame.querySelectorAll('[data-furniture]')]
    .map((element) => element.getBoundingClientRect())
    .filter(({ width, height }) => width > 0 && height > 0)
    .map((box) => ({
      left: Math.round(box.left - left),
      top: Math.round(box.top - top),
      width: Math.ceil(box.width),
      height: Math.ceil(box.height),
    }));
}

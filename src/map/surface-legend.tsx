import { useId } from 'react';
import type { LeaveOneOutError } from '../contract/surface.ts';
import { number } from '../lib/format.ts';

interface SurfaceLegendProps {
  readonly isOn: boolean;
  readonly onSwitch: (isOn: boolean) => void;
  /** Why there is no surface, or that it could not be had. */
  readonly note: string | null;
  /** Of the score, points; null without a surface. */
  readonly error: LeaveOneOutError | null;
  readonly isPending: boolean;
}

/** The switch of the surface between stations, and how far it is to be believed. */
export function SurfaceLegend({ isOn, onSwitch, note, error, isPending }: SurfaceLegendProps) {
  const id = useId();
  return (
    <div className="mt-1.5 border-t border-line pt-1.5 text-[0.6875rem] leading-snug">
      <label htmlFor={id} className="flex cursor-pointer items-center gap-1.5 text-fine pointer-coarse:min-h-9">
        <input
          id={id}
          type="checkbox"
          checked={isOn}
          onChange={({ currentTarget }) => onSwitch(currentTarget.checked)}
          aria-describedby={`${id}-note`}
          className="accent-ink"
        />
        Between stations
      </label>
      <p id={`${id}-note`} className="text-soft" aria-live="polite">
        {isOn ? words({ note, error, isPending }) : null}
      </p>
    </div>
  );
}

function words({ note, error, isPending }: Pick<SurfaceLegendProps, 'note' | 'error' | 'isPending'>): string | null {
  if (note !== null) return note;
  if (isPending) return 'The surface is being made.';
  if (error === null) return null;
  return `Estimates. Loose weave: over 50 km or 150 m of height from a station. Leave-one-out error: ${number(error.rootMeanSquare, error.rootMeanSquare < 10 ? 1 : 0)} points.`;
}

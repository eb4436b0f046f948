interface ProgressProps {
  /** What is under way, read out with the figure. */
  readonly label: string;
  /** 0 to 1; null while it is not known. */
  readonly share: number | null;
}

/** A thin bar of work done. The words and figures stand beside it, written by whoever shows it. */
export function Progress({ label, share }: ProgressProps) {
  const held = share === null ? null : Math.min(1, Math.max(0, share));
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={held === null ? undefined : Math.round(held * 100)}
      className="h-1 w-full overflow-hidden rounded-sm bg-line"
    >
      <div
        className={`h-full origin-left bg-indigo transition-transform duration-150 ${held === null ? 'animate-pulse' : ''}`}
        style={{ transform: `scaleX(${held ?? 1})` }}
      />
    </div>
  );
}

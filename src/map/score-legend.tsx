import { RAMP_GRADIENT, rampColour } from '../charts/ramp.ts';
import type { MapStation } from '../contract/programme-map.ts';
import { SCORE_LIMITS, scoreCounts } from './score-counts.ts';

type LegendProps = {
  readonly stations: readonly Pick<MapStation, 'score' | 'grade'>[];
};

/** What the colours of the stations mean: the ramp with its limits and unit, and how many stations fall in each class. */
export function ScoreLegend({ stations }: LegendProps) {
  const counts = scoreCounts(stations);
  return (
    <section aria-label="Legend" className="text-ink">
      <header className="flex items-baseline justify-between gap-3">
        <h3 className="serif text-lead text-ink">Score</h3>
        <p className="text-[0.6875rem] text-soft">points of 100</p>
      </header>
      <ClassRow counts={counts.classes} />
      <ul className="mt-1.5 grid gap-0.5 text-[0.6875rem] leading-snug text-soft">
        <KeyRow count={counts.gradeD} mark="hatched">
          Grade D, not ranked
        </KeyRow>
        <KeyRow count={counts.noScore} mark="hollow">
          No score
        </KeyRow>
      </ul>
    </section>
  );
}

function ClassRow({ counts }: { readonly counts: readonly number[] }) {
  return (
    <>
      <div aria-hidden="true" className="mt-1.5 h-3 border border-ink/70" style={{ backgroundImage: RAMP_GRADIENT }} />
      <div aria-hidden="true" className="relative mt-0.5 flex justify-between text-[0.6875rem] text-ink tabular-nums">
        {SCORE_LIMITS.map((limit) => (
          <span key={limit} className="w-0 flex justify-center">
            {limit}
          </span>
        ))}
      </div>
      <ul className="flex text-center text-[0.6875rem] text-soft tabular-nums">
        {counts.map((count, index) => (
          <li key={SCORE_LIMITS[index]} className="flex-1 basis-0">
            <span className="sr-only">
              {SCORE_LIMITS[index]} to {SCORE_LIMITS[index + 1]} points:{' '}
            </span>
            {count}
            <span className="sr-only">{count === 1 ? ' station' : ' stations'}</span>
          </li>
        ))}
      </ul>
    </>
  );
}

type KeyRowProps = { readonly count: number; readonly mark: 'hatched' | 'hollow'; readonly children: string };

function KeyRow({ count, mark, children }: KeyRowProps) {
  if (count === 0) return null;
  return (
    <li className="flex items-center gap-1.5">
      <svg
        aria-hidden="true"
        viewBox="0 0 16 15"
        className="h-3 w-[0.8rem] shrink-0 text-ink"
        stroke="currentColor"
        fill="none"
      >
        <path d="M8 1.5 15 13.5H1Z" strokeWidth={1.4} fill={mark === 'hatched' ? rampColour(0.4) : 'none'} />
        {mark === 'hatched' && <path d="M8.5 4 3 12.8M10.8 7.3 7 13.2M12.8 10.7 11.2 13.2" strokeWidth={1} />}
      </svg>
      <span>{children}</span>
      <span className="ml-auto text-ink tabular-nums">{count}</span>
    </li>
  );
}

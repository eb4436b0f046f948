import { classCounts, type LayerScale } from '../charts/layer-scale.ts';
import { RAMP_GRADIENT } from '../charts/ramp.ts';
import { number } from '../lib/format.ts';

export interface LegendPlace {
  readonly value: number | null;
  readonly grade: 'A' | 'B' | 'C' | 'D';
}

interface LegendProps {
  readonly title: string;
  readonly unit: string;
  readonly scale: LayerScale;
  /** Every place of the map with its figure of the layer. */
  readonly places: readonly LegendPlace[];
  /** What stands at the limits; by default the figures themselves. */
  readonly limitWords?: (limit: number) => string;
  /** What each class is called, where it is a thing and no span of figures. */
  readonly classNames?: readonly string[];
  /** Said of places without a figure. */
  readonly noneWords: string;
}

/** What the colours of the marks mean: the scale with its limits and unit, and how many places fall in each class. */
export function LayerLegend({ title, unit, scale, places, limitWords = plain, classNames, noneWords }: LegendProps) {
  const counts = classCounts(
    scale,
    places.map(({ value }) => value),
  );
  const gradeD = places.filter(({ grade }) => grade === 'D').length;
  const classWords = (index: number) =>
    classNames?.[index] ?? spanWords(scale.limits[index] ?? 0, scale.limits[index + 1] ?? 0, { limitWords, unit });
  return (
    <section aria-label="Legend" className="text-ink">
      <h3 className="mt-1 text-right text-[0.6875rem] leading-tight font-normal">
        <span className="sr-only">{title}, </span>
        {unit}
      </h3>
      <Bar scale={scale} />
      {classNames === undefined ? <Limits limits={scale.limits} words={limitWords} /> : null}
      <ul className="flex text-center text-[0.6875rem] text-soft tabular-nums">
        {counts.classes.map((count, index) => (
          <li key={classWords(index)} className="flex-1 basis-0">
            {classNames === undefined ? null : (
              <span aria-hidden="true" className="block text-fine text-ink">
                {classNames[index]}
              </span>
            )}
            <span className="sr-only">{classWords(index)}: </span>
            {number(count)}
            <span className="sr-only">{count === 1 ? ' place' : ' places'}</span>
          </li>
        ))}
      </ul>
      <ul className="mt-1 grid gap-0.5 text-[0.6875rem] leading-snug text-soft">
        <KeyRow count={gradeD} mark="hatched">
          Grade D, not ranked
        </KeyRow>
        <KeyRow count={counts.none} mark="hollow">
          {noneWords}
        </KeyRow>
      </ul>
    </section>
  );
}

function plain(limit: number): string {
  return number(limit, Number.isInteger(limit) ? 0 : 1);
}

interface SpanWords {
  readonly limitWords: (limit: number) => string;
  readonly unit: string;
}

function spanWords(from: number, to: number, { limitWords, unit }: SpanWords): string {
  if (from === Number.NEGATIVE_INFINITY) return `under ${limitWords(to)} ${unit}`;
  if (to === Number.POSITIVE_INFINITY) return `${limitWords(from)} ${unit} and over`;
  return `${limitWords(from)} to ${limitWords(to)} ${unit}`;
}

function Bar({ scale }: { readonly scale: LayerScale }) {
  if (scale.isRamp) {
    return (
      <div aria-hidden="true" className="mt-0.5 h-3 border border-ink/70" style={{ backgroundImage: RAMP_GRADIENT }} />
    );
  }
  return (
    <div aria-hidden="true" className="mt-0.5 flex h-3 divide-x divide-paper border border-ink/70">
      {scale.colours.map((colour) => (
        <span key={colour} className="flex-1" style={{ backgroundColor: colour }} />
      ))}
    </div>
  );
}

function Limits({ limits, words }: { readonly limits: readonly number[]; readonly words: (limit: number) => string }) {
  return (
    <div aria-hidden="true" className="mt-0.5 flex justify-between text-[0.6875rem] text-ink tabular-nums">
      {limits.map((limit) => (
        <span key={limit} className="flex w-0 justify-center">
          {Number.isFinite(limit) ? words(limit) : ''}
        </span>
      ))}
    </div>
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
        <path d="M8 1.5 15 13.5H1Z" strokeWidth={1.4} />
        {mark === 'hatched' && <path d="M8.5 4 3 12.8M10.8 7.3 7 13.2M12.8 10.7 11.2 13.2" strokeWidth={1} />}
      </svg>
      <span>{children}</span>
      <span className="ml-auto text-ink tabular-nums">{number(count)}</span>
    </li>
  );
}

import { rampColour } from './ramp.ts';
import type { Sequence } from './sequences.ts';

/** How a layer's figures become colours and classes. A class holds its lower limit, the last one both. */
export interface LayerScale {
  /** One more than there are classes, rising. */
  readonly limits: readonly number[];
  /** The ramp runs on within a class; a flat sequence has one colour for each. */
  readonly isRamp: boolean;
  /** The colour of each class; of a ramp the one in its middle. */
  readonly colours: readonly string[];
}

/** The ramp over so many equal classes from 0 to `most`. */
export function rampScale(most: number, classes = 5): LayerScale {
  const limits = Array.from({ length: classes + 1 }, (_, index) => (most * index) / classes);
  const colours = limits.slice(1).map((_, index) => rampColour((index + 0.5) / classes));
  return { limits, isRamp: true, colours };
}

/** A flat sequence: one colour between each limit and the next. @throws RangeError when there are not six classes */
export function flatScale(limits: readonly number[], colours: Sequence): LayerScale {
  if (limits.length !== colours.length + 1) throw new RangeError('A flat sequence needs seven limits.');
  return { limits, isRamp: false, colours };
}

/** Which class a figure falls in; figures outside are held to the ends. */
export function classOf({ limits }: LayerScale, value: number): number {
  const last = limits.length - 2;
  return Math.min(
    last,
    Math.max(
      0,
      limits.findLastIndex((limit) => limit <= value),
    ),
  );
}

export function colourOf(scale: LayerScale, value: number): string {
  if (!scale.isRamp) return scale.colours[classOf(scale, value)] ?? '';
  const most = scale.limits.at(-1) ?? 1;
  return rampColour(most === 0 ? 0 : value / most);
}

/** How many figures fall in each class, and how many places have none. */
export function classCounts(
  scale: LayerScale,
  values: Iterable<number | null>,
): { readonly classes: readonly number[]; readonly none: number } {
  const classes = scale.colours.map(() => 0);
  let none = 0;
  for (const value of values) {
    if (value === null) none += 1;
    else {
      const index = classOf(scale, value);
      classes[index] = (classes[index] ?? 0) + 1;
    }
  }
  return { classes, none };
}

/** The least of 1, 2, 2.5 and 5 times a power of ten, five times over, that is not under `most`: the top of a scale of five classes. */
export function roundTop(most: number): number {
  if (!(most > 0)) return 5;
  const size = 10 ** Math.floor(Math.log10(most / 5));
  const step = [1, 2, 2.5, 5, 10].find((each) => each * size * 5 >= most) ?? 10;
  return step * size * 5;
}

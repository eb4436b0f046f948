import type { HourClass } from '../engine/hour-classes/hour-class.ts';
import { ClassFill, classFillId } from './class-fill.tsx';
import { metClasses, unmetClasses } from './hour-class-colours.ts';

/** Classes of hours with demand in the order of the bar: met, frozen, not met. */
export const barOrder: readonly HourClass[] = [...metClasses, 'frozen', ...unmetClasses];

export interface LedgerBarProps {
  /** Unique in the page: names the fills. */
  readonly id: string;
  readonly classes: Readonly<Record<HourClass, number>>;
  readonly demand: number;
  readonly heightPx?: number;
  /** The same as the picture, in a sentence. */
  readonly label: string;
}

/** Hours with demand as one bar, each class as long as its share. Empty when nothing was asked of the place. */
export function LedgerBar({ id, classes, demand, heightPx = 18, label }: LedgerBarProps) {
  const shown = demand > 0 ? barOrder.filter((hourClass) => classes[hourClass] > 0) : [];
  let before = 0;
  const bars = shown.map((hourClass) => {
    const start = before;
    before += classes[hourClass];
    return { hourClass, x: (100 * start) / demand, width: (100 * classes[hourClass]) / demand };
  });
  return (
    <svg width="100%" height={heightPx} role="img" aria-label={label} style={{ display: 'block' }}>
      <defs>
        {shown.map((hourClass) => (
          <ClassFill key={hourClass} hourClass={hourClass} id={id} />
        ))}
      </defs>
      {bars.map(({ hourClass, x, width }) => (
        <rect key={hourClass} x={`${x}%`} width={`${width}%`} height={heightPx} fill={classFillId(id, hourClass)} />
      ))}
      {bars.slice(1).map(({ hourClass, x }) => (
        <line key={hourClass} x1={`${x}%`} x2={`${x}%`} y1="0" y2={heightPx} stroke="#fbf9f3" />
      ))}
      <rect width="100%" height={heightPx} fill="none" stroke="#22302f" strokeWidth="1.5" />
    </svg>
  );
}

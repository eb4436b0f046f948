import type { HourClass } from '../engine/hour-classes/hour-class.ts';
import { ClassFill, classFillId } from './class-fill.tsx';

/** A small square of the class's weave, for legends and tables. The word beside it says what it is. */
export function ClassSwatch({ hourClass, id }: { hourClass: HourClass; id: string }) {
  return (
    <svg width="12" height="12" aria-hidden="true" focusable="false" style={{ flex: 'none', display: 'block' }}>
      <defs>
        <ClassFill hourClass={hourClass} id={id} />
      </defs>
      <rect
        x="0.5"
        y="0.5"
        width="11"
        height="11"
        fill={classFillId(id, hourClass)}
        stroke="#22302f"
        strokeOpacity="0.35"
      />
    </svg>
  );
}

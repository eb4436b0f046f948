import type { HourClass } from '../engine/hour-classes/hour-class.ts';
import { classPaint, isThread, WEAVE_REPEAT } from './hour-class-colours.ts';

/** The fill of a class inside one picture: its weave as an SVG pattern, thread for thread that of the year cloth. */
export function ClassFill({ hourClass, id }: { hourClass: HourClass; id: string }) {
  const { base, thread, weave } = classPaint[hourClass];
  const threads: string[] = [];
  for (let y = 0; y < WEAVE_REPEAT; y += 1) {
    for (let x = 0; x < WEAVE_REPEAT; x += 1) if (isThread(weave, { x, y })) threads.push(`M${x} ${y}h1v1h-1z`);
  }
  return (
    <pattern id={`${id}-${hourClass}`} width={WEAVE_REPEAT} height={WEAVE_REPEAT} patternUnits="userSpaceOnUse">
      <rect width={WEAVE_REPEAT} height={WEAVE_REPEAT} fill={base} />
      {threads.length > 0 ? <path d={threads.join('')} fill={thread} shapeRendering="crispEdges" /> : null}
    </pattern>
  );
}

/** What to give as `fill` in a picture that holds the class's `ClassFill` under the same id. */
export function classFillId(id: string, hourClass: HourClass): string {
  return `url(#${id}-${hourClass})`;
}

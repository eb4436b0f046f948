import type { BriefPreview } from '../../contract/briefs.ts';

/** The two sides of a table of the effect: the draft, and the saved version that it is held against. */
export interface EffectSides {
  readonly now: BriefPreview;
  readonly before: BriefPreview | undefined;
  readonly savedVersion: number;
}

/** Classes of the cells of such a table. */
export const head = 'text-left font-normal text-soft align-bottom';
export const headRight = 'pl-2 text-right font-normal text-soft align-bottom';
export const figure = 'pl-2 text-right whitespace-nowrap align-bottom';

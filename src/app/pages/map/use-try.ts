import type { TurningChange } from '../../../contract/place-doubts.ts';
import { changed } from '../../../features/runs/live-parameters.ts';
import type { LiveDraftState } from './use-live-draft.ts';

/** Puts a change that would turn a verdict on its slider, so that the whole map shows what it does. */
export function useTry({ parameters, draft, change }: LiveDraftState) {
  return ({ path, to }: TurningChange): (() => void) | null => {
    const parameter = parameters.find((each) => each.path === path);
    if (parameter === undefined || to === null) return null;
    return () => change(changed(draft, parameter, to), true);
  };
}
